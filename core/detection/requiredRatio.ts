import { hitsOf, integratedPulses } from '../doppler/index.ts'
import type { RadarInput } from '../radar/index.ts'
import { cfarLossDb } from './cfar.ts'
import { detectionThreshold, probabilityOfDetection, requiredSnrDb, type SwerlingCase } from './exactPd.ts'

/** Loss of an echo as the beam passes over it instead of standing on it, one scanned dimension, dB. Mathematics (Gaussian beam; Barton). */
export const BEAM_SHAPE_LOSS_DB = 1.24
/** Loss of an echo that falls between gates and filters where the study states none, dB. */
export const DEFAULT_STRADDLE_LOSS_DB = 1

/** What is asked of one target. */
export interface DetectionTask {
  readonly pd: number
  readonly swerling: SwerlingCase
  /** Ratio stated by the user, all losses in it, dB; null = worked out. */
  readonly statedRatioDb: number | null
}
/** Ratio of echo to noise (or to noise and residue) per pulse that a target must reach, and what it is made of. */
export interface RequiredRatio {
  readonly ratioDb: number
  readonly by: 'stated' | 'detection'
  /** Exact mean S/N per pulse for Pd, Pfa, fluctuation and pulses, dB. */
  readonly d0Db: number
  readonly beamShapeDb: number
  readonly straddleDb: number
  readonly cfarDb: number
  /** Pulses in the half-power beam, and those that count in integration. */
  readonly hits: number
  readonly pulses: number
  readonly pd: number
  readonly pfa: number
  readonly swerling: SwerlingCase
}

const known = new Map<string, number>()
const MOST_KNOWN = 500
/** `requiredSnrDb`, kept between calls: a study asks the same few over and over. */
function exactD0Db(pd: number, pfa: number, pulses: number, swerling: SwerlingCase): number {
  const key = `${pd}|${pfa}|${pulses}|${swerling}`
  let value = known.get(key)
  if (value === undefined) {
    if (known.size > MOST_KNOWN) known.clear()
    value = requiredSnrDb(pd, pfa, pulses, swerling)
    known.set(key, value)
  }
  return value
}

/**
 * Required ratio of a radar and a target, dB per pulse: exact D₀ for Pd, Pfa, Swerling case and the pulses that integrate in one scan, plus beam
 * shape, straddling and the loss of an adaptive threshold (stated, or of cell averaging from its reference cells: single-pulse mathematics, more
 * than integration would lose). A stated ratio stands for all of them. Throws RangeError unless Pfa < Pd < 1.
 */
export function requiredRatio(r: RadarInput, task: DetectionTask): RequiredRatio {
  const { pd, swerling, statedRatioDb } = task
  const pulses = integratedPulses(r)
  const d0Db = exactD0Db(pd, r.pfa, pulses, swerling)
  const straddleDb = r.straddleLossDb ?? DEFAULT_STRADDLE_LOSS_DB
  const cells = r.cfarReferenceCells ?? null
  const cfarDb = r.cfarLossDb ?? (cells === null ? 0 : cfarLossDb(cells, r.pfa, pd))
  return {
    ratioDb: statedRatioDb ?? d0Db + BEAM_SHAPE_LOSS_DB + straddleDb + cfarDb,
    by: statedRatioDb === null ? 'detection' : 'stated',
    d0Db,
    beamShapeDb: BEAM_SHAPE_LOSS_DB,
    straddleDb,
    cfarDb,
    hits: hitsOf(r),
    pulses,
    pd,
    pfa: r.pfa,
    swerling,
  }
}

const CURVE_FROM_DB = -40
const CURVE_TO_DB = 60
const CURVE_PER_DB = 10

/**
 * Probability of detection by how far the ratio of echo to noise and residue stands above the required one, dB: at 0 it is the need's own Pd,
 * also where the ratio was stated. Exact at every tenth of a dB, linear between; −40 dB and less hold Pfa's end, 60 dB and more the top.
 */
export function pdCurve(required: RequiredRatio): (marginDb: number) => number {
  const threshold = detectionThreshold(required.pfa, required.pulses)
  const at = Float64Array.from({ length: (CURVE_TO_DB - CURVE_FROM_DB) * CURVE_PER_DB + 1 }, (_, n) =>
    probabilityOfDetection(required.d0Db + CURVE_FROM_DB + n / CURVE_PER_DB, threshold, required.pulses, required.swerling),
  )
  const last = at.length - 1
  return (marginDb) => {
    const x = (marginDb - CURVE_FROM_DB) * CURVE_PER_DB
    if (!(x > 0)) return Number.isNaN(x) ? Number.NaN : at[0]
    const n = Math.floor(x)
    return n >= last ? at[last] : at[n] + (x - n) * (at[n + 1] - at[n])
  }
}
