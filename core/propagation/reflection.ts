import { DEG_PER_RAD, RAD_PER_DEG, wavelengthM } from '../units/index.ts'

/** A reflection coefficient as magnitude and phase (deg, −180 to 180). */
export interface Reflection {
  readonly magnitude: number
  readonly phaseDeg: number
}
export interface Surface {
  readonly permittivity: number
  readonly conductivitySm: number
}
/** Ground constants for metre and centimetre waves, from memory (after Recommendation ITU-R P.527). */
export const SURFACES = {
  sea: { permittivity: 70, conductivitySm: 5 },
  freshWater: { permittivity: 80, conductivitySm: 3e-3 },
  wetGround: { permittivity: 30, conductivitySm: 1e-2 },
  mediumDryGround: { permittivity: 15, conductivitySm: 1e-3 },
  veryDryGround: { permittivity: 3, conductivitySm: 1e-4 },
} as const satisfies Record<string, Surface>

/** Fresnel reflection of a smooth surface at a grazing angle, both polarisations; ε_c = ε − j60λσ. Mathematics. */
export function fresnelReflection(s: Surface, frequencyHz: number, grazingDeg: number): { horizontal: Reflection; vertical: Reflection } {
  const sin = Math.sin(grazingDeg * RAD_PER_DEG)
  const cos = Math.cos(grazingDeg * RAD_PER_DEG)
  const e: Complex = [s.permittivity, -60 * wavelengthM(frequencyHz) * s.conductivitySm]
  const q = root([e[0] - cos * cos, e[1]])
  const ratio = (a: Complex, b: Complex): Reflection => {
    const [re, im] = divide([a[0] - b[0], a[1] - b[1]], [a[0] + b[0], a[1] + b[1]])
    return { magnitude: Math.hypot(re, im), phaseDeg: Math.atan2(im, re) * DEG_PER_RAD }
  }
  return { horizontal: ratio([sin, 0], q), vertical: ratio([e[0] * sin, e[1] * sin], q) }
}

/** Specular reduction by roughness, from g = σ_h sin ψ/λ. Sources: Ament (1953); Miller, Brown and Vegh (1984); mathematics. */
export function roughnessFactors(g: number): { ament: number; millerBrown: number } {
  const z = 2 * (2 * Math.PI * g) ** 2
  return { ament: Math.exp(-z), millerBrown: Math.exp(-z) * besselI0(z) }
}

/** Modified Bessel function I₀, x ≥ 0. Mathematics: power series, asymptotic beyond 30 with the exponential kept finite to 700. */
function besselI0(x: number): number {
  if (x > 30) return (Math.exp(x) / Math.sqrt(2 * Math.PI * x)) * (1 + 1 / (8 * x) + 9 / (128 * x * x) + 225 / (3072 * x ** 3))
  let term = 1
  let sum = 1
  for (let n = 1; term > sum * 1e-17; n++) sum += term *= (x / (2 * n)) ** 2
  return sum
}

type Complex = readonly [number, number]
const divide = ([a, b]: Complex, [c, d]: Complex): Complex => [(a * c + b * d) / (c * c + d * d), (b * c - a * d) / (c * c + d * d)]
function root([a, b]: Complex): Complex {
  const m = Math.hypot(a, b)
  return [Math.sqrt((m + a) / 2), Math.sign(b || 1) * Math.sqrt((m - a) / 2)]
}
