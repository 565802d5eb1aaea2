/** Roads and rails: the easiest way over the ground between the points given, on a coarse lattice, then rounded off. */
import { type Island, NORTH_KM, type Point, SIDE_KM, WEST_KM } from './island.ts'
import type { Way } from './places.ts'

const CELL_KM = 0.25
const N = Math.round(SIDE_KM / CELL_KM)
/** The eight neighbours and the eight knight's moves. */
const MOVES: readonly Point[] = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
  [1, 1],
  [1, -1],
  [-1, 1],
  [-1, -1],
  [2, 1],
  [2, -1],
  [-2, 1],
  [-2, -1],
  [1, 2],
  [1, -2],
  [-1, 2],
  [-1, -2],
]

/** Height at a place, m; NaN at sea. */
export function heightAt(island: Island, [x, y]: Point): number {
  const { land } = island
  const col = Math.floor(((x - WEST_KM) * 1000) / land.cellM)
  const row = Math.floor(((NORTH_KM - y) * 1000) / land.cellM)
  const cell = row * land.width + col
  return land.isLand[cell] ? land.heightM[cell] : Number.NaN
}

const middle = (node: number): Point => [WEST_KM + ((node % N) + 0.5) * CELL_KM, NORTH_KM - (Math.floor(node / N) + 0.5) * CELL_KM]
const nodeOf = ([x, y]: Point): number => Math.floor((NORTH_KM - y) / CELL_KM) * N + Math.floor((x - WEST_KM) / CELL_KM)

/** Cheapest chain of lattice points, steepness dear and water closed. Levels are taken in whole buckets of cost, lowest first. */
function easiest(heights: Float64Array, from: Point, to: Point, steepness: number): Point[] {
  const start = nodeOf(from)
  const goal = nodeOf(to)
  const cost = new Float64Array(N * N).fill(Number.POSITIVE_INFINITY)
  const back = new Int32Array(N * N).fill(-1)
  const buckets: number[][] = [[start]]
  cost[start] = 0
  for (let level = 0; level < buckets.length && !(cost[goal] < level); level++) {
    const bucket = buckets[level] ?? []
    for (let k = 0; k < bucket.length; k++) {
      const node = bucket[k]
      if (Math.floor(cost[node]) < level) continue
      for (const [dx, dy] of MOVES) {
        const next = node + dx - dy * N
        if (Number.isNaN(heights[next])) continue
        const length = Math.sqrt(dx * dx + dy * dy)
        const slope = Math.abs(heights[next] - heights[node]) / (length * CELL_KM * 1000)
        const reached = cost[node] + length * (1 + steepness * (900 * slope * slope + 6 * slope))
        if (reached >= cost[next]) continue
        cost[next] = reached
        back[next] = node
        ;(buckets[Math.floor(reached)] ??= []).push(next)
      }
    }
  }
  if (back[goal] < 0) throw new Error(`no way over land from ${from} to ${to}`)
  const chain: Point[] = [to]
  for (let node = back[goal]; node !== start; node = back[node]) chain.unshift(middle(node))
  return [from, ...chain]
}

/** Cuts corners three times: straights stay, bends become curves. */
function rounded(path: readonly Point[]): Point[] {
  let points = [...path]
  for (let turn = 0; turn < 3; turn++) {
    const next: Point[] = [points[0]]
    for (let k = 1; k < points.length; k++) {
      const [ax, ay] = points[k - 1]
      const [bx, by] = points[k]
      next.push([0.75 * ax + 0.25 * bx, 0.75 * ay + 0.25 * by], [0.25 * ax + 0.75 * bx, 0.25 * ay + 0.75 * by])
    }
    next.push(points[points.length - 1])
    points = next
  }
  return points
}

/** Leaves out points that lie within `tolerance` km of the line between their kept neighbours. */
export function thinned(path: readonly Point[], tolerance: number): Point[] {
  if (path.length < 3) return [...path]
  const [ax, ay] = path[0]
  const [bx, by] = path[path.length - 1]
  const length = Math.sqrt((bx - ax) ** 2 + (by - ay) ** 2)
  let worst = 0
  let far = tolerance
  for (let k = 1; k < path.length - 1; k++) {
    const off = Math.abs((bx - ax) * (path[k][1] - ay) - (by - ay) * (path[k][0] - ax)) / (length || 1)
    if (off > far) {
      far = off
      worst = k
    }
  }
  if (worst === 0) return [path[0], path[path.length - 1]]
  return [...thinned(path.slice(0, worst + 1), tolerance).slice(0, -1), ...thinned(path.slice(worst), tolerance)]
}

/** The line of every way, km. */
export function layWays(island: Island, ways: readonly Way[]): Point[][] {
  const heights = new Float64Array(N * N)
  for (let node = 0; node < heights.length; node++) heights[node] = heightAt(island, middle(node))
  return ways.map((way) => {
    if (way.straight) return [...way.via]
    // Fast roads and rails go through cuttings rather than round every rise.
    const steepness = way.highway === 'motorway' || way.highway === 'rail' ? 0.2 : 1
    const legs = way.via.slice(1).map((to, k) => thinned(easiest(heights, way.via[k], to, steepness), 0.13))
    return thinned(rounded(legs.flatMap((leg, k) => leg.slice(k === 0 ? 0 : 1))), 0.008)
  })
}
