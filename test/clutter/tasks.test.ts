// Three tasks of siting practice as small studies: a clutter map told by ring and octant, second-time clutter of far mountains, a coast.
import { describe, expect, it } from 'vitest'
import type { Weather } from '../../core/atmosphere/index.ts'
import {
  apparentRangeM,
  clutterLevels,
  clutterToNoise,
  fillCellStrength,
  foldedClutter,
  LEVEL_RING_M,
  secondTimeAround,
} from '../../core/clutter/index.ts'
import type { GroundCode } from '../../core/landcover/index.ts'
import { sweep } from '../../core/masking/index.ts'
import { CELL, cellAreasM2, type PolarShape } from '../../core/polar/index.ts'
import { minimumRangeM, signalToNoiseDb } from '../../core/radar/index.ts'
import { fromDb, M_PER_NM, toDb } from '../../core/units/index.ts'
import { finish } from '../../core/work/index.ts'
import { sBandRadar, testRadar } from '../radar/testRadar.ts'
import { geographicShape, groundOn, siteAt, utmShape } from '../terrain/grounds.ts'
import { hills } from './hills.ts'

const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: null }
const cover = (terrain: GroundCode['terrain']): GroundCode => ({ terrain, coverHeightM: 0, sourceClass: null, mark: null })
const FAIR: Weather = { gas: 'none', rainRateMmH: 0, rainTopM: 4000, rainExtentM: 15_000, seaState: 3, tideM: 0 }

describe('C/N map of a terminal radar over classed land', () => {
  it('tells the share over 40 dB by 5 NM ring and octant, the same as counting cells', async () => {
    const grid: PolarShape = { azimuths: 1200, ranges: 112, azimuthStepDeg: 0.3, rangeStepM: 150 }
    const radar = sBandRadar({ antenna: { elevationPattern: 'cosecant-squared', elevationBeamwidthDeg: 4.8, tiltDeg: 2, sidelobeDb: -28 } })
    const { ground, site: place } = await hills()
    const { site, masks } = finish(sweep(ground, place, [20], grid, EARTH))
    const clutter = finish(clutterToNoise(site, masks[0], ground.codes, place, 20, EARTH, radar, 2, { weather: FAIR }))
    const spread = new Float32Array(clutter.cnrDb.length)
    fillCellStrength(site, masks[0], ground.codes, place, 20, radar, { weather: FAIR }, { strengthDb: null, spread })
    const levels = clutterLevels(clutter, masks[0], spread, place.lat, LEVEL_RING_M.nm)
    expect(levels.rings).toHaveLength(2)
    const areas = cellAreasM2(grid, place.lat)
    let compared = 0
    for (const ring of [0, 1])
      for (let octant = 0; octant < 8; octant++) {
        let [known, over] = [0, 0]
        for (let i = 0; i < 1200; i++) {
          const off = Math.abs(((i * 0.3 - 45 * octant + 540) % 360) - 180)
          if (off > 22.5 || (off === 22.5 && (i * 0.3 - 45 * octant + 720) % 360 < 180)) continue
          for (let j = 0; j < 112; j++) {
            const at = i * 112 + j
            if (Math.floor(((j + 0.5) * 150) / (5 * M_PER_NM)) !== ring || masks[0].state[at] >= CELL.beyondVoid) continue
            known += areas[j]
            if (clutter.cnrDb[at] > 40) over += areas[j]
          }
        }
        const sector = levels.sectors[ring * 8 + octant]
        expect(sector.knownKm2, `ring ${ring} octant ${octant}`).toBeCloseTo(known / 1e6, 3)
        expect(sector.over40Pct).toBeCloseTo((100 * over) / known, 6)
        compared++
      }
    expect(compared).toBe(16)
    expect(levels.whole.over40Pct).toBeGreaterThan(5)
    for (const l of [levels.whole, ...levels.rings]) expect(l.p99Db ?? 0).toBeGreaterThan(l.p90Db ?? 0)
  })
})

describe('second-time clutter of far mountains', () => {
  it('a ridge at 95 NM seen at 1 000 Hz stands at 14.06 NM, at 1 100 Hz at 21.4 NM; staggered it is halved in both', async () => {
    // Low ground along a parallel with a wall of mountains 176 km to the east; the radar on a hill of 600 m.
    const shape = geographicShape(700, 40, 12, 45, 0.005, 0.005)
    const metres = 0.005 * 111_320 * Math.cos((45 * Math.PI) / 180)
    const wall = 100 + Math.round((95 * M_PER_NM) / metres)
    const ground = groundOn(shape, (col, row) => (Math.abs(col - wall) <= 1 ? 2500 : col === 100 && Math.abs(row - 20) < 2 ? 600 : 100), {
      codes: [cover('rural')],
    })
    const place = siteAt(ground, 100, 20)
    const near: PolarShape = { azimuths: 360, ranges: 300, azimuthStepDeg: 1, rangeStepM: 150 }
    const { site } = finish(sweep(ground, place, [20], near, EARTH))
    const radar = (prfHz: number[], prfMode: 'single' | 'dwellStagger' | 'pulseStagger') =>
      sBandRadar({ prfHz, prfMode, antenna: { azimuthBeamwidthDeg: 4, sidelobeDb: -200 } })
    const fold = (prfHz: number[], prfMode: 'single' | 'dwellStagger' | 'pulseStagger') =>
      finish(foldedClutter(ground, place, 20, EARTH, radar(prfHz, prfMode), 1, site, 200_000))
    const peakNm = (ratio: Float32Array): [nm: number, db: number] => {
      const row = ratio.subarray(90 * 300, 91 * 300)
      const j = row.indexOf(Math.max(...row))
      return [((j + 0.5) * 150) / M_PER_NM, toDb(row[j])]
    }
    const [at1000, level] = peakNm(fold([1000], 'single').ratio)
    expect(Math.abs(at1000 - 14.06)).toBeLessThan(0.4)
    expect(level).toBeGreaterThan(10)
    const [at1100] = peakNm(fold([1100], 'single').ratio)
    expect(Math.abs(at1100 - apparentRangeM(95 * M_PER_NM, 1100) / M_PER_NM)).toBeLessThan(0.4)
    const [, halved] = peakNm(fold([1000, 1100], 'pulseStagger').ratio)
    expect(halved).toBeCloseTo(Math.max(level, peakNm(fold([1100], 'single').ratio)[1]) + toDb(0.5), 1)
    const both = fold([1000, 1100], 'dwellStagger')
    expect(peakNm(both.ratio)[1]).toBeGreaterThanOrEqual(level - 1e-3)
    // terrain ends 11 km to the north and south
    const figure = secondTimeAround(both, place.lat)
    expect(figure.km2).toBeGreaterThan(0)
    expect(figure.notEvaluatedBeyondM).toBeLessThan(12_000)
  })
})

describe('a boat off a coast at X band', () => {
  it('detection range by azimuth, land shadow, tide and minimum range', async () => {
    const shape = await utmShape(500, 500, 50)
    // sea to the east of column 200, a low shore, and an islet 5 km off
    const islet = (col: number, row: number) => Math.max(0, 60 - 4 * Math.hypot(col - 300, row - 250))
    const height = (col: number, row: number) => (col < 200 ? 5 : islet(col, row))
    const code = Uint8Array.from({ length: 250_000 }, (_, k) => (height(k % 500, Math.floor(k / 500)) > 0 ? 1 : 0))
    const ground = groundOn(shape, height, { code, codes: [cover('water'), cover('open')] })
    const place = siteAt(ground, 200, 250)
    const radar = testRadar({
      frequencyHz: 9.41e9,
      peakPowerW: 25_000,
      pulseWidthS: 0.25e-6,
      noiseBandwidthHz: 4e6,
      polarisation: 'H',
      antenna: { gainDbi: 32, azimuthBeamwidthDeg: 0.8, elevationPattern: 'gaussian', elevationBeamwidthDeg: 20 },
    })
    const grid: PolarShape = { azimuths: 1800, ranges: 320, azimuthStepDeg: 0.2, rangeStepM: 37.5 }
    const { site, masks } = finish(sweep(ground, place, [40], grid, EARTH))
    const seen = (i: number, j: number) => masks[0].state[i * 320 + j] === CELL.inSight
    const detectable = (weather: Weather, i: number) => {
      const { cnrDb } = finish(clutterToNoise(site, masks[0], ground.codes, place, 40, EARTH, radar, 0, { weather }))
      return Array.from({ length: 320 }, (_, j) => {
        const r = (j + 0.5) * 37.5
        const s = signalToNoiseDb(radar, { rcsM2: 1, slantRangeM: r })
        return seen(i, j) && toDb(fromDb(s) / (1 + (fromDb(cnrDb[i * 320 + j]) || 0))) >= 13 ? r : 0
      })
    }
    const east = (90 / 0.2) | 0
    const open = (60 / 0.2) | 0
    const calm = detectable({ ...FAIR, seaState: 1 }, open)
    const rough = detectable({ ...FAIR, seaState: 5 }, open)
    const count = (ranges: number[]) => ranges.filter((r) => r > 0).length
    expect(count(calm)).toBeGreaterThan(count(rough))
    // behind the islet nothing, beside it to the same range as elsewhere
    const behind = detectable({ ...FAIR, seaState: 1 }, east).slice(Math.ceil(5_300 / 37.5), Math.floor(6_500 / 37.5))
    expect(behind.every((r) => r === 0)).toBe(true)
    expect(Math.max(...calm)).toBeGreaterThan(6_000)
    // high water brings the sea nearer the horizontal: less clutter at the same range
    const at = open * 320 + 150
    const clutterAt = (tideM: number) =>
      finish(clutterToNoise(site, masks[0], ground.codes, place, 40, EARTH, radar, 0, { weather: { ...FAIR, tideM } })).cnrDb[at]
    expect(clutterAt(-2)).toBeGreaterThan(clutterAt(0))
    expect(clutterAt(0)).toBeGreaterThan(clutterAt(2))
    expect(clutterAt(-2) - clutterAt(2)).toBeLessThan(2)
    expect(minimumRangeM(radar)).toBeCloseTo(37.47, 2)
  })
})
