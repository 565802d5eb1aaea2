import type { OptionResult } from '../../../core/index.ts'
import { floorStepM, formatBand, formatHeight, formatPlaceRange, textOf } from '../../words/index.ts'
import { inWords } from './cells.ts'
import { needName } from './needWords.ts'
import type { MemoInput } from './types.ts'

/** Needs for which a constant k is off by more than a printed floor shows, in a sentence; null where there are none. */
export function exponentialWords(input: MemoInput, r: OptionResult): string | null {
  const { system } = input
  const parts = r.figures.needs.flatMap((n) => {
    const e = n.exponential
    // less than the step of a printed floor says nothing
    if (e === null || Math.abs(e.differenceM) <= floorStepM(e.heightM, system)) return []
    const off = textOf(formatBand(Math.abs(e.differenceM), system))
    const side = e.differenceM > 0 ? 'higher' : 'lower'
    return [`${needName(n)} ${off} ${side} at ${textOf(formatPlaceRange(e.rangeM, system))} and ${textOf(formatHeight(e.heightM, system))}`]
  })
  if (parts.length === 0) return null
  return `In air that thins out with height (reference atmosphere, from memory) rays come out beside those of the study's k: ${inWords(parts)}. Floors there are that much off.`
}
