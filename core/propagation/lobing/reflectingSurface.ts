import { wavelengthM } from '../../units/index.ts'
import { fresnelReflection, roughnessFactors, SURFACES } from '../reflection.ts'

/** What a cell of ground throws back toward a target: nothing that is counted, level open ground, or water. */
export const REFLECTS = { none: 0, open: 1, water: 2 } as const

/** Roughness of low-relief open ground, m rms: the smoothest land of Barton (1985), from memory; smoother ground makes deeper nulls. */
export const OPEN_GROUND_ROUGHNESS_M = 0.3
/** Significant wave height by sea state 0 to 6, middle of its class, m, from memory. */
const WAVE_HEIGHT_M = [0, 0.15, 0.6, 1.2, 1.95, 3.05, 4.9]
/** Roughness of water, m rms: a quarter of the significant wave height; sea state 0 to 6, held beyond. From memory. */
export function waterRoughnessM(seaState: number): number {
  const s = Math.min(6, Math.max(0, seaState))
  const n = Math.min(5, Math.floor(s))
  return (WAVE_HEIGHT_M[n] + (s - n) * (WAVE_HEIGHT_M[n + 1] - WAVE_HEIGHT_M[n])) / 4
}

const TAN_TO = 0.6
const ENTRIES = 4096
const PER_UNIT = ENTRIES / TAN_TO
/** Specular reflection, roughness in it, by tangent of the grazing angle from 0 to 0.6, as real and imaginary part; held beyond. */
export interface ReflectionTable {
  readonly real: Float64Array
  readonly imaginary: Float64Array
}
/**
 * Table of a surface at a frequency. Circular polarisation takes the horizontal coefficient, whose nulls are the deeper ones. Sources: Fresnel
 * (mathematics) over ground constants after Recommendation ITU-R P.527, from memory; roughness after Miller, Brown and Vegh (1984).
 */
export function reflectionTable(
  kind: 'open' | 'water',
  frequencyHz: number,
  polarisation: 'H' | 'V' | 'circular',
  roughnessM: number,
): ReflectionTable {
  const surface = kind === 'water' ? SURFACES.sea : SURFACES.mediumDryGround
  const real = new Float64Array(ENTRIES + 2)
  const imaginary = new Float64Array(ENTRIES + 2)
  for (let n = 0; n < real.length; n++) {
    const grazing = Math.atan(n / PER_UNIT)
    const both = fresnelReflection(surface, frequencyHz, (grazing * 180) / Math.PI)
    const { magnitude, phaseDeg } = polarisation === 'V' ? both.vertical : both.horizontal
    const size = magnitude * roughnessFactors((roughnessM * Math.sin(grazing)) / wavelengthM(frequencyHz)).millerBrown
    real[n] = size * Math.cos((phaseDeg * Math.PI) / 180)
    imaginary[n] = size * Math.sin((phaseDeg * Math.PI) / 180)
  }
  return { real, imaginary }
}

/** Place in a table of a grazing angle, by its tangent ≥ 0. */
export const tablePlace = (tan: number): number => Math.min(ENTRIES, tan * PER_UNIT)

/** Below this grazing angle, rad, the two-ray sum leaves its range: (λ/2πa_e)^⅓. Source: Kerr, Propagation of Short Radio Waves (1951). */
export const leastGrazingRad = (wavelength: number, effectiveRadiusM: number): number =>
  (wavelength / (2 * Math.PI * effectiveRadiusM)) ** (1 / 3)
