import { type ClutterOptions, discreteEchoes, type LandTable } from '../clutter/index.ts'
import { improvementDb, type SuppressionBy, suppressionBy, unambiguousRangeM } from '../doppler/index.ts'
import { type Earth, geodesicInverse } from '../geodesy/index.ts'
import type { SightCells, SiteCells } from '../masking/index.ts'
import { floorFigures, LOW_K, type LowKCells, meanEffectiveRadiusM, type OptionCells } from '../merit/index.ts'
import { gridPosition } from '../raster/index.ts'
import type { SettledCandidate, SettledStudy } from '../study/index.ts'
import type { Ground, Site } from '../terrain/index.ts'

export const siteOf = (c: SettledCandidate): Site => ({
  lon: c.lon,
  lat: c.lat,
  groundHeightM: c.groundHeightM,
  clearingRadiusM: c.clearingRadiusM,
  ...(c.measuredHorizon?.used ? { survey: { candidate: c.id, earth: c.measuredHorizon.earth } } : {}),
})
/** The survey at a candidate as an option's cells name it; nothing where there is none. */
export const surveyPart = (c: SettledCandidate): Pick<OptionCells, 'survey'> =>
  c.measuredHorizon ? { survey: { candidate: c.id, earth: c.measuredHorizon.earth, used: c.measuredHorizon.used } } : {}
export const earthOf = (study: SettledStudy): Earth => ({
  effectiveEarthFactor: study.atmosphere.effectiveEarthFactor,
  earthRadiusM: study.atmosphere.earthRadiusM,
})
/** The earth of the smaller factor at which cover is worked out too. */
export const lowEarthOf = (study: SettledStudy): Earth => ({ ...earthOf(study), effectiveEarthFactor: LOW_K })

export function candidateOf(study: SettledStudy, id: string): SettledCandidate {
  const found = study.candidates.find((c) => c.id === id)
  if (!found) throw new Error(`no candidate ${id}`)
  return found
}

/** What the study's radar does to each kind of clutter on this ground. */
export const suppressionOf = (study: SettledStudy, ground: Ground): SuppressionBy =>
  suppressionBy(study.radar, study.atmosphere, ground.codes)

/**
 * Options of the clutter kernels for a place and mast height: weather, echoes of obstacles, land table, suppression. With `residue` 'where-kinds-differ' a suppression that all kinds share is left to `residueOf`: it costs no pass
 * and no grid of its own.
 */
export function clutterOptions(
  study: SettledStudy,
  ground: Ground,
  landTable: LandTable | null,
  place: Site,
  heightM: number,
  residue: 'where-kinds-differ' | 'always' = 'where-kinds-differ',
): ClutterOptions {
  const by = suppressionOf(study, ground)
  return {
    weather: study.atmosphere,
    discretes: discreteEchoes(ground, place, heightM, earthOf(study), study.run.maxRangeM),
    ...(landTable ? { landTable } : {}),
    ...(residue === 'always' || by.uniformDb === null ? { improvementDb: improvementDb(by, ground.codes) } : {}),
  }
}

/** Can ground lie beyond the unambiguous range, within the range that folded clutter is looked for? Only then is it worth a sweep. */
export function mayFold(study: SettledStudy, ground: Ground, place: Site): boolean {
  const nearestM = Math.min(...study.radar.prfHz.map(unambiguousRangeM))
  if (study.foldRangeM <= nearestM) return false
  const { width, height } = ground.shape
  const { toLonLat } = gridPosition(ground.shape)
  return [0, width - 1].some((col) =>
    [0, height - 1].some((row) => {
      const [lon, lat] = toLonLat(col, row)
      return geodesicInverse(place, { lon, lat }).distanceM > nearestM
    }),
  )
}

/** Cover of one mast height at the smaller k, from its sweep. */
export function lowKOf(site: SiteCells, mask: SightCells, earth: Earth, key: string): LowKCells {
  const { grid, floorM, floorBandM } = mask
  const clearM = new Float32Array(floorM.length)
  for (let at = 0; at < clearM.length; at++) clearM[at] = floorM[at] + floorBandM[at]
  return {
    kind: 'lowK',
    version: 1,
    key,
    grid,
    heightM: mask.heightM,
    k: earth.effectiveEarthFactor,
    clearM,
    floors: floorFigures(mask, grid),
    earth,
    meanRadiusM: meanEffectiveRadiusM(site),
  }
}
