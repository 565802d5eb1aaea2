import { describe, expect, it } from 'vitest'
import { geodesicDirect, geodesicInverse } from '../../core/geodesy/index.ts'
import {
  azimuthIndexOf,
  CELL,
  cellAreasM2,
  cellAt,
  cellCentre,
  cellOfLonLat,
  defaultPolarRun,
  gaussianRadiusM,
  isMasked,
  isSeen,
  isUnknown,
  polarShape,
  ringAreaM2,
  ringOf,
} from '../../core/polar/index.ts'

const SITE = { lon: 14.2, lat: 47.5 }
const GRID = polarShape({ maxRangeM: 60_000, rangeStepM: 75, azimuthStepDeg: 0.25 })

describe('polar grid', () => {
  it('holds whole azimuths and reaches the range asked for', () => {
    expect(GRID).toEqual({ azimuths: 1440, ranges: 800, azimuthStepDeg: 0.25, rangeStepM: 75 })
    expect(polarShape({ maxRangeM: 1000, rangeStepM: 300, azimuthStepDeg: 0.7 })).toMatchObject({ azimuths: 515, ranges: 4 })
  })
  it('refuses more than 16 million cells and names the step that would do', () => {
    expect(() => polarShape({ maxRangeM: 200_000, rangeStepM: 15, azimuthStepDeg: 0.25 })).toThrow(
      /19200000|16 million cells.*rangeStepM 30/,
    )
  })
  it('steps by default: a quarter beamwidth but at most 0.25°, half a gate but at least 15 m, coarser until it fits', () => {
    expect(defaultPolarRun({ azimuthBeamwidthDeg: 1.6, gateM: 180, maxRangeM: 60_000 })).toEqual({
      maxRangeM: 60_000,
      rangeStepM: 90,
      azimuthStepDeg: 0.25,
    })
    expect(defaultPolarRun({ azimuthBeamwidthDeg: 0.7, gateM: 20, maxRangeM: 60_000 })).toEqual({
      maxRangeM: 60_000,
      rangeStepM: 15,
      azimuthStepDeg: 360 / 2058,
    })
    expect(defaultPolarRun({ azimuthBeamwidthDeg: 0.4, gateM: 15, maxRangeM: 400_000 }).rangeStepM).toBe(120)
  })
  it('finds the cell of a place and the place of a cell', () => {
    for (const cell of [0, 799, 800 * 720 + 13, 1440 * 800 - 1]) expect(cellOfLonLat(SITE, GRID, cellCentre(SITE, GRID, cell))).toBe(cell)
    expect(azimuthIndexOf(GRID, 359.9)).toBe(0)
    expect(azimuthIndexOf(GRID, -0.3)).toBe(1439)
    expect(ringOf(GRID, 60_000)).toBe(-1)
    expect(cellAt(GRID, 10, 60_001)).toBe(-1)
  })
  it('knows unknown, seen and masked apart', () => {
    const states = Object.values(CELL)
    for (const s of states) expect([isUnknown(s), isSeen(s), isMasked(s)].filter(Boolean)).toHaveLength(1)
    expect(states.filter(isUnknown)).toEqual([CELL.beyondVoid, CELL.outside])
  })
})

describe('cell areas', () => {
  it('add up to the cap of the sphere', () => {
    const r = gaussianRadiusM(SITE.lat)
    const sum = cellAreasM2(GRID, SITE.lat).reduce((a, b) => a + b, 0) * GRID.azimuths
    expect(sum / (2 * Math.PI * r * r * (1 - Math.cos(60_000 / r)))).toBeCloseTo(1, 9)
    expect(ringAreaM2(0, 100, r)).toBeCloseTo(Math.PI * 1e4, 3)
  })
  it('agree with geodesics on the ellipsoid: ring width times the length of the geodesic circle, to 1 in 10⁵ at 100 km', () => {
    const n = 720
    let circle = 0
    for (let i = 0; i < n; i++) {
      const a = geodesicDirect(SITE, (360 * i) / n, 100_000)
      circle += geodesicInverse(a, geodesicDirect(SITE, (360 * (i + 1)) / n, 100_000)).distanceM
    }
    circle *= Math.PI / n / Math.sin(Math.PI / n)
    expect(ringAreaM2(99_999.5, 100_000.5, gaussianRadiusM(SITE.lat)) / circle).toBeCloseTo(1, 5)
  })
})
