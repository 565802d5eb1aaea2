import type { HorizonRow } from '../../masking/index.ts'
import { cellAreasM2 } from '../../polar/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { DEG_PER_RAD, SPEED_OF_LIGHT_MS } from '../../units/index.ts'
import { cellsOfNeed } from '../needs/needFigure.ts'
import { PLACE } from '../needs/place.ts'
import type { OptionCells } from '../optionCells.ts'
import type { Figures, FixFigure, NeedFigure } from '../types.ts'
import type { BeforeAfter, Change, FixChange, NeedChange, SectorChange } from './types.ts'

/** One option, worked out: its figures and its polar grids. */
export interface ChangeSide {
  readonly figures: Figures
  readonly cells: OptionCells
}
/** A horizon that moves by less is the same, deg. */
const SAME_DEG = 0.02
/** Azimuths apart by no more than so many steps of the grid are one sector. */
const GAP_STEPS = 2
/** Clutter that grows or falls by this is told, dB. */
const CLUTTER_STEP_DB = 3
/** A floor that moves by less is the same, m. */
const SAME_M = 0.5

/** Spacing of the nulls of a direct ray and one off a level surface `heightM` under the antenna, deg: λ/2h (common practice, flat surface). */
export const nullSpacingDeg = (wavelengthM: number, heightM: number): number | null =>
  heightM > 0 ? (wavelengthM / (2 * heightM)) * DEG_PER_RAD : null

/**
 * What changes from one worked-out option to another: needs and fixes, floors, sectors in which the horizon rises or falls, areas that gain and lose.
 * Areas are told cell by cell where both stand at one place on one grid (another mast, a changed obstacle), else left out.
 */
export function changeBetween(before: ChangeSide, after: ChangeSide, needs: readonly SettledNeed[]): Change {
  const [a, b] = [before.figures, after.figures]
  const together = samePlace(before.cells, after.cells)
  const areasKm2 = together ? cellAreasM2(before.cells.site.grid, before.cells.place.lat).map((m2) => m2 / 1e6) : null
  const clutter = areasKm2 ? clutterChange(before.cells, after.cells, areasKm2) : null
  const sectors = sectorChanges(a.horizon.rows, b.horizon.rows)
  const spacing = (s: ChangeSide): number | null => nullSpacingDeg(SPEED_OF_LIGHT_MS / s.cells.radar.frequencyHz, s.cells.heightM)
  return {
    needs: needs.flatMap((need) => needChange(need, before, after, areasKm2) ?? []),
    fixes: needs.flatMap((need) => fixChanges(need.id, figureOf(a, need.id), figureOf(b, need.id))).sort((p, q) => riseOf(q) - riseOf(p)),
    risen: sectors.filter((s) => s.mostDeg > 0),
    fallen: sectors.filter((s) => s.mostDeg < 0),
    floors: a.floors.flatMap((f) => {
      const other = b.floors.find((o) => o.rangeM === f.rangeM)
      return other ? [{ rangeM: f.rangeM, worstM: pair(f.worstM, other.worstM), medianM: pair(f.medianM, other.medianM) }] : []
    }),
    groundInSightKm2: pair(a.groundInSightKm2, b.groundInSightKm2),
    clutterOver40Km2: pair(a.clutterOverKm2.over40, b.clutterOverKm2.over40),
    clutterMoreKm2: clutter?.more ?? null,
    clutterLessKm2: clutter?.less ?? null,
    nullSpacingDeg: pair(spacing(before), spacing(after)),
  }
}
const pair = (before: number | null, after: number | null): BeforeAfter => ({ before, after })
const riseOf = (f: FixChange): number => f.floorRiseM ?? Number.NEGATIVE_INFINITY
const figureOf = (f: Figures, needId: string): NeedFigure | undefined => f.needs.find((n) => n.needId === needId && n.notAssessed === null)

function samePlace(a: OptionCells, b: OptionCells): boolean {
  const [g, h] = [a.site.grid, b.site.grid]
  const sameGrid = g.azimuths === h.azimuths && g.ranges === h.ranges && g.rangeStepM === h.rangeStepM
  return sameGrid && a.place.lon === b.place.lon && a.place.lat === b.place.lat
}

function needChange(need: SettledNeed, before: ChangeSide, after: ChangeSide, areasKm2: Float64Array | null): NeedChange | null {
  const [a, b] = [figureOf(before.figures, need.id), figureOf(after.figures, need.id)]
  if (!a || !b) return null
  let gained: number | null = null
  let lost: number | null = null
  const [from, to] = areasKm2 && a.measure === 'area' ? [cellsOfNeed(before.cells, need), cellsOfNeed(after.cells, need)] : [null, null]
  if (areasKm2 && from && to) {
    const ranges = areasKm2.length
    gained = 0
    lost = 0
    for (let at = 0; at < from.place.length; at++) {
      const was = from.place[at] & PLACE.usable
      const is = to.place[at] & PLACE.usable
      if (is && !was) gained += areasKm2[at % ranges]
      else if (was && !is) lost += areasKm2[at % ranges]
    }
  }
  return {
    needId: need.id,
    name: a.name,
    must: a.must,
    measure: a.measure,
    met: { before: { met: a.met, passes: a.passes }, after: { met: b.met, passes: b.passes } },
    inSightPct: pair(a.inSightPct, b.inSightPct),
    detectablePct: pair(a.detectablePct, b.detectablePct),
    usablePct: pair(a.usablePct, b.usablePct),
    worstMarginM: pair(a.worstMarginM, b.worstMarginM),
    worstSignalDb: pair(a.signal.worstDb, b.signal.worstDb),
    gainedKm2: gained,
    lostKm2: lost,
  }
}

function fixChanges(needId: string, a: NeedFigure | undefined, b: NeedFigure | undefined): FixChange[] {
  return (a?.fixes ?? []).flatMap((before) => {
    const after = b?.fixes?.find((f) => f.name === before.name && f.lon === before.lon && f.lat === before.lat)
    if (!after) return []
    const floorRiseM = before.floorM === null || after.floorM === null ? null : after.floorM - before.floorM
    const same = (key: keyof FixFigure): boolean => before[key] === after[key]
    const unchanged = same('visible') && same('detectable') && same('usable') && same('visibleLowK') && same('usableLowK')
    if (unchanged && (floorRiseM === null || Math.abs(floorRiseM) < SAME_M)) return []
    return [{ needId, name: before.name, azimuthDeg: before.azimuthDeg, rangeM: before.rangeM, before, after, floorRiseM }]
  })
}

function clutterChange(a: OptionCells, b: OptionCells, areasKm2: Float64Array): { more: number; less: number } {
  const ranges = areasKm2.length
  // under noise is none, whatever the number
  const over = (v: number): number => (v > 0 ? v : 0)
  let more = 0
  let less = 0
  for (let at = 0; at < a.clutter.cnrDb.length; at++) {
    const off = over(b.clutter.cnrDb[at]) - over(a.clutter.cnrDb[at])
    if (off >= CLUTTER_STEP_DB) more += areasKm2[at % ranges]
    else if (off <= -CLUTTER_STEP_DB) less += areasKm2[at % ranges]
  }
  return { more, less }
}

/** Runs of azimuths over which the horizon rises, or falls, by more than `SAME_DEG`, clockwise from north. */
export function sectorChanges(before: readonly HorizonRow[], after: readonly HorizonRow[]): SectorChange[] {
  const n = before.length
  if (n === 0 || after.length !== n) return []
  const stepDeg = 360 / n
  const off = before.map((r, i) => after[i].elevationDeg - r.elevationDeg)
  return [1, -1].flatMap((way) => {
    const on = off.map((v) => Number.isFinite(v) && way * v > SAME_DEG)
    if (!on.includes(true)) return []
    // begin where no run goes over the start, so that one across north stays whole
    const start = quietBefore(on)
    const out: SectorChange[] = []
    let run: number[] = []
    const close = () => {
      if (run.length > 0) out.push(sectorOf(run, off, after, stepDeg))
      run = []
    }
    let gap = 0
    for (let k = 0; k < n; k++) {
      const i = (start + k) % n
      if (on[i]) {
        run.push(i)
        gap = 0
      } else if (run.length > 0 && ++gap > GAP_STEPS) close()
    }
    close()
    return out.sort((p, q) => p.fromDeg - q.fromDeg)
  })
}
/** First azimuth that ends a quiet stretch longer than a gap; 0 where there is none. */
function quietBefore(on: readonly boolean[]): number {
  const n = on.length
  for (let i = 0; i < n; i++)
    if (on[i] && Array.from({ length: GAP_STEPS + 1 }, (_, g) => on[(i - 1 - g + n) % n]).every((v) => !v)) return i
  return 0
}
function sectorOf(run: readonly number[], off: readonly number[], after: readonly HorizonRow[], stepDeg: number): SectorChange {
  const top = run.reduce((best, i) => (Math.abs(off[i]) > Math.abs(off[best]) ? i : best), run[0])
  const first = after[run[0]].azimuthDeg
  const last = after[run[run.length - 1]].azimuthDeg
  const whole = run.length >= after.length
  const { obstacle, rangeM, azimuthDeg } = after[top]
  return {
    fromDeg: whole ? 0 : (first - stepDeg / 2 + 360) % 360,
    toDeg: whole ? 360 : (last + stepDeg / 2) % 360,
    mostDeg: off[top],
    atDeg: azimuthDeg,
    obstacle,
    rangeM,
  }
}
