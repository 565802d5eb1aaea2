import { knifeEdgeLossDb } from './knifeEdge.ts'
import { type SmoothPath, sphericalLossDb } from './sphericalEarth.ts'

/** A terrain profile between two antennas: distances from the first (m, rising, first 0) and heights (m MSL) of equal length, ends included. */
export interface DiffractionPath {
  readonly distM: ArrayLike<number>
  readonly heightM: ArrayLike<number>
  /** Antenna heights above the ground at the ends, m. */
  readonly firstAboveM: number
  readonly secondAboveM: number
  readonly effectiveRadiusM: number
  readonly frequencyHz: number
  readonly polarisation: 'H' | 'V'
  readonly permittivity: number
  readonly conductivitySm: number
}
export interface DeltaBullington {
  /** Bullington loss on the profile, on the smooth profile, and spherical loss of the smooth path, dB. */
  readonly profileDb: number
  readonly smoothDb: number
  readonly sphericalDb: number
  /** Effective heights over the smooth path, m. */
  readonly effectiveM: readonly [number, number]
  readonly lossDb: number
}

/** Bullington construction, dB, one way; distances in km inside. Source: Recommendation ITU-R P.526 §4.5.1, from memory. */
function bullington(
  d: ArrayLike<number>,
  h: ArrayLike<number>,
  firstM: number,
  secondM: number,
  radiusM: number,
  wavelengthM: number,
): number {
  const last = d.length - 1
  const total = d[last]
  const curve = 1000 / radiusM
  const bulge = (i: number) => 500 * curve * d[i] * (total - d[i])
  let fromFirst = Number.NEGATIVE_INFINITY
  let fromSecond = Number.NEGATIVE_INFINITY
  let nuMax = Number.NEGATIVE_INFINITY
  for (let i = 1; i < last; i++) {
    fromFirst = Math.max(fromFirst, (h[i] + bulge(i) - firstM) / d[i])
    fromSecond = Math.max(fromSecond, (h[i] + bulge(i) - secondM) / (total - d[i]))
    const above = h[i] + bulge(i) - (firstM * (total - d[i]) + secondM * d[i]) / total
    nuMax = Math.max(nuMax, above * Math.sqrt((0.002 * total) / (wavelengthM * d[i] * (total - d[i]))))
  }
  const direct = (secondM - firstM) / total
  let nu = nuMax
  if (fromFirst >= direct) {
    const at = (secondM - firstM + fromSecond * total) / (fromFirst + fromSecond)
    const above = firstM + fromFirst * at - (firstM * (total - at) + secondM * at) / total
    nu = above * Math.sqrt((0.002 * total) / (wavelengthM * at * (total - at)))
  }
  const edge = knifeEdgeLossDb(nu)
  return edge + (1 - Math.exp(-edge / 6)) * (10 + 0.02 * total)
}

/** Diffraction over terrain, dB, one way. Source: Recommendation ITU-R P.526 §4.5.2 (delta-Bullington), from memory. */
export function deltaBullington(p: DiffractionPath): DeltaBullington {
  const count = p.distM.length
  const d = Float64Array.from(p.distM, (x) => x / 1000)
  const h = p.heightM
  const total = d[count - 1]
  const lambda = 299_792_458 / p.frequencyHz
  const first = h[0] + p.firstAboveM
  const second = h[count - 1] + p.secondAboveM
  const profileDb = bullington(d, h, first, second, p.effectiveRadiusM, lambda)
  let v1 = 0
  let v2 = 0
  for (let i = 1; i < count; i++) {
    const step = d[i] - d[i - 1]
    v1 += step * (h[i] + h[i - 1])
    v2 += step * (h[i] * (2 * d[i] + d[i - 1]) + h[i - 1] * (d[i] + 2 * d[i - 1]))
  }
  let startM = (2 * v1 * total - v2) / total ** 2
  let endM = (v2 - v1 * total) / total ** 2
  let highest = Number.NEGATIVE_INFINITY
  let slopeFirst = Number.NEGATIVE_INFINITY
  let slopeSecond = Number.NEGATIVE_INFINITY
  for (let i = 1; i < count - 1; i++) {
    const above = h[i] - (first * (total - d[i]) + second * d[i]) / total
    highest = Math.max(highest, above)
    slopeFirst = Math.max(slopeFirst, above / d[i])
    slopeSecond = Math.max(slopeSecond, above / (total - d[i]))
  }
  if (highest > 0) {
    startM -= (highest * slopeFirst) / (slopeFirst + slopeSecond)
    endM -= (highest * slopeSecond) / (slopeFirst + slopeSecond)
  }
  const effectiveM = [first - Math.min(startM, h[0]), second - Math.min(endM, h[count - 1])] as const
  const smoothDb = bullington(d, new Float64Array(count), effectiveM[0], effectiveM[1], p.effectiveRadiusM, lambda)
  const path: SmoothPath = { ...p, distanceM: total * 1000, firstM: effectiveM[0], secondM: effectiveM[1] }
  const sphericalDb = sphericalLossDb(path)
  return { profileDb, smoothDb, sphericalDb, effectiveM, lossDb: profileDb + Math.max(sphericalDb - smoothDb, 0) }
}
