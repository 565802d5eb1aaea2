import { secondTimeAround } from '../clutter/index.ts'
import { geodesicInverse } from '../geodesy/index.ts'
import { sightPoint } from '../masking/index.ts'
import { isUnknown } from '../polar/index.ts'
import { canonicalJson, type SettledNeed } from '../study/index.ts'
import { share, type Work } from '../work/index.ts'
import { flatFigures } from './flatFigures.ts'
import { floorFigures, type GroundSums, groundSums, RING_WIDTH_M } from './groundFigures.ts'
import { measuredHorizonFigure } from './measured/index.ts'
import { needFigure } from './needs/needFigure.ts'
import { antennaM, type OptionCells } from './optionCells.ts'
import { percentile } from './percentile.ts'
import { type RoadsFigure, roadsFigure } from './roads/index.ts'
import { clutterLevelsOf, overloadNotes } from './signal/receiverLimits.ts'
import { trialPlan } from './trialPlan/index.ts'
import type { Figures, FloorFigure, NeedFigure } from './types.ts'

/** What of an option's figures does not hang on its needs, kept with the polar grids it was made from. */
interface Kept {
  sums: GroundSums | null
  notes: Figures['marks'] | null
  roads: { readonly rcsM2: number | undefined; readonly figure: RoadsFigure | null } | null
  readonly needs: Map<string, NeedFigure>
}
const keptByClutter = new WeakMap<object, Kept>()
interface KeptSight {
  readonly floors: FloorFigure[]
  readonly obstacles: string[]
  readonly knownToM: number
}
const keptByMask = new WeakMap<object, KeptSight>()

/** Parts that the work is told in: four before the needs, which take as long as all of them. */
const PARTS = 8
const NOTE_AREA_CFAR = { mark: 'outside model', about: 'area CFAR: threshold of a single sample of clutter, not of what a filter leaves' }

/** Figures of merit of one option. `marks` are the words that must stand beside its clutter figures. A change of need leaves the rest as it was. */
export function* optionFigures(o: OptionCells, needs: readonly SettledNeed[], marks: Figures['marks']): Work<Figures> {
  const kept = keptOf(o)
  kept.sums ??= groundSums(o)
  yield { done: 1, total: PARTS }
  kept.notes ??= overloadNotes(o)
  yield { done: 2, total: PARTS }
  const clutterLevels = clutterLevelsOf(o)
  yield { done: 3, total: PARTS }
  if (kept.roads?.rcsM2 !== o.vehicleRcsM2 || !kept.roads) kept.roads = { rcsM2: o.vehicleRcsM2, figure: roadsFigure(o) }
  const { sums } = kept
  const sight = sightOf(o)
  yield { done: 4, total: PARTS }
  const asked = yield* share(needFigures(o, needs), 4, PARTS, PARTS)
  const elevations = o.mask.horizon.map((h) => h.elevationDeg)
  const highest = o.mask.horizon.reduce<Figures['horizon']['highest']>(
    (best, row) => (Number.isFinite(row.elevationDeg) && (!best || row.elevationDeg > best.elevationDeg) ? row : best),
    null,
  )
  const figures: Omit<Figures, 'flat'> = {
    siteGroundM: o.site.siteGroundM,
    antennaM: antennaM(o),
    groundInSightKm2: sums.inSightKm2,
    maskedKm2: sums.maskedKm2,
    unknownKm2: sums.unknownKm2,
    horizon: { medianDeg: percentile(elevations, 0.5), p90Deg: percentile(elevations, 0.9), highest, rows: o.mask.horizon },
    floors: sight.floors,
    lowK: o.lowK?.k ?? null,
    floorsLowK: o.lowK?.floors ?? null,
    suppressionBy: o.suppression,
    rings: sums.rings,
    ringWidthM: RING_WIDTH_M,
    clutterOverKm2: sums.over,
    cnrPeakDb: sums.peakDb,
    clutterLevels,
    secondTimeAround: o.folded ? secondTimeAround(o.folded, o.place.lat) : { km2: null, notEvaluatedBeyondM: sight.knownToM },
    needs: asked,
    atHighK: null,
    trialPlan: trialPlan(o, needs, asked),
    measuredHorizon: measuredHorizonFigure(o),
    roads: kept.roads.figure,
    obstaclesInSight: sight.obstacles,
    marks: [...marks, ...o.suppression.notes, ...kept.notes, ...(o.radar.detector === 'areaCfar' ? [NOTE_AREA_CFAR] : [])],
  }
  return { ...figures, flat: flatFigures(figures) }
}

function keptOf(o: OptionCells): Kept {
  let kept = keptByClutter.get(o.clutter)
  if (!kept) {
    kept = { sums: null, notes: null, roads: null, needs: new Map() }
    keptByClutter.set(o.clutter, kept)
  }
  return kept
}

/** Figures of needs; those already worked out for the same cells, need and radar are taken again. */
export function* needFigures(o: OptionCells, needs: readonly SettledNeed[]): Work<NeedFigure[]> {
  const { needs: known } = keptOf(o)
  const rest = canonicalJson([o.radar, o.suppression.rows, o.lowK?.key ?? null, o.folded?.key ?? null])
  const wanted = new Map<string, NeedFigure>()
  const out: NeedFigure[] = []
  for (const [n, need] of needs.entries()) {
    const places = o.places.find((p) => p.needId === need.id)
    const key = `${canonicalJson(need)}|${rest}|${places ? serialOf(places) : ''}`
    const figure = known.get(key) ?? (yield* share(needFigure(o, need), n, n + 1, needs.length))
    wanted.set(key, figure)
    out.push(figure)
  }
  known.clear()
  for (const [key, figure] of wanted) known.set(key, figure)
  return out
}
const serials = new WeakMap<object, number>()
let nextSerial = 1
function serialOf(places: object): number {
  const known = serials.get(places) ?? nextSerial++
  serials.set(places, known)
  return known
}

function sightOf(o: OptionCells): KeptSight {
  let kept = keptByMask.get(o.mask)
  if (!kept) {
    kept = { floors: floorFigures(o.mask, o.site.grid), obstacles: obstaclesInSight(o), knownToM: knownToM(o) }
    keptByMask.set(o.mask, kept)
  }
  return kept
}

/** Nearest range at which the ground of some azimuth is no longer known, m, or the end of the grid. */
function knownToM(o: OptionCells): number {
  const { azimuths, ranges, rangeStepM } = o.site.grid
  let known = ranges
  for (let i = 0; i < azimuths; i++) for (let j = 0; j < known; j++) if (isUnknown(o.mask.state[i * ranges + j])) known = j
  return known * rangeStepM
}

/** Names of the obstacles whose top is in sight, each on its own ray, nearest first. */
function obstaclesInSight(o: OptionCells): string[] {
  const longest = o.site.grid.ranges * o.site.grid.rangeStepM
  const seen: { name: string; rangeM: number }[] = []
  for (const obstacle of o.ground.obstacles) {
    const at = obstacle.path[0]
    if (!at) continue
    const { distanceM } = geodesicInverse(o.place, at)
    if (distanceM > longest || distanceM < 1) continue
    // the surface at the obstacle's own place is its top
    if (sightPoint(o.ground, o.place, o.heightM, o.earth, at).inSight) seen.push({ name: obstacle.name, rangeM: distanceM })
  }
  return seen.sort((a, b) => a.rangeM - b.rangeM).map((s) => s.name)
}
