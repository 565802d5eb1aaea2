import { LOW_K } from '../merit/index.ts'
import { canonicalJson, type SettledCandidate, type SettledStudy } from '../study/index.ts'
import type { Keys, OptionRef } from './types.ts'

/** Key of what one option's results were made from; equal keys mean equal results. `filesSerial` stands for the files of needs. */
export function keysOf(serial: number, filesSerial: number, study: SettledStudy, candidate: SettledCandidate, ref: OptionRef): Keys {
  const { effectiveEarthFactor, ...air } = study.atmosphere
  const site = siteKey(serial, study, candidate, effectiveEarthFactor)
  const mask = `${site}|${ref.heightM}`
  const { antenna, ...radar } = study.radar
  const clutter = `${mask}|${canonicalJson([radar, { ...antenna, tiltDeg: ref.tiltDeg }, air, study.lowAngleLandTable])}`
  return {
    site,
    mask,
    lowK: `${siteKey(serial, study, candidate, LOW_K)}|${ref.heightM}|cover`,
    clutter,
    folded: `${clutter}|${study.foldRangeM}`,
    needs: `${clutter}|${study.foldRangeM}|${filesSerial}|${canonicalJson([study.needs, study.vehicleRcsM2, candidate.measuredHorizon?.file ?? null])}`,
  }
}

const siteKey = (serial: number, study: SettledStudy, c: SettledCandidate, k: number): string =>
  canonicalJson([
    serial,
    c.lon,
    c.lat,
    c.groundHeightM,
    c.clearingRadiusM,
    k,
    study.atmosphere.earthRadiusM,
    study.run,
    c.measuredHorizon?.used ? c.measuredHorizon : null,
  ])

export const optionId = (ref: OptionRef): string => `${ref.candidate}|${ref.heightM}|${ref.tiltDeg}`

/** Every option of the study, candidate by candidate. */
export function optionsOfStudy(study: SettledStudy): OptionRef[] {
  return study.candidates.flatMap((c) =>
    c.mastHeightsM.flatMap((heightM) => c.tiltsDeg.map((tiltDeg) => ({ candidate: c.id, heightM, tiltDeg }))),
  )
}
