import { CELL, cellAreasM2 } from '../polar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import type { Work } from '../work/index.ts'
import { groundSums } from './groundFigures.ts'
import type { EachNeedRow } from './needs/needCells.ts'
import { isAreaNeed, needFigure } from './needs/needFigure.ts'
import { PLACE } from './needs/place.ts'
import type { OptionCells } from './optionCells.ts'
import type { Figures, Ladder, NeedFigure } from './types.ts'

/** One rung: what the ruler shows of an option at one mast height. */
export interface Rung {
  readonly heightM: number
  readonly inSightPct: number
  readonly usablePct: number
  readonly over40Km2: number
  readonly shortKm2: number
  readonly octantPct: readonly (number | null)[]
  readonly needs: readonly { readonly needId: string; readonly name: string; readonly met: boolean }[]
}

/**
 * In sight and usable % are of the first need, or of the known ground (in sight) where there is none. A need is met when it passes at the study's
 * k and at the smaller one; at the study's alone where the smaller was not worked out.
 */
export function* rung(o: OptionCells, needs: readonly SettledNeed[]): Work<Rung> {
  const sums = groundSums(o)
  yield { done: 0, total: 1 }
  const first = needs.find(isAreaNeed)
  const octants = octantAreas(o)
  const figures: NeedFigure[] = []
  for (const need of needs) {
    const figure = yield* needFigure(o, need, need === first ? octants.add : undefined)
    if (figure.notAssessed === null) figures.push(figure)
  }
  if (!first) octants.addGround()
  const known = sums.inSightKm2 + sums.maskedKm2
  return {
    heightM: o.heightM,
    inSightPct: figures[0]?.inSightPct ?? (known > 0 ? (100 * sums.inSightKm2) / known : 0),
    usablePct: figures[0]?.usablePct ?? 0,
    over40Km2: sums.over.over40,
    shortKm2: figures.reduce((s, f) => s + f.suppression.shortKm2, 0),
    octantPct: octants.pct(),
    needs: figures.map((f) => ({ needId: f.needId, name: f.name, met: f.passes ?? f.met })),
  }
}

const OCTANTS = 8
/** By octant: share of a need's area that is usable (`add` takes its rows), or of known ground that is in sight, %; null where there is none of it. */
export function octantAreas(o: OptionCells) {
  const { azimuths, ranges, azimuthStepDeg } = o.site.grid
  const areas = cellAreasM2(o.site.grid, o.place.lat)
  const whole = new Float64Array(OCTANTS)
  const part = new Float64Array(OCTANTS)
  const octantOf = (i: number): number => Math.floor((i * azimuthStepDeg * OCTANTS) / 360 + 0.5) % OCTANTS
  const add: EachNeedRow = ({ place }, from, first, last) => {
    const octant = octantOf(from / ranges)
    for (let j = first; j < last; j++) {
      if (place[j] & PLACE.groundAbove) continue
      whole[octant] += areas[j]
      if (place[j] & PLACE.usable) part[octant] += areas[j]
    }
  }
  const addGround = (): void => {
    const { state, inSight } = o.mask
    for (let i = 0; i < azimuths; i++) {
      const octant = octantOf(i)
      for (let j = 0, at = i * ranges; j < ranges; j++, at++) {
        if (state[at] === CELL.beyondVoid || state[at] === CELL.outside) continue
        whole[octant] += areas[j]
        part[octant] += (inSight[at] / 65535) * areas[j]
      }
    }
  }
  return { add, addGround, pct: () => Array.from(whole, (area, n) => (area > 0 ? (100 * part[n]) / area : null)) }
}

/** The ladder's numbers of an option whose figures are there: the same as its rung has. */
export function ladderValuesOf(f: Pick<Figures, 'needs' | 'groundInSightKm2' | 'maskedKm2' | 'clutterOverKm2'>): {
  readonly inSightPct: number
  readonly usablePct: number
  readonly over40Km2: number
  readonly shortKm2: number
} {
  const assessed = f.needs.filter((n) => n.notAssessed === null)
  const known = f.groundInSightKm2 + f.maskedKm2
  return {
    inSightPct: assessed[0]?.inSightPct ?? (known > 0 ? (100 * f.groundInSightKm2) / known : 0),
    usablePct: assessed[0]?.usablePct ?? 0,
    over40Km2: f.clutterOverKm2.over40,
    shortKm2: assessed.reduce((s, n) => s + n.suppression.shortKm2, 0),
  }
}

export function ladderOf(rungs: readonly Rung[]): Ladder {
  const needs = rungs[0]?.needs ?? []
  return {
    heightsM: rungs.map((r) => r.heightM),
    inSightPct: rungs.map((r) => r.inSightPct),
    usablePct: rungs.map((r) => r.usablePct),
    over40Km2: rungs.map((r) => r.over40Km2),
    shortKm2: rungs.map((r) => r.shortKm2),
    octantPct: rungs.map((r) => r.octantPct),
    needMet: needs.map(({ needId, name }, k) => ({ needId, name, intervals: intervalsOf(rungs, k) })),
    needMetAtM: needs.map(({ needId, name }, k) => ({
      needId,
      name,
      heightM: rungs.find((r) => r.needs[k].met)?.heightM ?? null,
    })),
  }
}

/** Runs of rungs in which a need is met, from the first to the last height of each. */
function intervalsOf(rungs: readonly Rung[], need: number): [number, number][] {
  const out: [number, number][] = []
  let open = false
  for (const { heightM, needs } of rungs) {
    if (!needs[need].met) open = false
    else if (open) out[out.length - 1][1] = heightM
    else {
      out.push([heightM, heightM])
      open = true
    }
  }
  return out
}

/** Heights of the ruler: ten to sixteen even steps that reach past the tallest stated mast, with the stated ones among them. */
export function ladderHeightsM(statedM: readonly number[]): number[] {
  const top = Math.max(40, 1.25 * Math.max(0, ...statedM))
  const step = [2, 4, 5, 10, 20, 50].find((s) => top / s <= 14) ?? 100
  const heights = new Set<number>(statedM)
  for (let h = step; h <= top + 1e-9; h += step) heights.add(h)
  return [...heights].sort((a, b) => a - b)
}
