import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, type LossCause, ladderOf, lossCode, type NeedFigure, type NeedPlaces } from '../../core/index.ts'
import { from, layerNeed, plainGround, uniformLand, work } from './plain.ts'

let plain: Ask['ground']
let hilly: Ask['ground']
beforeAll(async () => {
  plain = await plainGround(26_000)
  hilly = await plainGround(26_000, (e, n) => 60 * Math.sin(e / 1700) * Math.cos(n / 2300) + (Math.hypot(e - 9000, n) < 1500 ? 150 : 0))
})
const radarOf = (statedDb: number) => ({ suppression: { kind: 'stated' as const, statedDb } })
const figure = (w: ReturnType<typeof work>): NeedFigure => w.result.figures.needs[0]

describe('the three nested figures', () => {
  it('each lies inside the one before, at both k; losses make up the rest; all areas add up', () => {
    for (const heightM of [30, 80, 200, [50, 600] as [number, number]]) {
      const w = work(hilly, {
        needs: [layerNeed({ heightM, rcsM2: 0.5 })],
        radar: { ...radarOf(25), peakPowerW: 4000, stc: { kind: 'rtoFourth', cornerM: 9000, maxDb: 30 } },
      })
      const n = figure(w)
      for (const s of [n, n.atLowK!]) {
        expect(s.detectablePct).toBeLessThanOrEqual(s.inSightPct)
        expect(s.usablePct).toBeLessThanOrEqual(s.detectablePct)
      }
      // more bulge never uncovers
      expect(n.atLowK!.inSightPct).toBeLessThanOrEqual(n.inSightPct + 1e-9)
      const lost = n.losses.reduce((s, l) => s + l.pct, 0)
      expect(n.usablePct + lost).toBeCloseTo(100, 6)
      expect(n.usableKm2 + n.losses.reduce((s, l) => s + l.amount, 0)).toBeCloseTo(n.areaKm2, 6)
      expect(n.suppression.maskedPct).toBeCloseTo(100 - n.inSightPct - (100 * n.unknownKm2) / n.areaKm2, 6)
    }
  })

  it('floors at k = 1 stand higher, by the difference of the bulge on a plain', () => {
    const { figures } = work(plain, { needs: [layerNeed()] }).result
    expect(figures.lowK).toBe(1)
    const at = (list: typeof figures.floors | null) => list!.find((f) => Math.round(f.rangeM / 1852) === 10)!
    // 150 m over a plain at 100 m sees its own ground at 10 NM at both k: floors are the ground
    expect(at(figures.floorsLowK).medianM).toBeGreaterThanOrEqual(at(figures.floors).medianM as number)
    const same = work(plain, { needs: [layerNeed()], atmosphere: { effectiveEarthFactor: 1 } }).result.figures
    expect(same.floorsLowK).toBeNull()
    expect(same.needs[0].atLowK).toBeNull()
    // its own k is the smaller one: nothing else is asked
    expect(same.needs[0].passes).toBe(same.needs[0].met)
  })

  it('a need that names its share is met and passes by usable area', () => {
    const w = work(hilly, { needs: [layerNeed({ heightM: 150, requiredPct: 60 })], radar: radarOf(60) })
    const n = figure(w)
    expect(n.usablePct).toBeGreaterThan(60)
    expect(n).toMatchObject({ met: true, passes: true })
    expect(figure(work(hilly, { needs: [layerNeed({ heightM: 150 })], radar: radarOf(60) }))).toMatchObject({ met: false, passes: false })
  })
})

describe('cause of loss, place by place', () => {
  const causeAt = (w: ReturnType<typeof work>, azimuthDeg: number, rangeM: number): LossCause | 'usable' => {
    const value = w.layerAt('cause-of-loss', azimuthDeg, rangeM)
    const found = (
      [
        'unknown',
        'out-of-range',
        'masked',
        'marginal',
        'short-range-sensitivity',
        'above-beam',
        'below-beam',
        'clutter',
        'too-weak',
        'several',
      ] as const
    ).find((c) => lossCode(c) === value)
    return Number.isNaN(value) ? 'usable' : (found as LossCause)
  }
  const pencil = {
    gainDbi: 33.5,
    azimuthBeamwidthDeg: 1.3,
    elevationBeamwidthDeg: 3,
    elevationPattern: 'gaussian' as const,
    sidelobeDb: -200,
    tiltDeg: 2,
  }

  it('above and below the beam', () => {
    const w = work(plain, { needs: [layerNeed({ heightM: 2500 })], radar: { ...radarOf(60), antenna: pencil } })
    expect(causeAt(w, 40, 5000)).toBe('above-beam')
    expect(causeAt(w, 40, 22_000)).toBe('above-beam')
    const low = work(plain, {
      needs: [layerNeed({ heightM: 100 })],
      radar: { ...radarOf(80), antenna: { ...pencil, tiltDeg: 8, elevationBeamwidthDeg: 2 } },
    })
    expect(causeAt(low, 40, 20_000)).toBe('below-beam')
  })
  it('clutter, sensitivity, power, range', () => {
    const clutter = work(plain, { needs: [layerNeed()], radar: radarOf(10), landTable: uniformLand(-25) })
    expect(causeAt(clutter, 40, 15_000)).toBe('clutter')
    const stc = work(plain, {
      needs: [layerNeed()],
      radar: { ...radarOf(80), peakPowerW: 20_000, stc: { kind: 'rtoFourth', cornerM: 90_000, maxDb: 90 } },
    })
    expect(causeAt(stc, 40, 5000)).toBe('short-range-sensitivity')
    const weak = work(plain, { needs: [layerNeed({ rcsM2: 1e-4 })], radar: { ...radarOf(80), peakPowerW: 100 } })
    expect(causeAt(weak, 40, 20_000)).toBe('too-weak')
    expect(figure(weak).suppression.tooWeakPct).toBeGreaterThan(50)
    const short = work(plain, { needs: [layerNeed()], radar: { ...radarOf(80), instrumentedRangeM: 10_000 } })
    expect(causeAt(short, 40, 9000)).toBe('usable')
    expect(causeAt(short, 40, 11_000)).toBe('out-of-range')
    const blind = work(plain, {
      needs: [layerNeed()],
      radar: { ...radarOf(80), pulseWidthS: 20e-6, compressedPulseWidthS: 1.03e-6, recoveryS: 7e-6 },
    })
    // c(20 + 7 µs)/2 = 4 047 m of slant range
    expect(causeAt(blind, 40, 3900)).toBe('out-of-range')
    expect(causeAt(blind, 40, 4200)).toBe('usable')
  })
  it('two causes that only go together', () => {
    const both = work(plain, {
      needs: [layerNeed()],
      radar: { ...radarOf(10), peakPowerW: 20_000, stc: { kind: 'rtoFourth', cornerM: 60_000, maxDb: 90 } },
      landTable: uniformLand(-20),
    })
    expect(causeAt(both, 40, 4000)).toBe('several')
  })
  it('hidden, inside the error band, off the terrain', async () => {
    const ground = await plainGround(15_000, (e) => (Math.abs(e - 6000) < 150 ? 150 : 0))
    const w = work(ground, { needs: [layerNeed({ heightM: 120, toRangeM: 24_000 })], radar: radarOf(80) })
    expect(causeAt(w, 90, 14_000)).toBe('masked')
    expect(causeAt(w, 270, 10_000)).toBe('usable')
    expect(causeAt(w, 270, 20_000)).toBe('unknown')
    const n = figure(w)
    expect(n.losses.map((l) => l.cause)).toContain('marginal')
    expect(n.marginalKm2).toBeGreaterThan(0)
    expect(n.losses.find((l) => l.cause === 'unknown')!.amount).toBeCloseTo(n.unknownKm2, 9)
  })
  it('a lossless level leaves the layer bare, and Pd and margins agree with it', () => {
    const w = work(plain, { needs: [layerNeed()], radar: radarOf(80) })
    expect(figure(w).usablePct).toBe(100)
    expect(w.layerAt('usable', 40, 15_000)).toBe(3)
    expect(w.layerAt('probability-of-detection', 40, 15_000)).toBeGreaterThan(0.8)
    expect(w.layerAt('signal-margin', 40, 15_000)).toBeGreaterThan(0)
    expect(w.layerAt('cause-of-loss', 40, 15_000)).toBeNaN()
    expect(w.layerAt('usable', 40, 24_500)).toBeNaN()
  })
})

describe('cone of silence', () => {
  it('where a cosecant-squared beam ends: height over the antenna by the tangent of its limit', () => {
    const antenna = {
      gainDbi: 33.5,
      azimuthBeamwidthDeg: 1.3,
      elevationBeamwidthDeg: 4,
      elevationPattern: 'cosecant-squared' as const,
      cosecantLimitDeg: 30,
      tiltDeg: 1,
    }
    const w = work(plain, { needs: [layerNeed({ heightM: [100, 3000], heightAbove: 'sea' })], radar: { ...radarOf(80), antenna } })
    const [low, , , , high] = figure(w).coneOfSilence
    expect(low).toEqual({ levelM: 100, radiusM: null })
    // the pattern ends at 30° of its own angle, whose zero lies half a beamwidth under the peak
    const by = (3000 - 150) / Math.tan(((30 + 1 - 2) * Math.PI) / 180)
    expect(high.radiusM as number).toBeGreaterThan(by - 5)
    expect(high.radiusM as number).toBeLessThan(by + 10)
    expect(
      work(plain, { needs: [layerNeed({ heightM: 3000, heightAbove: 'sea' })], radar: radarOf(80) }).result.figures.needs[0]
        .coneOfSilence[0].radiusM,
    ).toBe(0)
  })
})

describe('a need in a polygon', () => {
  const square = (feature: number, middle: { azimuthDeg: number; rangeM: number }, halfM: number) => ({
    feature,
    path: [45, 135, 225, 315, 45].map((az) => {
      const centre = from(middle.azimuthDeg, middle.rangeM)
      // corners half a diagonal away
      const p = { east: Math.sin((az * Math.PI) / 180) * Math.SQRT2 * halfM, north: Math.cos((az * Math.PI) / 180) * Math.SQRT2 * halfM }
      return { lon: centre.lon + p.east / (111_320 * Math.cos((centre.lat * Math.PI) / 180)), lat: centre.lat + p.north / 111_240 }
    }),
  })
  const inside = (rings: NeedPlaces['rings'], over = {}) =>
    figure(
      work(plain, {
        needs: [{ ...layerNeed({ fromRangeM: 0, ...over }), kind: 'polygon', file: 'p.geojson', toRangeM: undefined }],
        places: [{ needId: 'n', kind: 'polygon', places: [], rings }],
        radar: radarOf(80),
      }),
    )

  it('has the area of its outline, less its holes, once where two overlap', () => {
    const outer = square(1, { azimuthDeg: 70, rangeM: 12_000 }, 4000)
    expect(inside([outer]).areaKm2).toBeGreaterThan(63.2)
    expect(inside([outer]).areaKm2).toBeLessThan(64.8)
    const hole = square(1, { azimuthDeg: 70, rangeM: 12_000 }, 1500)
    expect(inside([outer, hole]).areaKm2).toBeGreaterThan(54.2)
    expect(inside([outer, hole]).areaKm2).toBeLessThan(55.8)
    expect(inside([outer, square(2, { azimuthDeg: 70, rangeM: 12_000 }, 1500)]).areaKm2).toBeCloseTo(inside([outer]).areaKm2, 9)
    expect(inside([outer]).usablePct).toBe(100)
  })
  it('round the radar itself, and half beyond the grid: what is not worked out is unknown', () => {
    expect(inside([square(1, { azimuthDeg: 0, rangeM: 1 }, 3000)]).areaKm2).toBeGreaterThan(35.4)
    const beyond = inside([square(1, { azimuthDeg: 0, rangeM: 25_000 }, 2000)])
    expect(beyond.areaKm2).toBeGreaterThan(15.5)
    expect(beyond.areaKm2).toBeLessThan(16.5)
    expect(beyond.unknownKm2).toBeGreaterThan(7.5)
    expect(beyond.losses[0].cause).toBe('unknown')
  })
})

describe('the ladder', () => {
  it('lists every interval in which a need is met: a taller mast can lose one', () => {
    const rungs = [true, true, false, false, true].map((met, n) => ({
      heightM: 10 * (n + 1),
      inSightPct: 50 + n,
      usablePct: 40 + n,
      over40Km2: n,
      shortKm2: 2 * n,
      octantPct: [],
      needs: [{ needId: 'n', name: 'need', met }],
    }))
    const ladder = ladderOf(rungs)
    expect(ladder.needMet[0].intervals).toEqual([
      [10, 20],
      [50, 50],
    ])
    expect(ladder.needMetAtM[0].heightM).toBe(10)
    expect(ladder).toMatchObject({ usablePct: [40, 41, 42, 43, 44], shortKm2: [0, 2, 4, 6, 8] })
  })
})
