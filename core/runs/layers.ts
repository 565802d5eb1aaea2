import { decibel, fillCellStrength } from '../clutter/index.ts'
import { heightToSeeCells } from '../masking/index.ts'
import { cellsOfNeed, LOSS_CAUSES, type NeedCells, type OptionCells, PLACE, pdOf } from '../merit/index.ts'
import { type ClassPattern, makeRamp, type Ramp } from '../paint/index.ts'
import { CELL } from '../polar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { DEG_PER_RAD } from '../units/index.ts'
import { finish, type Work } from '../work/index.ts'
import { LAYER_IDS, type LayerId, type LayerInfo } from './types.ts'

const layer = (
  id: LayerId,
  family: LayerInfo['family'],
  unit: LayerInfo['unit'],
  safe: LayerInfo['safe'],
  ramp: LayerInfo['ramp'],
  hatchMasked: boolean,
): LayerInfo => ({ id, family, unit, safe, ramp, hatchMasked })

/** One flat colour per class, classes numbered from 1. */
function classRamp(hexes: readonly string[]): Ramp {
  const colours = hexes.map((hex) => {
    const [r, g, b] = [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16))
    return ((255 << 24) | (b << 16) | (g << 8) | r) >>> 0
  })
  return {
    stops: hexes.map((_, n) => n + 1),
    rgba: Uint32Array.from({ length: 256 }, (_, n) => colours[Math.floor((n * colours.length) / 256)]),
    low: 0.5,
    high: hexes.length + 0.5,
    below: 'bare',
  }
}
const classes = (id: LayerId, family: LayerInfo['family'], hexes: readonly string[]): LayerInfo => ({
  ...layer(id, family, '', 'down', classRamp(hexes), false),
  classes: true,
})
/** In sight, detectable, usable. */
const USABLE_HEXES = ['#d3e8e4', '#81bcbf', '#235877']
/** By LOSS_CAUSES: greys for what is hidden or not known, then a hue per kind of cause, two tones where kinds belong together. */
const CAUSE_HEXES: Readonly<Record<(typeof LOSS_CAUSES)[number], string>> = {
  unknown: '#c9c6be',
  'out-of-range': '#8f8a7d',
  masked: '#41494e',
  marginal: '#7a8086',
  'short-range-sensitivity': '#7b5ea7',
  'above-beam': '#2f7d87',
  'below-beam': '#8fc7c9',
  clutter: '#b8482c',
  'blind-speed': '#e0a13c',
  'too-weak': '#355f9e',
  several: '#8a2f5c',
  lobing: '#5f7a2e',
}

/** Beside the hues: two causes with the same pattern are far apart in grey. */
const CAUSE_PATTERNS: Readonly<Record<(typeof LOSS_CAUSES)[number], ClassPattern>> = {
  unknown: 'falling',
  'out-of-range': 'grid',
  masked: 'rising',
  marginal: 'dots',
  'short-range-sensitivity': 'level',
  'above-beam': 'upright',
  'below-beam': 'upright',
  clutter: 'plain',
  'blind-speed': 'checks',
  'too-weak': 'cross',
  several: 'falling',
  lobing: 'rings',
}

/** Fixed ramps with round stops, so that two maps, two candidates and the memo compare by eye. */
export const LAYERS: Readonly<Record<LayerId, LayerInfo>> = {
  masked: layer('masked', 'hidden', '', 'up', makeRamp('ink', [0, 1], 'bare'), true),
  'coverage-floor': layer('coverage-floor', 'seen', 'm', 'up', makeRamp('cool', [0, 250, 500, 1000, 1500, 2000, 3000], 'hold'), false),
  'height-to-see': layer('height-to-see', 'seen', 'm', 'up', makeRamp('cool', [0, 10, 20, 30, 40, 50, 60], 'hold'), false),
  depression: layer('depression', 'echo', 'deg', 'up', makeRamp('warm', [0, 0.5, 1, 1.5, 2, 3, 4], 'hold'), true),
  'clutter-strength': layer('clutter-strength', 'echo', 'dB', 'up', makeRamp('warm', [-60, -50, -40, -30, -20, -10], 'bare'), true),
  'clutter-to-noise': layer('clutter-to-noise', 'echo', 'dB', 'up', makeRamp('warm', [0, 10, 20, 30, 40, 50, 60, 70], 'bare'), true),
  'suppression-needed': layer('suppression-needed', 'takes', 'dB', 'up', makeRamp('warm', [0, 10, 20, 30, 40, 50, 60, 70], 'bare'), true),
  'second-time-around': layer('second-time-around', 'echo', 'dB', 'up', makeRamp('warm', [0, 10, 20, 30, 40, 50, 60, 70], 'bare'), false),
  usable: classes('usable', 'seen', USABLE_HEXES),
  'probability-of-detection': layer(
    'probability-of-detection',
    'seen',
    '',
    'down',
    makeRamp('cool', [0, 0.2, 0.4, 0.6, 0.8, 1], 'hold', true),
    false,
  ),
  'signal-margin': layer('signal-margin', 'seen', 'dB', 'down', makeRamp('cool', [-30, -20, -10, 0, 10, 20, 30], 'hold', true), false),
  'cause-of-loss': {
    ...classes(
      'cause-of-loss',
      'lost',
      LOSS_CAUSES.map((c) => CAUSE_HEXES[c]),
    ),
    patterns: LOSS_CAUSES.map((c) => CAUSE_PATTERNS[c]),
  },
}
/** Layers drawn for one need, of kind layer or polygon. */
export const NEED_LAYERS: readonly LayerId[] = [
  'suppression-needed',
  'usable',
  'probability-of-detection',
  'signal-margin',
  'cause-of-loss',
]
export const layerInfo = (id: LayerId): LayerInfo => LAYERS[id]
export const isLayerId = (id: string): id is LayerId => (LAYER_IDS as readonly string[]).includes(id)

/** Folded clutter fainter than this over noise is none. */
const FAINTEST_RATIO = 1e-10

const heights = new WeakMap<OptionCells['site'], Float32Array>()
/** Height to see of every cell, m of mast, worked out when it is first asked for; the same for every mast height of a candidate. */
export function* heightToSee(o: OptionCells): Work<Float32Array> {
  if (o.site.heightToSeeM.length > 0) return o.site.heightToSeeM
  let found = heights.get(o.site)
  if (!found) {
    found = yield* heightToSeeCells(o.ground, o.place, o.site.grid, o.earth)
    heights.set(o.site, found)
  }
  return found
}

/** Fills one value per polar cell, NaN = bare. `need` is the need on show, for the layers that ask for one. */
export function fillLayer(id: LayerId, o: OptionCells, need: SettledNeed | null, out: Float32Array): void {
  switch (id) {
    case 'masked':
      out.fill(Number.NaN)
      return
    case 'coverage-floor':
      out.set(o.mask.floorM)
      return
    case 'height-to-see':
      out.set(finish(heightToSee(o)))
      return
    case 'clutter-to-noise':
      out.set(o.clutter.cnrDb)
      return
    case 'second-time-around':
      if (o.folded)
        for (let at = 0; at < out.length; at++) out[at] = o.folded.ratio[at] > FAINTEST_RATIO ? decibel(o.folded.ratio[at]) : Number.NaN
      else out.fill(Number.NaN)
      return
    case 'depression':
      fillDepression(o, out)
      return
    case 'clutter-strength':
      fillStrength(o, out)
      return
    default: {
      const cells = need ? cellsOfNeed(o, need) : null
      if (cells && need) fillNeed(id, cells, need, out)
      else out.fill(Number.NaN)
    }
  }
}

/** Layers of one need. Usable: 1 in sight, 2 detectable, 3 usable. Pd is 0 where the target is hidden or not heard. */
function fillNeed(id: LayerId, cells: NeedCells, need: SettledNeed, out: Float32Array): void {
  const { place, cause, signalDb, neededDb } = cells
  const pd = pdOf(need.required)
  for (let at = 0; at < out.length; at++) {
    const bits = place[at]
    const known = bits & PLACE.inNeed && !(bits & (PLACE.groundAbove | PLACE.unknown))
    switch (id) {
      case 'usable':
        out[at] = bits & PLACE.usable ? 3 : bits & PLACE.detectable ? 2 : bits & PLACE.inSight ? 1 : Number.NaN
        break
      case 'cause-of-loss':
        out[at] = cause[at] > 0 ? cause[at] : Number.NaN
        break
      case 'probability-of-detection':
        out[at] = !known ? Number.NaN : bits & PLACE.inSight && cause[at] !== OUT_OF_RANGE ? pd(signalDb[at]) : 0
        break
      case 'signal-margin':
        out[at] = signalDb[at]
        break
      default:
        out[at] = neededDb[at]
    }
  }
}
const OUT_OF_RANGE = LOSS_CAUSES.indexOf('out-of-range') + 1

/** Depression at the patch on the smooth effective earth, slope not included: h/r − r/2ka, deg; NaN where the ground is unknown or masked. */
function fillDepression(o: OptionCells, out: Float32Array): void {
  const { azimuths, ranges, rangeStepM } = o.site.grid
  const mast = o.site.siteGroundM + o.heightM
  for (let i = 0; i < azimuths; i++) {
    const half = 1 / (2 * o.site.effectiveRadiusM[i])
    for (let j = 0; j < ranges; j++) {
      const at = i * ranges + j
      const r = (j + 0.5) * rangeStepM
      out[at] = visible(o.mask.state[at]) ? ((mast - o.site.groundM[at]) / r - r * half) * DEG_PER_RAD : Number.NaN
    }
  }
}

/** Mean strength at the cell centres by the tables of the clutter sums: land with its relief and context, steep ground, sea. */
function fillStrength(o: OptionCells, out: Float32Array): void {
  const options = { weather: o.atmosphere, ...(o.landTable ? { landTable: o.landTable } : {}) }
  fillCellStrength(o.site, o.mask, o.ground.codes, o.place, o.heightM, o.radar, options, { strengthDb: out, spread: null })
}

const visible = (state: number): boolean => state === CELL.inSight || state === CELL.partly
