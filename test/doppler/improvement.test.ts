import { describe, expect, it } from 'vitest'
import {
  blindSpeedMs,
  type ClutterMotion,
  cancellerImprovementDb,
  cancellerResponse,
  combineLimitsDb,
  type GroundCode,
  improvementDb,
  quantisationLimitDb,
  type RadarInput,
  scanningCorrelation,
  staggeredImprovementDb,
  suppressionBy,
  toDb,
  velocityResponse,
} from '../../core/index.ts'
import { sBandRadar } from '../radar/testRadar.ts'

const motion = (windMs: number): ClutterMotion => ({ windMs, seaSpreadMs: null, seaMeanMs: null, rainSpreadMs: null, rainMeanMs: null })
const codes = (['forest', 'open', 'urban', 'water'] as const).map(
  (terrain): GroundCode => ({ terrain, coverHeightM: 0, sourceClass: null, mark: null }),
)
type Over = Partial<Omit<RadarInput, 'antenna' | 'suppression'>> & { suppression?: Partial<RadarInput['suppression']> }
const radar = (over: Over = {}): RadarInput =>
  sBandRadar({
    ...over,
    suppression: { kind: 'canceller', statedDb: 0, pulses: 3, stabilityLimitDb: null, bits: null, ...over.suppression },
  })
const of = (r: RadarInput, about: string, windMs = 8): number =>
  suppressionBy(r, motion(windMs), codes).rows.find((x) => x.about === about)!.improvementDb

describe('improvement factor by kind of clutter', () => {
  it('open ground and towns: scanning alone, n⁴/3.844 for three pulses', () => {
    const hits = 1300 / 72
    expect(of(radar(), 'open')).toBeCloseTo(toDb(hits ** 4 / 3.844), 0)
    expect(of(radar(), 'urban')).toBe(of(radar(), 'open'))
    expect(of(radar({ suppression: { pulses: 2 } }), 'open')).toBeCloseTo(toDb(hits ** 2 / 1.386), 0)
    expect(of(radar({ suppression: { pulses: 1 } }), 'open')).toBe(0)
  })

  it('trees in wind cost more as it blows harder; sea and rain move most', () => {
    const four = radar({ suppression: { pulses: 4 }, rotationRpm: 4 })
    expect(of(four, 'forest', 3)).toBeLessThan(of(four, 'open'))
    expect(of(four, 'forest', 10)).toBeLessThan(of(four, 'forest', 3) - 2)
    expect(of(four, 'water', 10)).toBeLessThan(of(four, 'forest', 10))
    expect(of(four, 'rain', 10)).toBeLessThan(of(four, 'water', 10))
  })

  it('equipment limits combine as 1/I', () => {
    const free = of(radar(), 'open')
    const limited = of(radar({ suppression: { stabilityLimitDb: 40, bits: 8 } }), 'open')
    expect(limited).toBeCloseTo(combineLimitsDb([free, 40, quantisationLimitDb(8)]), 9)
    expect(limited).toBeLessThan(40)
  })

  it('stated and none are one value for every kind', () => {
    expect(suppressionBy(radar({ suppression: { kind: 'stated', statedDb: 32 } }), motion(8), codes).uniformDb).toBe(32)
    expect(suppressionBy(radar({ suppression: { kind: 'none' } }), motion(8), codes).uniformDb).toBe(0)
    const by = suppressionBy(radar(), motion(8), codes)
    expect(by.uniformDb).toBeNull()
    expect(improvementDb(by, codes).byCode).toEqual(codes.map((c) => of(radar(), c.terrain)))
  })

  it('clutter of an earlier pulse is suppressed only at a constant PRF with a coherent transmitter', () => {
    expect(of(radar(), 'folded')).toBeCloseTo(of(radar(), 'water'), 9)
    expect(of(radar({ coherentTransmitter: false }), 'folded')).toBe(0)
    expect(of(radar({ prfHz: [1000, 1100], prfMode: 'pulseStagger' }), 'folded')).toBe(0)
    expect(of(radar({ prfHz: [1000, 1100], prfMode: 'dwellStagger' }), 'folded')).toBeGreaterThan(20)
    expect(
      suppressionBy(radar({ coherentTransmitter: false, suppression: { kind: 'stated', statedDb: 30 } }), motion(8), codes).uniformDb,
    ).toBeNull()
  })

  it('staggered pulses: the constant interval is a special case, unequal intervals cost improvement', () => {
    const scan = scanningCorrelation(18, 1000)
    expect(staggeredImprovementDb(3, scan, [1e-3])).toBeCloseTo(cancellerImprovementDb(3, scan, 1e-3), 9)
    expect(staggeredImprovementDb(3, scan, [1e-3, 1e-3])).toBeCloseTo(cancellerImprovementDb(3, scan, 1e-3), 9)
    expect(staggeredImprovementDb(3, scan, [0.9e-3, 1.1e-3])).toBeLessThan(cancellerImprovementDb(3, scan, 1e-3) - 3)
  })

  it('a bank: uniform filters gain their number over noise, a window less; more filters suppress more', () => {
    const bank = (pulses: number, window: 'uniform' | 'hamming') =>
      suppressionBy(radar({ suppression: { kind: 'filterBank', pulses, window } }), motion(8), codes)
    expect(bank(8, 'uniform').noiseGain).toBeCloseTo(8, 9)
    expect(bank(8, 'hamming').noiseGain).toBeGreaterThan(4)
    expect(bank(8, 'hamming').noiseGain).toBeLessThan(8)
    const open = (b: ReturnType<typeof bank>) => b.rows.find((x) => x.about === 'open')!.improvementDb
    expect(open(bank(16, 'hamming'))).toBeGreaterThan(open(bank(8, 'hamming')) + 2)
    expect(open(bank(8, 'hamming'))).toBeGreaterThan(open(bank(8, 'uniform')))
  })
})

describe('response to a velocity', () => {
  const blind = blindSpeedMs(2.8e9, 1000)
  it('a canceller: nothing at 0 and at blind speeds, mean 1 over a blind interval', () => {
    const respond = velocityResponse(radar())
    for (const v of [0, blind, 2 * blind]) expect(respond(v)).toBeLessThan(1e-9)
    let sum = 0
    for (let n = 0; n < 1000; n++) sum += respond((n * blind) / 1000)
    expect(sum / 1000).toBeCloseTo(1, 6)
  })
  it('pulse stagger fills the blind speed of the mean PRF; in dwell stagger each dwell has to see the target', () => {
    const prfHz = [900, 1100]
    const pulse = velocityResponse(radar({ prfHz, prfMode: 'pulseStagger' }))
    const dwell = velocityResponse(radar({ prfHz, prfMode: 'dwellStagger' }))
    const meanBlind = blindSpeedMs(2.8e9, 2 / (1 / 900 + 1 / 1100))
    expect(pulse(meanBlind)).toBeGreaterThan(0.1)
    expect(dwell(blindSpeedMs(2.8e9, 900))).toBeLessThan(1e-9)
    expect(cancellerResponse(3, [1 / 1100], blindSpeedMs(2.8e9, 900), 299_792_458 / 2.8e9)).toBeGreaterThan(0.1)
    const by = suppressionBy(radar({ prfHz: [1000, 1250], prfMode: 'pulseStagger' }), motion(8), codes)
    // 1 000 and 800 µs are 5 : 4, first blind speed 4.5 times that of the mean interval of 900 µs
    expect(by.blindSpeedsMs[0]).toBeCloseTo(4.5 * blindSpeedMs(2.8e9, 1 / 900e-6), 6)
  })
  it('stated suppression has no response of its own', () => {
    expect(velocityResponse(radar({ suppression: { kind: 'stated', statedDb: 30 } }))(blind)).toBe(1)
  })
})
