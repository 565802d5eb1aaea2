import type { FixFigure, LossCause, LossFigure, NeedFigure, NestedPct } from '../../../core/index.ts'
import {
  formatAreaUp,
  formatLossPct,
  formatMetPct,
  formatRangeUp,
  LOSS_WORDS,
  textOf,
  type UnitSystem,
  withMetric,
} from '../../words/index.ts'

/** A need's name set apart from the sentence it stands in. */
export const needName = (n: { readonly name: string }): string => `“${n.name}”`
/** Nothing of a layer is left over known ground inside its range: the ground stands above it. */
export const isUnderGround = (n: NeedFigure): boolean =>
  n.measure === 'area' && n.notAssessed === null && n.groundAboveKm2 > 0 && n.areaKm2 - n.unknownKm2 < 1e-6
export const UNDER_GROUND = 'the layer lies below all known ground inside its range'

/** The three nested shares in one breath; never one alone. */
export function nestedWords(n: NeedFigure): string {
  if (isUnderGround(n)) return UNDER_GROUND
  const pct = (x: number): string => textOf(formatMetPct(x))
  return `${pct(n.inSightPct)} in sight, ${pct(n.detectablePct)} detectable and ${pct(n.usablePct)} usable`
}
/** `97 / 95 / 88`, for a column whose head says which is which. */
export const nestedNumbers = (n: NestedPct): string =>
  [n.inSightPct, n.detectablePct, n.usablePct].map((x) => formatMetPct(x).value).join(' / ')

/** What the shares are shares of, with its amount. */
export const measureWords = (n: NeedFigure): string =>
  n.measure === 'fixes' ? 'of fixes' : n.measure === 'length' ? 'of length' : 'of area'

/** One cause with its share and amount: `masked 12 % (30 km²)`. */
export function lossWords(n: NeedFigure, loss: LossFigure, system: UnitSystem): string {
  const amount =
    n.measure === 'area'
      ? withMetric((s) => formatAreaUp(loss.amount, s), system)
      : n.measure === 'length'
        ? withMetric((s) => formatRangeUp(1000 * loss.amount, s), system)
        : `${Math.ceil(loss.amount)} of ${n.amount}`
  return `${LOSS_WORDS[loss.cause]} ${textOf(formatLossPct(loss.pct))}, ${amount}`
}
/** How far a fix or piece gets, and what stops it. */
export function outcomeWords(f: Pick<FixFigure, 'usable' | 'detectable' | 'visible' | 'cause'>): string {
  if (f.usable) return 'usable'
  const reach = f.detectable ? 'detectable, not usable' : f.visible === 'yes' ? 'in sight only' : ''
  return [reach, f.cause === null ? '' : LOSS_WORDS[f.cause]].filter((w) => w !== '').join(': ')
}
export const segmentWords = (s: { cause: LossCause | null; tangential: boolean; blind: boolean }): string =>
  [s.cause === null ? 'usable' : LOSS_WORDS[s.cause], s.tangential ? 'tangential' : '', s.blind ? 'blind speed' : '']
    .filter((w) => w !== '')
    .join(', ')
