import { BUILT_IN_LAND_TABLE, type ClutterCells, clutterToNoise, type LandTable } from '../../core/clutter/index.ts'
import type { Earth } from '../../core/geodesy/index.ts'
import type { GroundCode, TerrainName } from '../../core/landcover/index.ts'
import type { SightCells, SiteCells } from '../../core/masking/index.ts'
import { CELL, type PolarShape } from '../../core/polar/index.ts'
import type { RadarInput } from '../../core/radar/index.ts'
import { RELIEF, type Site } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'

export const EARTH: Earth = { effectiveEarthFactor: 4 / 3, earthRadiusM: 6_371_000 }
export const SITE: Site = { lon: 0, lat: 0, groundHeightM: null, clearingRadiusM: 0 }
export const codeOf = (terrain: TerrainName): GroundCode => ({ terrain, coverHeightM: 0, sourceClass: null, mark: null })

/** Cells made by hand: ground 100 m, one code, low relief, all in sight; change the arrays before use. */
export function flatCells(grid: PolarShape, heightM: number, effRadiusM = (4 / 3) * 6_371_000): { site: SiteCells; mask: SightCells } {
  const n = grid.azimuths * grid.ranges
  const site: SiteCells = {
    kind: 'site',
    version: 1,
    key: '',
    grid,
    groundM: new Float32Array(n).fill(100),
    code: new Uint8Array(n),
    relief: new Uint8Array(n).fill(RELIEF.low),
    slopePermille: new Int16Array(n),
    heightToSeeM: new Float32Array(n),
    siteGroundM: 100,
    effectiveRadiusM: new Float64Array(grid.azimuths).fill(effRadiusM),
  }
  const mask: SightCells = {
    kind: 'sight',
    version: 1,
    key: '',
    grid,
    heightM,
    state: new Uint8Array(n).fill(CELL.inSight),
    inSight: new Uint16Array(n).fill(65535),
    floorM: new Float32Array(n).fill(100),
    floorBandM: new Float32Array(n),
    horizon: [],
  }
  return { site, mask }
}

export function clutterOf(
  cells: { site: SiteCells; mask: SightCells },
  r: RadarInput,
  codes: readonly GroundCode[] = [codeOf('rural')],
  landTable: LandTable = BUILT_IN_LAND_TABLE,
): ClutterCells {
  return finish(clutterToNoise(cells.site, cells.mask, codes, SITE, cells.mask.heightM, EARTH, r, r.antenna.tiltDeg, { landTable }))
}

/** The built-in table with one strength everywhere, for checks against plain arithmetic. */
export function uniformTable(meanDb: number): LandTable {
  const rows = Object.entries(BUILT_IN_LAND_TABLE.rows).map(([name, bands]) => [
    name,
    bands.map((b) => ({ ...b, meanDb: b.meanDb.map(() => meanDb) })),
  ])
  return { ...BUILT_IN_LAND_TABLE, rows: Object.fromEntries(rows) }
}
