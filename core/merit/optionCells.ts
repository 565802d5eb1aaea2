import type { ClutterCells, LandTable } from '../clutter/index.ts'
import type { Earth } from '../geodesy/index.ts'
import type { SightCells, SiteCells } from '../masking/index.ts'
import type { RadarInput } from '../radar/index.ts'
import type { Ground, Site } from '../terrain/index.ts'

/** Everything known about one option (candidate × mast height × tilt): what figures and layers are read from. */
export interface OptionCells {
  readonly ground: Ground
  readonly place: Site
  readonly earth: Earth
  readonly radar: RadarInput
  /** The study's own land table; null for the built-in one. */
  readonly landTable: LandTable | null
  readonly heightM: number
  readonly tiltDeg: number
  readonly site: SiteCells
  readonly mask: SightCells
  readonly clutter: ClutterCells
}

/** Electrical centre, m MSL. */
export const antennaM = (o: Pick<OptionCells, 'site' | 'heightM'>): number => o.site.siteGroundM + o.heightM

/** Mean effective earth radius over the azimuths of a site, m: for angles and slant ranges of targets, where 0.3 % of bulge is under a metre. */
export function meanEffectiveRadiusM(site: SiteCells): number {
  let sum = 0
  for (const r of site.effectiveRadiusM) sum += r
  return sum / site.effectiveRadiusM.length
}
