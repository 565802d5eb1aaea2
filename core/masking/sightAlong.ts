import type { Earth } from '../geodesy/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { floorBand } from './floorBand.ts'
import { makeCuts, makeStraightProfile } from './plane/profile.ts'
import { controlErrorM, heightOnLine, runRay } from './plane/ray.ts'
import { makeSightRun } from './plane/sightRun.ts'
import { rangeOfX } from './plane/straight.ts'
import { heldRunner } from './sightPoint.ts'
import { isInSight } from './sightState.ts'

/** Terrain profile along one ray as one antenna sees it; arrays of equal length, at every crossing of the ray. */
export interface SightProfile {
  readonly azimuthDeg: number
  readonly antennaM: number
  readonly effectiveRadiusM: number
  readonly distM: Float64Array
  readonly groundM: Float64Array
  readonly surfaceM: Float64Array
  readonly floorM: Float64Array
  readonly floorBandM: Float64Array
  /** 1 in sight, 0 masked, 2 unknown. */
  readonly inSight: Uint8Array
  /** Where the ray stopped being known, m; Infinity if it did not. */
  readonly unknownFromM: number
  readonly unknownWhy: 'void' | 'edge' | null
}

/** One ray from the site to a range (m) at an azimuth (degrees true): every crossing with ground, surface, floor, its band and sight. */
export function sightAlong(g: Ground, site: Site, heightM: number, earth: Earth, azimuthDeg: number, toRangeM: number): SightProfile {
  const held = heldRunner(g, site, toRangeM)
  const t = held.tracer.track
  held.tracer.traceTo(azimuthDeg, toRangeM)
  const known = t.count
  const cutM = Float64Array.from({ length: known }, (_, k) => t.ground[3 * k])
  const r = { ...held, profile: makeStraightProfile(t.surface.length, known), run: makeSightRun(known) }
  runRay(r, earth, azimuthDeg, heightM, makeCuts(cutM))
  const antennaM = r.siteGroundM + heightM
  const tail = t.unknownWhy === null ? 0 : 2
  const n = known + tail
  const out = {
    azimuthDeg,
    antennaM,
    effectiveRadiusM: r.effectiveRadiusM,
    distM: new Float64Array(n),
    groundM: new Float64Array(n).fill(Number.NaN),
    surfaceM: new Float64Array(n).fill(Number.NaN),
    floorM: new Float64Array(n).fill(Number.NaN),
    floorBandM: new Float64Array(n).fill(Number.NaN),
    inSight: new Uint8Array(n).fill(2),
    unknownFromM: t.unknownFromM,
    unknownWhy: t.unknownWhy,
  }
  for (let k = 0; k < known; k++) {
    const rangeM = cutM[k]
    out.distM[k] = rangeM
    const surfaceM = t.surface[3 * k + 1]
    out.groundM[k] = t.ground[3 * k + 1]
    out.surfaceM[k] = surfaceM
    const controlM = rangeOfX(r.run.controlX[k], r.inverse)
    const lineM = controlM > 0 ? heightOnLine(r.antennaY, r.run.tangent[k], rangeM, r.inverse) : surfaceM
    const seen = isInSight(lineM - surfaceM, rangeM - controlM, g.postingM)
    const errorM = controlErrorM(r, r.run.controlX[k])
    out.inSight[k] = seen ? 1 : 0
    out.floorM[k] = seen ? surfaceM : lineM
    out.floorBandM[k] = seen ? errorM : floorBand(rangeM, controlM, errorM, g.verticalErrorM)
  }
  if (tail > 0) {
    out.distM[known] = known > 0 ? cutM[known - 1] : 0
    out.distM[known + 1] = toRangeM
  }
  return out
}
