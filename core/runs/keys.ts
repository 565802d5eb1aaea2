import { canonicalJson, type SettledCandidate, type SettledStudy } from '../study/index.ts'
import type { Keys, OptionRef } from './types.ts'

/** Key of what one option's results were made from; equal keys mean equal results. */
export function keysOf(serial: number, study: SettledStudy, candidate: SettledCandidate, ref: OptionRef): Keys {
  const { lon, lat, groundHeightM, clearingRadiusM } = candidate
  const { effectiveEarthFactor, earthRadiusM, gas, rainRateMmH, windMs, seaState } = study.atmosphere
  const site = canonicalJson([serial, lon, lat, groundHeightM, clearingRadiusM, effectiveEarthFactor, earthRadiusM, study.run])
  const mask = `${site}|${ref.heightM}`
  const { antenna, ...radar } = study.radar
  const clutter = `${mask}|${canonicalJson([radar, { ...antenna, tiltDeg: ref.tiltDeg }, gas, rainRateMmH, windMs, seaState, study.lowAngleLandTable])}`
  return { site, mask, clutter, needs: `${clutter}|${canonicalJson(study.needs)}` }
}

export const optionId = (ref: OptionRef): string => `${ref.candidate}|${ref.heightM}|${ref.tiltDeg}`

/** Every option of the study, candidate by candidate. */
export function optionsOfStudy(study: SettledStudy): OptionRef[] {
  return study.candidates.flatMap((c) =>
    c.mastHeightsM.flatMap((heightM) => c.tiltsDeg.map((tiltDeg) => ({ candidate: c.id, heightM, tiltDeg }))),
  )
}
