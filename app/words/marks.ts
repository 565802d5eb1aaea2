import type { ModelMark } from '../../core/index.ts'

/** Marks are words beside a value, never colour alone; each says in one line what it means. */
export const MARK_WORDS: Record<ModelMark, { readonly word: string; readonly meaning: string }> = {
  default: { word: 'default', meaning: 'Not stated in the study: our own default stands in for it' },
  'outside model': { word: 'outside model', meaning: 'Outside the limits within which the model was published; held at its edge' },
  'by hand': { word: 'by hand', meaning: 'Entered or changed by hand, not computed' },
  'from memory': { word: 'from memory', meaning: 'Written down from memory of the published source, not proof-read in print' },
}
/** The four words, never swapped. */
export const FOUR_WORDS = {
  inSight: { word: 'in sight', meaning: 'Line of sight only' },
  detectable: { word: 'detectable', meaning: 'In sight, within range, and enough signal over noise' },
  usable: {
    word: 'usable',
    meaning:
      'Detectable, and enough over clutter plus noise after suppression and short-range sensitivity; a need is met by what is usable',
  },
  confirmed: { word: 'confirmed', meaning: 'Measured on site or in trial; entered, never computed' },
} as const
/** What a need comes to, in a word. *Passes* only where the smaller k is known too. */
export const VERDICT_WORDS = {
  passes: 'passes',
  oneK: 'met, k = 1 not run yet',
  notAtLowK: 'met, not at k = 1',
  notMet: 'not met',
} as const
/** What a need comes to in a word. */
export function verdictOf(n: { readonly met: boolean; readonly passes: boolean | null }): string {
  if (!n.met) return VERDICT_WORDS.notMet
  if (n.passes === null) return VERDICT_WORDS.oneK
  return n.passes ? VERDICT_WORDS.passes : VERDICT_WORDS.notAtLowK
}
/** What the shares of a need are shares of. */
export const MEASURE_WORDS = { area: 'its area', fixes: 'its fixes', length: 'its length' } as const
/** Words that stand where there is no number. */
export const STATE_WORDS = {
  masked: 'masked',
  unknown: 'unknown',
  beyondVoid: 'unknown: beyond a void',
  edge: 'unknown: edge of terrain',
  outOfRange: 'out of range',
  belowNoise: 'below noise',
  tooWeak: 'too weak',
  noneNeeded: 'none needed',
  marginal: 'marginal',
  notReached: 'not within the ladder',
  atLeast: 'at least',
} as const
