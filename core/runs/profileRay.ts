import { elevationAngleDeg, heightOnRayM } from '../geodesy/index.ts'
import type { SightProfile } from '../masking/index.ts'
import { fresnelRadiusM } from '../propagation/index.ts'
import type { ProfileRay } from './types.ts'

/**
 * The straight ray from the antenna of a profile to a target (ground range m, height m MSL), and the radius of its first Fresnel zone at each
 * sample; without a target to the coverage floor at the last known sample. Null where no sample is known. Mathematics.
 */
export function profileRay(
  p: Pick<SightProfile, 'distM' | 'floorM' | 'antennaM' | 'effectiveRadiusM'>,
  wavelengthM: number,
  target: { readonly rangeM: number; readonly heightM: number } | null,
): ProfileRay | null {
  let last = p.distM.length - 1
  while (last >= 0 && !(Number.isFinite(p.floorM[last]) && p.distM[last] > 0)) last--
  if (last < 0) return null
  const toRangeM = target?.rangeM ?? p.distM[last]
  const toHeightM = target?.heightM ?? p.floorM[last]
  if (!(toRangeM > 0)) return null
  const elevationDeg = elevationAngleDeg(p.antennaM, toHeightM, toRangeM, p.effectiveRadiusM)
  const inside = (r: number): boolean => r >= 0 && r <= toRangeM
  return {
    toRangeM,
    toHeightM,
    heightM: p.distM.map((r) => (inside(r) ? heightOnRayM(p.antennaM, elevationDeg, r, p.effectiveRadiusM) : Number.NaN)),
    fresnelM: p.distM.map((r) => (inside(r) ? fresnelRadiusM(wavelengthM, r, toRangeM - r) : Number.NaN)),
  }
}
