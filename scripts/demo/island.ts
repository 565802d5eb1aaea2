/** The invented island: where its coast runs, what lifts it, and the heights that wearing down leaves. Kilometres east (x) and north (y) of the middle. */
import { type Drainage, drainage, type Forcing, type Land, wearDown } from './erosion.ts'
import { fbm, mix, noise, ridged, smoothstep } from './noise.ts'

export type Point = readonly [number, number]
export interface Island {
  readonly land: Land
  readonly drainage: Drainage
  /** Kilometres inland of the coast, negative at sea; rough away from the coast. */
  readonly inlandKm: Float32Array
}

/** Side of the square raster and where its western and northern edges lie, km; its finest posting, m. Most sea is left where the candidates look. */
export const SIDE_KM = 90
export const WEST_KM = -50
export const NORTH_KM = 41
export const POSTING_M = 50

export const NEAR_RIDGE: readonly Point[] = [
  [-2.2, 14.5],
  [-1.2, 9],
  [-0.6, 4],
  [-0.4, -1],
  [-1.2, -5.5],
  [-3.4, -9.5],
]
export const MASSIF: readonly Point[] = [
  [13.5, -9],
  [15, -2],
  [16, 5],
  [21, 12],
]
/** Where the near ridge is low enough for a road. */
export const GAP: Point = [-0.4, -1.4]
const VALLEY: readonly Point[] = [
  [5.6, -9],
  [5.2, -1],
  [4.2, 6],
  [3.0, 12],
]
const SOUTH_CAPE: readonly Point[] = [
  [-10.6, -11.2],
  [-11.8, -14.5],
]
const NORTH_CAPE: readonly Point[] = [
  [-13.5, 9.6],
  [-17, 12],
]
/** Lower arms of the near ridge, reaching onto the plain. */
const SPURS: readonly (readonly Point[])[] = [
  [
    [-1.4, -4.3],
    [-4.6, -3.4],
  ],
  [
    [-0.8, 7.6],
    [-4.4, 8.6],
  ],
  [
    [-0.6, 3.2],
    [1.6, 4.4],
  ],
]
const INLET: readonly Point[] = [
  [6.5, -27],
  [5.2, -17],
  [6.6, -6.2],
]
const LOBES: readonly (readonly [Point, Point, number])[] = [
  [[-10, -5], [-9, 6], 8.2],
  [[-4, -1], [14, 2], 12.5],
  [[14, -7], [21, 11], 9.5],
  [[-3, 12], [5, 21], 4.2],
  [[17, -12], [25, -20], 3.4],
  [[-9, -8], [-11.6, -14], 2.6],
  [[-13, 9], [-17.5, 12], 2.2],
]
const ISLETS: readonly (readonly [number, number, number])[] = [
  [-23.5, -8.2, 0.9],
  [-24.6, -7.1, 0.5],
  [-21.8, 4.6, 0.75],
  [-16.5, -16.5, 0.8],
  [-15.2, -17.6, 0.5],
  [29.5, 15.5, 1.3],
  [31.4, 13.6, 0.7],
  [9.5, 24.5, 0.9],
]

function toSegment(x: number, y: number, [ax, ay]: Point, [bx, by]: Point): number {
  const dx = bx - ax
  const dy = by - ay
  const t = Math.min(1, Math.max(0, ((x - ax) * dx + (y - ay) * dy) / (dx * dx + dy * dy)))
  return Math.sqrt((x - ax - t * dx) ** 2 + (y - ay - t * dy) ** 2)
}
/** Distance to a chain of points, km. */
export function toPath(x: number, y: number, path: readonly Point[]): number {
  let nearest = Number.POSITIVE_INFINITY
  for (let k = 1; k < path.length; k++) nearest = Math.min(nearest, toSegment(x, y, path[k - 1], path[k]))
  return nearest
}
/** 1 at the middle, 0 at `reach` and beyond. */
const bump = (distance: number, reach: number): number => (Math.abs(distance) >= reach ? 0 : (1 - (distance / reach) ** 2) ** 2)
const smoothMax = (a: number, b: number, blend: number): number => {
  const t = Math.max(0, blend - Math.abs(a - b)) / blend
  return Math.max(a, b) + (t * t * blend) / 4
}

/** Kilometres inland, negative at sea. */
export function coastKm(x: number, y: number): number {
  let inland = -60
  for (const [a, b, reach] of LOBES) inland = smoothMax(inland, reach - toSegment(x, y, a, b), 4)
  // The western beach is one long curve; elsewhere the sea has bitten into the rock.
  const beach = smoothstep(-13, -15, x) * smoothstep(7.5, 6, y) * smoothstep(-9.5, -8, y)
  const rough = 1 - 0.86 * beach
  inland += rough * (3.6 * fbm(x / 9.5, y / 9.5, 2, 101) + 2.4 * fbm(x / 3.4, y / 3.4, 6, 102))
  const inletWidth = 0.75 + 0.09 * Math.max(0, -7 - y)
  const wander = 0.9 * noise(x / 4, y / 4, 103) + 0.35 * fbm(x / 1.2, y / 1.2, 3, 104)
  inland = -smoothMax(-inland, inletWidth - Math.abs(toPath(x + wander, y, INLET)), 0.8)
  for (const [ix, iy, reach] of ISLETS) {
    const d = Math.sqrt((x - ix) ** 2 + (y - iy) ** 2)
    if (d < 3) inland = Math.max(inland, reach - d + 0.45 * fbm(x / 0.9, y / 0.9, 4, 105))
  }
  return inland
}

/** How fast the rock rises here and how readily it is worn. */
function forcingAt(x: number, y: number, inland: number): readonly [uplift: number, wear: number] {
  const bendX = 1.5 * fbm(x / 5.5, y / 5.5, 3, 201)
  const bendY = 1.5 * fbm(x / 5.5, y / 5.5, 3, 211)
  const gap = bump(Math.sqrt((x - GAP[0]) ** 2 + ((y - GAP[1]) * 1.1) ** 2), 2.3)
  const crest = Math.max(0.45, 1 + 0.45 * fbm(x / 3.4, y / 3.4, 2, 202))
  const ridgeX = x + 0.9 * bendX
  const ridgeY = y + 0.9 * bendY
  const spurs = Math.max(...SPURS.map((spur) => bump(toPath(ridgeX, ridgeY, spur), 1.3)))
  const ridge = Math.max(bump(toPath(ridgeX, ridgeY, NEAR_RIDGE), 2.1), 0.55 * spurs) * (1 - 0.93 * gap) * crest
  const far = bump(toPath(x + 2.2 * bendX, y + 2.2 * bendY, MASSIF), 9.5)
  const massif = far * far * Math.max(0.3, 1 + 0.75 * fbm(x / 6.5, y / 6.5, 3, 205))
  const plain = smoothstep(-1.6, -4.2, x + 0.8 * bendX) * smoothstep(9.6, 6.6, y + 1.8 * bendY) * smoothstep(-11.5, -8.2, y + 1.2 * bendX)
  const valley = bump(toPath(x + bendX, y, VALLEY), 3.9)
  const hills = 24 + 62 * fbm(x / 5.2, y / 5.2, 3, 203)
  const head = bump(toPath(x, y, SOUTH_CAPE), 2.8)
  const northWest = bump(toPath(x, y, NORTH_CAPE), 2.8)
  const offshore = Math.max(smoothstep(-18.5, -19.5, x), smoothstep(20, 23, y), smoothstep(27.5, 29, x))
  let uplift = mix(Math.max(7, hills), 2.4 + 1.6 * noise(x / 2.2, y / 2.2, 206), Math.max(plain, 0.94 * Math.min(1, 1.3 * valley)))
  uplift += 100 * ridge + 150 * massif + 16 * head + 26 * northWest + 14 * offshore
  const soft = 1.35 - 0.85 * Math.min(1, ridge) - 0.5 * head + 0.9 * fbm(x / 1.1, y / 1.1, 3, 204)
  return [uplift * smoothstep(-0.4, 0.5, inland), Math.max(0.25, soft)]
}

function shapeAt(cellM: number): { land: Land; forcing: Forcing; inlandKm: Float32Array } {
  const width = Math.round((SIDE_KM * 1000) / cellM)
  const n = width * width
  const land: Land = { width, height: width, cellM, isLand: new Uint8Array(n), heightM: new Float64Array(n) }
  const forcing: Forcing = { uplift: new Float64Array(n), wear: new Float64Array(n) }
  const inlandKm = new Float32Array(n).fill(-9)
  for (let row = 1; row < width - 1; row++) {
    const y = NORTH_KM - ((row + 0.5) * cellM) / 1000
    for (let col = 1; col < width - 1; col++) {
      const x = WEST_KM + ((col + 0.5) * cellM) / 1000
      if (x < -28 || x > 36 || Math.abs(y) > 29) continue
      const cell = row * width + col
      const inland = coastKm(x, y)
      inlandKm[cell] = inland
      if (inland <= 0) continue
      land.isLand[cell] = 1
      const [uplift, wear] = forcingAt(x, y, inland)
      forcing.uplift[cell] = uplift
      forcing.wear[cell] = wear
      land.heightM[cell] = 2 + 8 * Math.min(inland, 4) + 6 * noise(x / 1.1, y / 1.1, 301)
    }
  }
  return { land, forcing, inlandKm }
}

/** Heights of a coarser run as the start of a finer one, read a little aside so that no straight grid line survives. */
function refine(coarse: Land, fine: Land, roughM: number, roughKm: number): void {
  const ratio = fine.cellM / coarse.cellM
  for (let row = 1; row < fine.height - 1; row++) {
    for (let col = 1; col < fine.width - 1; col++) {
      const cell = row * fine.width + col
      if (!fine.isLand[cell]) continue
      const aside = 1.1 * fbm((col * ratio) / 4, (row * ratio) / 4, 2, 302)
      const along = 1.1 * fbm((col * ratio) / 4, (row * ratio) / 4, 2, 303)
      const c = (col + 0.5) * ratio - 0.5 + aside
      const r = (row + 0.5) * ratio - 0.5 + along
      const c0 = Math.floor(c)
      const r0 = Math.floor(r)
      const at = r0 * coarse.width + c0
      const h = coarse.heightM
      const top = mix(h[at], h[at + 1], c - c0)
      const bottom = mix(h[at + coarse.width], h[at + coarse.width + 1], c - c0)
      const x = WEST_KM + ((col + 0.5) * fine.cellM) / 1000
      const y = NORTH_KM - ((row + 0.5) * fine.cellM) / 1000
      const swell = roughM * fbm(x / roughKm, y / roughKm, 4, 304)
      fine.heightM[cell] = Math.max(0.3, mix(top, bottom, r - r0) + swell)
    }
  }
}

/** What running water does not make: dunes behind the beach, cliffs, a little roughness on steep rock. */
function finish(land: Land, inlandKm: Float32Array): void {
  for (let row = 1; row < land.height - 1; row++) {
    const y = NORTH_KM - ((row + 0.5) * land.cellM) / 1000
    for (let col = 1; col < land.width - 1; col++) {
      const cell = row * land.width + col
      if (!land.isLand[cell]) continue
      const x = WEST_KM + ((col + 0.5) * land.cellM) / 1000
      const inland = inlandKm[cell]
      const h = land.heightM[cell]
      const beach = smoothstep(-12.5, -14, x) * smoothstep(8, 6.5, y) * smoothstep(-10, -8.5, y)
      const dunes =
        beach * (bump(inland - 0.45, 0.4) * 11 + bump(inland - 0.95, 0.35) * 7) * (0.55 + 0.75 * ridged(x / 0.7, y / 1.6, 3, 401))
      const cape = Math.max(
        bump(toPath(x, y, SOUTH_CAPE), 4),
        bump(toPath(x, y, NORTH_CAPE), 4),
        smoothstep(-18.5, -19.5, x),
        smoothstep(26, 28, x),
        0.5 * smoothstep(6, 60, h),
      )
      const cliff = cape * (1 - beach) * smoothstep(0, 0.22, inland) * (8 + 16 * smoothstep(-0.35, 0.5, noise(x / 3.5, y / 3.5, 402)))
      const rock = smoothstep(120, 500, h) * 26 * (ridged(x / 0.9, y / 0.9, 4, 403) - 0.35)
      land.heightM[cell] = Math.max(0.5, h + dunes + cliff + rock)
    }
  }
}

/** The whole island at the finest posting. */
export function makeIsland(): Island {
  let last = shapeAt(300)
  for (let step = 0; step < 130; step++) wearDown(last.land, last.forcing, 0.06, 5e4)
  for (const [cellM, steps, timeStep, roughM, roughKm] of [
    [150, 26, 0.03, 9, 2.4],
    [POSTING_M, 7, 0.012, 3, 0.9],
  ] as const) {
    const next = shapeAt(cellM)
    refine(last.land, next.land, roughM, roughKm)
    for (let step = 0; step < steps; step++) wearDown(next.land, next.forcing, timeStep, 2.5e4)
    last = next
  }
  const rivers = drainage(last.land)
  finish(last.land, last.inlandKm)
  return { land: last.land, drainage: rivers, inlandKm: last.inlandKm }
}
