import { geodesicDirect } from '../../geodesy/index.ts'
import { sightPoint } from '../../masking/index.ts'
import { cellAreasM2 } from '../../polar/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { toDb } from '../../units/index.ts'
import { addArea, areaHistogram, areaPercentile } from '../areaHistogram.ts'
import type { OptionCells } from '../optionCells.ts'
import { ratioOfDb } from '../signal/decibelTables.ts'
import { conesOf } from './cone.ts'
import { type NeedCells, needCells, PLACE } from './needCells.ts'
import { LOSS_CAUSES, type NeedFigure, type PlaceRef, type SuppressionFigure } from './needTypes.ts'
import { lossesOf, outcome } from './outcome.ts'
import { fixesFigure, trackFigure } from './places/placesFigure.ts'

/** Is a need tested in the cells of the polar grid? Fixes and tracks have rays of their own. */
export const isAreaNeed = (need: SettledNeed): boolean => need.kind === 'layer' || need.kind === 'polygon'

/** Cells of a need for one option; null for fixes and tracks, and for a polygon whose file is not read. */
export const cellsOfNeed = (o: OptionCells, need: SettledNeed): NeedCells | null =>
  isAreaNeed(need) && placesOf(o, need) !== 'missing' ? needCells(o, need) : null

const placesOf = (o: OptionCells, need: SettledNeed) =>
  need.kind === 'layer' ? null : (o.places.find((p) => p.needId === need.id) ?? 'missing')

/** One need against one option. `notAssessed` is set where its file is not read. */
export function needFigure(o: OptionCells, need: SettledNeed): NeedFigure {
  const places = placesOf(o, need)
  const base = emptyFigure(o, need)
  if (places === 'missing') return { ...base, notAssessed: `its file ${need.file ?? ''} is not read` }
  if (places && need.kind === 'fixes') return fixesFigure(o, need, places, base)
  if (places && need.kind === 'track') return trackFigure(o, need, places, base)
  return areaFigure(o, need, base)
}

/** Sums over the cells of a layer or polygon need. */
function areaFigure(o: OptionCells, need: SettledNeed, base: NeedFigure): NeedFigure {
  const cells = needCells(o, need)
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = o.site.grid
  const areas = cellAreasM2(o.site.grid, o.place.lat)
  const margins = areaHistogram(-2000, 20000, 1)
  const signals = areaHistogram(-150, 150, 0.1)
  const needed = areaHistogram(0, 200, 0.1)
  const shortBy = areaHistogram(0, 200, 0.1)
  const lost = new Float64Array(LOSS_CAUSES.length + 1)
  // by bit of PLACE
  const sum = new Float64Array(10)
  let total = 0
  let above = 0
  let short = 0
  let clutter = 0
  let left = 0
  const height: Worst = { value: Number.POSITIVE_INFINITY, cell: -1 }
  const signal: Worst = { value: Number.POSITIVE_INFINITY, cell: -1 }
  for (let i = 0; i < azimuths; i++) {
    const pairs = cells.spans.pairs[i]
    for (let p = 0; pairs && p < pairs.length; p += 2)
      for (let j = pairs[p]; j < pairs[p + 1]; j++) {
        const at = i * ranges + j
        const bits = cells.place[at]
        const area = areas[j]
        if (bits & PLACE.groundAbove) {
          above += area
          continue
        }
        total += area
        for (let b = 1; b < 10; b++) if (bits & (1 << b)) sum[b] += area
        if (cells.cause[at] > 0) lost[cells.cause[at]] += area
        if (bits & PLACE.unknown) continue
        const margin = cells.marginM[at]
        addArea(margins, margin, area)
        if (margin < height.value) {
          height.value = margin
          height.cell = at
        }
        const over = cells.signalDb[at]
        if (!Number.isNaN(over)) {
          addArea(signals, over, area)
          if (over < signal.value) {
            signal.value = over
            signal.cell = at
          }
        }
        const wanted = cells.neededDb[at]
        if (Number.isNaN(wanted)) continue
        const available = cells.availableDb[at]
        addArea(needed, wanted, area)
        addArea(shortBy, Math.max(0, wanted - available), area)
        if (wanted > available) short += area
        if (o.suppression.uniformDb === null) {
          const cnr = ratioOfDb(o.clutter.cnrDb[at])
          clutter += area * cnr
          left += area * cnr * ratioOfDb(-available)
        }
      }
  }
  const beyond = cells.spans.beyondM2
  total += beyond
  const of = (bit: number): number => sum[Math.log2(bit)]
  const unknown = of(PLACE.unknown) + beyond
  lost[1] += beyond
  const pct = (m2: number): number => (total > 0 ? (100 * m2) / total : 0)
  const suppression: SuppressionFigure = {
    p50Db: levelAt(needed, 0.5),
    p90Db: levelAt(needed, 0.9),
    p99Db: levelAt(needed, 0.99),
    availableDb: o.suppression.uniformDb ?? (left > 0 ? toDb(clutter / left) : 0),
    shortKm2: short / 1e6,
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
  const placeOf = (w: Worst): PlaceRef | null =>
    w.cell < 0 ? null : placeAt(o, Math.floor(w.cell / ranges) * azimuthStepDeg, ((w.cell % ranges) + 0.5) * rangeStepM)
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
    worstMarginM: height.cell < 0 ? null : height.value,
    tenthMarginM: areaPercentile(margins, 0.1, 'down'),
    worst: placeOf(height),
    signal: {
      worstDb: signal.cell < 0 ? null : signal.value,
      tenthDb: areaPercentile(signals, 0.1, 'down'),
      worst: placeOf(signal),
    },
    losses: lossesOf(lost, total, 1e6),
    suppression,
  }
}
interface Worst {
  value: number
  cell: number
}

const levelAt = (h: ReturnType<typeof areaHistogram>, share: number): number | null => {
  const v = areaPercentile(h, share, 'up')
  // The first bin holds the places that need nothing.
  return v === null ? null : v <= h.step + 1e-9 ? 0 : v
}

function placeAt(o: OptionCells, azimuthDeg: number, rangeM: number): PlaceRef {
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
    notAssessed: null,
  }
}
