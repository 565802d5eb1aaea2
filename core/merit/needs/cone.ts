import { elevationAngleDeg, slantRangeM } from '../../geodesy/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { RAD_PER_DEG, toDb } from '../../units/index.ts'
import { antennaM, meanEffectiveRadiusM, type OptionCells } from '../optionCells.ts'
import { echoAt, targetSignal } from '../signal/targetSignal.ts'
import type { ConeFigure } from './needTypes.ts'

const STEP_M = 50
const CLOSER_M = 1

/**
 * Cone of silence at each level of a need: the largest ground range inside which no target passes because of the elevation pattern, without
 * terrain, clutter and short-range sensitivity. Levels above ground stand over the ground at the mast.
 */
export function conesOf(o: OptionCells, need: SettledNeed): ConeFigure[] {
  const mast = antennaM(o)
  const radius = meanEffectiveRadiusM(o.site)
  const gainOfBankDb = toDb(o.suppression.noiseGain)
  const endM = Math.max(o.radar.instrumentedRangeM, o.site.grid.ranges * o.site.grid.rangeStepM)
  const signal = targetSignal(o.radar, o.atmosphere, o.tiltDeg, need.rcsM2, endM)
  return need.levelsM.map((levelM) => {
    const targetM = need.heightAbove === 'sea' ? levelM : o.site.siteGroundM + levelM
    if (!(targetM > mast)) return { levelM, radiusM: null }
    const passes = (rangeM: number): boolean => {
      const slantM = slantRangeM(mast, targetM, rangeM, radius)
      const tan = Math.tan(elevationAngleDeg(mast, targetM, rangeM, radius) * RAD_PER_DEG)
      const { snrDb, stcDb } = echoAt(signal, mast, targetM, rangeM, slantM, tan)
      return snrDb + stcDb + gainOfBankDb >= need.requiredRatioDb
    }
    let rangeM = CLOSER_M
    if (passes(rangeM)) return { levelM, radiusM: 0 }
    while (rangeM < endM && !passes(rangeM + STEP_M)) rangeM += STEP_M
    if (rangeM >= endM) return { levelM, radiusM: null }
    let low = rangeM
    let high = rangeM + STEP_M
    while (high - low > CLOSER_M) {
      const middle = (low + high) / 2
      if (passes(middle)) high = middle
      else low = middle
    }
    return { levelM, radiusM: high }
  })
}
