import type { CutWindow, OptionResult } from '../../../core/index.ts'
import {
  levelsChart,
  levelsFinding,
  suppressionChart,
  suppressionFinding,
  suppressionRows,
  verticalChart,
  verticalTitle,
} from '../../charts/index.ts'
import { cautionsFor } from '../../words/index.ts'
import { type Block, type FigureBlock, type MemoInput, SMALL_PT, TEXT_WIDTH_PT } from './types.ts'

const LEVELS_PT = 128
/** Room for a need and for a kind of clutter in the chart of suppression, and for its axes, pt. */
const NEED_PT = 22
const KIND_PT = 13
const AXES_PT = 52

/** Samples of a printed diagram. */
const CUT = { columns: 240, rows: 120, fromRangeM: 0, fromHeightM: null, toHeightM: null }
const CUT_PT = 148

/** The need and the plane that an option's printed range-height diagram is about: its first need, toward the worst place of it, else toward the highest horizon. */
export function cutOf(r: OptionResult, maxRangeM: number): { need: string; window: CutWindow } | null {
  const need = r.figures.needs.find((n) => n.notAssessed === null)
  if (!need) return null
  const azimuthDeg = need.worst?.azimuthDeg ?? r.figures.horizon.highest?.azimuthDeg ?? 0
  return { need: need.needId, window: { ...CUT, azimuthDeg: Math.round(10 * azimuthDeg) / 10, toRangeM: maxRangeM } }
}

/** Range-height diagram with the caution of its diffracted part; nothing where no plane was worked out. */
export function verticalBlocks(input: MemoInput, r: OptionResult, figure: () => number): Block[] {
  const map = input.maps.find(
    (m) => m.ref.candidate === r.ref.candidate && m.ref.heightM === r.ref.heightM && m.ref.tiltDeg === r.ref.tiltDeg,
  )
  const cut = map?.cut
  if (!cut) {
    // as for the map: its number stays its own
    if (!map && cutOf(r, input.study.run.maxRangeM)) figure()
    return []
  }
  const { system } = input
  return [
    {
      kind: 'figure',
      id: 'vertical',
      number: figure(),
      caption: `${verticalTitle(cut, system)}.`,
      get drawing() {
        return verticalChart({ cut, width: TEXT_WIDTH_PT, height: CUT_PT, system, size: SMALL_PT - 1 }).drawing
      },
    },
    { kind: 'caution', texts: cautionsFor('diagram') },
  ]
}

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
