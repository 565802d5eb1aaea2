import { describe, expect, it } from 'vitest'
import {
  gasLossDbKm,
  pathLoss,
  rainLaws,
  rainLossDbKm,
  twoWayGasLossDb,
  twoWayLossParts,
  type Weather,
} from '../../core/atmosphere/index.ts'
import { type ClutterOptions, clutterToNoise, type DiscreteEcho, rainReflectivity, seaStrengthDb } from '../../core/clutter/index.ts'
import { elevationAngleDeg, slantRangeM } from '../../core/geodesy/index.ts'
import type { TerrainName } from '../../core/landcover/index.ts'
import { CELL, type PolarShape } from '../../core/polar/index.ts'
import { gateLengthM, type RadarInput, radarConstantDb } from '../../core/radar/index.ts'
import { fromDb, RAD_PER_DEG, toDb } from '../../core/units/index.ts'
import { finish } from '../../core/work/index.ts'
import { testRadar } from '../radar/testRadar.ts'
import { codeOf, EARTH, flatCells, SITE, uniformTable } from './flatCells.ts'

const GRID: PolarShape = { azimuths: 360, ranges: 400, azimuthStepDeg: 1, rangeStepM: 75 }
const KA = (4 / 3) * 6_371_000
const FAIR: Weather = { gas: 'none', rainRateMmH: 0, rainTopM: 4000, rainExtentM: 15_000, seaState: 3, tideM: 0 }
const ONE_CELL = 75 / (299_792_458 / 2)
const radar = (over: Parameters<typeof testRadar>[0] = {}): RadarInput =>
  testRadar({ frequencyHz: 9.4e9, pulseWidthS: ONE_CELL, ...over, antenna: { azimuthBeamwidthDeg: 4, ...over.antenna } })
const rangeOf = (j: number): number => (j + 0.5) * 75
const cells = (
  terrain: TerrainName,
  heightM: number,
  r: RadarInput,
  options: ClutterOptions,
  change?: (c: ReturnType<typeof flatCells>) => void,
) => {
  const c = flatCells(GRID, heightM)
  change?.(c)
  return finish(clutterToNoise(c.site, c.mask, [codeOf(terrain)], SITE, heightM, EARTH, r, 0, options))
}
const depressionDeg = (heightM: number, rangeM: number): number => (heightM / rangeM - rangeM / (2 * KA)) / RAD_PER_DEG
/** C/N of one cell of level ground at a stated strength, by hand. */
const byHand = (r: RadarInput, strengthDb: number, heightM: number, rangeM: number): number => {
  const slant = slantRangeM(100 + heightM, 100, rangeM, KA)
  const area = slant * r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG * gateLengthM(r)
  return radarConstantDb(r) + strengthDb + toDb(area) - 40 * Math.log10(slant)
}

describe('sea clutter on water (Gregers-Hansen and Mital 2012)', () => {
  it('equals the model worked by hand at the depression of the cell, H and V, three ranges', () => {
    let compared = 0
    for (const polarisation of ['H', 'V'] as const) {
      const r = radar({ polarisation })
      const { cnrDb } = cells('water', 40, r, { weather: FAIR })
      for (const j of [20, 80, 150]) {
        const sea = seaStrengthDb(9.4, depressionDeg(40, rangeOf(j)), 3, polarisation)
        expect(Math.abs(cnrDb[7 * 400 + j] - byHand(r, sea, 40, rangeOf(j))), `${polarisation} ${j}`).toBeLessThan(0.02)
        compared++
      }
    }
    expect(compared).toBe(6)
  })

  it('is held below 0.1° and says so, and ends at the horizon of the effective earth', () => {
    const r = radar()
    const { cnrDb, notes } = cells('water', 40, r, { weather: FAIR })
    const j = 260 // 19.5 km: 0.05°
    expect(depressionDeg(40, rangeOf(j))).toBeLessThan(0.1)
    expect(cnrDb[j]).toBeCloseTo(byHand(r, seaStrengthDb(9.4, 0.1, 3, 'V'), 40, rangeOf(j)), 2)
    const note = notes.find((n) => n.about.includes('below 0.1°'))
    expect(note?.mark).toBe('outside model')
    expect(note?.share).toBeGreaterThan(0.3)
    expect(note?.share).toBeLessThan(1)
    const horizon = Math.floor(Math.sqrt(2 * KA * 40) / 75)
    expect(horizon).toBeLessThan(399)
    expect(cnrDb[horizon - 1]).toBeGreaterThan(-60)
    expect(cnrDb[horizon + 1]).toBeNaN()
  })

  it('moves with the tide, not the antenna', () => {
    const r = radar()
    const j = 100
    const level = cells('water', 40, r, { weather: { ...FAIR, tideM: 2 } }).cnrDb[j]
    const sea = seaStrengthDb(9.4, depressionDeg(38, rangeOf(j)), 3, 'V')
    expect(Math.abs(level - byHand(r, sea, 40, rangeOf(j)))).toBeLessThan(0.02)
    expect(cells('forest', 40, r, { weather: { ...FAIR, tideM: 2 } }).cnrDb).toEqual(cells('forest', 40, r, { weather: FAIR }).cnrDb)
  })

  it('takes the higher of H and V for circular polarisation, marked; is not assessed outside 0.5 to 35 GHz, and says so', () => {
    const circular = cells('water', 40, radar({ polarisation: 'circular' }), { weather: FAIR })
    const [h, v] = (['H', 'V'] as const).map((polarisation) => cells('water', 40, radar({ polarisation }), { weather: FAIR }).cnrDb[50])
    expect(circular.cnrDb[50]).toBeCloseTo(Math.max(h, v), 5)
    expect(circular.notes.map((n) => n.about).join()).toContain('higher of H and V')
    const low = cells('water', 40, radar({ frequencyHz: 435e6 }), { weather: FAIR })
    expect(low.cnrDb.every(Number.isNaN)).toBe(true)
    expect(low.notes.map((n) => n.about)).toContain('sea clutter not assessed')
    const rough = cells('water', 40, radar(), { weather: { ...FAIR, seaState: 8 } })
    expect(rough.notes.map((n) => n.about).join()).toContain('sea state over 6')
    expect(rough.cnrDb[50]).toBeCloseTo(cells('water', 40, radar(), { weather: { ...FAIR, seaState: 6 } }).cnrDb[50], 6)
  })
})

describe('losses of the weather', () => {
  const dry = (r: RadarInput) => cells('rural', 40, r, { weather: FAIR }).cnrDb
  it('gas: two-way, along the ray, from the height of the mast to that of the ground (P.676)', () => {
    const r = radar()
    const wet = cells('rural', 40, r, { weather: { ...FAIR, gas: 'p676' } }).cnrDb
    for (const j of [60, 200, 399]) {
      const slant = slantRangeM(140, 100, rangeOf(j), KA)
      expect(dry(r)[j] - wet[j]).toBeCloseTo(twoWayGasLossDb(gasLossDbKm(9.4), 140, 100, slant), 3)
    }
  })

  it('rain: two-way out to its extent, by polarisation (P.838)', () => {
    const heavy = { ...FAIR, rainRateMmH: 16 }
    const loss = pathLoss(heavy, 9.4e9, 'H')
    if (!loss) throw new Error('no loss')
    const perKm = rainLossDbKm(rainLaws(9.4).horizontal, 16)
    expect(twoWayLossParts(loss, 40, 0, 10_000, 10_000).rainDb).toBeCloseTo(20 * perKm, 9)
    expect(twoWayLossParts(loss, 40, 0, 40_000, 40_000).rainDb).toBeCloseTo(30 * perKm, 9)
    // a target far above the rain: the ray leaves it at a third of its length
    expect(twoWayLossParts(loss, 1000, 10_000, 12_000, 15_000).rainDb).toBeCloseTo((30 / 3) * perKm, 9)
    // an antenna above the rain
    expect(twoWayLossParts(loss, 5000, 3000, 10_000, 10_198).rainDb).toBeCloseTo(10.198 * perKm, 9)
    expect(twoWayLossParts(loss, 5000, 6000, 10_000, 10_050).rainDb).toBe(0)
  })
  it('is nothing in fair weather', () => expect(pathLoss(FAIR, 9.4e9, 'V')).toBeNull())
})

describe('rain clutter', () => {
  const heavy = { ...FAIR, rainRateMmH: 10 }
  const hide = (c: ReturnType<typeof flatCells>) => {
    c.mask.inSight.fill(0)
    c.mask.state.fill(CELL.masked)
  }
  it('is η·R²·gate·0.753 θ·∫g² de from the horizon to the rain top, with its own loss, worked by hand', () => {
    const r = radar()
    const rain = cells('rural', 40, r, { weather: heavy }, hide).cnrDb
    const loss = pathLoss(heavy, 9.4e9, 'V')
    if (!loss) throw new Error('no loss')
    for (const j of [40, 100, 199]) {
      const slant = slantRangeM(140, 100, rangeOf(j), KA)
      // elevations at that slant range: height = mast + R sin e + R²/2ka
      const drop = slant / (2 * KA)
      const reach = Math.asin(Math.min(1, (4000 - 140) / slant - drop)) - Math.asin((100 - 140) / slant - drop)
      const volume = slant ** 2 * gateLengthM(r) * 0.7527 * 4 * RAD_PER_DEG * reach
      const lossDb = twoWayLossParts(loss, 140, 100, rangeOf(j), slant).rainDb
      const byHandDb = radarConstantDb(r) + toDb(rainReflectivity(9.4e9, 10) * volume) - lossDb - 40 * Math.log10(slant)
      expect(Math.abs(rain[11 * 400 + j] - byHandDb), `gate ${j}`).toBeLessThan(0.05)
    }
    expect(rain[200]).toBeNaN()
  })

  it('falls by 15 dB in circular polarisation, or by what the radar states; leaves a residue of its own', () => {
    const base = cells(
      'rural',
      40,
      radar({ polarisation: 'circular', circular: { rainLossDb: 0, targetLossDb: 3 } }),
      { weather: heavy },
      hide,
    )
    const usual = cells('rural', 40, radar({ polarisation: 'circular' }), { weather: heavy }, hide)
    expect(usual.cnrDb[50] - base.cnrDb[50]).toBeCloseTo(-15, 4)
    const improvementDb = { byCode: [40], sea: 30, rain: 12, discrete: 40, folded: 0 }
    const left = cells('rural', 40, radar(), { weather: heavy, improvementDb }, hide)
    expect(left.residueDb[50] - left.cnrDb[50]).toBeCloseTo(-12, 4)
  })

  it('starts at the local horizon and ends at the rain top', () => {
    const high = cells('rural', 40, radar(), { weather: heavy }, (c) => {
      hide(c)
      c.mask.floorM.fill(4001)
    })
    expect(high.cnrDb.every(Number.isNaN)).toBe(true)
  })

  it('marks a frequency beyond small drops', () => {
    const { notes } = cells('rural', 40, radar({ frequencyHz: 16e9 }), { weather: heavy })
    expect(notes.map((n) => n.about).join()).toContain('rain clutter: frequency')
  })
})

describe('discrete echoes', () => {
  const mast: DiscreteEcho = {
    name: 'old light',
    azimuthDeg: 30.2,
    rangeM: 9_020,
    slantM: slantRangeM(140, 150, 9_020, KA),
    elevationDeg: elevationAngleDeg(140, 150, 9_020, KA),
    topM: 150,
    rcsM2: 1000,
  }
  const quiet = uniformTable(-120)
  it('come through the radar equation, the two-way beam and the gate, and the side lobes all round', () => {
    const r = radar({
      antenna: { azimuthBeamwidthDeg: 4, sidelobeDb: -20, elevationPattern: 'gaussian', elevationBeamwidthDeg: 3, tiltDeg: 0 },
    })
    const { cnrDb, sideLobeCnrDb } = cells('rural', 40, r, { landTable: quiet, discretes: [mast] })
    const gainDb = 2 * toDb(Math.exp(-4 * Math.LN2 * (mast.elevationDeg / 3) ** 2))
    const peak = radarConstantDb(r) + 30 + gainDb - 40 * Math.log10(mast.slantM)
    const at = (i: number, j: number) => cnrDb[i * 400 + j]
    const beam = (offDeg: number) => toDb(Math.exp(-8 * Math.LN2 * (offDeg / 4) ** 2))
    const lobe = peak - 40
    const j = 120 // 9 000 to 9 075 m
    expect(at(30, j)).toBeCloseTo(toDb(fromDb(peak + beam(0.2)) + fromDb(lobe)), 2)
    expect(at(33, j)).toBeCloseTo(toDb(fromDb(peak + beam(2.8)) + fromDb(lobe)), 2)
    expect(at(210, j)).toBeCloseTo(lobe, 2)
    expect(sideLobeCnrDb[j]).toBeCloseTo(lobe, 2)
    expect(at(30, j + 2)).toBeLessThan(peak - 60)
  })
  it('lose the share of the gate where a cell is longer than the gate, and suffer losses and suppression', () => {
    const r = radar({ pulseWidthS: ONE_CELL / 3, noiseBandwidthHz: 1e6 })
    const one = cells('rural', 40, radar(), { landTable: quiet, discretes: [mast] }).cnrDb[30 * 400 + 120]
    const short = cells('rural', 40, r, { landTable: quiet, discretes: [mast] }).cnrDb[30 * 400 + 120]
    expect(short - one).toBeCloseTo(toDb(1 / 3), 3)
    const improvementDb = { byCode: [0], sea: 0, rain: 0, discrete: 25, folded: 0 }
    const left = cells('rural', 40, radar(), { landTable: quiet, discretes: [mast], improvementDb })
    expect(left.residueDb[30 * 400 + 120] - left.cnrDb[30 * 400 + 120]).toBeCloseTo(-25, 2)
  })
})
