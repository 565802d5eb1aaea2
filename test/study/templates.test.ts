import { describe, expect, it } from 'vitest'
import {
  checkDoc,
  needsOfSet,
  newStudy,
  RADAR_TEMPLATES,
  radarOfTemplate,
  STARTING_SETS,
  type StudyDoc,
  settle,
  withoutOrigin,
} from '../../core/index.ts'

const withRadar = (id: string): StudyDoc => ({ ...newStudy('Moor'), radar: radarOfTemplate(id) })
/** What a template leaves for the user: its source does not give it. */
const LEFT: Record<string, string[]> = {
  T3: ['radar.antenna.gainDbi', 'radar.peakPowerW'],
  V2: ['radar.antenna.gainDbi', 'radar.peakPowerW', 'radar.pulseWidthS'],
  D1: ['radar.pulseWidthS'],
}

describe('radar templates', () => {
  it.each(RADAR_TEMPLATES.map((t) => t.id))('%s runs but for what its source leaves open', (id) => {
    const { problems, warnings } = checkDoc(withRadar(id))
    expect([...new Set(problems.map((p) => p.path))].sort()).toEqual(LEFT[id] ?? [])
    expect(warnings).toEqual([])
  })
  it('a rate that is not given is asked for once the rest stands', () => {
    const doc = withRadar('D1')
    const problems = checkDoc({ ...doc, radar: { ...doc.radar, pulseWidthS: 1e-3 } }).problems
    expect(problems.map((p) => p.path)).toEqual(['radar.prfHz'])
  })
  it('every value of the radar has its origin, and every origin its value', () => {
    for (const t of RADAR_TEMPLATES) {
      const { origins, name, ...radar } = radarOfTemplate(t.id)
      const paths = (part: object, at = ''): string[] =>
        Object.entries(part).flatMap(([k, v]) =>
          v !== null && typeof v === 'object' && !Array.isArray(v)
            ? paths(v, `${at}${k}.`)
            : Array.isArray(v) && v.length === 0
              ? []
              : [at + k],
        )
      expect(paths(radar).sort(), name).toEqual(Object.keys(origins ?? {}).sort())
      for (const o of Object.values(origins ?? {})) expect(o).toMatch(/^(read|from memory|worked out|chosen here): \S/)
    }
  })
  it('the terminal radar with a klystron: the values of the generic set, 19 hits a beam', () => {
    const r = settle(withRadar('T1')).radar
    expect(r).toMatchObject({ frequencyHz: 2.8e9, pulseWidthS: 1.03e-6, noiseFigureDb: 4, rotationRpm: 12.5 })
    expect(r.antenna).toMatchObject({ gainDbi: 33.5, azimuthBeamwidthDeg: 1.3, elevationBeamwidthDeg: 4.8, cosecantLimitDeg: 30 })
    // beamwidth over turn rate times PRF: 1.3 / (6 × 12.5) × 1100 = 19.07
    expect((r.antenna.azimuthBeamwidthDeg / (6 * r.rotationRpm)) * r.prfHz[0]!).toBeCloseTo(19.07, 2)
  })
  it('the system temperature of the weather radar as a noise figure', () => {
    expect(radarOfTemplate('W1').noiseFigureDb).toBeCloseTo(10 * Math.log10(450 / 290), 1)
  })
  it('the long pulse of the solid-state terminal radar starts at its blind range', () => {
    expect(radarOfTemplate('T2').pulses?.[1]?.fromRangeM).toBeCloseTo((299_792_458 * 89e-6) / 2, -1)
  })
  it('no template names a maker: band and role only', () => {
    for (const t of RADAR_TEMPLATES)
      expect(t.name).toMatch(/^(Terminal|En-route|Weather|Coastal|Inland waters|Surface movement|Bird|Drone), [LSCX] band/)
  })
})

describe('starting sets', () => {
  it.each(STARTING_SETS.map((s) => s.id))('%s: radar and needs run as they are', (id) => {
    const set = STARTING_SETS.find((s) => s.id === id)!
    const doc = { ...withRadar(set.radar), needs: needsOfSet(id) }
    expect(checkDoc(doc).problems).toEqual([])
    const study = settle(doc)
    expect(study.needs.length).toBe(set.needs.length)
    expect(study.origins.length).toBe(
      Object.keys(doc.radar.origins ?? {}).length + doc.needs.flatMap((n) => Object.keys(n.origins ?? {})).length,
    )
  })
  it('coastal: a reflector of 7.5 m² at 4 m out to 5.0 NM', () => {
    expect(needsOfSet('coastal')[0]).toMatchObject({ rcsM2: 7.5, heightM: 4, heightAbove: 'sea', toRangeM: 9260 })
  })
})

describe('origins', () => {
  it('a value changed by hand loses its origin, the others keep theirs', () => {
    const doc = { ...withRadar('B1'), needs: needsOfSet('birdDrone') }
    const radar = withoutOrigin(doc, 'radar.antenna.gainDbi').radar
    expect(radar.origins?.['antenna.gainDbi']).toBeUndefined()
    expect(Object.keys(radar.origins ?? {}).length).toBe(Object.keys(doc.radar.origins ?? {}).length - 1)
    expect(withoutOrigin(doc, 'needs[0].pd').needs?.[0]?.origins?.pd).toBeUndefined()
    expect(withoutOrigin(doc, 'radar.stc.kind')).toBe(doc)
    expect(withoutOrigin(doc, 'atmosphere.windMs')).toBe(doc)
  })
  it('a part that is replaced loses the origins inside it', () => {
    const radar = withoutOrigin(withRadar('W1'), 'radar.suppression').radar
    expect(Object.keys(radar.origins ?? {}).filter((k) => k.startsWith('suppression'))).toEqual([])
  })
})
