import { strengthByCode } from '../clutter/index.ts'
import { cellsOfNeed, type OptionCells } from '../merit/index.ts'
import { makeRamp } from '../paint/index.ts'
import { CELL } from '../polar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { DEG_PER_RAD } from '../units/index.ts'
import { LAYER_IDS, type LayerId, type LayerInfo } from './types.ts'

const layer = (
  id: LayerId,
  family: LayerInfo['family'],
  unit: LayerInfo['unit'],
  safe: LayerInfo['safe'],
  ramp: LayerInfo['ramp'],
  hatchMasked: boolean,
): LayerInfo => ({ id, family, unit, safe, ramp, hatchMasked })

/** Fixed ramps with round stops, so that two maps, two candidates and the memo compare by eye. */
export const LAYERS: Readonly<Record<LayerId, LayerInfo>> = {
  masked: layer('masked', 'hidden', '', 'up', makeRamp('ink', [0, 1], 'bare'), true),
  'coverage-floor': layer('coverage-floor', 'seen', 'm', 'up', makeRamp('cool', [0, 250, 500, 1000, 1500, 2000, 3000], 'hold'), false),
  'height-to-see': layer('height-to-see', 'seen', 'm', 'up', makeRamp('cool', [0, 10, 20, 30, 40, 50, 60], 'hold'), false),
  depression: layer('depression', 'echo', 'deg', 'up', makeRamp('warm', [0, 0.5, 1, 1.5, 2, 3, 4], 'hold'), true),
  'clutter-strength': layer('clutter-strength', 'echo', 'dB', 'up', makeRamp('warm', [-60, -50, -40, -30, -20, -10], 'bare'), true),
  'clutter-to-noise': layer('clutter-to-noise', 'echo', 'dB', 'up', makeRamp('warm', [0, 10, 20, 30, 40, 50, 60, 70], 'bare'), true),
  'suppression-needed': layer('suppression-needed', 'takes', 'dB', 'up', makeRamp('warm', [0, 10, 20, 30, 40, 50, 60, 70], 'bare'), true),
}
export const layerInfo = (id: LayerId): LayerInfo => LAYERS[id]
export const isLayerId = (id: string): id is LayerId => (LAYER_IDS as readonly string[]).includes(id)

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
      out.set(o.site.heightToSeeM)
      return
    case 'clutter-to-noise':
      out.set(o.clutter.cnrDb)
      return
    case 'depression':
      fillDepression(o, out)
      return
    case 'clutter-strength':
      fillStrength(o, out)
      return
    case 'suppression-needed': {
      const cells = need ? cellsOfNeed(o, need) : null
      if (cells) out.set(cells.neededDb)
      else out.fill(Number.NaN)
    }
  }
}

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

function fillStrength(o: OptionCells, out: Float32Array): void {
  fillDepression(o, out)
  const strength = strengthByCode(o.ground.codes, o.radar.frequencyHz, o.landTable ?? undefined)
  for (let at = 0; at < out.length; at++) {
    const depression = out[at]
    if (!Number.isNaN(depression)) out[at] = strength(o.site.code[at], o.site.relief[at], depression)
  }
}

const visible = (state: number): boolean => state === CELL.inSight || state === CELL.partly
