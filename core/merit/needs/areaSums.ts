import { cellAreasM2 } from '../../polar/index.ts'
import { addArea, areaHistogram } from '../areaHistogram.ts'
import type { OptionCells } from '../optionCells.ts'
import { ratioOfDb } from '../signal/decibelTables.ts'
import type { NeedRow } from './levelTest.ts'
import { LOSS_CAUSES } from './needTypes.ts'
import { PLACE, PLACES } from './place.ts'

/** Lowest value met and the cell it stands in; −1 = none yet. */
export interface Lowest {
  value: number
  cell: number
}

/** Areas of a need by outcome, margin and suppression; `add` takes the rows of `scanNeed`. Areas in m². */
export function areaSums(o: OptionCells) {
  const areas = cellAreasM2(o.site.grid, o.place.lat)
  const margins = areaHistogram(-2000, 20_000, 1)
  const signals = areaHistogram(-150, 150, 0.1)
  const needed = areaHistogram(0, 200, 0.1)
  const shortBy = areaHistogram(0, 200, 0.1)
  /** By sum of bits of PLACE, and by code of LOSS_CAUSES. */
  const by = new Float64Array(PLACES)
  const lost = new Float64Array(LOSS_CAUSES.length + 1)
  const lowestMargin: Lowest = { value: Number.POSITIVE_INFINITY, cell: -1 }
  const lowestSignal: Lowest = { value: Number.POSITIVE_INFINITY, cell: -1 }
  const total = { short: 0, clutter: 0, left: 0 }
  const weighed = o.suppression.uniformDb === null
  const { cnrDb } = o.clutter

  function add(row: NeedRow, from: number, first: number, last: number): void {
    const { place, cause, marginM, signalDb, neededDb, availableDb } = row
    let leastM = lowestMargin.value
    let leastDb = lowestSignal.value
    let short = 0
    for (let j = first; j < last; j++) {
      const bits = place[j]
      const area = areas[j]
      by[bits] += area
      lost[cause[j]] += area
      if (bits & (PLACE.groundAbove | PLACE.unknown)) continue
      const margin = marginM[j]
      addArea(margins, margin, area)
      if (margin < leastM) {
        leastM = margin
        lowestMargin.cell = from + j
      }
      if (!(bits & PLACE.inSight)) continue
      const over = signalDb[j]
      addArea(signals, over, area)
      if (over < leastDb) {
        leastDb = over
        lowestSignal.cell = from + j
      }
      if (!(bits & PLACE.detectable)) continue
      const wanted = neededDb[j]
      const missing = wanted - availableDb[j]
      addArea(needed, wanted, area)
      addArea(shortBy, missing, area)
      if (missing > 0) short += area
      if (weighed) {
        const clutter = area * ratioOfDb(cnrDb[from + j])
        total.clutter += clutter
        total.left += clutter * ratioOfDb(-availableDb[j])
      }
    }
    lowestMargin.value = leastM
    lowestSignal.value = leastDb
    total.short += short
  }
  return { margins, signals, needed, shortBy, by, lost, lowestMargin, lowestSignal, total, add }
}
