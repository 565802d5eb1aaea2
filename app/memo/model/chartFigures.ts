import type { OptionResult } from '../../../core/index.ts'
import { levelsChart, levelsFinding, suppressionChart, suppressionFinding, suppressionRows } from '../../charts/index.ts'
import { type FigureBlock, type MemoInput, SMALL_PT, TEXT_WIDTH_PT } from './types.ts'

const LEVELS_PT = 150
/** Room for a need and for a kind of clutter in the chart of suppression, and for its axes, pt. */
const NEED_PT = 22
const KIND_PT = 13
const AXES_PT = 52

/** Clutter by ring and octant. Drawn when it is printed: the column beside the map has no use for it. */
export function levelsFigure(input: MemoInput, r: OptionResult, number: number): FigureBlock {
  const { clutterLevels } = r.figures
  const { system } = input
  return {
    kind: 'figure',
    id: 'levels',
    number,
    caption: `${levelsFinding(clutterLevels, system)}.`,
    get drawing() {
      return levelsChart({ levels: clutterLevels, width: TEXT_WIDTH_PT, height: LEVELS_PT, system, size: SMALL_PT - 1 }).drawing
    },
  }
}

/** Suppression needed against available. */
export function suppressionFigure(input: MemoInput, r: OptionResult, number: number): FigureBlock {
  const { figures } = r
  const { system } = input
  const { needs, kinds } = suppressionRows(figures)
  const height = AXES_PT + needs * NEED_PT + kinds * KIND_PT
  return {
    kind: 'figure',
    id: 'suppression',
    number,
    caption: `${suppressionFinding(figures, system)}.`,
    get drawing() {
      return suppressionChart({ figures, width: TEXT_WIDTH_PT, height, system, size: SMALL_PT - 1 }).drawing
    },
  }
}
