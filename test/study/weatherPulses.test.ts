import { describe, expect, it } from 'vitest'
import { parseStudy, rangeSegments, type StudyDoc, settle } from '../../core/index.ts'
import { minimal, withValue } from './fixture.ts'

const settled = (...values: [path: string, value: unknown][]) =>
  settle(values.reduce<unknown>((doc, [path, value]) => withValue(path, value, doc), minimal()) as StudyDoc)
const used = (s: ReturnType<typeof settled>) => Object.fromEntries(s.defaults.map((d) => [d.path, d.value]))
const refusal = (path: string, value: unknown, more: [string, unknown][] = []): string => {
  try {
    settled(...more, [path, value])
    return 'accepted'
  } catch (error) {
    return (error as Error).message
  }
}

describe('weather of a study', () => {
  it('rain top and extent are defaults only where it rains; the tide is 0', () => {
    const dry = settled()
    expect(dry.atmosphere).toMatchObject({ rainTopM: 4000, rainExtentM: 15_000, tideM: 0 })
    expect(used(dry)).toMatchObject({ 'atmosphere.tideM': 0 })
    expect(used(dry)).not.toHaveProperty('atmosphere.rainTopM')
    const wet = settled(['atmosphere.rainRateMmH', 4], ['atmosphere.rainExtentM', 30_000], ['atmosphere.tideM', -2])
    expect(wet.atmosphere).toMatchObject({ rainTopM: 4000, rainExtentM: 30_000, tideM: -2 })
    expect(used(wet)).toMatchObject({ 'atmosphere.rainTopM': 4000 })
    expect(used(wet)).not.toHaveProperty('atmosphere.rainExtentM')
  })

  it('circular polarisation takes 15 dB off rain and 3 dB off targets unless the radar says otherwise', () => {
    expect(settled(['radar.polarisation', 'H']).radar.circular).toBeUndefined()
    const plain = settled(['radar.polarisation', 'circular'])
    expect(plain.radar.circular).toEqual({ rainLossDb: 15, targetLossDb: 3 })
    expect(used(plain)).toMatchObject({ 'radar.circular.rainLossDb': 15, 'radar.circular.targetLossDb': 3 })
    const own = settled(['radar.polarisation', 'circular'], ['radar.circular.rainLossDb', 22])
    expect(own.radar.circular).toEqual({ rainLossDb: 22, targetLossDb: 3 })
  })

  it('dwells needed: all of the PRFs unless said, only where PRFs change from dwell to dwell, never more than there are', () => {
    const rates: [string, unknown] = ['radar.prfHz', [900, 1100, 1000]]
    const dwell: [string, unknown] = ['radar.prfMode', 'dwellStagger']
    expect(settled(rates, dwell).radar.dwellsNeeded).toBe(3)
    expect(used(settled(rates, dwell))).toMatchObject({ 'radar.dwellsNeeded': 3 })
    expect(settled(rates, dwell, ['radar.dwellsNeeded', 2]).radar.dwellsNeeded).toBe(2)
    expect(settled().radar.dwellsNeeded).toBeUndefined()
    expect(refusal('radar.dwellsNeeded', 4, [rates, dwell])).toContain('4 of 3 PRFs')
    expect(refusal('radar.dwellsNeeded', 1)).toContain('dwellStagger')
  })

  it('folded clutter is looked for out to c/2f of the lowest PRF and the instrumented range', () => {
    expect(settled(['radar.instrumentedRangeM', 60_000]).foldRangeM).toBeCloseTo(299_792_458 / 1800 + 60_000, 6)
    expect(settled(['run.foldRangeM', 250_000]).foldRangeM).toBe(250_000)
  })

  it('keys of weather and folding are known', () => {
    const { warnings } = parseStudy(
      JSON.stringify(withValue('run.foldRangeM', 1e5, withValue('atmosphere.tideM', 1, withValue('radar.circular.rainLossDb', 12)))),
      's.json',
    )
    expect(warnings.join()).not.toMatch(/tideM|foldRangeM|circular/)
  })
})

describe('pulses and beams of a study', () => {
  const pulses = [
    { widthS: 1e-6, fromRangeM: 0, toRangeM: 8_000 },
    { widthS: 30e-6, compressedWidthS: 0.5e-6, fromRangeM: 8_000, toRangeM: 100_000, rangeSidelobeDb: -40 },
  ]
  const beams = [{ name: 'low' }, { name: 'high', gainDbi: 32, offsetDeg: 3.5 }]
  const beamSwitch = [
    { fromRangeM: 0, toRangeM: 15_000, transmit: 'low', receive: 'high' },
    { fromRangeM: 15_000, toRangeM: 2e5, transmit: 'low', receive: 'low' },
  ]

  it('are settled with their defaults and split the range', () => {
    const { radar, run } = settled(['radar.pulses', pulses], ['radar.beams', beams], ['radar.beamSwitch', beamSwitch])
    expect(radar.pulses?.[0]).toMatchObject({ compressedWidthS: 1e-6, noiseBandwidthHz: 1e6, rangeSidelobeDb: null })
    expect(radar.beams?.[0]).toMatchObject({ gainDbi: 33, offsetDeg: 0, elevationPattern: 'gaussian' })
    expect(rangeSegments(radar).map((s) => [s.fromM, s.toM, s.beams])).toEqual([
      [0, 8_000, 'low, high'],
      [8_000, 15_000, 'low, high'],
      [15_000, 100_000, 'low'],
    ])
    // the shortest gate, 75 m, sets the step
    expect(run.rangeStepM).toBeCloseTo((299_792_458 * 0.5e-6) / 4, 6)
  })

  it.each<[string, unknown, RegExp, [string, unknown][]?]>([
    ['radar.pulses', [pulses[0], { ...pulses[1], fromRangeM: 7_000 }], /overlap at 7000 m/],
    ['radar.pulses', [{ ...pulses[0], toRangeM: 0.5, fromRangeM: 1 }], /ends at 0\.5 m/],
    ['radar.pulses', [{ ...pulses[0], compressedWidthS: 2e-6 }], /longer than the pulse/],
    ['radar.pulses', [{ ...pulses[0], noiseBandwidthHz: 5e6 }], /outside 0\.5 to 2/],
    ['radar.beams', beams, /without the ranges/],
    ['radar.beamSwitch', beamSwitch, /beam "low" is not in radar\.beams/],
    ['radar.beamSwitch', [{ ...beamSwitch[0], receive: 'hihg' }], /use low or high/, [['radar.beams', beams]]],
    ['radar.beams', [beams[0], beams[0]], /listed twice/, [['radar.beamSwitch', beamSwitch]]],
    ['run.rangeStepM', 80, /over the range gate/, [['radar.pulses', pulses]]],
  ])('%s %j is refused', (path, value, sentence, more = []) => expect(refusal(path, value, more)).toMatch(sentence))
})
