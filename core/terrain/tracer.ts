import { geodesicDirect, geodesicInverse, type LonLat } from '../geodesy/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import { makeBlockers, type Spike } from './blockers.ts'
import { codeAt, positionOf } from './buildGround.ts'
import { type ControlPoints, directControl, fanControl, setInside } from './controlPoints.ts'
import { type Clearing, type CoverPosts, coverAlong } from './coverAlong.ts'
import { reliefAt, reliefBlockOf } from './relief.ts'
import type { Ground, RayTrack, Site } from './types.ts'
import { WALK_END, type WalkedPatches, walkCapacity, walkRay } from './walkRay.ts'

/** The track with what the kernels beside it need: the ground's own bend and the obstacles standing in this ray. */
export interface TracedRay extends RayTrack {
  /** Quadratic term of the ground between this crossing and the next, 1/m. */
  groundBendPerM: Float64Array
  /** Obstacles in this ray, nearest first: range and index into Ground.obstacles. */
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
  /** Ground code and relief at ascending distances along the traced ray: fills code[offset + i] and relief[offset + i] for i < count. */
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
  const covered = g.codes.some((c) => c.coverHeightM > 0)
  const capacity = walkCapacity(shape.width, shape.height, control.points.distM.length) + 3 * spikeRoom(g)
  const patches: WalkedPatches | null = covered
    ? {
        post: new Int32Array(capacity),
        u: new Float64Array(capacity),
        v: new Float64Array(capacity),
        bendPerTwist: new Float64Array(capacity),
      }
    : null
  const separate = covered || g.obstacles.length > 0
  const groundM = new Float64Array(capacity)
  const groundBendPerM = new Float64Array(capacity)
  const track: TracedRay & { patches: WalkedPatches | null } = {
    count: 0,
    distM: new Float64Array(capacity),
    groundM,
    groundBendPerM,
    surfaceM: separate ? new Float64Array(capacity) : groundM,
    bendPerM: separate ? new Float64Array(capacity) : groundBendPerM,
    code: new Uint8Array(capacity),
    unknownFromM: Number.POSITIVE_INFINITY,
    unknownWhy: null,
    end: 'maxRange',
    spikes: [],
    patches,
  }
  const walk = { count: 0, end: 0, distM: track.distM, groundM, groundBendPerM, patches }
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
    const last = n > 0 ? track.distM[n - 1] : 0
    const ended = last < rangeM - END_SLACK_M
    if (!ended && n > 0) track.distM[n - 1] = rangeM
    track.unknownFromM = ended ? last : Number.POSITIVE_INFINITY
    track.unknownWhy = ended ? (walk.end === WALK_END.void ? 'void' : 'edge') : null
    track.end = track.unknownWhy === 'edge' ? 'edge' : 'maxRange'
    if (cover && patches) coverAlong(cover, n, patches, track.distM, groundM, groundBendPerM, track.surfaceM, track.bendPerM, track.code)
    else if (separate) {
      track.surfaceM.set(groundM.subarray(0, n))
      track.bendPerM.set(groundBendPerM.subarray(0, n))
    }
    track.spikes = blockers.along(azimuthDeg)
    if (track.spikes.length > 0) insertSpikes(track)
  }
  const block = reliefBlockOf(g)

  const cut: ControlPoints = {
    count: 0,
    distM: control.points.distM.slice(),
    col: control.points.col.slice(),
    row: control.points.row.slice(),
  }
  let current = control.points

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
    place: (distM, azimuthDeg) => {
      const { lon, lat } = geodesicDirect(site, azimuthDeg, distM)
      return { lon, lat }
    },
    sampleCells(distM, count, code, relief, offset) {
      const { col, row, distM: at } = current
      const { width, height } = shape
      const blocks = g.relief.samples
      const blockWidth = g.relief.width
      let i = 0
      for (let m = 0; m + 1 < current.count && i < count; m++) {
        const perM = 1 / (at[m + 1] - at[m])
        const dc = (col[m + 1] - col[m]) * perM
        const dr = (row[m + 1] - row[m]) * perM
        for (; i < count && distM[i] <= at[m + 1]; i++) {
          const s = distM[i] - at[m]
          const c = Math.floor(col[m] + s * dc + 0.5)
          const r = Math.floor(row[m] + s * dr + 0.5)
          if (c < 0 || r < 0 || c >= width || r >= height) continue
          if (code.length > 0) code[offset + i] = g.code ? g.code[r * width + c] : 0
          relief[offset + i] = blocks[((r / block.rows) | 0) * blockWidth + ((c / block.cols) | 0)]
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

/** Puts the obstacles of this ray into the track: up to the top and down again within 2 mm. */
function insertSpikes(t: TracedRay): void {
  for (const spike of t.spikes) {
    const n = t.count
    if (!(spike.distM > 0 && spike.distM <= t.distM[n - 1])) continue
    let j = 0
    let high = n - 1
    while (high - j > 1) {
      const mid = (j + high) >> 1
      if (t.distM[mid] < spike.distM) j = mid
      else high = mid
    }
    // the spike stands in the segment from j to j + 1
    const length = t.distM[j + 1] - t.distM[j]
    const at = (distM: number, z: Float64Array, bend: Float64Array): number => {
      if (!(length > 0)) return z[j]
      const u = distM - t.distM[j]
      return z[j] + u * ((z[j + 1] - z[j]) / length + bend[j] * (u - length))
    }
    const groundM = at(spike.distM, t.groundM, t.groundBendPerM)
    const topM = spike.aboveGround ? groundM + spike.topM : spike.topM
    if (topM <= at(spike.distM, t.surfaceM, t.bendPerM)) continue
    const before = Math.max(t.distM[j], spike.distM - SPIKE_HALF_M)
    const after = Math.min(t.distM[j + 1], spike.distM + SPIKE_HALF_M)
    const rows: [number, number, number, number, number][] = [
      [before, at(before, t.groundM, t.groundBendPerM), t.groundBendPerM[j], at(before, t.surfaceM, t.bendPerM), 0],
      [spike.distM, groundM, t.groundBendPerM[j], topM, 0],
      [after, at(after, t.groundM, t.groundBendPerM), t.groundBendPerM[j], at(after, t.surfaceM, t.bendPerM), t.bendPerM[j]],
    ]
    for (const a of [t.distM, t.groundM, t.groundBendPerM, t.surfaceM, t.bendPerM, t.code]) a.copyWithin(j + 4, j + 1, n)
    rows.forEach(([distM, ground, groundBend, surface, bend], i) => {
      const k = j + 1 + i
      t.distM[k] = distM
      t.groundM[k] = ground
      t.groundBendPerM[k] = groundBend
      t.surfaceM[k] = surface
      t.bendPerM[k] = bend
      t.code[k] = t.code[j]
    })
    t.count = n + 3
  }
}
