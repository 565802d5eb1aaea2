import { exponentialDifferenceM } from '../../atmosphere/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { antennaM, meanEffectiveRadiusM, type OptionCells } from '../optionCells.ts'
import type { ExponentialFigure, NeedFigure } from './needTypes.ts'

/**
 * Where a constant k is most off for a need: height of the ray in the reference exponential air over that of the study's k, at every fix or piece of a
 * track, or at the ceiling and far end of a layer or polygon (as far as the grid goes). null for a flat earth, and where no height is known.
 */
export function exponentialOf(o: OptionCells, need: SettledNeed, figure: NeedFigure): ExponentialFigure | null {
  const radiusM = meanEffectiveRadiusM(o.site)
  const k = o.earth.effectiveEarthFactor
  if (!Number.isFinite(radiusM) || !(k > 0)) return null
  const { ranges, rangeStepM } = o.site.grid
  const ceilingM = Math.max(...need.levelsM) + (need.heightAbove === 'sea' ? 0 : o.site.siteGroundM)
  const places = figure.fixes ?? figure.track?.pieces ?? [{ rangeM: Math.min(need.toRangeM, ranges * rangeStepM), altM: ceilingM }]
  let most: ExponentialFigure | null = null
  for (const { rangeM, altM } of places) {
    if (altM === null || !(rangeM > 0)) continue
    const differenceM = exponentialDifferenceM(antennaM(o), altM, rangeM, radiusM / k, radiusM)
    if (Number.isFinite(differenceM) && (most === null || Math.abs(differenceM) > Math.abs(most.differenceM)))
      most = { differenceM, rangeM, heightM: altM }
  }
  return most
}
