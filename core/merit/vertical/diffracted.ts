import type { SightProfile } from '../../masking/index.ts'
import { deltaBullington, SURFACES } from '../../propagation/index.ts'
import type { OptionCells } from '../optionCells.ts'

/** Most points of a profile that diffraction is worked out over: the highest of each stretch stands for it. */
const MOST_POINTS = 200
/** A target on the ground itself stands this high for the smooth-earth part, m. */
const LEAST_ABOVE_M = 1

/** One-way diffraction loss over the surface of one azimuth, dB, to a height (m MSL) at a ground range (m); 0 or more. */
export type DiffractedLoss = (rangeM: number, heightM: number, groundM: number) => number

/** Loss along a profile. Source: Recommendation ITU-R P.526 §4.5.2 (delta-Bullington), from memory; medium dry ground. */
export function diffractedLoss(o: OptionCells, profile: SightProfile): DiffractedLoss {
  const { distM, heightM } = thinned(profile)
  const polarisation = o.radar.polarisation === 'V' ? 'V' : 'H'
  const { frequencyHz } = o.radar
  const { effectiveRadiusM } = profile
  let held = { rangeM: Number.NaN, d: new Float64Array(0), h: new Float64Array(0) }
  return (rangeM, targetM, groundM) => {
    if (held.rangeM !== rangeM) {
      let n = 0
      while (n < distM.length && distM[n] < rangeM) n++
      const d = new Float64Array(n + 1)
      const h = new Float64Array(n + 1)
      d.set(distM.subarray(0, n))
      h.set(heightM.subarray(0, n))
      d[n] = rangeM
      h[n] = groundM
      held = { rangeM, d, h }
    }
    if (held.d.length < 3) return 0
    const { lossDb } = deltaBullington({
      distM: held.d,
      heightM: held.h,
      firstAboveM: profile.antennaM - held.h[0],
      secondAboveM: Math.max(LEAST_ABOVE_M, targetM - groundM),
      effectiveRadiusM,
      frequencyHz,
      polarisation,
      ...SURFACES.mediumDryGround,
    })
    return Number.isFinite(lossDb) ? Math.max(0, lossDb) : 0
  }
}

/** The known part of a profile with at most MOST_POINTS points; first point at the antenna's foot. */
function thinned(p: SightProfile): { distM: Float64Array; heightM: Float64Array } {
  const known: number[] = []
  for (let i = 0; i < p.distM.length; i++) if (!Number.isNaN(p.surfaceM[i]) && p.distM[i] > 0) known.push(i)
  const each = Math.max(1, Math.ceil(known.length / MOST_POINTS))
  const picked: number[] = []
  for (let n = 0; n < known.length; n += each) {
    let best = known[n]
    for (let k = n + 1; k < Math.min(known.length, n + each); k++) if (p.surfaceM[known[k]] > p.surfaceM[best]) best = known[k]
    picked.push(best)
  }
  const foot = known.length > 0 ? p.groundM[known[0]] : p.antennaM
  return {
    distM: Float64Array.from([0, ...picked.map((i) => p.distM[i])]),
    heightM: Float64Array.from([Math.min(foot, p.antennaM), ...picked.map((i) => p.surfaceM[i])]),
  }
}
