/**
 * Valleys worn by running water: the stream-power law dz/dt = U − K·√A·S, solved implicitly from the sea upward
 * (Braun and Willett 2013, Geomorphology 180–181), with hollows drained by flooding from the sea (Barnes et al. 2014,
 * Computers & Geosciences 62), and slopes softened by diffusion. Lengths and heights in metres; time in arbitrary units.
 */
import { chance } from './noise.ts'

export interface Land {
  readonly width: number
  readonly height: number
  readonly cellM: number
  /** 1 on land. */
  readonly isLand: Uint8Array
  readonly heightM: Float64Array
}
export interface Forcing {
  /** Uplift, metres per unit of time. */
  readonly uplift: Float64Array
  /** How readily the rock is worn, 1 = ordinary. */
  readonly wear: Float64Array
}
export interface Drainage {
  /** Land cells in the order the sea would drown them: each after the cell it drains to. */
  readonly order: Int32Array
  readonly receiver: Int32Array
  readonly stepM: Float64Array
  /** Catchment above each cell, m². */
  readonly areaM2: Float64Array
}

const DIAGONAL = Math.SQRT2

/** Binary heap of cell numbers by level; ties broken by cell number so that the order is the same everywhere. */
class Flood {
  private readonly heap: Int32Array
  private size = 0
  constructor(
    private readonly level: Float64Array,
    capacity: number,
  ) {
    this.heap = new Int32Array(capacity + 1)
  }
  private before(a: number, b: number): boolean {
    const d = this.level[a] - this.level[b]
    return d < 0 || (d === 0 && a < b)
  }
  get empty(): boolean {
    return this.size === 0
  }
  push(cell: number): void {
    let i = this.size++
    while (i > 0) {
      const up = (i - 1) >> 1
      if (!this.before(cell, this.heap[up])) break
      this.heap[i] = this.heap[up]
      i = up
    }
    this.heap[i] = cell
  }
  pop(): number {
    const top = this.heap[0]
    const last = this.heap[--this.size]
    let i = 0
    for (;;) {
      let down = 2 * i + 1
      if (down >= this.size) break
      if (down + 1 < this.size && this.before(this.heap[down + 1], this.heap[down])) down++
      if (!this.before(this.heap[down], last)) break
      this.heap[i] = this.heap[down]
      i = down
    }
    this.heap[i] = last
    return top
  }
}

/**
 * Where every cell drains to, hollows overflowing at their lowest lip, and the catchment above it. The outermost cells must be sea.
 * Diagonal steps are weighed with a random length between 1 and 2, so that no valley keeps to the grid
 * (Fairfield and Leymarie 1991, Water Resources Research 27).
 */
export function drainage(land: Land): Drainage {
  const { width, isLand, heightM, cellM } = land
  const n = isLand.length
  const level = new Float64Array(n)
  const done = new Uint8Array(n)
  const receiver = new Int32Array(n).fill(-1)
  const stepM = new Float64Array(n)
  const around = [-width, -1, 1, width, -width - 1, -width + 1, width - 1, width + 1]
  const order = new Int32Array(n)
  const flood = new Flood(level, n)
  for (let cell = 0; cell < n; cell++) {
    if (isLand[cell]) continue
    done[cell] = 1
    const row = Math.floor(cell / width)
    const col = cell - row * width
    if (row === 0 || col === 0 || row === land.height - 1 || col === width - 1) continue
    for (let k = 0; k < 8; k++) {
      if (!isLand[cell + around[k]]) continue
      flood.push(cell)
      break
    }
  }
  let count = 0
  while (!flood.empty) {
    const cell = flood.pop()
    if (isLand[cell]) order[count++] = cell
    for (let k = 0; k < 8; k++) {
      const next = cell + around[k]
      if (!isLand[next] || done[next]) continue
      done[next] = 1
      level[next] = Math.max(heightM[next], level[cell] + 1e-4)
      flood.push(next)
    }
  }
  const areaM2 = new Float64Array(n)
  for (let at = 0; at < count; at++) {
    const cell = order[at]
    let steepest = 0
    const diagonal = 2 - chance(cell, 0, 501)
    for (let k = 0; k < 8; k++) {
      const next = cell + around[k]
      const slope = (level[cell] - level[next]) / (k < 4 ? 1 : diagonal)
      if (slope <= steepest) continue
      steepest = slope
      receiver[cell] = next
      stepM[cell] = k < 4 ? cellM : cellM * DIAGONAL
    }
    areaM2[cell] = cellM * cellM
  }
  for (let at = count - 1; at >= 0; at--) areaM2[receiver[order[at]]] += areaM2[order[at]]
  return { order: order.subarray(0, count), receiver, stepM, areaM2 }
}

/** One step of time: lift, wear the valleys, let the slopes creep. Changes land.heightM. */
export function wearDown(land: Land, forcing: Forcing, timeStep: number, creepM2: number): void {
  const { width, heightM, isLand, cellM } = land
  const d = drainage(land)
  for (const cell of d.order) {
    const to = d.receiver[cell]
    const f = (forcing.wear[cell] * timeStep * Math.sqrt(d.areaM2[cell])) / d.stepM[cell]
    heightM[cell] = Math.max(0.2, (heightM[cell] + forcing.uplift[cell] * timeStep + f * heightM[to]) / (1 + f))
  }
  const share = Math.min(0.2, (creepM2 * timeStep) / (cellM * cellM))
  const before = heightM.slice()
  for (const cell of d.order) {
    const edge = (step: number) => (isLand[cell + step] ? before[cell + step] : before[cell])
    heightM[cell] += share * (edge(1) + edge(-1) + edge(width) + edge(-width) - 4 * before[cell])
  }
}
