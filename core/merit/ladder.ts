import type { SettledNeed } from '../study/index.ts'
import { groundSums } from './groundFigures.ts'
import { cellsOfNeed, needFigure } from './needFigure.ts'
import type { OptionCells } from './optionCells.ts'
import type { Ladder } from './types.ts'

/** One rung: what the ruler shows of an option at one mast height. */
export interface Rung {
  readonly heightM: number
  readonly inSightPct: number
  readonly over40Km2: number
  readonly needs: readonly { readonly needId: string; readonly name: string; readonly met: boolean }[]
}

/** In sight % is of the first layer need, or of the known ground where there is none. */
export function rung(o: OptionCells, needs: readonly SettledNeed[]): Rung {
  const sums = groundSums(o)
  const figures = needs.filter((n) => n.kind === 'layer').map((need) => needFigure(o, need, cellsOfNeed(o, need)))
  const known = sums.inSightKm2 + sums.maskedKm2
  return {
    heightM: o.heightM,
    inSightPct: figures[0]?.inSightPct ?? (known > 0 ? (100 * sums.inSightKm2) / known : 0),
    over40Km2: sums.over.over40,
    needs: figures.map((f) => ({ needId: f.needId, name: f.name, met: f.inSightPct >= f.requiredPct })),
  }
}

export function ladderOf(rungs: readonly Rung[]): Ladder {
  return {
    heightsM: rungs.map((r) => r.heightM),
    inSightPct: rungs.map((r) => r.inSightPct),
    over40Km2: rungs.map((r) => r.over40Km2),
    needMetAtM: (rungs[0]?.needs ?? []).map(({ needId, name }, k) => ({
      needId,
      name,
      heightM: rungs.find((r) => r.needs[k].met)?.heightM ?? null,
    })),
  }
}

/** Heights of the ruler: ten to sixteen even steps that reach past the tallest stated mast, with the stated ones among them. */
export function ladderHeightsM(statedM: readonly number[]): number[] {
  const top = Math.max(40, 1.25 * Math.max(0, ...statedM))
  const step = [2, 4, 5, 10, 20, 50].find((s) => top / s <= 14) ?? 100
  const heights = new Set<number>(statedM)
  for (let h = step; h <= top + 1e-9; h += step) heights.add(h)
  return [...heights].sort((a, b) => a - b)
}
