import { type Earth, effectiveRadiusM } from '../../geodesy/index.ts'
import { type Ground, makeTracer, type Site, type Spike, siteGround, type Tracer } from '../../terrain/index.ts'
import { HORIZON_IS } from '../horizonIs.ts'
import { type Cuts, makeStraightProfile, type StraightProfile, straighten } from './profile.ts'
import { makeSightRun, runSight, type SightRun } from './sightRun.ts'
import { heightOfY, rangeOfX, straightDrop, straightX, straightY } from './straight.ts'

/** One site with all it takes to run single rays: scratch that is filled again for each. */
export interface RayRunner {
  readonly g: Ground
  readonly site: Site
  readonly siteGroundM: number
  readonly tracer: Tracer
  readonly run: SightRun
  profile: StraightProfile
  effectiveRadiusM: number
  /** 1 / effective radius of the last ray; 0 for a flat earth. */
  inverse: number
  antennaY: number
}

/** `cuts`: how many a profile may be cut at. With `fanStepDeg` the runner is for a fan of rays that far apart. */
export function makeRunner(g: Ground, site: Site, maxRangeM: number, cuts: number, fanStepDeg?: number): RayRunner {
  const tracer = makeTracer(g, site, maxRangeM, { fanStepDeg })
  return {
    g,
    site,
    siteGroundM: siteGround(g, site),
    tracer,
    run: makeSightRun(cuts),
    profile: makeStraightProfile(tracer.track.surface.length, cuts),
    effectiveRadiusM: 0,
    inverse: 0,
    antennaY: 0,
  }
}

/** Prepares a traced ray: straight plane of the azimuth's effective radius, cuts, and the run from one antenna height (m above the site's ground). */
export function runRay(r: RayRunner, earth: Earth, azimuthDeg: number, heightM: number, cuts: Cuts): void {
  setEarth(r, earth, azimuthDeg)
  straighten(r.tracer.track, r.inverse, cuts, r.profile)
  setAntenna(r, heightM)
  runSight(r.profile, r.antennaY, r.run)
}
export function setAntenna(r: RayRunner, heightM: number): void {
  r.antennaY = straightY(r.siteGroundM + heightM, 0, r.inverse)
}
export function setEarth(r: RayRunner, earth: Earth, azimuthDeg: number): void {
  r.effectiveRadiusM = effectiveRadiusM(earth, r.site.lat, azimuthDeg)
  r.inverse = 1 / r.effectiveRadiusM
}

/** Height of the line of a tangent at a ground range, m MSL. */
export const heightOnLine = (antennaY: number, tangent: number, rangeM: number, inverse: number): number =>
  heightOfY(antennaY + tangent * straightX(rangeM, inverse), straightDrop(rangeM, inverse), inverse)

/** What a line from the antenna touches: range, height, and what stands there. */
export interface Controlling {
  readonly rangeM: number
  readonly heightM: number
  /** Index into Ground.obstacles, or one of HORIZON_IS. */
  readonly is: number
  /** Its 90 % error, m. */
  readonly errorM: number
}
/** Cover is named where the surface stands at least this far above the ground, m. */
const COVER_NAMED_M = 0.05

export function controllingOf(r: RayRunner, tangent: number, controlX: number): Controlling {
  const { spikes, count, ground: t } = r.tracer.track
  const rangeM = rangeOfX(controlX, r.inverse)
  const heightM = heightOfY(r.antennaY + tangent * controlX, straightDrop(rangeM, r.inverse), r.inverse)
  for (const spike of spikes)
    if (Math.abs(spike.distM - rangeM) < 1e-4) {
      return { rangeM, heightM, is: spike.obstacle, errorM: spikeErrorM(r.g, spike) }
    }
  let j = 0
  let high = count - 1
  while (high - j > 1) {
    const mid = (j + high) >> 1
    if (t[3 * mid] <= rangeM) j = mid
    else high = mid
  }
  const length = t[3 * j + 3] - t[3 * j]
  const u = rangeM - t[3 * j]
  const z = t[3 * j + 1]
  const ground = length > 0 ? z + u * ((t[3 * j + 4] - z) / length + t[3 * j + 2] * (u - length)) : z
  const is = heightM - ground > COVER_NAMED_M ? HORIZON_IS.cover : HORIZON_IS.terrain
  return { rangeM, heightM, is, errorM: r.g.verticalErrorM }
}
/** Error of an obstacle's top, m: that of its record or survey, else the raster's. */
const spikeErrorM = (g: Ground, spike: Spike): number => spike.errorM ?? g.obstacles[spike.obstacle]?.verticalErrorM ?? g.verticalErrorM
/** Error of the controlling point alone: obstacle records carry their own. */
export function controlErrorM(r: RayRunner, controlX: number): number {
  const { spikes } = r.tracer.track
  if (spikes.length > 0) {
    const rangeM = rangeOfX(controlX, r.inverse)
    for (const s of spikes) if (Math.abs(s.distM - rangeM) < 1e-4) return spikeErrorM(r.g, s)
  }
  return r.g.verticalErrorM
}
