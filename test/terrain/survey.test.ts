import { beforeAll, describe, expect, it } from 'vitest'
import {
  type Ask,
  buildGround,
  cellAt,
  elevationAngleDeg,
  finish,
  type Ground,
  heightOnRayM,
  horizonAt,
  readSurvey,
  type Site,
  type Survey,
  sightPoint,
  surveyLine,
} from '../../core/index.ts'
import { from, PLACE, plainGround, studyOf, work } from '../merit/plain.ts'

// A surveyed horizon on a plain at 100 m with a ridge of 300 m at 12 km in the west; antenna at 150 m, instrument at 102 m.
const R = 6_371_000
const RADIUS = (4 / 3) * R
const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: R }
const HEAD = 'azimuth_deg,elevation_deg,range_m,instrument_height_m,method'
const rowsOf = (...lines: string[]) => readSurvey([HEAD, ...lines].join('\n'), 's.csv')
const surveyOf = (...lines: string[]): Survey => ({ candidate: 'A', file: 's.csv', rows: rowsOf(...lines) })
let parts: Ask['ground']
beforeAll(async () => {
  parts = await plainGround(25_000, (east, north) =>
    east < -Math.abs(north) ? Math.max(0, 200 - Math.abs(Math.hypot(east, north) - 12_000)) : 0,
  )
})
const groundOf = (survey: Survey): Ground => finish(buildGround({ serial: 1, ...parts, surveys: [survey] }))
const site: Site = { ...PLACE, groundHeightM: 100, clearingRadiusM: 0, survey: { candidate: 'A', earth: EARTH } }
/** A tree line 1° over the instrument at 3 km to the east: 155.1 m. */
const TREES = ['88,1.0,3000,2,theodolite', '90,1.0,3000,2,theodolite', '92,1.0,3000,2,theodolite']
const treeTopM = heightOnRayM(102, 1, 3000, RADIUS)

describe('surveyed horizon in the line of sight', () => {
  it('the obstacle is a height at its range, seen from the mast at another elevation', () => {
    expect(treeTopM).toBeCloseTo(102 + 3000 * Math.tan(Math.PI / 180) + 3000 ** 2 / (2 * RADIUS), 1)
    const [h] = horizonAt(groundOf(surveyOf(...TREES)), site, 50, EARTH, [90], 20_000)
    expect(h.obstacle).toBe('surveyed')
    expect(h.rangeM).toBeCloseTo(3000, 2)
    expect(h.elevationDeg).toBeCloseTo(elevationAngleDeg(150, treeTopM, 3000, RADIUS), 4)
    // at the instrument's own height the elevation is the one surveyed
    expect(horizonAt(groundOf(surveyOf(...TREES)), site, 2, EARTH, [90], 20_000)[0].elevationDeg).toBeCloseTo(1, 4)
  })
  it('the floor behind it is the line over its top; at k = 1 the obstacle stands where it stands', () => {
    const g = groundOf(surveyOf(...TREES))
    for (const [k, radius] of [
      [4 / 3, RADIUS],
      [1, R],
    ] as const) {
      const s = sightPoint(g, site, 50, { ...EARTH, effectiveEarthFactor: k }, from(90, 10_000))
      const floorM = heightOnRayM(150, elevationAngleDeg(150, treeTopM, 3000, radius), 10_000, radius)
      expect(Math.abs(s.floorM - floorM)).toBeLessThan(0.05)
      expect(s.controlling).toMatchObject({ obstacle: 'surveyed' })
      // 90 % error of 0.05° at 3 km is 2.6 m, at 10 km 8.7 m by its lever, with 1 m of the antenna's own ground
      expect(s.floorBandM).toBeGreaterThan(8.7)
      expect(s.floorBandM).toBeLessThan(9.2)
    }
    const nearer = sightPoint(g, site, 50, EARTH, from(90, 2000))
    expect(nearer.controlling.obstacle).not.toBe('surveyed')
  })
  it('the higher of both: a survey under the ridge changes nothing behind it', () => {
    const g = groundOf(surveyOf('269,0.1,12000,2,photograph', '270,0.1,12000,2,photograph', '271,0.1,12000,2,photograph'))
    const { survey: _none, ...bare } = site
    for (const rangeM of [6000, 18_000])
      expect(sightPoint(g, site, 50, EARTH, from(270, rangeM)).floorM).toBeCloseTo(
        sightPoint(g, bare, 50, EARTH, from(270, rangeM)).floorM,
        6,
      )
    expect(horizonAt(g, site, 50, EARTH, [270], 20_000)[0].obstacle).toBe('terrain')
  })
  it('linear between rows up to 5° apart, to 0.5° beside a row that stands alone, through north', () => {
    const line = surveyLine(groundOf(surveyOf('358,1,3000,2,t', '2,2,3000,2,t', '90,1,4000,2,t')), site)!
    const elevationAt = (az: number): number | null => {
      const p = line.at(az)
      return p && elevationAngleDeg(102, p.topM, p.distM, RADIUS)
    }
    expect(elevationAt(358)).toBeCloseTo(1, 5)
    expect(elevationAt(0)).toBeCloseTo(1.5, 5)
    expect(elevationAt(1)).toBeCloseTo(1.75, 5)
    expect(elevationAt(2)).toBeCloseTo(2, 5)
    expect(elevationAt(90.4)).toBeCloseTo(1, 5)
    expect([elevationAt(3), elevationAt(45), elevationAt(90.6), elevationAt(357.4)]).toEqual([null, null, null, null])
    expect(surveyLine(groundOf(surveyOf(...TREES)), { ...site, survey: undefined })).toBeNull()
  })
})

describe('surveyed horizon of a study', () => {
  const survey = surveyOf(...TREES, '270,0.5,12000,2,photograph')
  const study = (used: boolean | undefined) =>
    work(
      { ...parts, surveys: [survey] },
      {
        needs: [],
        run: { maxRangeM: 20_000 },
        candidate: { measuredHorizon: { file: 's.csv' }, ...(used === undefined ? {} : { useMeasuredHorizon: used }) },
      },
    )
  it('is compared, row by row, and not used unless asked', () => {
    const { result, cells } = study(undefined)
    const m = result.figures.measuredHorizon!
    expect(m).toMatchObject({ used: false, file: 's.csv' })
    expect(m.rows.map((r) => r.azimuthDeg)).toEqual([88, 90, 92, 270])
    const east = m.rows[1]
    expect(east).toMatchObject({ measuredDeg: 1, rangeM: 3000, instrumentHeightM: 2, method: 'theodolite' })
    expect(east.correctedDeg).toBeCloseTo(elevationAngleDeg(150, treeTopM, 3000, RADIUS), 9)
    // the open plain: about the dip of the horizon at 20 km
    expect(east.computedDeg as number).toBeLessThan(-0.15)
    expect(east.differenceDeg).toBeCloseTo(east.correctedDeg - (east.computedDeg as number), 12)
    // 0.5° from the instrument is 215 m at 12 km, under the ridge of 300 m
    expect(m.worst).toMatchObject({ azimuthDeg: 270 })
    expect(m.rows[3].differenceDeg as number).toBeLessThan(-0.35)
    const apart = m.rows.map((r) => r.differenceDeg as number)
    expect(m.meanDeg).toBeCloseTo(apart.reduce((s, x) => s + x, 0) / 4, 12)
    expect(m.rmsDeg).toBeCloseTo(Math.sqrt(apart.reduce((s, x) => s + x * x, 0) / 4), 12)
    expect(cells.mask.horizon.every((h) => h.obstacle !== 'surveyed')).toBe(true)
  })
  it('used: sweep and point have the same floor behind it, the comparison stays that with the raster alone', () => {
    const { cells, result } = study(true)
    const at = cellAt(cells.site.grid, 90, 10_075)
    const azimuth = Math.floor(at / cells.site.grid.ranges) * cells.site.grid.azimuthStepDeg
    const range = ((at % cells.site.grid.ranges) + 0.5) * cells.site.grid.rangeStepM
    const point = sightPoint(cells.ground, cells.place, 50, cells.earth, from(azimuth, range))
    expect(Math.abs(cells.mask.floorM[at] - point.floorM)).toBeLessThan(0.05)
    expect(Math.abs(cells.mask.floorBandM[at] - point.floorBandM)).toBeLessThan(0.05)
    expect(point.controlling.obstacle).toBe('surveyed')
    // from 87.5° to 92.5°: half a degree beyond the outer rows
    const taken = cells.mask.horizon.filter((h) => h.obstacle === 'surveyed').map((h) => h.azimuthDeg)
    expect(Math.abs(taken[0]! - 87.5)).toBeLessThan(cells.site.grid.azimuthStepDeg)
    expect(Math.abs(taken.at(-1)! - 92.5)).toBeLessThan(cells.site.grid.azimuthStepDeg)
    expect(taken.length).toBe(Math.floor(5 / cells.site.grid.azimuthStepDeg))
    expect(result.figures.measuredHorizon).toMatchObject({ used: true })
    expect(result.figures.measuredHorizon!.rows[1].computedDeg as number).toBeLessThan(-0.15)
  })
  it('is a default to say no, listed', () => {
    const doc = studyOf({ needs: [], candidate: { measuredHorizon: { file: 's.csv' } } })
    expect(doc.candidates[0]).toMatchObject({ measuredHorizon: { file: 's.csv' } })
  })
})

describe('files of surveys', () => {
  it('rows by rising azimuth, with an error of 0.05° where none is stated', () => {
    const rows = readSurvey(`${HEAD},error_deg\n350,0.2,900,1.6,photograph,0.1\n-10.5,0.4,700,1.6,theodolite,\n`, 's.csv')
    expect(rows.map((r) => [r.azimuthDeg, r.errorDeg])).toEqual([
      [349.5, 0.05],
      [350, 0.1],
    ])
  })
  it.each([
    ['azimuth_deg,elevation_deg\n1,2', /s\.csv.*header: no column range_m, instrument_height_m, method; give columns azimuth_deg/],
    [`${HEAD}\n10,0.5,900,2,t\n20,high,900,2,t`, /s\.csv.*line 3, elevation_deg: elevation is "high"; give -45 to 89/],
    [`${HEAD}\n10,0.5,,2,t`, /line 2, range_m: no range; give 1 to 500000/],
    [`${HEAD}\n10,0.5,900,-2,t`, /line 2, instrument_height_m: instrument height is "-2"/],
    [`${HEAD}\n10,0.5,900,2,`, /line 2, method: no method; say how it was measured/],
    [`${HEAD}\n10,0.5,900,2,t\n370,1,900,2,t`, /line 3, azimuth_deg: azimuth is "370"/],
    [`${HEAD}\n10,0.5,900,2,t\n-350,1,900,2,t`, /azimuth 10 stands on line 2 already; keep one row per azimuth/],
    [`${HEAD}\n`, /no row in it/],
  ])('%j is refused with its line', (text, why) => {
    expect(() => readSurvey(text, 's.csv')).toThrow(why)
  })
})
