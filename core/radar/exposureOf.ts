import { elevationGain } from '../antenna/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import { fieldRegionsM, keepClear, localExposureLimits, wholeBodyExposureLimits } from './exposure.ts'
import type { RadarInput } from './types.ts'

/** A reference level, W/m², by the name it is printed with, and how its number came here. */
export interface ExposureLimit {
  readonly limitWm2: number
  readonly name: string
  readonly source: string
  readonly basis: 'read' | 'from memory' | 'by hand'
}
/** Keep-clear distances of a radar that is set as high as the study allows. */
export interface ExposureFigure {
  readonly limit: ExposureLimit
  /** Peak power × pulse width × highest PRF, W, and the duty behind it, 0…1. */
  readonly averagePowerW: number
  readonly duty: number
  /** Ground reflection in power. */
  readonly reflectionFactor: number
  /** Antenna stopped, main beam: the larger of the far-field and the near-field answer, m. */
  readonly stoppedM: number
  /** Which of the two it is. */
  readonly by: 'far field' | 'near field'
  readonly farFieldFormulaM: number
  /** 0.6 D²/λ: inside it no rotating value is given. */
  readonly transitionM: number
  /** Antenna turning, averaged over a turn, m; stands second, never alone. Null where it would lie inside 0.6 D²/λ or the antenna does not turn. */
  readonly rotatingM: number | null
  readonly rotatingNot: 'inside 0.6 D²/λ' | 'the antenna does not turn' | null
  /** Lower half-power edge of the beam, deg above the antenna's horizontal; null where the pattern has none. */
  readonly lowerEdgeDeg: number | null
  /** Height of that edge at the stopped distance above level ground at the foot of the mast, m; negative: it has met the ground before. */
  readonly lowerEdgeAboveGroundM: number | null
}
export interface ExposureOptions {
  /** Power factor of ground reflection, 1 to 4; 4 unless stated. */
  readonly reflectionFactor?: number
  /** Limits chosen; the lower of ICNIRP's local and whole-body levels for the public unless stated. */
  readonly limits?: readonly ExposureLimit[]
}

/** Reference levels for the public at a frequency, lowest first. Sources: ICNIRP 2020, Table 6 as reprinted in a textbook; Table 5 from memory. */
export function publicLimits(frequencyHz: number): ExposureLimit[] {
  const ghz = frequencyHz / 1e9
  const limits: ExposureLimit[] = [
    {
      limitWm2: wholeBodyExposureLimits(ghz).publicWm2,
      name: 'general public, whole body, 30 minutes',
      source: 'ICNIRP 2020, Table 5',
      basis: 'from memory',
    },
    {
      limitWm2: localExposureLimits(ghz).publicWm2,
      name: 'general public, local, 6 minutes',
      source: 'ICNIRP 2020, Table 6',
      basis: 'read',
    },
  ]
  return limits.sort((a, b) => a.limitWm2 - b.limitWm2)
}

/** Step of the search for the beam's lower edge, deg, and how far down it goes. */
const EDGE_STEP_DEG = 0.01
const EDGE_DOWN_DEG = 60

/** Elevation of the lower half-power edge, deg; null where the gain never falls to half below the peak. */
function lowerEdgeDeg(r: RadarInput, tiltDeg: number): number | null {
  for (let n = 0; n * EDGE_STEP_DEG <= EDGE_DOWN_DEG; n++) {
    const elevation = tiltDeg - n * EDGE_STEP_DEG
    if (elevationGain(r.antenna, elevation, tiltDeg) < 0.5) return elevation
  }
  return null
}

/**
 * Keep-clear distances, m: headline with the antenna stopped in the main beam, the larger of the far-field and near-field answers at the lowest of
 * the limits; the value of a turning antenna (power averaged over a turn, far field) second. Null when an aperture side is not stated: the near
 * field cannot be judged without it. Pulse-peak limits are not assessed. Sources: far field mathematics; near field FCC OET Bulletin 65, from
 * memory. Frequency 30 MHz to 300 GHz.
 */
export function exposureOf(r: RadarInput, tiltDeg: number, mastHeightM: number, options: ExposureOptions = {}): ExposureFigure | null {
  const { apertureWidthM, apertureHeightM, gainDbi, azimuthBeamwidthDeg } = r.antenna
  if (apertureWidthM === null || apertureHeightM === null) return null
  const limits = options.limits && options.limits.length > 0 ? options.limits : publicLimits(r.frequencyHz)
  const limit = limits.reduce((low, x) => (x.limitWm2 < low.limitWm2 ? x : low))
  const reflectionFactor = options.reflectionFactor ?? 4
  const duty = r.pulseWidthS * Math.max(...r.prfHz)
  const averagePowerW = r.peakPowerW * duty
  const { limitWm2 } = limit
  const clear = keepClear({
    averagePowerW,
    gainDbi,
    frequencyHz: r.frequencyHz,
    apertureWidthM,
    apertureHeightM,
    limitWm2,
    reflectionFactor,
  })
  const { transitionM } = fieldRegionsM(Math.max(apertureWidthM, apertureHeightM), r.frequencyHz)
  const turns = r.rotationRpm > 0
  const turningM = clear.farFieldFormulaM * Math.sqrt(Math.min(1, azimuthBeamwidthDeg / 360))
  const rotatingNot = !turns ? 'the antenna does not turn' : turningM < transitionM ? 'inside 0.6 D²/λ' : null
  const edge = lowerEdgeDeg(r, tiltDeg)
  return {
    limit,
    averagePowerW,
    duty,
    reflectionFactor,
    stoppedM: clear.stoppedM,
    by: clear.stoppedM > clear.farFieldFormulaM ? 'near field' : 'far field',
    farFieldFormulaM: clear.farFieldFormulaM,
    transitionM,
    rotatingM: rotatingNot === null ? turningM : null,
    rotatingNot,
    lowerEdgeDeg: edge,
    lowerEdgeAboveGroundM: edge === null ? null : mastHeightM + clear.stoppedM * Math.tan(edge * RAD_PER_DEG),
  }
}
