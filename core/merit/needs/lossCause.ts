import { aboveNoiseDb } from '../signal/decibelTables.ts'
import { type LossCause, lossCode } from './needTypes.ts'

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
  readonly echoResponseDb?: number
  readonly residueResponseDb?: number
}

/** Signal margin S/(C/I+N) less the required ratio, dB. */
export function signalMarginDb(p: SignalParts): number {
  const head = p.headDb + (p.echoResponseDb ?? 0)
  return head - aboveNoiseDb(p.residueDb - (p.residueResponseDb ?? 0) - p.stcDb + p.noiseGainDb)
}

const CODE = (cause: LossCause): number => lossCode(cause)
const TOO_WEAK = CODE('too-weak')
const STC = CODE('short-range-sensitivity')
const ABOVE = CODE('above-beam')
const BELOW = CODE('below-beam')
const CLUTTER = CODE('clutter')
const BLIND = CODE('blind-speed')
const SEVERAL = CODE('several')

/**
 * Why a place in sight and in range is not usable, as a code of LOSS_CAUSES: too weak even on the beam peak without short-range sensitivity;
 * else the first of short-range sensitivity, elevation pattern, clutter, speed whose removal alone makes it pass; else several together.
 */
export function signalLoss(p: SignalParts): number {
  const passes = (change: Partial<SignalParts>): boolean => signalMarginDb({ ...p, ...change }) >= 0
  if (p.headDb + p.stcDb - p.gainDb < 0) return TOO_WEAK
  if (p.stcDb > 0 && passes({ headDb: p.headDb + p.stcDb, stcDb: 0 })) return STC
  if (passes({ headDb: p.headDb - p.gainDb })) return p.above ? ABOVE : BELOW
  if (passes({ residueDb: Number.NaN })) return CLUTTER
  if (passes({ echoResponseDb: 0, residueResponseDb: 0 })) return BLIND
  return SEVERAL
}
