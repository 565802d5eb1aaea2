import { beforeAll, describe, expect, it } from 'vitest'
import {
  type Ask,
  elevationAngleDeg,
  geodesicInverse,
  heightOnRayM,
  type LonLat,
  type Road,
  roadLines,
  roadPieces,
} from '../../core/index.ts'
import { from, type Parts, plainGround, work } from '../merit/plain.ts'

// Motorways and rails of a small study: length seen by class and ring, radial speeds, lines for the map. Plain at 100 m, antenna at 150 m.
const RADIUS = (4 / 3) * 6_371_000
const NM = 1852
const SPEED_OF_LIGHT = 299_792_458
const WALL_M = 6000
/** Place by metres east and north of the radar. */
const at = (east: number, north: number): LonLat => from((Math.atan2(east, north) * 180) / Math.PI, Math.hypot(east, north))
const road = (highway: string, path: LonLat[], more: Partial<Road> = {}): Road => ({
  name: highway,
  highway,
  maxspeedKmh: null,
  tunnel: false,
  path,
  ...more,
})
/** A bank at 6 km in the south: a line over it passes this high over the plain at 12 km. */
const LINE_OVER_M = 4.9
const bankTopM = heightOnRayM(150, elevationAngleDeg(150, 100 + LINE_OVER_M, 12_000, RADIUS), WALL_M, RADIUS)
/** That bank, one post wide, in the south; a high wall at 6 km in the west. */
const rise = (east: number, north: number): number => {
  const r = Math.hypot(east, north)
  if (north < -2 * Math.abs(east)) return (bankTopM - 100) * Math.max(0, 1 - Math.abs(r - WALL_M) / 100)
  return east < -Math.abs(north) && Math.abs(r - WALL_M) <= 250 ? 200 : 0
}
let ground: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(26_000, rise)
})
const figure = (roads: Road[], parts: Partial<Parts> = {}) => {
  const worked = work({ ...ground, roads }, { needs: [], run: { maxRangeM: 24_000 }, ...parts })
  return { worked, roads: worked.result.figures.roads! }
}
const EAST = road('motorway', [at(5000, -4500), at(5000, 4500)])

describe('roads seen', () => {
  it('an open motorway is seen over its whole length, by class and ring', () => {
    const { roads, worked } = figure([EAST])
    const { distanceM } = geodesicInverse(EAST.path[0], EAST.path[1])
    expect(Math.abs(distanceM - 9000)).toBeLessThan(2)
    expect(roads.lengthM).toBeCloseTo(distanceM, 3)
    expect(roads.seenM).toBeCloseTo(distanceM, 3)
    expect(roads.inSightM).toBe(roads.seenM)
    expect(roads.classes).toEqual([{ roadClass: 'motorway', lengthM: roads.lengthM, inSightM: roads.seenM, seenM: roads.seenM }])
    // all of it within the first ring of 5 NM: its farthest place is at 6.73 km
    expect(roads.rings[0]).toMatchObject({ fromM: 0, toM: 5 * NM })
    expect(roads.rings[0].seenM).toBeCloseTo(distanceM, 3)
    expect(roads.rings.slice(1).every((r) => r.lengthM === 0)).toBe(true)
    expect(worked.result.figures.flat).toMatchObject({ roads_seen_km: roads.seenM / 1000, roads_seen_motorway_km: roads.seenM / 1000 })
    expect(roads.atHighK).toMatchObject({ k: 2.75, seenM: roads.seenM })
  })

  it('pieces of at most 50 m that add up to the road', () => {
    const pieces = roadPieces([EAST])
    expect(Math.max(...pieces.map((p) => p.lengthM))).toBeLessThanOrEqual(50)
    expect(pieces.length).toBe(Math.ceil(geodesicInverse(EAST.path[0], EAST.path[1]).distanceM / 50))
  })

  it('radial speeds: v·|cos(β − α)| for a straight road that passes at 5 km', () => {
    const { roads } = figure([EAST])
    const v = 110 / 3.6
    // a place n m north of abeam closes or opens at v·n/√(n² + 5000²): length with less than u is 2·5000·u/√(v² − u²)
    const under = (u: number): number => Math.min(9000, (2 * 5000 * u) / Math.sqrt(v * v - u * u))
    expect(roads.speeds.map((s) => [s.fromMs, s.toMs])).toEqual([0, 5, 10, 15, 20].map((s) => [s, s + 5]))
    for (const s of roads.speeds) {
      const expected = under(s.toMs) - under(s.fromMs)
      // a piece counts with its middle: within two pieces at each end
      expect(Math.abs(s.seenM - expected), `${s.fromMs} m/s`).toBeLessThan(110)
    }
    expect(roads.speeds.reduce((t, s) => t + s.seenM, 0)).toBeCloseTo(roads.seenM, 6)
    expect(roads.blindM).toBeNull()
  })

  it('speed by tag before class; tag and class agree with their numbers', () => {
    const fastest = (r: Road) => figure([r]).roads.speeds.length * 5
    const radial = (highway: string, maxspeedKmh: number | null) => road(highway, [at(0, 3000), at(0, 8000)], { maxspeedKmh })
    expect(fastest(radial('motorway', 200))).toBe(60) // 55.6 m/s
    expect(['motorway', 'trunk', 'primary', 'secondary', 'residential'].map((h) => fastest(radial(h, null)))).toEqual([35, 25, 25, 20, 15]) // 30.6 25.0− 22.2 16.7 13.9 m/s
  })

  it('behind the bank 4.6 m is hidden, 5.2 and 7.0 m are seen: the line passes 4.9 m over the plain', () => {
    const path = [at(-40, -12_000), at(40, -12_000)]
    const of = (highway: string) => figure([road(highway, path)], { run: { maxRangeM: 24_000 } }).roads
    expect(of('trunk')).toMatchObject({ seenM: 0, inSightM: 0 })
    for (const high of ['motorway', 'rail']) expect(of(high).seenM, high).toBeCloseTo(of(high).lengthM, 6)
  })

  it('a wall hides, a tunnel is not seen, what lies beyond the range is not counted, unknown ground is said', () => {
    const { roads } = figure([
      road('rail', [at(-9000, 1000), at(-9000, -1000)]),
      road('primary', [at(3000, 0), at(4000, 0)], { tunnel: true }),
      road('primary', [at(0, 24_500), at(0, 25_500)]),
    ])
    expect(roads.seenM).toBe(0)
    expect(roads.tunnelM).toBeCloseTo(geodesicInverse(at(3000, 0), at(4000, 0)).distanceM, 3)
    expect(roads.lengthM).toBeGreaterThan(2990)
    expect(roads.lengthM).toBeLessThan(3010)
    const off = figure([road('primary', [at(0, 24_000), at(0, 30_000)])], { run: { maxRangeM: 40_000 } }).roads
    expect(off.seenM + off.unknownM).toBeCloseTo(off.lengthM, 6)
    expect(off.unknownM).toBeGreaterThan(3800)
    expect(off.unknownM).toBeLessThan(4200)
  })

  it('an echo too weak is in sight and not seen: 200 dB of short-range attenuation to 6 km', () => {
    const radial = road('trunk', [at(0, 4000), at(0, 8000)])
    const { roads } = figure([radial], { radar: { stc: { kind: 'curve', curve: [[0, 200], [6000, 200], [6001, 0]] } } }) // biome-ignore format: one line
    expect(roads.inSightM).toBeCloseTo(roads.lengthM, 6)
    expect(Math.abs(roads.seenM - 2000)).toBeLessThan(60)
  })

  it('blind zone of a two-pulse canceller: response 2·sin²(2πvT/λ) under a tenth', () => {
    const { roads } = figure([EAST], { radar: { suppression: { kind: 'canceller', pulses: 2 } } })
    const lambda = SPEED_OF_LIGHT / 2.8e9
    const blindMs = (Math.asin(Math.sqrt(0.05)) / Math.PI) * ((lambda * 1000) / 2)
    expect(blindMs).toBeCloseTo(3.84, 1)
    const v = 110 / 3.6
    const expected = (2 * 5000 * blindMs) / Math.sqrt(v * v - blindMs * blindMs)
    expect(Math.abs((roads.blindM as number) - expected)).toBeLessThan(110)
  })

  it('a taller k bends over the horizon: more is seen at 2.75', () => {
    // antenna 10 m over the plain, top 4.6 m: horizons 13.04 + 8.84 km at k 4/3
    const radial = road('trunk', [at(0, 15_000), at(0, 25_000)])
    const { roads } = figure([radial], { candidate: { mastHeightsM: [10] }, run: { maxRangeM: 25_500 } })
    const reachM = Math.sqrt(2 * RADIUS * 10) + Math.sqrt(2 * RADIUS * 4.6)
    expect(Math.abs(15_000 + roads.inSightM - reachM)).toBeLessThan(60)
    expect(roads.atHighK!.inSightM).toBeCloseTo(roads.lengthM, 6)
  })

  it('lines for the map: seen and hidden apart, joined, together the length of the roads', () => {
    const { worked, roads } = figure([EAST, road('rail', [at(-9000, 1000), at(-9000, -1000)])])
    const lines = roadLines(worked.cells)
    const length = (list: readonly (readonly LonLat[])[]) =>
      list.reduce((t, l) => t + l.slice(1).reduce((s, p, n) => s + geodesicInverse(l[n], p).distanceM, 0), 0)
    expect(lines.seen).toHaveLength(1)
    expect(length(lines.seen)).toBeCloseTo(roads.seenM, 2)
    expect(length(lines.seen) + length(lines.hidden)).toBeCloseTo(roads.lengthM, 2)
  })

  it('no roads, no figure', () => {
    expect(work(ground, { needs: [], run: { maxRangeM: 5000 } }).result.figures.roads).toBeNull()
  })
})
