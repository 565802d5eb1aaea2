import type { TerrainName } from '../../landcover/index.ts'
import { RELIEF } from '../../terrain/index.ts'
import { RAD_PER_DEG } from '../../units/index.ts'

/** Where γ·sin ψ holds (the plateau between near-grazing and near-vertical), and where the low-angle table runs over into it. */
export const GAMMA_LIMITS = { grazingDeg: { low: 10, high: 60 }, tableToDepressionDeg: 8, gammaFromDepressionDeg: 10 } as const
/** Steep ground is never taken at a grazing angle below this: it is in sight, so it faces the radar. */
const LEAST_GRAZING_DEG = 0.1

/**
 * Constant-gamma land clutter, mean σ° in dB at a grazing angle in degrees (0 < angle <= 90): γ·sin ψ. Propagation is not included.
 * Source: Richards, Fundamentals of Radar Signal Processing, near eq. 2.64.
 */
export const constantGammaDb = (gammaDb: number, grazingDeg: number): number =>
  gammaDb + 10 * Math.log10(Math.sin(grazingDeg * RAD_PER_DEG))

/** γ, dB, of the terrain names. Source: Barton, Proc. IEEE 73(2), 1985, from memory; which terrain takes which is our own choice. */
export const GAMMA_DB = { mountains: -5, urban: -5, wooded: -10, rolling: -12, lowRelief: -15 } as const

/** γ, dB, for a terrain and a value of RELIEF. */
export function gammaDbOf(terrain: TerrainName, relief: number): number {
  if (terrain === 'urban') return GAMMA_DB.urban
  if (relief === RELIEF.mountains) return GAMMA_DB.mountains
  if (terrain === 'forest') return GAMMA_DB.wooded
  return relief === RELIEF.high ? GAMMA_DB.rolling : GAMMA_DB.lowRelief
}

/**
 * Mean strength of steep ground, dB: the low-angle table's last value to 8° depression, γ·sin ψ from 10°, linear in dB between. Grazing is the
 * depression plus the local slope along the ray, degrees; held at 0.1° where the slope takes it lower.
 */
export function steepStrengthDb(tableDb: number, gammaDb: number, depressionDeg: number, grazingDeg: number): number {
  const { tableToDepressionDeg: from, gammaFromDepressionDeg: to } = GAMMA_LIMITS
  const share = Math.min(1, Math.max(0, (depressionDeg - from) / (to - from)))
  const gamma = constantGammaDb(gammaDb, Math.min(90, Math.max(LEAST_GRAZING_DEG, grazingDeg)))
  return tableDb + share * (gamma - tableDb)
}
