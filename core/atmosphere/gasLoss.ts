import { OXYGEN_LINES, WATER_LINES } from './gasLines.ts'

/** Where the gas model holds, GHz; below 1 GHz it is computed all the same and marked outside the Recommendation. */
export const GAS_LIMITS = { frequencyGHz: { low: 1, high: 350 } } as const
/** Reference surface air: 15 °C, 1013.25 hPa dry, 7.5 g/m³ of vapour. */
export const REFERENCE_AIR = { dryPressureHpa: 1013.25, temperatureK: 288.15, vapourGM3: 7.5 } as const
export interface Air {
  readonly dryPressureHpa: number
  readonly temperatureK: number
  readonly vapourGM3: number
}
export interface GasLoss {
  /** One way, dB/km. */
  readonly oxygenDbKm: number
  readonly waterDbKm: number
}

/**
 * Specific attenuation by oxygen and water vapour, one way, dB/km, line by line. `frequencyGHz` above 0 (Recommendation: 1 to 350 GHz).
 * Source: Recommendation ITU-R P.676-12, Annex 1, equations 1 to 9 and Tables 1 and 2.
 */
export function gasLossDbKm(frequencyGHz: number, air: Air = REFERENCE_AIR): GasLoss {
  const f = frequencyGHz
  const p = air.dryPressureHpa
  const theta = 300 / air.temperatureK
  const e = (air.vapourGM3 * air.temperatureK) / 216.7
  let oxygen = 0
  for (const [f0, a1, a2, a3, a4, a5, a6] of OXYGEN_LINES) {
    const strength = a1 * 1e-7 * p * theta ** 3 * Math.exp(a2 * (1 - theta))
    const width = Math.hypot(a3 * 1e-4 * (p * theta ** (0.8 - a4) + 1.1 * e * theta), Math.sqrt(2.25e-6))
    const mixing = (a5 + a6 * theta) * 1e-4 * (p + e) * theta ** 0.8
    oxygen += strength * lineShape(f, f0, width, mixing)
  }
  const d = 5.6e-4 * (p + e) * theta ** 0.8
  oxygen += f * p * theta ** 2 * (6.14e-5 / (d * (1 + (f / d) ** 2)) + (1.4e-12 * p * theta ** 1.5) / (1 + 1.9e-5 * f ** 1.5))
  let water = 0
  for (const [f0, b1, b2, b3, b4, b5, b6] of WATER_LINES) {
    const strength = b1 * 0.1 * e * theta ** 3.5 * Math.exp(b2 * (1 - theta))
    const pressure = b3 * 1e-4 * (p * theta ** b4 + b5 * e * theta ** b6)
    const width = 0.535 * pressure + Math.sqrt(0.217 * pressure ** 2 + (2.1316e-12 * f0 ** 2) / theta)
    water += strength * lineShape(f, f0, width, 0)
  }
  return { oxygenDbKm: 0.182 * f * oxygen, waterDbKm: 0.182 * f * water }
}

function lineShape(f: number, f0: number, width: number, mixing: number): number {
  const below = f0 - f
  const above = f0 + f
  return (f / f0) * ((width - mixing * below) / (below ** 2 + width ** 2) + (width - mixing * above) / (above ** 2 + width ** 2))
}

/** Scale heights of oxygen and water vapour, m. Common practice, from memory. */
export const GAS_SCALE_HEIGHTS_M = { oxygen: 6000, water: 2000 } as const

/**
 * Two-way gas loss along a straight ray, dB, from a height to another over a slant range; losses fall off exponentially with height (scale
 * heights from memory) and the height is taken linear along the ray.
 */
export function twoWayGasLossDb(surface: GasLoss, fromHeightM: number, toHeightM: number, slantRangeM: number): number {
  const km = slantRangeM / 1000
  return (
    2 *
    km *
    (surface.oxygenDbKm * meanDecay(fromHeightM, toHeightM, GAS_SCALE_HEIGHTS_M.oxygen) +
      surface.waterDbKm * meanDecay(fromHeightM, toHeightM, GAS_SCALE_HEIGHTS_M.water))
  )
}

/** Mean of exp(−h/H) for h even between two heights; below sea level the surface value is held. */
function meanDecay(fromM: number, toM: number, scaleM: number): number {
  const a = Math.max(0, fromM) / scaleM
  const b = Math.max(0, toM) / scaleM
  return Math.abs(b - a) < 1e-6 ? Math.exp(-a) : (Math.exp(-a) - Math.exp(-b)) / (b - a)
}
