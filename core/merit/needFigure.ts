import { geodesicDirect } from '../geodesy/index.ts'
import { sightPoint } from '../masking/index.ts'
import { cellAreasM2 } from '../polar/index.ts'
import type { RadarInput } from '../radar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { addArea, areaHistogram, areaPercentile } from './areaHistogram.ts'
import { inSector, type NeedCells, needCells, PLACE } from './needCells.ts'
import type { OptionCells } from './optionCells.ts'
import type { NeedFigure, PlaceRef, SuppressionFigure } from './types.ts'

/** Suppression the radar has, dB: what is stated; 0 for none and for kinds whose improvement is not assessed yet. */
export const availableSuppressionDb = (radar: RadarInput): number => (radar.suppression.kind === 'stated' ? radar.suppression.statedDb : 0)

/** One layer need against one option. Kinds other than `layer` come back with `notAssessed` set. */
export function needFigure(o: OptionCells, need: SettledNeed, cells: NeedCells | null): NeedFigure {
  if (need.kind !== 'layer' || !cells) return unassessed(o, need)
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = o.site.grid
  const areas = cellAreasM2(o.site.grid, o.place.lat)
  const margins = areaHistogram(-2000, 20000, 1)
  const needed = areaHistogram(0, 200, 0.1)
  const available = availableSuppressionDb(o.radar)
  let total = 0
  let inSight = 0
  let marginal = 0
  let unknown = 0
  let above = 0
  let weak = 0
  let short = 0
  let worstMargin = Number.POSITIVE_INFINITY
  let worstCell = -1
  for (let i = 0; i < azimuths; i++)
    for (let j = 0; j < ranges; j++) {
      const at = i * ranges + j
      const bits = cells.place[at]
      if (bits === 0) continue
      const area = areas[j]
      if (bits & PLACE.groundAbove) {
        above += area
        continue
      }
      total += area
      if (bits & PLACE.unknown) {
        unknown += area
        continue
      }
      if (bits & PLACE.inSight) {
        inSight += area
        if (!(bits & PLACE.strong)) weak += area
      } else if (bits & PLACE.marginal) marginal += area
      const margin = cells.marginM[at]
      addArea(margins, margin, area)
      if (margin < worstMargin) {
        worstMargin = margin
        worstCell = at
      }
      const required = cells.neededDb[at]
      if (required === required && bits & PLACE.inSight) {
        addArea(needed, required, area)
        if (required > available) short += area
      }
    }
  const beyond = areaBeyondM2(o, need)
  total += beyond
  unknown += beyond
  const known = total - unknown
  const suppression: SuppressionFigure = {
    p50Db: neededAt(needed, 0.5),
    p90Db: neededAt(needed, 0.9),
    p99Db: neededAt(needed, 0.99),
    availableDb: available,
    shortKm2: short / 1e6,
    maskedPct: known > 0 ? (100 * (known - inSight)) / total : 0,
    tooWeakPct: total > 0 ? (100 * weak) / total : 0,
  }
  return {
    needId: need.id,
    name: need.name,
    must: need.must,
    areaKm2: total / 1e6,
    requiredPct: need.requiredPct,
    inSightPct: total > 0 ? (100 * inSight) / total : 0,
    inSightKm2: inSight / 1e6,
    marginalKm2: marginal / 1e6,
    unknownKm2: unknown / 1e6,
    groundAboveKm2: above / 1e6,
    worstMarginM: worstCell < 0 ? null : worstMargin,
    tenthMarginM: areaPercentile(margins, 0.1, 'down'),
    worst: worstCell < 0 ? null : placeOf(o, Math.floor(worstCell / ranges) * azimuthStepDeg, ((worstCell % ranges) + 0.5) * rangeStepM),
    suppression,
    notAssessed: null,
  }
}

const neededAt = (h: ReturnType<typeof areaHistogram>, share: number): number | null => {
  const v = areaPercentile(h, share, 'up')
  // The first bin holds the clutter-free places, which need nothing.
  return v === null ? null : v <= h.step + 1e-9 ? 0 : v
}

function placeOf(o: OptionCells, azimuthDeg: number, rangeM: number): PlaceRef {
  const at = geodesicDirect(o.place, azimuthDeg, rangeM)
  const sight = sightPoint(o.ground, o.place, o.heightM, o.earth, at)
  return { lon: at.lon, lat: at.lat, azimuthDeg, rangeM, obstacle: sight.controlling?.obstacle ?? 'terrain' }
}

/** Area of the need that lies beyond the end of the polar grid: never evaluated, so unknown. */
function areaBeyondM2(o: OptionCells, need: SettledNeed): number {
  const { azimuths, azimuthStepDeg, ranges, rangeStepM } = o.site.grid
  const end = ranges * rangeStepM
  const from = Math.max(end, need.fromRangeM)
  if (need.toRangeM <= from + rangeStepM / 2) return 0
  let rays = 0
  for (let i = 0; i < azimuths; i++) if (inSector(i * azimuthStepDeg, need.sectorDeg)) rays++
  return (rays / azimuths) * Math.PI * (need.toRangeM ** 2 - from ** 2)
}

function unassessed(o: OptionCells, need: SettledNeed): NeedFigure {
  return {
    needId: need.id,
    name: need.name,
    must: need.must,
    areaKm2: 0,
    requiredPct: need.requiredPct,
    inSightPct: 0,
    inSightKm2: 0,
    marginalKm2: 0,
    unknownKm2: 0,
    groundAboveKm2: 0,
    worstMarginM: null,
    tenthMarginM: null,
    worst: null,
    suppression: {
      p50Db: null,
      p90Db: null,
      p99Db: null,
      availableDb: availableSuppressionDb(o.radar),
      shortKm2: 0,
      maskedPct: 0,
      tooWeakPct: 0,
    },
    notAssessed: `needs of kind "${need.kind}" are not assessed yet`,
  }
}

/** Cells of a need for one option, or null for a kind that is not assessed. */
export const cellsOfNeed = (o: OptionCells, need: SettledNeed): NeedCells | null => (need.kind === 'layer' ? needCells(o, need) : null)
