import { fromDb, wavelengthM } from '../units/index.ts'

/** Power density on the beam axis in the far field, W/m²; `reflectionFactor` in power, 1 in free space, 4 for full ground reflection. Mathematics. */
export const powerDensityWm2 = (averagePowerW: number, gainDbi: number, rangeM: number, reflectionFactor = 1): number =>
  (reflectionFactor * averagePowerW * fromDb(gainDbi)) / (4 * Math.PI * rangeM * rangeM)

/** Range at which the far-field density falls to a limit, m. Mathematics. */
export const exposureRangeM = (averagePowerW: number, gainDbi: number, limitWm2: number, reflectionFactor = 1): number =>
  Math.sqrt((reflectionFactor * averagePowerW * fromDb(gainDbi)) / (4 * Math.PI * limitWm2))

/** Boundaries of the regions in front of an aperture of largest side D (m): far field 2D²/λ; near field D²/4λ; transition to 0.6D²/λ. */
export function fieldRegionsM(apertureM: number, frequencyHz: number): { farFieldM: number; nearFieldM: number; transitionM: number } {
  const unit = apertureM ** 2 / wavelengthM(frequencyHz)
  return { farFieldM: 2 * unit, nearFieldM: unit / 4, transitionM: 0.6 * unit }
}

export interface ExposureLimits {
  readonly publicWm2: number
  readonly occupationalWm2: number
}
export const EXPOSURE_LIMITS_RANGE = { frequencyGHz: { low: 0.03, high: 300 } } as const

/** Local exposure over 6 minutes, W/m², 30 MHz to 300 GHz. Source: ICNIRP 2020, Table 6, coefficients read in a textbook reprint. */
export function localExposureLimits(frequencyGHz: number): ExposureLimits {
  const mhz = frequencyGHz * 1000
  if (mhz <= 400) return { publicWm2: 10, occupationalWm2: 50 }
  if (mhz <= 2000) return { publicWm2: 0.058 * mhz ** 0.86, occupationalWm2: 0.29 * mhz ** 0.86 }
  if (frequencyGHz <= 6) return { publicWm2: 40, occupationalWm2: 200 }
  return { publicWm2: 55 / frequencyGHz ** 0.177, occupationalWm2: 275 / frequencyGHz ** 0.177 }
}

/** Whole-body exposure over 30 minutes, W/m², 30 MHz to 300 GHz. Source: ICNIRP 2020, Table 5, from memory. */
export function wholeBodyExposureLimits(frequencyGHz: number): ExposureLimits {
  const mhz = frequencyGHz * 1000
  if (mhz <= 400) return { publicWm2: 2, occupationalWm2: 10 }
  if (mhz <= 2000) return { publicWm2: mhz / 200, occupationalWm2: mhz / 40 }
  return { publicWm2: 10, occupationalWm2: 50 }
}

/** What a keep-clear distance is worked out from. */
export interface ExposureInput {
  /** Highest average power the radar can be set to, W. */
  readonly averagePowerW: number
  readonly gainDbi: number
  readonly frequencyHz: number
  readonly apertureWidthM: number
  readonly apertureHeightM: number
  readonly limitWm2: number
  /** Ground reflection in power, 1 to 4; 4 unless stated. */
  readonly reflectionFactor?: number
}
export interface KeepClear {
  /** Antenna stopped, main beam: the larger of the far-field and near-field answers, m. */
  readonly stoppedM: number
  readonly farFieldFormulaM: number
  readonly nearFieldM: number
  /** The distance lies where the far-field formula alone would not do. */
  readonly insideNearField: boolean
}

/**
 * Keep-clear distance for a stopped antenna, m. Near field: 16ηP/(πD²) with η from gain and aperture out to D²/4λ, falling as 1/R to
 * 0.6D²/λ, far field beyond. Source: FCC OET Bulletin 65, from memory; reflection factor in power on every region. Pulse-peak limits are
 * not assessed.
 */
export function keepClear(x: ExposureInput): KeepClear {
  const factor = x.reflectionFactor ?? 4
  const lambda = wavelengthM(x.frequencyHz)
  const largest = Math.max(x.apertureWidthM, x.apertureHeightM)
  const area = x.apertureWidthM * x.apertureHeightM
  const efficiency = Math.min(1, (fromDb(x.gainDbi) * lambda ** 2) / (4 * Math.PI * area))
  const { nearFieldM, transitionM, farFieldM } = fieldRegionsM(largest, x.frequencyHz)
  const farFieldFormulaM = exposureRangeM(x.averagePowerW, x.gainDbi, x.limitWm2, factor)
  // density all through the near field for an aperture of this area (circle of equal area: 16ηP/πD² = 4ηP/A)
  const nearDensity = (factor * 4 * efficiency * x.averagePowerW) / area
  const nearAnswerM = nearDensity <= x.limitWm2 ? 0 : Math.min(transitionM, nearFieldM * (nearDensity / x.limitWm2))
  const stoppedM = Math.max(farFieldFormulaM, nearAnswerM)
  return { stoppedM, farFieldFormulaM, nearFieldM, insideNearField: stoppedM < farFieldM }
}
