import { geodesicDirect } from '../../geodesy/index.ts'
import { sightPoint } from '../../masking/index.ts'
import { canonicalJson, type SettledNeed } from '../../study/index.ts'
import { toDb } from '../../units/index.ts'
import type { Work } from '../../work/index.ts'
import { type AreaHistogram, areaPercentile } from '../areaHistogram.ts'
import type { OptionCells } from '../optionCells.ts'
import { areaSums } from './areaSums.ts'
import { conesOf } from './cone.ts'
import { exponentialOf } from './exponential.ts'
import { type EachNeedRow, type NeedCells, needCells, scanNeed } from './needCells.ts'
import { lossCode, type NeedFigure, type PlaceRef, type SuppressionFigure } from './needTypes.ts'
import { lossesOf, outcome } from './outcome.ts'
import { PLACE } from './place.ts'
import { fixesFigure, trackFigure } from './places/placesFigure.ts'

/** Is a need tested in the cells of the polar grid? Fixes and tracks have rays of their own. */
export const isAreaNeed = (need: SettledNeed): boolean => need.kind === 'layer' || need.kind === 'polygon'

/** Cells of a need for one option; null for fixes and tracks, and for a polygon whose file is not read. */
export function cellsOfNeed(o: OptionCells, need: SettledNeed): NeedCells | null {
  if (!isAreaNeed(need)) return null
  const places = placesOf(o, need)
  if (places === 'missing') return null
  const { clutter, mask, lowK, folded, suppression } = o
  const from = { clutter, mask, lowK, folded, suppression, places, need: canonicalJson(need) }
  const at = lately.findIndex((l) => Object.entries(from).every(([key, value]) => l.from[key as keyof typeof from] === value))
  const found = at < 0 ? { from, cells: needCells(o, need) } : lately.splice(at, 1)[0]
  lately.unshift(found)
  lately.length = Math.min(lately.length, CELLS_KEPT)
  return found.cells
}
/** The needs looked at last: layers, pans of the map and the pointer ask for the same cells again and again. */
const CELLS_KEPT = 2
const lately: { readonly from: Readonly<Record<string, unknown>>; readonly cells: NeedCells }[] = []

const placesOf = (o: OptionCells, need: SettledNeed) =>
  need.kind === 'layer' ? null : (o.places.find((p) => p.needId === need.id) ?? 'missing')

/** One need against one option. `notAssessed` is set where its file is not read; `also` sees each row of cells of a layer or polygon. */
export function* needFigure(o: OptionCells, need: SettledNeed, also?: EachNeedRow): Work<NeedFigure> {
  const places = placesOf(o, need)
  const base = emptyFigure(o, need)
  if (places === 'missing') return { ...base, notAssessed: `its file ${need.file ?? ''} is not read` }
  const figure =
    places && need.kind === 'fixes'
      ? fixesFigure(o, need, places, base)
      : places && need.kind === 'track'
        ? trackFigure(o, need, places, base)
        : yield* areaFigure(o, need, base, also)
  return { ...figure, exponential: exponentialOf(o, need, figure) }
}

/** Sums over the cells of a layer or polygon need. */
function* areaFigure(o: OptionCells, need: SettledNeed, base: NeedFigure, also?: EachNeedRow): Work<NeedFigure> {
  const sums = areaSums(o)
  const each: EachNeedRow = (row, from, first, last) => {
    sums.add(row, from, first, last)
    also?.(row, from, first, last)
  }
  const { beyondM2 } = yield* scanNeed(o, need, each)
  const { margins, signals, needed, shortBy, lost, lowestMargin, lowestSignal } = sums
  const of = (bit: number): number => sums.by.reduce((s, area, bits) => (bits & bit ? s + area : s), 0)
  const above = of(PLACE.groundAbove)
  const total = of(PLACE.inNeed) - above + beyondM2
  const unknown = of(PLACE.unknown) + beyondM2
  lost[lossCode('unknown')] += beyondM2
  const pct = (m2: number): number => (total > 0 ? (100 * m2) / total : 0)
  const suppression: SuppressionFigure = {
    p50Db: levelAt(needed, 0.5),
    p90Db: levelAt(needed, 0.9),
    p99Db: levelAt(needed, 0.99),
    availableDb: o.suppression.uniformDb ?? (sums.total.left > 0 ? toDb(sums.total.clutter / sums.total.left) : 0),
    shortKm2: sums.total.short / 1e6,
    shortP90Db: levelAt(shortBy, 0.9),
    shortP99Db: levelAt(shortBy, 0.99),
    maskedPct: pct(total - unknown - of(PLACE.inSight)),
    tooWeakPct: pct(of(PLACE.inSight) - of(PLACE.detectable)),
  }
  const shares = { inSightPct: pct(of(PLACE.inSight)), detectablePct: pct(of(PLACE.detectable)), usablePct: pct(of(PLACE.usable)) }
  const lowShares = {
    inSightPct: pct(of(PLACE.lowInSight)),
    detectablePct: pct(of(PLACE.lowDetectable)),
    usablePct: pct(of(PLACE.lowUsable)),
  }
  return {
    ...base,
    ...outcome(o, need, shares, lowShares),
    amount: total / 1e6,
    areaKm2: total / 1e6,
    inSightKm2: of(PLACE.inSight) / 1e6,
    detectableKm2: of(PLACE.detectable) / 1e6,
    usableKm2: of(PLACE.usable) / 1e6,
    marginalKm2: of(PLACE.marginal) / 1e6,
    unknownKm2: unknown / 1e6,
    groundAboveKm2: above / 1e6,
    worstMarginM: lowestMargin.cell < 0 ? null : lowestMargin.value,
    tenthMarginM: areaPercentile(margins, 0.1, 'down'),
    worst: placeAt(o, lowestMargin.cell),
    signal: {
      worstDb: lowestSignal.cell < 0 ? null : lowestSignal.value,
      tenthDb: areaPercentile(signals, 0.1, 'down'),
      worst: placeAt(o, lowestSignal.cell),
    },
    losses: lossesOf(lost, total, 1e6),
    suppression,
  }
}

const levelAt = (h: AreaHistogram, share: number): number | null => {
  const v = areaPercentile(h, share, 'up')
  // The first bin holds the places that need nothing.
  return v === null ? null : v <= h.step + 1e-9 ? 0 : v
}

/** Centre of a cell; null for −1. */
function placeAt(o: OptionCells, cell: number): PlaceRef | null {
  if (cell < 0) return null
  const { ranges, azimuthStepDeg, rangeStepM } = o.site.grid
  const azimuthDeg = Math.floor(cell / ranges) * azimuthStepDeg
  const rangeM = ((cell % ranges) + 0.5) * rangeStepM
  const at = geodesicDirect(o.place, azimuthDeg, rangeM)
  const sight = sightPoint(o.ground, o.place, o.heightM, o.earth, at)
  return { lon: at.lon, lat: at.lat, azimuthDeg, rangeM, obstacle: sight.controlling?.obstacle ?? 'terrain' }
}

/** A need about which nothing is known yet. */
function emptyFigure(o: OptionCells, need: SettledNeed): NeedFigure {
  return {
    needId: need.id,
    name: need.name,
    must: need.must,
    measure: isAreaNeed(need) ? 'area' : need.kind === 'fixes' ? 'fixes' : 'length',
    amount: 0,
    areaKm2: 0,
    requiredPct: need.requiredPct,
    inSightPct: 0,
    detectablePct: 0,
    usablePct: 0,
    inSightKm2: 0,
    detectableKm2: 0,
    usableKm2: 0,
    atLowK: null,
    met: false,
    passes: null,
    required: need.required,
    marginalKm2: 0,
    unknownKm2: 0,
    groundAboveKm2: 0,
    worstMarginM: null,
    tenthMarginM: null,
    worst: null,
    signal: { worstDb: null, tenthDb: null, worst: null },
    losses: [],
    coneOfSilence: isAreaNeed(need) ? conesOf(o, need) : [],
    suppression: {
      p50Db: null,
      p90Db: null,
      p99Db: null,
      availableDb: o.suppression.uniformDb ?? 0,
      shortKm2: 0,
      shortP90Db: null,
      shortP99Db: null,
      maskedPct: 0,
      tooWeakPct: 0,
    },
    fixes: null,
    track: null,
    exponential: null,
    notAssessed: null,
  }
}
