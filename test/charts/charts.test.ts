import { describe, expect, it } from 'vitest'
import * as c from '../../app/charts/index.ts'
import { type ClutterLevel, type ClutterLevels, coverageOf } from '../../core/index.ts'
import { sampleProfile, sampleResults, sampleRows } from '../memo/sample.ts'

const size = 12
const horizon = (style: 'strip' | 'chart') =>
  c.horizonChart({ rows: sampleRows(0.7, 2), width: 640, height: style === 'strip' ? 96 : 210, system: 'nautical', size, style })

/** Boxes of all texts of a drawing, unturned ones. */
const textBoxes = (d: c.Drawing) =>
  d.items.flatMap((i) => {
    if (i.kind !== 'text' || i.turn !== undefined) return []
    const w = c.textWidth(i.text, i.size)
    const left = i.anchor === 'end' ? i.x - w : i.anchor === 'middle' ? i.x - w / 2 : i.x
    return [{ text: i.text, left, right: left + w, top: i.y - 0.75 * i.size, bottom: i.y + 0.1 * i.size }]
  })
const collisions = (d: c.Drawing): string[] => {
  const boxes = textBoxes(d)
  return boxes.flatMap((a, i) =>
    boxes
      .slice(i + 1)
      .flatMap((b) => (a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom ? [`${a.text} / ${b.text}`] : [])),
  )
}
const outside = (d: c.Drawing): string[] =>
  textBoxes(d).flatMap((b) => (b.left < -1 || b.right > d.width + 1 || b.top < -1 || b.bottom > d.height + 1 ? [b.text] : []))

/** Three rings of 10 km and the octants, falling outward and round from north. */
function levelsOf(): ClutterLevels {
  const level = (meanDb: number | null): ClutterLevel => ({
    knownKm2: 100,
    over40Pct: 10,
    meanDb,
    p90Db: meanDb === null ? null : meanDb - 3,
    p99Db: meanDb === null ? null : meanDb + 8,
  })
  return {
    whole: level(41),
    rings: [52, 31, null].map((db, n) => ({ fromM: n * 10_000, toM: (n + 1) * 10_000, ...level(db) })),
    octants: Array.from({ length: 8 }, (_, n) => ({ azimuthDeg: 45 * n, ...level(44.2 - 2 * n) })),
    sectors: Array.from({ length: 24 }, () => level(30)),
    peak: null,
  }
}

const drawings: readonly (readonly [string, () => c.Drawing])[] = [
  ['horizon-strip', () => horizon('strip').drawing],
  ['horizon-chart', () => horizon('chart').drawing],
  ['terrain', () => c.terrainChart({ profile: sampleProfile(), width: 640, height: 260, system: 'metric', size }).drawing],
  ['rings', () => c.ringChart({ rings: sampleResults[1].figures.rings, width: 480, height: 280, system: 'nautical', size })],
  ['levels', () => c.levelsChart({ levels: levelsOf(), width: 520, height: 240, system: 'metric', size }).drawing],
  [
    'suppression',
    () => c.suppressionChart({ figures: sampleResults[1].figures, width: 520, height: 240, system: 'nautical', size }).drawing,
  ],
  [
    'options',
    () =>
      c.optionsChart({
        results: sampleResults,
        needId: 'n1',
        selected: sampleResults[3].ref,
        width: 480,
        height: 260,
        system: 'metric',
        size,
      }).drawing,
  ],
]

describe('every chart', () => {
  it.each(drawings)('%s: texts touch neither each other nor the edge', (_name, make) => {
    expect(collisions(make())).toEqual([])
    expect(outside(make())).toEqual([])
  })
  it.each(drawings)('%s: looks as it did, in hex colours and three places', async (name, make) => {
    const svg = c.svgOf(make())
    expect(svg).not.toMatch(/hsl|var\(|NaN|Infinity|undefined/)
    expect(svg).not.toMatch(/\d\.\d{4}/)
    await expect(`${svg}\n`).toMatchFileSnapshot(`snapshots/${name}.svg`)
  })
})

describe('horizon profile', () => {
  it('names the highest point, each named obstacle and the end of the terrain', () => {
    const named = c.peaksOf(sampleRows(0.7, 2), 8)
    expect(named[0].azimuthDeg).toBeGreaterThan(95)
    expect(named[0].azimuthDeg).toBeLessThan(113)
    expect(named.map((r) => r.obstacle)).toContain('Grey mast')
    expect(named.map((r) => r.obstacle)).toContain('at least: edge of terrain')
  })
  it('an angle at the edge of terrain reads "at least"', () => {
    const row = sampleRows(0.7, 2).find((r) => r.obstacle.startsWith('at least'))!
    expect(c.labelOf(row, 'nautical')).toMatch(/^at least .*edge of terrain$/)
  })
  it('finds the row under the pointer across north', () => {
    const g = horizon('strip')
    expect(g.rowAt(359.5)?.azimuthDeg).toBe(0)
    expect(g.azimuth.invert(g.azimuth.at(104))).toBeCloseTo(104, 9)
  })
})

describe('terrain profile', () => {
  const g = c.terrainChart({ profile: sampleProfile(), width: 640, height: 260, system: 'metric', size })
  it('a sight line over the controlling point is straight: the floor beyond lies on it', () => {
    const p = sampleProfile()
    const i = c.controllingIndex(p)
    const [x0, y0] = g.place(0, p.antennaM)
    const [x1, y1] = g.place(p.distM[i], p.surfaceM[i])
    const [x2, y2] = g.place(p.distM[140], p.floorM[140])
    expect(p.distM[i]).toBeGreaterThan(8_000)
    expect((y2 - y0) / (x2 - x0)).toBeCloseTo((y1 - y0) / (x1 - x0), 6)
  })
  it('heights are true at both ends and raised by the bulge between', () => {
    const far = sampleProfile().distM[160]
    expect(g.place(far, 100)[1]).toBeCloseTo(g.place(0, 100)[1], 9)
    expect(g.place(far / 2, 100)[1]).toBeLessThan(g.place(0, 100)[1])
  })
  it('finds the sample under the pointer', () => {
    expect(g.indexAt(10_040)).toBe(33)
    expect(g.indexAt(1e9)).toBe(160)
  })
})

describe('options plot', () => {
  it('names every option', () => {
    const d = drawings[6][1]()
    const texts = d.items.flatMap((i) => (i.kind === 'text' ? [i.text.replaceAll('\u202f', ' ')] : []))
    for (const name of ['A 12 m', 'A 24 m', 'B 12 m', 'B 24 m', 'C 24 m']) expect(texts).toContain(name)
  })
  it('marks the options that no other beats in usable share and area short of suppression', () => {
    const { points } = c.optionsChart({
      results: sampleResults,
      needId: 'n1',
      selected: null,
      width: 480,
      height: 260,
      system: 'metric',
      size,
    })
    const both = (i: number) => coverageOf(sampleResults[i].figures, 'n1')!
    points.forEach((p, i) => {
      const beaten = points.some((_q, k) => {
        const [own, other] = [both(i), both(k)]
        const noWorse = other.usablePct >= own.usablePct && other.shortKm2 <= own.shortKm2
        return noWorse && (other.usablePct > own.usablePct || other.shortKm2 < own.shortKm2)
      })
      expect(p.best, p.label).toBe(!beaten)
    })
    expect(points.filter((p) => p.best).length).toBeGreaterThan(0)
  })
})

describe('coverage against clutter', () => {
  it('weighs the usable shares of all needs by their area, and adds up what is short', () => {
    const { needs } = sampleResults[1].figures
    const [one, two] = needs
    const all = coverageOf(sampleResults[1].figures, null)!
    expect(all.usablePct).toBeCloseTo((one.usablePct * 4870 + two.usablePct * 590) / 5460, 9)
    expect(all.shortKm2).toBe(one.suppression.shortKm2 + two.suppression.shortKm2)
    expect(coverageOf(sampleResults[1].figures, 'n2')).toEqual({ usablePct: two.usablePct, shortKm2: two.suppression.shortKm2 })
  })
})

describe('ladder', () => {
  const ladder = {
    heightsM: [5, 15, 25, 40],
    inSightPct: [40, 60, 90, 100],
    over40Km2: [10, 30, 50, 80],
    usablePct: [20, 40, 80, 90],
    shortKm2: [1, 2, 3, 4],
    octantPct: [],
    needMet: [
      { needId: 'n1', name: 'one', intervals: [[10, 14] as const, [24, 40] as const] },
      { needId: 'n2', name: 'two', intervals: [[25, 40] as const] },
      { needId: 'n3', name: 'three', intervals: [] },
    ],
    needMetAtM: [
      { needId: 'n1', name: 'one', heightM: 24 },
      { needId: 'n2', name: 'two', heightM: 25 },
      { needId: 'n3', name: 'three', heightM: null },
    ],
  }
  const g = c.ladderGeometry({ ladder, topM: 40, lengthPx: 400, stripPx: 30, linePx: 16 })
  it('puts ground at the foot and the top of the scale at 0', () => {
    expect(g.mast.at(0)).toBe(400)
    expect(g.mast.at(40)).toBe(0)
    expect(g.mast.invert(200)).toBe(20)
  })
  it('keeps labels of needs apart and says which are not met', () => {
    expect(Math.abs(g.met[0].labelY - g.met[1].labelY)).toBeGreaterThanOrEqual(16)
    expect(g.met[0].y).toBe(160)
    expect(g.notMet.map((n) => n.needId)).toEqual(['n3'])
  })
  it('draws every stretch in which a need is met: a taller mast can lose one', () => {
    expect(g.intervals[0].stretches).toEqual([
      [260, 300],
      [0, 160],
    ])
    expect(g.intervals[2].stretches).toEqual([])
  })
  it('reads between the rungs and nothing outside them', () => {
    expect(g.valuesAt(20)).toEqual({ inSightPct: 75, over40Km2: 40, usablePct: 60, shortKm2: 2.5 })
    expect(g.valuesAt(2)).toBeNull()
  })
})

describe('clutter by ring and octant', () => {
  it('says where it is strongest, levels rounded up', () => {
    expect(c.levelsFinding(levelsOf(), 'metric')).toBe(
      'Clutter is strongest from 0 to 10\u202fkm: mean C/N 52\u202fdB, 99\u202f% under 60\u202fdB; by octant toward N: 45\u202fdB',
    )
  })
  it('has a part for each ring and octant that a pointer finds, and one table of all of them', () => {
    const { parts, boxes } = c.levelsChart({ levels: levelsOf(), width: 520, height: 240, system: 'metric', size })
    expect(parts.map((p) => p.rangeM)).toEqual([5_000, 15_000, 25_000, ...Array.from({ length: 8 }, () => null)])
    expect(parts.slice(3).map((p) => p.azimuthDeg)).toEqual([0, 45, 90, 135, 180, 225, 270, 315])
    expect(parts[2].right).toBeCloseTo(boxes[0].right, 6)
    const table = c.levelsCsv(levelsOf()).trim().split('\n')
    expect(table.length).toBe(1 + 1 + 3 + 8 + 24)
    expect(table[2]).toBe('0,10000,,100.00,10.00,52.00,49.00,60.00')
    expect(table[4]).toBe('20000,30000,,100.00,10.00,,,')
  })
})

describe('suppression needed against available', () => {
  const { figures } = sampleResults[1]
  it('names the need that is short over the largest area, needed up and available down', () => {
    const short = figures.needs.filter((n) => n.measure === 'area' && n.notAssessed === null && n.suppression.shortKm2 > 0)
    expect(short.length).toBeGreaterThan(0)
    const worst = short.reduce((w, n) => (n.suppression.shortKm2 > w.suppression.shortKm2 ? n : w))
    expect(c.suppressionFinding(figures, 'metric')).toContain(`${worst.name}: needed `)
    const none = { ...figures, needs: figures.needs.map((n) => ({ ...n, suppression: { ...n.suppression, shortKm2: 0 } })) }
    expect(c.suppressionFinding(none, 'metric')).toBe('Suppression is enough over every place of every need')
  })
  it('one row for each need of an area and one for each kind of clutter; one in all where they share a value', () => {
    const rows = c.suppressionChart({ figures, width: 520, height: 240, system: 'metric', size }).rows
    const { needs, kinds } = c.suppressionRows(figures)
    expect(rows.length).toBe(needs + kinds)
    const shared = { ...figures, suppressionBy: { ...figures.suppressionBy, uniformDb: 32 } }
    expect(c.suppressionRows(shared).kinds).toBe(1)
    expect(c.suppressionChart({ figures: shared, width: 520, height: 240, system: 'metric', size }).rows.at(-1)?.words).toBe(
      'every kind of clutter: available 32\u202fdB',
    )
  })
})

describe('horizons beside the option’s own', () => {
  const rows = sampleRows(0.7, 2)
  const azimuthsDeg = Array.from({ length: 360 }, (_, i) => i)
  const flat = (k: number, cover: boolean, deg: number) => ({ k, cover, azimuthsDeg, elevationDeg: new Float64Array(360).fill(deg) })
  const lines = [flat(4 / 3, false, 0.2), flat(1, false, 0.1), flat(1, true, 0.15)]
  const measured = {
    points: [10, 12, 14, 40].map((azimuthDeg) => ({ azimuthDeg, elevationDeg: 0.3 })),
    gapDeg: 5,
  }
  const input = { rows, lines, measured, width: 640, height: 210, system: 'metric', size, style: 'strip' } as const
  it('are named in one row with what was measured, and what is measured is not joined over a wide gap', () => {
    const { drawing } = c.horizonChart(input)
    const texts = drawing.items.flatMap((i) => (i.kind === 'text' ? [i.text] : []))
    for (const words of ['with cover, k = 4/3', 'bare ground, k = 4/3', 'bare ground, k = 1', 'with cover, k = 1', 'measured'])
      expect(texts).toContain(words)
    const line = drawing.items.find((i) => i.kind === 'path' && i.stroke === 'cool-7' && i.width === 1.6)
    expect(line?.kind === 'path' && (line.d.match(/M/g) ?? []).length).toBe(2)
    expect(outside(drawing)).toEqual([])
  })
  it('a stretched scale shows the lower part larger and breaks what stands over it', () => {
    const whole = c.horizonChart(input).elevation
    const part = c.horizonChart({ ...input, stretch: 4 }).elevation
    expect((whole.to - whole.from) / (part.to - part.from)).toBeCloseTo(4, 6)
    const svg = c.svgOf(c.horizonChart({ ...input, stretch: 8 }).drawing)
    expect(svg).not.toMatch(/NaN|Infinity|undefined/)
  })
  it('and as one table', () => {
    const head = c.horizonCsv({ rows, lines, measured }).split('\n')[0]
    expect(head).toBe(
      'azimuth_deg,elevation_deg,range_m,height_m_msl,lon,lat,obstacle,bare_ground_k_1.33_deg,bare_ground_k_1.00_deg,surface_k_1.00_deg,measured_deg',
    )
  })
})
