import { geodesicDirect, geodesicInverse, geodesicLine, type LonLat } from '../geodesy/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import { makeBlockers, type Spike, SURVEYED } from './blockers.ts'
import { codeAt, positionOf } from './buildGround.ts'
import { type ControlPoints, directControl, fanControl, setInside } from './controlPoints.ts'
import { type Clearing, type CoverPosts, coverAlong } from './coverAlong.ts'
import type { WalkedPatches } from './patches.ts'
import { reliefAt, reliefBlockOf } from './relief.ts'
import { type SurveyLine, surveyLine } from './survey/index.ts'
import type { Ground, RayTrack, Site } from './types.ts'
import { WALK_END, walkCapacity, walkRay } from './walkRay.ts'

/** The track with the obstacles standing in this ray, nearest first. */
export interface TracedRay extends RayTrack {
  spikes: readonly Spike[]
}
export interface TracerOptions {
  /** Azimuth step of a fan of rays, degrees: control points come from a series, and obstacles block at least one ray. */
  readonly fanStepDeg?: number
}
export interface Tracer {
  readonly track: TracedRay
  /** Fills the track with the ray at an azimuth (degrees true), from the site to maxRangeM, the terrain's end or a void. */
  trace(azimuthDeg: number): void
  /** The same, ended at a range; not above the tracer's maxRangeM. */
  traceTo(azimuthDeg: number, rangeM: number): void
  /** Place on the geodesic. */
  place(distM: number, azimuthDeg: number): LonLat
  /**
   * Ground code and relief at ascending distances along the traced ray: sets code[offset + i] and relief[offset + i] for i < count. Where the ground is
   * uniform its code is 0 and the codes are left alone.
   */
  sampleCells(distM: Float64Array, count: number, code: Uint8Array, relief: Uint8Array, offset: number): void
  /** Pixel position of a distance along the traced ray. */
  pixelAt(distM: number): [number, number]
}

/** Half thickness of an obstacle in the ray, m. */
const SPIKE_HALF_M = 0.001
/** A ray that is known to this little before its end is known to its end, m. */
const END_SLACK_M = 0.001
/** Positions this near a post are on it (rounding of projections), pixels. */
const SNAP_PX = 1e-6
const snap = (px: number): number => (Math.abs(px - Math.round(px)) < SNAP_PX ? Math.round(px) : px)

/**
 * Tracer of rays from a site over a ground: ground = bilinear surface through the posts; surface = ground + cover (posts outside the clearing radius,
 * then bilinear) + obstacles. Follows geodesics to better than 0.1 pixel. The track is scratch: valid until the next trace.
 */
export function makeTracer(g: Ground, site: Site, maxRangeM: number, options: TracerOptions = {}): Tracer {
  const { shape, heightM } = g
  const position = positionOf(g)
  const [siteCol, siteRow] = position.toPixel(site.lon, site.lat)
  const start: readonly [number, number] = [snap(siteCol), snap(siteRow)]
  const direct = directControl(shape, position, site, start, maxRangeM, g.postingM)
  const control = options.fanStepDeg === undefined ? direct : fanControl(shape, position, site, direct)
  const blockers = makeBlockers(g, site, options.fanStepDeg ?? null)
  const survey = surveyLine(g, site)
  const covered = g.codes.some((c) => c.coverHeightM > 0)
  const capacity = walkCapacity(shape.width, shape.height, control.points.distM.length) + 3 * (spikeRoom(g) + (survey ? 1 : 0))
  const patches: WalkedPatches | null = covered
    ? {
        post: new Int32Array(capacity),
        u: new Float64Array(capacity),
        v: new Float64Array(capacity),
        bendPerTwist: new Float64Array(capacity),
      }
    : null
  const ground = new Float64Array(3 * capacity)
  const separate = covered || g.obstacles.length > 0 || survey !== null
  const surface = separate ? new Float64Array(3 * capacity) : ground
  const track: TracedRay = { count: 0, ground, surface, unknownFromM: Number.POSITIVE_INFINITY, unknownWhy: null, spikes: [] }
  const walk = { count: 0, end: 0, ground, patches }
  const cover: CoverPosts | null = covered
    ? {
        code: g.code,
        coverM: Float64Array.from({ length: 256 }, (_, i) => g.codes[i]?.coverHeightM ?? 0),
        width: shape.width,
        clearing: clearingOf(g, site, start),
      }
    : null

  function run(azimuthDeg: number, points: ControlPoints, rangeM: number): void {
    walkRay(heightM, shape.width, shape.height, points, walk)
    const n = walk.count
    track.count = n
    const last = n > 0 ? ground[3 * (n - 1)] : 0
    const ended = last < rangeM - END_SLACK_M
    if (!ended && n > 0) ground[3 * (n - 1)] = rangeM
    track.unknownFromM = ended ? last : Number.POSITIVE_INFINITY
    track.unknownWhy = ended ? (walk.end === WALK_END.void ? 'void' : 'edge') : null
    if (cover && patches) coverAlong(cover, n, patches, ground, surface)
    else if (separate) surface.set(ground.subarray(0, 3 * n))
    track.spikes = survey ? withSurvey(blockers.along(azimuthDeg), survey, azimuthDeg) : blockers.along(azimuthDeg)
    if (track.spikes.length > 0) insertSpikes(track)
  }
  const block = reliefBlockOf(g)
  const blockCol = Int32Array.from({ length: shape.width }, (_, c) => Math.floor(c / block.cols))
  const blockRow = Int32Array.from({ length: shape.height }, (_, r) => Math.floor(r / block.rows) * g.relief.width)

  const cut: ControlPoints = {
    count: 0,
    distM: control.points.distM.slice(),
    col: control.points.col.slice(),
    row: control.points.row.slice(),
  }
  let current = control.points
  let lineDeg = 0
  let line = geodesicLine(site, lineDeg)

  return {
    track,
    trace(azimuthDeg) {
      current = control.points
      control.fill(azimuthDeg)
      run(azimuthDeg, current, maxRangeM)
    },
    traceTo(azimuthDeg, rangeM) {
      current = cut
      direct.fill(azimuthDeg)
      cutAt(direct.points, rangeM, cut)
      if (cut.count > 1 && cut.distM[cut.count - 1] === rangeM) {
        const p = geodesicDirect(site, azimuthDeg, rangeM)
        const [col, row] = position.toPixel(p.lon, p.lat)
        setInside(cut, cut.count - 1, col, row, shape)
      }
      run(azimuthDeg, cut, rangeM)
    },
    place(distM, azimuthDeg) {
      if (azimuthDeg !== lineDeg) {
        line = geodesicLine(site, azimuthDeg)
        lineDeg = azimuthDeg
      }
      return line.at(distM)
    },
    sampleCells(distM, count, code, relief, offset) {
      const { col, row, distM: at } = current
      const { width, height } = shape
      const blocks = g.relief.samples
      const codes = g.code
      let i = 0
      for (let m = 0; m + 1 < current.count && i < count; m++) {
        const perM = 1 / (at[m + 1] - at[m])
        const dc = (col[m + 1] - col[m]) * perM
        const dr = (row[m + 1] - row[m]) * perM
        const c0 = col[m] - at[m] * dc + 0.5
        const r0 = row[m] - at[m] * dr + 0.5
        const end = at[m + 1]
        for (; i < count; i++) {
          const s = distM[i]
          if (s > end) break
          const c = (c0 + s * dc) | 0
          const r = (r0 + s * dr) | 0
          if (c >= width || r >= height) continue
          if (codes) code[offset + i] = codes[r * width + c]
          relief[offset + i] = blocks[blockRow[r] + blockCol[c]]
        }
      }
    },
    pixelAt(distM) {
      let m = 0
      while (m + 2 < current.count && current.distM[m + 1] < distM) m++
      const f = (distM - current.distM[m]) / (current.distM[m + 1] - current.distM[m])
      return [current.col[m] + f * (current.col[m + 1] - current.col[m]), current.row[m] + f * (current.row[m + 1] - current.row[m])]
    },
  }
}

/** Code and relief at a pixel position, for a single place. */
export const groundKindAt = (g: Ground, col: number, row: number): { code: number; relief: number } => ({
  code: codeAt(g, col, row),
  relief: reliefAt(g, col, row),
})

/** The obstacles of a ray with what was surveyed there, nearest first. */
function withSurvey(spikes: readonly Spike[], survey: SurveyLine, azimuthDeg: number): readonly Spike[] {
  const found = survey.at(azimuthDeg)
  if (!found) return spikes
  const spike = { distM: found.distM, topM: found.topM, aboveGround: false, obstacle: SURVEYED, errorM: found.errorM }
  return [...spikes, spike].sort((a, b) => a.distM - b.distM)
}

/** Entries one ray may need for obstacles: no ray meets more spikes than there are points and pieces of lines. */
function spikeRoom(g: Ground): number {
  let n = 0
  for (const o of g.obstacles) {
    n += 1
    for (let i = 0; i + 1 < o.path.length; i++) n += 1 + Math.ceil(geodesicInverse(o.path[i], o.path[i + 1]).distanceM / 500)
  }
  return n
}

function clearingOf(g: Ground, site: Site, start: readonly [number, number]): Clearing {
  const position = positionOf(g)
  const step = (dc: number, dr: number): [number, number] => {
    const [lonA, latA] = position.toLonLat(start[0] - dc, start[1] - dr)
    const [lonB, latB] = position.toLonLat(start[0] + dc, start[1] + dr)
    const p = geodesicInverse({ lon: lonA, lat: latA }, { lon: lonB, lat: latB })
    return [p.distanceM * Math.sin(p.azimuthDeg * RAD_PER_DEG), p.distanceM * Math.cos(p.azimuthDeg * RAD_PER_DEG)]
  }
  const [colEastM, colNorthM] = step(0.5, 0)
  const [rowEastM, rowNorthM] = step(0, 0.5)
  const reachM = site.clearingRadiusM + 2 * (Math.hypot(colEastM, colNorthM) + Math.hypot(rowEastM, rowNorthM))
  return { radiusM: site.clearingRadiusM, reachM, siteCol: start[0], siteRow: start[1], colEastM, colNorthM, rowEastM, rowNorthM }
}

/** Copies control points up to a range; the last one lies at the range itself (or is the first outside the raster). */
function cutAt(from: ControlPoints, rangeM: number, to: ControlPoints): void {
  let m = 0
  for (; m < from.count; m++) {
    to.distM[m] = from.distM[m]
    to.col[m] = from.col[m]
    to.row[m] = from.row[m]
    if (m > 0 && from.distM[m] >= rangeM) {
      const f = (rangeM - from.distM[m - 1]) / (from.distM[m] - from.distM[m - 1])
      to.distM[m] = rangeM
      to.col[m] = from.col[m - 1] + f * (from.col[m] - from.col[m - 1])
      to.row[m] = from.row[m - 1] + f * (from.row[m] - from.row[m - 1])
      m++
      break
    }
  }
  to.count = m
}

/** Height on a track between entry j and the next. */
function heightBetween(t: Float64Array, j: number, distM: number): number {
  const length = t[3 * j + 3] - t[3 * j]
  const z = t[3 * j + 1]
  if (!(length > 0)) return z
  const u = distM - t[3 * j]
  return z + u * ((t[3 * j + 4] - z) / length + t[3 * j + 2] * (u - length))
}

/** Puts the obstacles of this ray into the track: up to the top and down again within 2 mm. Those that do not stand over the surface are left out. */
function insertSpikes(t: TracedRay): void {
  const { ground, surface } = t
  const standing: Spike[] = []
  for (const spike of t.spikes) {
    const n = t.count
    if (!(spike.distM > 0 && spike.distM <= ground[3 * (n - 1)])) continue
    // the spike stands between entries j and j + 1
    let j = 0
    let high = n - 1
    while (high - j > 1) {
      const mid = (j + high) >> 1
      if (ground[3 * mid] < spike.distM) j = mid
      else high = mid
    }
    const footM = heightBetween(ground, j, spike.distM)
    const topM = spike.aboveGround ? footM + spike.topM : spike.topM
    if (topM <= heightBetween(surface, j, spike.distM)) continue
    const before = Math.max(ground[3 * j], spike.distM - SPIKE_HALF_M)
    const after = Math.min(ground[3 * j + 3], spike.distM + SPIKE_HALF_M)
    const q = ground[3 * j + 2]
    const rows = [before, heightBetween(ground, j, before), q, spike.distM, footM, q, after, heightBetween(ground, j, after), q]
    const tops = [
      before,
      heightBetween(surface, j, before),
      0,
      spike.distM,
      topM,
      0,
      after,
      heightBetween(surface, j, after),
      surface[3 * j + 2],
    ]
    for (const [a, values] of [
      [ground, rows],
      [surface, tops],
    ] as const) {
      a.copyWithin(3 * (j + 4), 3 * (j + 1), 3 * n)
      a.set(values, 3 * (j + 1))
    }
    t.count = n + 3
    standing.push(spike)
  }
  t.spikes = standing
}
