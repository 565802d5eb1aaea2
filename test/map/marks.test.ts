import { describe, expect, it } from 'vitest'
import { markLabels } from '../../app/map/marks/markLabels.ts'
import { strokesOf } from '../../app/map/marks/Obstacles.tsx'
import { ringLabels } from '../../app/map/marks/Rings.tsx'
import { offsetFrom, ringPath, sectorPath } from '../../app/map/marks/worldPaths.ts'
import { geodesicInverse } from '../../core/geodesy/index.ts'
import { latFromWorldY, lonFromWorldX, type View, worldXFromLon, worldYFromLat } from '../../core/paint/index.ts'

const site = { lon: 179.98, lat: 62 }
const pointsOf = (d: string) => [...d.matchAll(/[ML](-?[\d.]+) (-?[\d.]+)/g)].map((m) => [Number(m[1]), Number(m[2])] as const)
const rangeOf = ([x, y]: readonly [number, number]) =>
  geodesicInverse(site, { lon: lonFromWorldX(worldXFromLon(site.lon) + x), lat: latFromWorldY(worldYFromLat(site.lat) - y) }).distanceM

describe('marks', () => {
  it('draws rings of equal ground range, in one piece across the antimeridian', () => {
    const points = pointsOf(ringPath(site, 60_000))
    expect(points.length).toBeGreaterThan(80)
    for (const p of points) expect(Math.abs(rangeOf(p) - 60_000)).toBeLessThan(1)
  })
  it('outlines a need between two ranges and two azimuths, through north where it has to', () => {
    const points = pointsOf(sectorPath(site, 10_000, 40_000, [330, 30]))
    const ranges = points.map(rangeOf)
    expect(ranges.filter((r) => Math.abs(r - 40_000) < 1).length).toBe(16)
    expect(ranges.filter((r) => Math.abs(r - 10_000) < 1).length).toBe(16)
    for (const [, y] of points) expect(y).toBeLessThan(0)
    expect(sectorPath(site, 0, 40_000, [0, 360])).toBe(ringPath(site, 40_000))
  })
  it('measures offsets on the nearest turn of the world', () => {
    expect(offsetFrom({ lon: 179.9, lat: 0 }, { lon: -179.9, lat: 0 })[0]).toBeCloseTo(worldXFromLon(0.2), 3)
  })
  it('labels each ring inside the view, clear of cards and of each other', () => {
    const view: View = {
      width: 600,
      height: 500,
      worldX: worldXFromLon(site.lon) - 300 * 400,
      worldY: worldYFromLat(site.lat) + 250 * 400,
      worldPerPx: 400,
      night: false,
    }
    const card = { left: 200, top: 0, right: 400, bottom: 250 }
    const labels = ringLabels(view, site, [10_000, 20_000, 30_000], [card])
    expect(labels).toHaveLength(3)
    for (const l of labels) {
      expect(l.x + 25 < card.left || l.x - 25 > card.right || l.y - 9 > card.bottom).toBe(true)
      expect(l.x).toBeGreaterThan(28)
      expect(l.x).toBeLessThan(572)
    }
    for (const a of labels) for (const b of labels) if (a !== b) expect(Math.abs(a.x - b.x) >= 50 || Math.abs(a.y - b.y) >= 18).toBe(true)
  })

  const east = (m: number) => ({ lon: lonFromWorldX(worldXFromLon(10) + m), lat: 48 })
  const candidate = (id: string, m: number) => ({ id, name: id, ...east(m), mastHeightsM: [10], tiltsDeg: [0] })
  const obstacle = (name: string, m: number, heightM: number) =>
    ({ name, path: [east(m)], heightM, topM: null, widthM: 0, rcsM2: null, verticalErrorM: null }) as const

  it('shows letters and names that find room: the candidate on show first, then the higher obstacle', () => {
    const candidates = [candidate('A', 0), candidate('B', 22), candidate('C', 300)]
    const obstacles = [obstacle('Chimney', 200, 60), obstacle('Silo tower', 204, 90), obstacle('Mill', -150, 20)]
    const near = markLabels(east(0), 1, candidates, 'B', obstacles)
    // B's letter has the room to its right, A's goes to the left of its own ring
    expect([...near.candidates]).toEqual([
      ['B', 'right'],
      ['A', 'left'],
      ['C', 'right'],
    ])
    expect(near.obstacles.map((l) => l.n)).toEqual([1, 2])
    // from farther off the rings lie over each other: C's keeps the right, the letter of the one on show goes left, A's finds no room
    const far = markLabels(east(0), 30, candidates, 'B', [])
    expect([...far.candidates]).toEqual([
      ['B', 'left'],
      ['C', 'right'],
    ])
  })
  it('draws obstacles of the same few pixels once', () => {
    const obstacles = [0, 1, 2, 500].map((m) => obstacle('x', m, 10))
    expect(strokesOf(east(0), obstacles, 10)[0].match(/M/g)).toHaveLength(2)
    expect(strokesOf(east(0), obstacles, 0.2)[0].match(/M/g)).toHaveLength(4)
  })
})
