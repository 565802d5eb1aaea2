import { geodesicInverse, type LonLat } from '../geodesy/index.ts'
import { DEG_PER_RAD, RAD_PER_DEG, wrap180, wrap360 } from '../units/index.ts'
import { groundAt } from './buildGround.ts'
import type { Ground } from './types.ts'

/** Lines are cut to pieces no longer than this, so that each is straight in the plane of azimuth and range. */
const PIECE_M = 500

/** Where one obstacle stands in one ray. */
export interface Spike {
  distM: number
  /** Top, m MSL; for a line of stated height above ground: height, to be added to the ground of the ray. */
  topM: number
  aboveGround: boolean
  /** Index into Ground.obstacles, or SURVEYED. */
  obstacle: number
  /** 90 % error of the top where it is not the obstacle's own, m. */
  errorM?: number
}
/** Stands in place of an obstacle's index for what a survey of the horizon found. */
export const SURVEYED = -5
/** The obstacles around one site, by azimuth. */
export interface Blockers {
  /** Spikes of the ray at an azimuth, nearest first. */
  along(azimuthDeg: number): readonly Spike[]
}

interface Item {
  readonly obstacle: number
  /** Middle and half of the azimuths it may block, degrees. */
  readonly azimuthDeg: number
  readonly halfDeg: number
  /** A point: its spike. */
  readonly spike: Spike | null
  /** A piece of a line: ends in metres east and north of the site, in the plane of azimuth and range; heights there. */
  readonly piece: { ax: number; ay: number; bx: number; by: number; topM: number; aboveGround: boolean; middleM: number } | null
}

const NONE: readonly Spike[] = []

/**
 * Obstacles as seen from a site. A point blocks the rays within its angular width; a line blocks the rays it crosses. With `fanStepDeg` (a fan of rays so
 * far apart) each blocks at least one. An obstacle whose width covers the mast, or over unknown ground, blocks nothing.
 */
export function makeBlockers(g: Ground, site: LonLat, fanStepDeg: number | null): Blockers {
  const items: Item[] = []
  const leastHalfDeg = fanStepDeg === null ? 0 : fanStepDeg / 2
  g.obstacles.forEach((o, obstacle) => {
    if (o.path.length === 1) {
      const p = geodesicInverse(site, o.path[0])
      const foot = groundAt(g, o.path[0].lon, o.path[0].lat)
      const topM = o.topM ?? foot + (o.heightM ?? 0)
      if (!(p.distanceM > o.widthM / 2 && p.distanceM > 0) || !Number.isFinite(foot)) return
      const halfDeg = Math.max(leastHalfDeg, Math.atan(o.widthM / 2 / p.distanceM) * DEG_PER_RAD)
      const spike = { distM: p.distanceM, topM, aboveGround: false, obstacle }
      items.push({ obstacle, azimuthDeg: p.azimuthDeg, halfDeg, spike, piece: null })
      return
    }
    for (let i = 0; i + 1 < o.path.length; i++)
      for (const [a, b] of pieces(o.path[i], o.path[i + 1])) {
        const pa = geodesicInverse(site, a)
        const pb = geodesicInverse(site, b)
        const turn = wrap180(pb.azimuthDeg - pa.azimuthDeg)
        const middleDeg = wrap360(pa.azimuthDeg + turn / 2)
        const topM = o.topM ?? o.heightM ?? 0
        const piece = {
          ax: pa.distanceM * Math.sin(pa.azimuthDeg * RAD_PER_DEG),
          ay: pa.distanceM * Math.cos(pa.azimuthDeg * RAD_PER_DEG),
          bx: pb.distanceM * Math.sin(pb.azimuthDeg * RAD_PER_DEG),
          by: pb.distanceM * Math.cos(pb.azimuthDeg * RAD_PER_DEG),
          topM,
          aboveGround: o.topM === null,
          middleM: (pa.distanceM + pb.distanceM) / 2,
        }
        items.push({ obstacle, azimuthDeg: middleDeg, halfDeg: Math.max(leastHalfDeg, Math.abs(turn) / 2), spike: null, piece })
      }
  })
  if (items.length === 0) return { along: () => NONE }
  const sectors: Item[][] = Array.from({ length: 360 }, () => [])
  for (const item of items) {
    const from = Math.floor(item.azimuthDeg - item.halfDeg - 1e-9)
    const to = Math.min(from + 359, Math.floor(item.azimuthDeg + item.halfDeg + 1e-9))
    for (let k = from; k <= to; k++) sectors[((k % 360) + 360) % 360].push(item)
  }
  return {
    along(azimuthDeg) {
      const list = sectors[Math.floor(wrap360(azimuthDeg)) % 360]
      if (list.length === 0) return NONE
      const spikes: Spike[] = []
      for (const item of list) {
        const off = Math.abs(wrap180(azimuthDeg - item.azimuthDeg))
        if (off > item.halfDeg + 1e-9) continue
        if (item.spike) spikes.push(item.spike)
        else spikes.push(crossing(item, azimuthDeg))
      }
      return spikes.sort((a, b) => a.distM - b.distM)
    },
  }
}

/** A line cut into pieces, straight in longitude and latitude. */
function* pieces(from: LonLat, to: LonLat): Generator<[LonLat, LonLat]> {
  const n = Math.max(1, Math.ceil(geodesicInverse(from, to).distanceM / PIECE_M))
  const turn = wrap180(to.lon - from.lon)
  let a = from
  for (let k = 1; k <= n; k++) {
    const b = k === n ? to : { lon: from.lon + (turn * k) / n, lat: from.lat + ((to.lat - from.lat) * k) / n }
    yield [a, b]
    a = b
  }
}

/** Where a ray meets a piece of a line; a ray that only passes nearest to it (a piece between two rays of a fan) meets its middle. */
function crossing(item: Item, azimuthDeg: number): Spike {
  const { ax, ay, bx, by, topM, aboveGround, middleM } = item.piece!
  const ux = Math.sin(azimuthDeg * RAD_PER_DEG)
  const uy = Math.cos(azimuthDeg * RAD_PER_DEG)
  const across = (bx - ax) * uy - (by - ay) * ux
  const t = across === 0 ? 0.5 : -(ax * uy - ay * ux) / across
  const distM = (ax + t * (bx - ax)) * ux + (ay + t * (by - ay)) * uy
  const meets = t >= 0 && t <= 1 && distM > 0
  return { distM: meets ? distM : middleM, topM, aboveGround, obstacle: item.obstacle }
}
