import { aboveNoiseDb } from '../signal/decibelTables.ts'
import { lossCode } from './needTypes.ts'

/** What the signal of one place is made of, dB; `headDb` is S/N after pattern and STC less the required ratio (with a bank's gain). */
export interface SignalParts {
  readonly headDb: number
  readonly gainDb: number
  readonly stcDb: number
  /** Residue over noise before STC; NaN where there is none. */
  readonly residueDb: number
  readonly noiseGainDb: number
  readonly above: boolean
  /** Response of the processing to the target's own speed, dB; on the echo for a canceller, on the residue for a bank. */
  readonly echoResponseDb: number
  readonly residueResponseDb: number
}

/** Signal margin S/(C/I+N) less the required ratio, dB. */
export const signalMarginDb = (p: SignalParts): number =>
  p.headDb + p.echoResponseDb - aboveNoiseDb(p.residueDb - p.residueResponseDb - p.stcDb + p.noiseGainDb)

const TOO_WEAK = lossCode('too-weak')
const STC = lossCode('short-range-sensitivity')
const ABOVE = lossCode('above-beam')
const BELOW = lossCode('below-beam')
const CLUTTER = lossCode('clutter')
const BLIND = lossCode('blind-speed')
const SEVERAL = lossCode('several')

/**
 * Why a place in sight and in range is not usable, as a code of LOSS_CAUSES: too weak even on the beam peak without short-range sensitivity;
 * else the first of short-range sensitivity, elevation pattern, clutter, speed whose removal alone makes it pass; else several together.
 */
export function signalLoss(p: SignalParts): number {
  const { headDb, gainDb, stcDb, echoResponseDb: echo, residueResponseDb } = p
  const residue = p.residueDb + p.noiseGainDb
  const left = residue - residueResponseDb
  if (headDb + stcDb - gainDb < 0) return TOO_WEAK
  if (stcDb > 0 && headDb + stcDb + echo >= aboveNoiseDb(left)) return STC
  if (headDb - gainDb + echo >= aboveNoiseDb(left - stcDb)) return p.above ? ABOVE : BELOW
  if (headDb + echo >= 0) return CLUTTER
  if (headDb >= aboveNoiseDb(residue - stcDb)) return BLIND
  return SEVERAL
}
