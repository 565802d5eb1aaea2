import { describe, expect, it } from 'vitest'
import {
  BUILT_IN_LAND_TABLE,
  clutterMarks,
  clutterToNoise,
  decibel,
  elevationTangent,
  gateWeights,
  type ImprovementDb,
  meanStrengthDb,
  slantSquared,
} from '../../core/clutter/index.ts'
import { elevationAngleDeg, slantRangeM } from '../../core/geodesy/index.ts'
import { CELL, type PolarShape } from '../../core/polar/index.ts'
import { gateLengthM, radarConstantDb } from '../../core/radar/index.ts'
import { RELIEF } from '../../core/terrain/index.ts'
import { fromDb, RAD_PER_DEG, toDb } from '../../core/units/index.ts'
import { finish } from '../../core/work/index.ts'
import { sBandRadar, testRadar } from '../radar/testRadar.ts'
import { clutterOf, codeOf, EARTH, flatCells, SITE, uniformTable } from './flatCells.ts'

const GRID: PolarShape = { azimuths: 720, ranges: 200, azimuthStepDeg: 0.5, rangeStepM: 75 }
const RADAR = testRadar({ antenna: { azimuthBeamwidthDeg: 2 } })
const at = (i: number, j: number): number => i * GRID.ranges + j

describe('clutter-to-noise over polar cells', () => {
  it('falls with the third power of range over even ground', () => {
    const { cnrDb } = clutterOf(flatCells(GRID, 5), RADAR, undefined, uniformTable(-30))
    const slope = (cnrDb[at(3, 180)] - cnrDb[at(3, 45)]) / Math.log10(180.5 / 45.5)
    expect(slope).toBeCloseTo(-30, 2)
  })

  it('equals the published table worked by hand, farmland and open ground at four bands, to 0.05 dB', () => {
    const bands = [435e6, 1230e6, 3240e6, 9200e6]
    const farmland = [-39, -30, -30, -30]
    const open = [-74, -68, -51, -42]
    let compared = 0
    for (const [terrain, strengths] of [
      ['farmland', farmland],
      ['open', open],
    ] as const)
      bands.forEach((frequencyHz, b) => {
        const r = testRadar({ frequencyHz })
        const { cnrDb } = clutterOf(flatCells(GRID, 40), r, [codeOf(terrain)])
        const rangeM = 199.5 * 75 - 75 // 0.13°: lowest band of both
        const rcsDb = strengths[b] + toDb(rangeM * 1.5 * RAD_PER_DEG * gateLengthM(r))
        expect(Math.abs(cnrDb[at(11, 198)] - (radarConstantDb(r) + rcsDb - 40 * Math.log10(rangeM)))).toBeLessThan(0.05)
        compared++
      })
    expect(compared).toBe(8)
  })

  it('counts the share in sight once', () => {
    const cells = flatCells(GRID, 20)
    const whole = clutterOf(cells, RADAR).cnrDb[at(5, 100)]
    cells.mask.inSight.fill(65535 / 4)
    expect(clutterOf(cells, RADAR).cnrDb[at(5, 100)] - whole).toBeCloseTo(toDb(0.25), 3)
  })

  it('spreads one azimuth of clutter by the two-way beam, round through north', () => {
    const cells = flatCells(GRID, 20)
    cells.mask.inSight.fill(0)
    cells.mask.state.fill(CELL.masked)
    for (let j = 0; j < GRID.ranges; j++) cells.mask.inSight[at(0, j)] = 65535
    const { cnrDb } = clutterOf(cells, RADAR)
    const onPeak = cnrDb[at(0, 100)]
    for (const [i, offsetDeg] of [
      [2, 1],
      [718, 1],
      [5, 2.5],
    ])
      expect(cnrDb[at(i, 100)] - onPeak).toBeCloseTo(-toDb(Math.E) * 8 * Math.LN2 * (offsetDeg / 2) ** 2, 3)
  })

  it('weights cells by their overlap with the gate', () => {
    expect([...gateWeights(150, 75)]).toEqual([37.5, 75, 37.5])
    expect([...gateWeights(75, 75)]).toEqual([75])
    expect([...gateWeights(20, 75)]).toEqual([20])
    const long = gateWeights(1000, 60)
    expect(long.reduce((s, w) => s + w, 0)).toBeCloseTo(1000, 9)
    expect(long).toHaveLength(17)
  })

  it('keeps only the side-lobe term where nothing is in sight: ring mean × two-way level × 360°/beamwidth', () => {
    const r = testRadar({ antenna: { azimuthBeamwidthDeg: 2, sidelobeDb: -25 } })
    const cells = flatCells(GRID, 20)
    for (let i = 180; i < 540; i++)
      for (let j = 0; j < GRID.ranges; j++) {
        cells.mask.inSight[at(i, j)] = 0
        cells.mask.state[at(i, j)] = CELL.masked
      }
    const quiet = clutterOf(cells, testRadar({ antenna: { azimuthBeamwidthDeg: 2 } })).cnrDb[at(0, 120)]
    const { cnrDb, sideLobeCnrDb } = clutterOf(cells, r)
    const term = quiet + toDb(0.5) - 50 + toDb(180)
    expect(sideLobeCnrDb[120]).toBeCloseTo(term, 3)
    expect(cnrDb[at(360, 120)]).toBeCloseTo(term, 3)
    expect(cnrDb[at(0, 120)]).toBeCloseTo(toDb(fromDb(quiet) + fromDb(term)), 3)
  })

  it('leaves a residue: each ground code divided by its own improvement before the sum, side lobes too', () => {
    const r = testRadar({ antenna: { azimuthBeamwidthDeg: 2, sidelobeDb: -25 } })
    const cells = flatCells(GRID, 20)
    for (let i = 0; i < 360; i++) for (let j = 0; j < GRID.ranges; j++) cells.site.code[at(i, j)] = 1
    const codes = [codeOf('rural'), codeOf('urban')]
    const run = (improvementDb?: ImprovementDb) =>
      finish(clutterToNoise(cells.site, cells.mask, codes, SITE, 20, EARTH, r, 0, improvementDb ? { improvementDb } : {}))
    const same = { sea: 30, rain: 30, discrete: 30, folded: 30 }
    const plain = run()
    expect(plain.residueDb).toBe(plain.cnrDb)
    const even = run({ byCode: [30, 30], ...same })
    expect(even.residueDb[at(90, 120)] - plain.cnrDb[at(90, 120)]).toBeCloseTo(-30, 4)
    const { residueDb, cnrDb, sideLobeCnrDb, sideLobeResidueDb } = run({ byCode: [30, 10], ...same })
    expect(cnrDb).toEqual(plain.cnrDb)
    const main = (c: number) => fromDb(plain.cnrDb[c]) - fromDb(sideLobeCnrDb[120])
    const [urban, rural] = [main(at(90, 120)), main(at(450, 120))]
    const ring = fromDb(sideLobeResidueDb[120])
    expect(toDb(ring)).toBeCloseTo(toDb((urban / 10 + rural / 1000) / 2) - 50 + toDb(180), 3)
    expect(residueDb[at(90, 120)]).toBeCloseTo(toDb(urban / 10 + ring), 3)
    expect(residueDb[at(450, 120)]).toBeCloseTo(toDb(rural / 1000 + ring), 3)
  })

  it('is undefined where sight is unknown, inside cτ/2, and where both terms are nil', () => {
    const cells = flatCells(GRID, 20)
    cells.mask.state[at(9, 150)] = CELL.outside
    cells.mask.state[at(9, 151)] = CELL.beyondVoid
    const long = testRadar({ pulseWidthS: 10e-6, compressedPulseWidthS: 1e-6 })
    const { cnrDb, sideLobeCnrDb } = clutterOf(cells, long)
    expect([cnrDb[at(9, 150)], cnrDb[at(9, 151)]]).toEqual([Number.NaN, Number.NaN])
    const first = Math.ceil(1499 / 75 - 0.5)
    expect(cnrDb[at(1, first - 1)]).toBeNaN()
    expect(sideLobeCnrDb[first - 1]).toBeNaN()
    expect(cnrDb[at(1, first)]).toBeGreaterThan(0)
    cells.mask.inSight.fill(0)
    expect(clutterOf(cells, long).cnrDb.every(Number.isNaN)).toBe(true)
  })

  it('gains pulse compression and nothing else by a longer pulse of the same gate', () => {
    const cells = flatCells(GRID, 20)
    const plain = clutterOf(cells, RADAR).cnrDb[at(0, 150)]
    const long = clutterOf(cells, testRadar({ pulseWidthS: 10e-6, compressedPulseWidthS: 1e-6, antenna: RADAR.antenna })).cnrDb[at(0, 150)]
    expect(long - plain).toBeCloseTo(10, 4)
  })

  it('has no strength on water without a weather, and says so', () => {
    const { cnrDb, notes } = clutterOf(flatCells(GRID, 20), RADAR, [codeOf('water')])
    expect(cnrDb.every(Number.isNaN)).toBe(true)
    expect(notes.map((n) => n.about)).toContain('sea clutter not assessed')
  })

  it('takes steep ground at its local slope', () => {
    const cells = flatCells(GRID, 100)
    const j = 7 // 562 m: 10.2°
    const code = [codeOf('farmland')]
    const short = testRadar({ pulseWidthS: 75 / (299_792_458 / 2), antenna: RADAR.antenna })
    const level = clutterOf(cells, short, code).cnrDb[at(2, j)]
    cells.site.slopePermille.fill(200)
    const rising = clutterOf(cells, short, code).cnrDb[at(2, j)]
    const depression = (deg: number) => (100 / 562.5 - 562.5 / (2 * (4 / 3) * 6_371_000)) / RAD_PER_DEG + deg
    const sine = (deg: number) => toDb(Math.sin(depression(deg) * RAD_PER_DEG))
    expect(rising - level).toBeCloseTo(sine(Math.atan(0.2) / RAD_PER_DEG) - sine(0), 3)
  })

  it('takes urban ground over open ground by what lies toward the radar', () => {
    const codes = [codeOf('open'), codeOf('urban'), codeOf('rural')]
    const cells = flatCells(GRID, 20)
    const town = (ground: number, from: number) => {
      for (let i = 0; i < GRID.azimuths; i++) for (let j = 0; j < GRID.ranges; j++) cells.site.code[at(i, j)] = j >= from ? 1 : ground
      return clutterOf(cells, RADAR, codes).cnrDb
    }
    // 20 m over level ground is under 0.25° beyond 4 km; a town that starts at 7.5 km, seen 3.75 km deep and 6 km deep
    const overOpen = town(0, 100)
    const overRural = town(2, 100)
    const [onL, onS] = [BUILT_IN_LAND_TABLE.rows['urban over open ground'][0], BUILT_IN_LAND_TABLE.rows.urban[0]].map((b) =>
      meanStrengthDb(b, RADAR.frequencyHz),
    )
    expect(overOpen[at(5, 150)] - overRural[at(5, 150)]).toBeCloseTo(onL - onS, 3)
    expect(overOpen[at(5, 180)]).toBeCloseTo(overRural[at(5, 180)], 3)
    cells.site.relief.fill(RELIEF.high)
    expect(town(0, 100)[at(5, 150)]).toBeCloseTo(overRural[at(5, 150)], 3)
  })

  it('takes elevation gain at the cell, two-way, with the side-lobe floor', () => {
    const narrow = { azimuthBeamwidthDeg: 2, elevationPattern: 'gaussian', elevationBeamwidthDeg: 3 } as const
    const flat = clutterOf(flatCells(GRID, 100), RADAR, undefined, uniformTable(-30)).cnrDb
    const shaped = (tiltDeg: number) =>
      clutterOf(flatCells(GRID, 100), testRadar({ antenna: { ...narrow, tiltDeg } }), undefined, uniformTable(-30)).cnrDb
    // 100 m above the ground at 7.5375 km: 0.7856° below the horizontal on the 4/3 earth
    const e = elevationAngleDeg(200, 100, 100.5 * 75, (4 / 3) * 6_371_000)
    expect(shaped(1)[at(0, 100)] - flat[at(0, 100)]).toBeCloseTo(2 * toDb(Math.exp(-4 * Math.LN2 * ((e - 1) / 3) ** 2)), 2)
    expect(shaped(20)[at(0, 100)] - flat[at(0, 100)]).toBeCloseTo(-60, 3)
  })

  it('marks table, steep ground, ground above the antenna and frequency beyond the bands', () => {
    const about = (over: Parameters<typeof testRadar>[0], groundM: number, heightM: number) => {
      const cells = flatCells(GRID, heightM)
      cells.site.groundM.fill(groundM)
      return clutterOf(cells, testRadar(over)).notes.map((n) => `${n.mark}: ${n.about}`)
    }
    expect(about({}, 100, 15)).toEqual(['from memory: land clutter table: Billingsley, Low-Angle Radar Land Clutter (2002), from memory'])
    expect(about({}, 100, 90).join()).toContain('depression over 8°: the land clutter table runs over into γ·sin ψ')
    expect(about({}, 300, 20).join()).toContain('above the antenna horizontal')
    expect(about({ frequencyHz: 15e9 }, 100, 15).join()).toContain('frequency beyond its bands')
    expect(() => about({ frequencyHz: 20e6 }, 100, 5)).toThrow(/30 MHz to 40 GHz/)
    const water = [codeOf('water')]
    const weather = { gas: 'none', rainRateMmH: 0, rainTopM: 4000, rainExtentM: 15_000, seaState: 3, tideM: 0 } as const
    expect(
      clutterMarks(water, RADAR, false, weather)
        .map((m) => m.about)
        .join(),
    ).not.toContain('sea')
    expect(clutterMarks(water, testRadar({ frequencyHz: 435e6 }), false, weather).map((m) => m.about)).toContain('sea clutter not assessed')
    const marks = clutterMarks([{ ...codeOf('rural'), mark: 'default' }, codeOf('water')], RADAR, true)
    expect(marks.map((m) => m.mark)).toEqual(['by hand', 'default', 'outside model'])
  })

  it('says when rays are flat by an effective-earth factor out of range', () => {
    const { site, mask } = flatCells(GRID, 20, Number.POSITIVE_INFINITY)
    const work = clutterToNoise(site, mask, [codeOf('rural')], SITE, 20, { ...EARTH, effectiveEarthFactor: -1 }, RADAR, 0)
    let step = work.next()
    while (!step.done) step = work.next()
    expect(step.value.notes.map((n) => n.about).join()).toContain('ducting sensitivity')
    expect(step.value.cnrDb[at(0, 100)]).toBeGreaterThan(0)
  })

  it('yields often enough to be stopped', () => {
    const { site, mask } = flatCells({ ...GRID, azimuths: 720 }, 20)
    const work = clutterToNoise(site, mask, [codeOf('rural')], SITE, 20, EARTH, sBandRadar(), 0)
    let steps = 0
    for (let s = work.next(); !s.done; s = work.next()) {
      expect(s.value.done).toBeLessThanOrEqual(s.value.total)
      steps++
    }
    expect(steps).toBeGreaterThan(3)
  })
})

describe('series and tables of the hot loop', () => {
  it('slant range and elevation agree with exact sphere geometry, k 0.5 to flat, to 500 km', () => {
    let compared = 0
    for (const radius of [0.5 * 6_371_000, (4 / 3) * 6_371_000, 1e9])
      for (const range of [50, 3_000, 40_000, 200_000, 500_000])
        for (const ground of [-100, 0, 900, 4_000]) {
          const slant = Math.sqrt(slantSquared(520, ground, range, 1 / radius))
          expect(Math.abs(slant / slantRangeM(520, ground, range, radius) - 1)).toBeLessThan(1e-7)
          const degrees = Math.atan(elevationTangent(520, ground, range, 1 / radius)) / RAD_PER_DEG
          expect(Math.abs(degrees - elevationAngleDeg(520, ground, range, radius))).toBeLessThan(1e-4)
          compared++
        }
    expect(compared).toBe(60)
    expect(elevationTangent(50, 150, 1000, 0)).toBeCloseTo(0.1, 12)
  })

  it('decibels from the table are right to 1e-5 dB over 300 decades', () => {
    for (let e = -299; e < 300; e += 0.37) {
      const x = 10 ** e
      expect(Math.abs(decibel(x) - 10 * Math.log10(x))).toBeLessThan(1e-5)
    }
    expect(decibel(0)).toBeNaN()
    expect(decibel(Number.NaN)).toBeNaN()
    expect(decibel(-1)).toBeNaN()
  })
})
