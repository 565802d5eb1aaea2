import type { OptionCells } from '../merit/index.ts'
import { makeDifferenceRamp, paintDifference, type Ramp, type View } from '../paint/index.ts'
import { CELL } from '../polar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { fillLayer } from './layers.ts'
import type { LayerId } from './types.ts'

/** How the difference of a layer between two options is shown. */
export interface DifferenceInfo {
  readonly ramp: Ramp
  /** Smaller differences are left bare. */
  readonly deadBand: number
  /** A larger value is worse: more comes back, or less is seen. */
  readonly moreIs: 'worse' | 'better'
  /** What stands for bare cells and beyond the range, in the layer's unit; null = no difference can be taken there. */
  readonly bare: number | null
}
const DB_STOPS = [-30, -20, -10, 0, 10, 20, 30]
const info = (stops: readonly number[], deadBand: number, moreIs: DifferenceInfo['moreIs'], bare: number | null): DifferenceInfo => ({
  ramp: makeDifferenceRamp(stops, moreIs === 'worse' ? 'high' : 'low'),
  deadBand,
  moreIs,
  bare,
})
/**
 * Layers that a difference can be taken of. Where nothing comes back over noise, C/N counts as 0 dB; where nothing is in sight, detectable or usable,
 * the class counts as 0; a place masked for one option alone is a difference of sight.
 */
const DIFFERENCES: Readonly<Partial<Record<LayerId, DifferenceInfo>>> = {
  masked: info([-1, 0, 1], 0.5, 'better', 0),
  'coverage-floor': info([-1500, -1000, -500, 0, 500, 1000, 1500], 10, 'worse', null),
  'height-to-see': info([-60, -40, -20, 0, 20, 40, 60], 1, 'worse', null),
  depression: info([-3, -2, -1, 0, 1, 2, 3], 0.05, 'worse', null),
  'clutter-strength': info(DB_STOPS, 1, 'worse', null),
  'clutter-to-noise': info(DB_STOPS, 1, 'worse', 0),
  'second-time-around': info(DB_STOPS, 1, 'worse', 0),
  'suppression-needed': info(DB_STOPS, 1, 'worse', 0),
  usable: info([-3, -2, -1, 0, 1, 2, 3], 0.5, 'better', 0),
  'probability-of-detection': info([-1, -0.5, 0, 0.5, 1], 0.05, 'better', null),
  'signal-margin': info(DB_STOPS, 1, 'better', null),
}
/** null: no difference can be taken of this layer (its values are names). */
export const differenceInfo = (layer: LayerId): DifferenceInfo | null => DIFFERENCES[layer] ?? null

/** Values of a layer for a difference: bare cells stand for `bare` where the ground is known, NaN where it is not. */
export function differenceValues(o: OptionCells, layer: LayerId, need: SettledNeed | null, how: DifferenceInfo): Float32Array {
  const out = new Float32Array(o.site.groundM.length)
  const { state } = o.mask
  if (layer === 'masked') {
    for (let at = 0; at < out.length; at++)
      out[at] = unknown(state[at]) ? Number.NaN : state[at] === CELL.inSight || state[at] === CELL.partly ? 1 : 0
    return out
  }
  fillLayer(layer, o, need, out)
  if (how.bare === null) return out
  for (let at = 0; at < out.length; at++) out[at] = unknown(state[at]) ? Number.NaN : out[at] > how.bare ? out[at] : how.bare
  return out
}
const unknown = (state: number): boolean => state === CELL.beyondVoid || state === CELL.outside

/** The layer of `a` less that of `b` over a view, straight RGBA, transparent where they do not differ; null where no difference can be taken of it. */
export function paintOptionsDifference(
  a: OptionCells,
  b: OptionCells,
  layer: LayerId,
  need: SettledNeed | null,
  view: View,
): Uint32Array | null {
  const how = differenceInfo(layer)
  if (!how) return null
  const side = (o: OptionCells) => ({
    grid: o.site.grid,
    site: { lon: o.place.lon, lat: o.place.lat },
    values: differenceValues(o, layer, need, how),
    outside: how.bare ?? Number.NaN,
  })
  const out = new Uint32Array(view.width * view.height)
  paintDifference(side(a), side(b), how.deadBand, how.ramp, view, out)
  return out
}
