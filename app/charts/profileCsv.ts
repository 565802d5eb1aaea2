import type { Profile } from '../../core/index.ts'
import { csvOf } from './csv.ts'

const SIGHT = ['masked', 'in sight', 'unknown'] as const
/** A terrain profile as a table, one line per sample. */
export const profileCsv = (p: Profile): string =>
  csvOf([
    { head: 'azimuth_deg', values: Array.from(p.distM, () => p.azimuthDeg), decimals: 2 },
    { head: 'range_m', values: p.distM, decimals: 1 },
    { head: 'ground_m_msl', values: p.groundM, decimals: 2 },
    { head: 'surface_m_msl', values: p.surfaceM, decimals: 2 },
    { head: 'coverage_floor_m_msl', values: p.floorM, decimals: 2 },
    { head: 'floor_band_m', values: p.floorBandM, decimals: 2 },
    { head: 'sight', values: Array.from(p.inSight, (s) => SIGHT[s]) },
    { head: 'ray_m_msl', values: p.ray?.heightM ?? [], decimals: 2 },
    { head: 'fresnel_radius_m', values: p.ray?.fresnelM ?? [], decimals: 2 },
  ])
