import type { GroundCode } from '../../landcover/index.ts'
import { RELIEF } from '../../terrain/index.ts'
import { REFLECTS } from './reflectingSurface.ts'

/**
 * Level open ground is taken at its mean over this far to either side, m, to the next quarter of a metre: a few posts of noise are no mirror, and no
 * raster knows its level better.
 */
const SMOOTH_M = 250
const LEVELS_PER_M = 4

/** Ground codes as a reflecting ray reads them: what they reflect as, and how high their cover stands, m. One entry per code byte. */
export interface ReflectingCodes {
  readonly kind: Uint8Array
  readonly coverM: Float64Array
}
/** Codes of a ground that may reflect: water, and open ground where its relief is low. null where there are none of them. */
export function reflectingCodes(codes: readonly GroundCode[]): ReflectingCodes | null {
  const kind = new Uint8Array(256)
  const coverM = new Float64Array(256)
  codes.forEach(({ terrain, coverHeightM }, n) => {
    kind[n] = terrain === 'water' ? REFLECTS.water : terrain === 'open' ? REFLECTS.open : REFLECTS.none
    coverM[n] = coverHeightM
  })
  return kind.some((k) => k !== REFLECTS.none) ? { kind, coverM } : null
}

/** Cells of one or more rays: ground at the centre (m MSL), ground code, relief, share in sight of the antenna of 65535. */
export interface RayCells {
  readonly groundM: Float32Array
  readonly code: Uint8Array
  readonly relief: Uint8Array
  readonly inSight: Uint16Array
}
/** Where rays come off the ground along one azimuth, by cell; filled again for each azimuth. */
export interface ReflectingRay {
  /** Ground range of the first centre and distance between centres, m. */
  firstM: number
  readonly stepM: number
  /** Cells in use, and whether any of them reflects. */
  count: number
  any: boolean
  antennaM: number
  /** 1 / effective earth radius. */
  c: number
  tideM: number
  /** Ground of the cells, which start at index `from`. */
  groundM: Float32Array
  from: number
  /** A value of REFLECTS; none where the antenna does not see the cell. */
  readonly kind: Uint8Array
  readonly surfaceM: Float64Array
  /** Highest surface from a cell on, m. */
  readonly topM: Float64Array
  /** Cells before this one have the three values below worked out for the curvature at hand. */
  ready: number
  /** Height of the reflecting surface, m MSL. */
  readonly heightM: Float64Array
  /** Tangent of the grazing angle of the ray from the antenna. */
  readonly tan: Float64Array
  /** Cell in which the reflected ray meets the surface again; −1 = not looked for yet. */
  readonly meets: Int32Array
  /** The surface found last by `reflectionTo`: its height, m, and a value of REFLECTS. */
  atHeightM: number
  atKind: number
}

export function makeReflectingRay(cells: number, stepM: number): ReflectingRay {
  const values = (): Float64Array => new Float64Array(cells)
  return {
    firstM: stepM / 2,
    stepM,
    count: 0,
    any: false,
    antennaM: 0,
    c: 0,
    tideM: 0,
    groundM: new Float32Array(0),
    from: 0,
    kind: new Uint8Array(cells),
    surfaceM: values(),
    topM: values(),
    ready: 0,
    heightM: values(),
    tan: values(),
    meets: new Int32Array(cells),
    atHeightM: 0,
    atKind: REFLECTS.none,
  }
}

/**
 * Fills a ray from `count` cells that start at index `from`, centres from `firstM` (m) on. Reflects: water (raised by the tide) and low-relief open
 * ground, half of whose cell the antenna sees. `bendRay` must follow.
 */
export function fillReflectingRay(
  ray: ReflectingRay,
  codes: ReflectingCodes,
  cells: RayCells,
  from: number,
  count: number,
  firstM: number,
  antennaM: number,
  tideM: number,
): void {
  const { kind, surfaceM, topM } = ray
  const { groundM, code, relief, inSight } = cells
  let any = false
  let top = Number.NEGATIVE_INFINITY
  for (let i = count - 1, at = from + count - 1; i >= 0; i--, at--) {
    const own = codes.kind[code[at]]
    const reflects = own !== 0 && inSight[at] > 32767 && (own === REFLECTS.water || relief[at] === RELIEF.low)
    kind[i] = reflects ? own : REFLECTS.none
    if (reflects) any = true
    const surface = groundM[at] + codes.coverM[code[at]]
    surfaceM[i] = surface
    if (surface > top) top = surface
    topM[i] = top
  }
  ray.firstM = firstM
  ray.count = count
  ray.any = any
  ray.antennaM = antennaM
  ray.tideM = tideM
  ray.groundM = groundM
  ray.from = from
  ray.ready = 0
}

/** Sets the curvature of the earth, 1 / effective radius, for a filled ray. */
export function bendRay(ray: ReflectingRay, c: number): void {
  ray.c = c
  ray.ready = 0
}

/** Works out the next cell: its surface is the water's, or the mean of the open ground around. */
function readyNext(ray: ReflectingRay): void {
  const { kind, groundM, from, count, stepM } = ray
  const i = ray.ready++
  let z = groundM[from + i] + ray.tideM
  if (kind[i] === REFLECTS.open) {
    const reach = Math.round(SMOOTH_M / stepM)
    let sum = 0
    let held = 0
    for (let k = Math.max(0, i - reach); k <= Math.min(count - 1, i + reach); k++) {
      if (kind[k] !== REFLECTS.open) continue
      sum += groundM[from + k]
      held++
    }
    z = Math.round((sum / held) * LEVELS_PER_M) / LEVELS_PER_M
  }
  const d = ray.firstM + i * stepM
  ray.heightM[i] = z
  ray.tan[i] = (ray.antennaM - z) / d - (d * ray.c) / 2
  ray.meets[i] = -1
}

/** Height over sea level at a ground range of the ray that came off cell i, m. */
function reflectedM(ray: ReflectingRay, i: number, rangeM: number): number {
  while (ray.ready <= i) readyNext(ray)
  const x = rangeM - ray.firstM - i * ray.stepM
  return ray.heightM[i] + x * ray.tan[i] + (x * x * ray.c) / 2
}

/** First cell in which the ray off cell i meets the surface; the number of cells where none. The ground around the point itself is its mirror. */
function meetsAgain(ray: ReflectingRay, i: number): number {
  const { meets, surfaceM, topM, count, stepM, firstM } = ray
  if (meets[i] >= 0) return meets[i]
  let k = i + 1 + Math.round(SMOOTH_M / stepM)
  for (; k < count; k++) {
    const y = reflectedM(ray, i, firstM + k * stepM)
    if (y >= topM[k]) k = count
    else if (surfaceM[k] > y) break
  }
  meets[i] = Math.min(k, count)
  return meets[i]
}

/** Is a cell, with the one before it, a surface that the ray to a target in a cell farther out may come off? */
const isMirror = (ray: ReflectingRay, i: number, cell: number): boolean =>
  i > 0 && ray.kind[i - 1] !== REFLECTS.none && ray.tan[i] > 0 && meetsAgain(ray, i) >= cell

/**
 * Looks for the surface that the ray toward a target (height m MSL) at a ground range (m) in cell `cell` comes off, from cell `start` on: the first
 * reflecting cell whose ray passes at or under the target, if the cell before it reflects too. Returns the cell the search got to, the start for any
 * target farther out at the same height or higher; the surface is in `ray.at…`, `atKind` REFLECTS.none where there is none in sight of both ends.
 */
export function reflectionTo(ray: ReflectingRay, cell: number, rangeM: number, targetM: number, start: number): number {
  const { kind, heightM } = ray
  let i = start
  while (i < cell && (kind[i] === REFLECTS.none || reflectedM(ray, i, rangeM) > targetM)) i++
  ray.atKind = REFLECTS.none
  if (i >= cell || !isMirror(ray, i, cell)) return i
  ray.atHeightM = heightM[i]
  ray.atKind = kind[i]
  return i
}

/** Range at which the ray off cell i reaches a height (m MSL), m; Infinity where it never does. */
function reachesM(ray: ReflectingRay, i: number, targetM: number): number {
  while (ray.ready <= i) readyNext(ray)
  const { c, tan, firstM, stepM } = ray
  const rise = targetM - ray.heightM[i]
  const slope = tan[i]
  const root = slope * slope + 2 * c * rise
  if (rise < 0 || root < 0) return rise < 0 ? 0 : Number.POSITIVE_INFINITY
  const x = c > 0 ? (2 * rise) / (slope + Math.sqrt(root)) : rise / slope
  return firstM + i * stepM + (x >= 0 ? x : Number.POSITIVE_INFINITY)
}

/** `reflectionTo` for every cell first … last−1 at one height (m MSL); `each` gets the stretches of cells whose rays come off one surface. */
export function reflectionsAt(
  ray: ReflectingRay,
  targetM: number,
  first: number,
  last: number,
  each: (fromCell: number, toCell: number, kind: number, heightM: number) => void,
): void {
  const { kind, firstM, stepM } = ray
  let i = 0
  let toM = -1
  for (let j = first; j < last; ) {
    while (i < j) {
      if (kind[i] !== REFLECTS.none) {
        if (toM < 0) toM = reachesM(ray, i, targetM)
        if (toM >= firstM + j * stepM) break
      }
      i++
      toM = -1
    }
    if (i >= j) {
      j++
      continue
    }
    let end = j + 1
    while (end < last && firstM + end * stepM <= toM) end++
    if (isMirror(ray, i, j)) each(j, Math.min(end, ray.meets[i] + 1), kind[i], ray.heightM[i])
    j = end
  }
}
