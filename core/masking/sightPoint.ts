import { depressionAtTerrainDeg, type Earth, geodesicInverse, type LonLat } from '../geodesy/index.ts'
import { type Ground, groundAt, groundKindAt, positionOf, type Site } from '../terrain/index.ts'
import { floorBand } from './floorBand.ts'
import { horizonName } from './horizonIs.ts'
import { lowestAntennaY } from './plane/heightToSee.ts'
import { makeCuts } from './plane/profile.ts'
import { controllingOf, heightOnLine, makeRunner, type RayRunner, runRay } from './plane/ray.ts'
import { heightOfY } from './plane/straight.ts'
import { isInSight } from './sightState.ts'

/** One place from one antenna, on its own ray and range. Numbers are NaN where the ground is not known. */
export interface SightPoint {
  readonly azimuthDeg: number
  readonly rangeM: number
  /** Ground and surface (with cover and obstacle) at the place, m MSL. */
  readonly groundM: number
  readonly surfaceM: number
  readonly inSight: boolean
  /** Masked by less than the error band. */
  readonly marginal: boolean
  /** Lowest height in sight above the place, m MSL: the horizon so far, or the surface. */
  readonly floorM: number
  readonly floorBandM: number
  /** Lowest electrical centre above the site's ground from which the place's surface is in sight, m; at least 0. */
  readonly heightToSeeM: number
  readonly depressionDeg: number
  /** Slope of the ground along the ray, rising away from the radar positive, as a ratio. */
  readonly slope: number
  /** Index into Ground.codes; 255 unknown. */
  readonly code: number
  readonly relief: number
  readonly unknown: null | 'void' | 'edge'
  /** What hides it or, in sight, the highest line so far; range 0 when there is none. */
  readonly controlling: { readonly rangeM: number; readonly obstacle: string }
}

const runners = new WeakMap<Ground, { key: string; runner: RayRunner; reachM: number }>()
/** A survey belongs to the ground; which one, and the earth its angles are taken with, to the site. */
const surveyKey = ({ survey }: Site): string =>
  survey ? `${survey.candidate}|${survey.earth.effectiveEarthFactor}|${survey.earth.earthRadiusM}` : ''

/** Runner kept between calls for one ground and site; used by functions that finish before they return. */
export function heldRunner(g: Ground, site: Site, rangeM: number): RayRunner {
  const key = `${site.lon},${site.lat},${site.groundHeightM},${site.clearingRadiusM},${surveyKey(site)}`
  const held = runners.get(g)
  if (held && held.key === key && held.reachM >= rangeM) return held.runner
  const reachM = Math.max(rangeM * 1.5, 20_000)
  const runner = makeRunner(g, site, reachM, 1)
  runners.set(g, { key, runner, reachM })
  return runner
}

/** Sight, floor, height to see and ground at one place: its own ray, its own range (WGS 84 geodesic). */
export function sightPoint(g: Ground, site: Site, heightM: number, earth: Earth, at: LonLat): SightPoint {
  const { azimuthDeg, distanceM: rangeM } = geodesicInverse(site, at)
  const r = heldRunner(g, site, rangeM)
  const [col, row] = positionOf(g).toPixel(at.lon, at.lat)
  const kind = groundKindAt(g, col, row)
  if (rangeM < 1e-3) return atTheMast(r, azimuthDeg, rangeM, kind)
  r.tracer.traceTo(azimuthDeg, rangeM)
  const t = r.tracer.track
  runRay(r, earth, azimuthDeg, heightM, makeCuts(Float64Array.of(rangeM)))
  if (r.profile.cuts === 0 || Number.isNaN(r.siteGroundM)) {
    const none = Number.NaN
    return {
      azimuthDeg,
      rangeM,
      groundM: groundAt(g, at.lon, at.lat),
      surfaceM: none,
      inSight: false,
      marginal: false,
      floorM: none,
      floorBandM: none,
      heightToSeeM: none,
      depressionDeg: none,
      slope: none,
      ...kind,
      unknown: t.unknownWhy ?? 'edge',
      controlling: { rangeM: none, obstacle: '' },
    }
  }
  const antennaM = r.siteGroundM + heightM
  const surfaceM = r.profile.cutSurfaceM[0]
  const groundM = r.profile.cutGroundM[0]
  const tangent = r.run.tangent[0]
  const c = controllingOf(r, tangent, r.run.controlX[0])
  const point = r.profile.cutPoint[0]
  const lineM = heightOnLine(r.antennaY, tangent, rangeM, r.inverse)
  const depthM = lineM - surfaceM
  const inSight = isInSight(depthM, rangeM - c.rangeM, g.postingM)
  const floorM = inSight ? surfaceM : lineM
  const floorBandM = inSight ? c.errorM : floorBand(rangeM, c.rangeM, c.errorM, g.verticalErrorM)
  const lowestY = lowestAntennaY(r.profile, point, g.postingM)
  return {
    azimuthDeg,
    rangeM,
    groundM,
    surfaceM,
    inSight,
    marginal: !inSight && depthM < floorBandM,
    floorM,
    floorBandM,
    heightToSeeM: Math.max(0, heightOfY(lowestY, 0, r.inverse) - r.siteGroundM),
    depressionDeg: depressionAtTerrainDeg(antennaM - groundM, rangeM, r.effectiveRadiusM),
    slope: r.profile.cutSlope[0],
    ...kind,
    unknown: null,
    controlling: { rangeM: c.rangeM, obstacle: horizonName(c.is, g.obstacles) },
  }
}

/** The foot of the mast itself: in sight of every height. */
function atTheMast(r: RayRunner, azimuthDeg: number, rangeM: number, kind: { code: number; relief: number }): SightPoint {
  const groundM = groundAt(r.g, r.site.lon, r.site.lat)
  const known = Number.isFinite(groundM)
  return {
    azimuthDeg,
    rangeM,
    groundM,
    surfaceM: groundM,
    inSight: known,
    marginal: false,
    floorM: groundM,
    floorBandM: known ? r.g.verticalErrorM : Number.NaN,
    heightToSeeM: known ? 0 : Number.NaN,
    depressionDeg: known ? 90 : Number.NaN,
    slope: known ? 0 : Number.NaN,
    ...kind,
    unknown: known ? null : 'edge',
    controlling: { rangeM: 0, obstacle: 'terrain' },
  }
}
