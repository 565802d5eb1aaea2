import type { SettledNeed } from '../../../study/index.ts'
import type { OptionCells } from '../../optionCells.ts'
import { percentile } from '../../percentile.ts'
import { type FixFigure, LOSS_CAUSES, lossCode, type NeedFigure, type PlaceRef } from '../needTypes.ts'
import { lossesOf, outcome } from '../outcome.ts'
import { checkPlace, placeModel, sightOf } from './placeCheck.ts'
import { flyTrack } from './track.ts'
import type { NeedPlaces } from './types.ts'

/** Fixes: each on its own ray, worst first. */
export function fixesFigure(o: OptionCells, need: SettledNeed, places: NeedPlaces, base: NeedFigure): NeedFigure {
  const m = placeModel(o, need)
  const fixes = places.places.map((at) => checkPlace(m, at, sightOf(o, at))).sort(worstFirst)
  const weights = fixes.map(() => 1)
  return { ...base, ...sums(o, need, fixes, weights), amount: fixes.length, losses: lossesBy(fixes, weights, 1), fixes }
}

/** A track in pieces of at most 250 m; shares are of its length. */
export function trackFigure(o: OptionCells, need: SettledNeed, places: NeedPlaces, base: NeedFigure): NeedFigure {
  const track = flyTrack(placeModel(o, need), places.places)
  const weights = track.pieces.map((p) => p.lengthM)
  return {
    ...base,
    ...sums(o, need, track.pieces, weights),
    amount: track.lengthM / 1000,
    losses: lossesBy(track.pieces, weights, 1000),
    track,
  }
}

/** Not passing before passing, unknown first of all; then the least height margin, then the least signal margin. */
function worstFirst(a: FixFigure, b: FixFigure): number {
  const rank = (f: FixFigure): number => (f.visible === 'unknown' ? 0 : f.visible !== 'yes' ? 1 : f.usable ? 3 : 2)
  const byRank = rank(a) - rank(b)
  if (byRank !== 0) return byRank
  const lost = rank(a) === 2
  const margin = (f: FixFigure): number => (lost ? f.signalMarginDb : f.marginM) ?? Number.NEGATIVE_INFINITY
  return margin(a) - margin(b)
}

function sums(
  o: OptionCells,
  need: SettledNeed,
  list: readonly FixFigure[],
  weights: readonly number[],
): Partial<NeedFigure> & ReturnType<typeof outcome> {
  const total = weights.reduce((s, w) => s + w, 0)
  const pct = (passes: (f: FixFigure) => boolean): number => {
    const sum = list.reduce((s, f, n) => s + (passes(f) ? weights[n] : 0), 0)
    return total > 0 ? (sum >= total * (1 - 1e-12) ? 100 : (100 * sum) / total) : 0
  }
  const shares = {
    inSightPct: pct((f) => f.visible === 'yes'),
    detectablePct: pct((f) => f.detectable),
    usablePct: pct((f) => f.usable),
  }
  const low = {
    inSightPct: pct((f) => f.visibleLowK === 'yes'),
    detectablePct: pct((f) => f.detectableLowK === true),
    usablePct: pct((f) => f.usableLowK === true),
  }
  const heights = list.flatMap((f) => (f.marginM === null ? [] : [f]))
  const signals = list.flatMap((f) => (f.visible === 'yes' && f.signalMarginDb !== null ? [f] : []))
  const least = (of: readonly FixFigure[], value: (f: FixFigure) => number): FixFigure | null =>
    of.reduce<FixFigure | null>((worst, f) => (worst === null || value(f) < value(worst) ? f : worst), null)
  const worst = least(heights, (f) => f.marginM as number)
  const weakest = least(signals, (f) => f.signalMarginDb as number)
  return {
    ...outcome(o, need, shares, low),
    worstMarginM: worst?.marginM ?? null,
    tenthMarginM: percentile(
      heights.map((f) => f.marginM as number),
      0.1,
    ),
    worst: placeRef(worst),
    signal: {
      worstDb: weakest?.signalMarginDb ?? null,
      tenthDb: percentile(
        signals.map((f) => f.signalMarginDb as number),
        0.1,
      ),
      worst: placeRef(weakest),
    },
  }
}

const placeRef = (f: FixFigure | null): PlaceRef | null =>
  f && { lon: f.lon, lat: f.lat, azimuthDeg: f.azimuthDeg, rangeM: f.rangeM, obstacle: f.obstacle }

function lossesBy(list: readonly FixFigure[], weights: readonly number[], perUnit: number) {
  const lost = new Float64Array(LOSS_CAUSES.length + 1)
  list.forEach((f, n) => {
    if (f.cause) lost[lossCode(f.cause)] += weights[n]
  })
  return lossesOf(
    lost,
    weights.reduce((s, w) => s + w, 0),
    perUnit,
  )
}
