import { geodesicInverse, type LonLat } from '../geodesy/index.ts'
import { cellsOfNeed, lossCauseAt, type OptionCells, PLACE } from '../merit/index.ts'
import { CELL } from '../polar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { groundAt } from '../terrain/index.ts'
import { differenceInfo } from './difference.ts'
import { fillLayer, NEED_LAYERS } from './layers.ts'
import type { LayerId, Probe } from './types.ts'

/** Values of the layer on show, kept so that a moving pointer does not fill the layer again. */
export interface ProbeCache {
  key: string
  values: Float32Array
  words: Uint16Array | null
}

/** What the map shows under a point: read from the polar cell it lies in, so that number and colour agree. */
export function probeAt(o: OptionCells, layer: LayerId, need: SettledNeed | null, at: LonLat, cache: ProbeCache): Probe {
  const key = `${o.clutter.key}|${o.heightM}|${o.tiltDeg}|${o.place.lon}|${o.place.lat}|${layer}|${need?.id ?? ''}`
  if (cache.key !== key) {
    cache.key = key
    cache.values = new Float32Array(o.site.groundM.length)
    fillLayer(layer, o, need, cache.values)
    cache.words = NEED_LAYERS.includes(layer) && need ? (cellsOfNeed(o, need)?.place ?? null) : null
  }
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = o.site.grid
  const { azimuthDeg, distanceM } = geodesicInverse(o.place, at)
  const ground = groundAt(o.ground, at.lon, at.lat)
  const base = { lon: at.lon, lat: at.lat, azimuthDeg, rangeM: distanceM, groundM: Number.isFinite(ground) ? ground : null, layer }
  const j = Math.floor(distanceM / rangeStepM)
  if (j >= ranges) return { ...base, value: null, word: 'out of range' }
  const cell = (Math.round(azimuthDeg / azimuthStepDeg) % azimuths) * ranges + j
  const value = cache.values[cell]
  const state = o.mask.state[cell]
  const word = wordOf(layer, state, value, cache.words ? cache.words[cell] : 0, o.atmosphere.rainRateMmH > 0)
  return { ...base, value: Number.isFinite(value) && word !== 'masked' ? value : null, word }
}

/** Two read-outs of one place side by side: how much more the first has, where both have a number. */
export function differenceOf(own: Probe, against: Probe): Probe {
  const known = own.value !== null && against.value !== null && differenceInfo(own.layer) !== null
  return { ...own, against, difference: known ? (own.value as number) - (against.value as number) : null }
}

function wordOf(layer: LayerId, state: number, value: number, place: number, raining: boolean): string | null {
  if (state === CELL.beyondVoid) return 'unknown: beyond a void'
  if (state === CELL.outside) return 'unknown: edge of terrain'
  const hidden = state === CELL.masked || state === CELL.marginal
  if (layer === 'masked')
    return state === CELL.inSight ? 'in sight' : state === CELL.partly ? 'partly in sight' : state === CELL.marginal ? 'marginal' : 'masked'
  if (layer === 'coverage-floor' || layer === 'height-to-see') return Number.isFinite(value) ? null : 'unknown'
  if (NEED_LAYERS.includes(layer)) return needWord(layer, value, place)
  if (layer === 'clutter-to-noise') {
    if (!Number.isFinite(value)) return hidden ? 'masked' : 'no clutter modelled'
    return hidden ? (raining ? 'masked: side lobes and rain' : 'masked, side lobes only') : value < 0 ? 'below noise' : null
  }
  return Number.isFinite(value) ? null : hidden ? 'masked' : 'not modelled'
}

/** Words of the layers of a need; a cause of loss is told by its id. */
function needWord(layer: LayerId, value: number, place: number): string | null {
  if (!(place & PLACE.inNeed)) return 'outside the need'
  if (place & PLACE.groundAbove) return 'ground above the level'
  if (layer === 'cause-of-loss') return lossCauseAt(value) ?? 'usable'
  if (layer === 'usable') return value === 3 ? 'usable' : value === 2 ? 'detectable' : value === 1 ? 'in sight' : 'target masked'
  if (!(place & PLACE.inSight)) return 'target masked'
  if (layer !== 'suppression-needed') return null
  if (!Number.isFinite(value)) return 'too weak'
  return value === 0 ? 'none needed' : null
}
