import type { LayerId } from '../../core/index.ts'

/** What a result of a cell's ledger is called, and the map layer that shows it, rounded. */
export interface LedgerWords {
  readonly name: string
  readonly unit: 'dB' | 'dBsm' | 'm' | 'deg' | ''
  readonly layer: LayerId | null
  /** Place in the ledger: what the reader came for stands first. */
  readonly rank: number
}
const words = (name: string, unit: LedgerWords['unit'], layer: LayerId | null, rank: number): LedgerWords => ({ name, unit, layer, rank })
const RESULTS: Readonly<Record<string, LedgerWords>> = {
  clutter_to_noise_db: words('C/N', 'dB', 'clutter-to-noise', 0),
  coverage_floor_m: words('Coverage floor, MSL', 'm', 'coverage-floor', 1),
  clutter_rcs_dbsm: words('Clutter RCS', 'dBsm', null, 20),
  clutter_strength_db: words('Clutter strength σ°F⁴', 'dB', 'clutter-strength', 21),
  depression_deg: words('Depression angle', 'deg', 'depression', 22),
  height_to_see_m: words('Height to see, mast', 'm', 'height-to-see', 23),
}
const NEED: readonly (readonly [tail: string, LedgerWords])[] = [
  ['suppression_needed_db', words('suppression needed', 'dB', 'suppression-needed', 0)],
  ['signal_margin_db', words('signal margin', 'dB', 'signal-margin', 1)],
  ['probability_of_detection', words('probability of detection', '', 'probability-of-detection', 2)],
  ['signal_to_noise_db', words('S/N', 'dB', null, 3)],
  ['residue_to_noise_db', words('residue over noise', 'dB', null, 4)],
  ['required_ratio_db', words('required ratio', 'dB', null, 5)],
  ['height_margin_m', words('height margin', 'm', null, 6)],
  ['height_margin_k1_m', words('height margin at k = 1', 'm', null, 7)],
]
/** Words of a result by its key; a need's result carries the need's name. Undefined for a key this version does not know. */
export function ledgerWords(key: string, needs: readonly { readonly id: string; readonly name: string }[]): LedgerWords | undefined {
  if (RESULTS[key]) return RESULTS[key]
  for (const [at, { id, name }] of needs.entries())
    for (const [tail, w] of NEED)
      if (key === `need_${id}_${tail}`) return { ...w, name: `${name}: ${w.name}`, rank: 2 + (w.rank + 8 * at) / 1000 }
  return undefined
}
/** The line after a part's: what it is by itself, before it is added. */
export const LEDGER_ALONE = 'By itself'
/** Lines that are read by no result: where the place is and what stands between. */
export const LEDGER_PLACE = 'Place'

const CLUTTER_KEYS = /^(clutter_|strength$|spread$)/
/**
 * Why a result or line has no value, in words: from what the ledger says of the place (`inSight` yes, no, marginal, unknown; `row` of the land
 * table; `controlling` obstacle).
 */
export function whyNone(key: string, place: { readonly inSight: string; readonly row: string; readonly controlling: string }): string {
  if (place.inSight === 'unknown') return 'unknown ground'
  if (key.endsWith('suppression_needed_db')) return 'too weak for any suppression'
  if (key.endsWith('residue_to_noise_db')) return 'no clutter in its cell'
  if (CLUTTER_KEYS.test(key)) {
    if (place.inSight === 'yes') return place.row === '' ? 'no clutter modelled here' : 'nothing in sight'
    const hidden = place.inSight === 'marginal' ? 'masked by less than the error band' : 'masked'
    return place.row === 'sea' ? `water, ${place.controlling === 'terrain' ? 'below the horizon' : hidden}` : hidden
  }
  return 'none'
}
