import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { FileSource } from '../../app/batch/fileSource.ts'
import { CELL, cellCentre, type Figures, finish, type OptionCells, readClasses } from '../../core/index.ts'
import { chance } from '../../scripts/demo/noise.ts'
import { batchLater, type Ran, rowsOf } from '../batch/tinyStudy.ts'
import { allResults, DEMO_DIR, type OpenDemo, openDemo } from './openDemo.ts'

const STUDY = join(DEMO_DIR, 'study.json')
const OPTION = { candidate: 'C', heightM: 20, tiltDeg: 1.5 }
const HOW = ['--candidate', OPTION.candidate, '--height', String(OPTION.heightM)]
const CELLS = 400

let folder: string
let demo: OpenDemo
let cells: OptionCells
let figures: Figures
/** Cells of the option spread over all azimuths and ranges. */
let chosen: number[]
let pointsRan: Ran
let horizonRan: Ran
let ledgerRan: Ran
let runRan: Ran

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'demo-'))
  demo = await openDemo()
  cells = finish(demo.engine.compute(OPTION))
  figures = allResults(demo.engine).find((r) => r.ref.candidate === OPTION.candidate && r.ref.heightM === OPTION.heightM)!.figures
  const count = cells.site.grid.azimuths * cells.site.grid.ranges
  chosen = Array.from({ length: CELLS }, (_, k) => Math.floor(chance(k, 1, 7) * count))
  const places = chosen.map((cell) => cellCentre(cells.place, cells.site.grid, cell))
  const list = join(folder, 'places.csv')
  writeFileSync(list, `lon,lat\n${places.map((p) => `${p.lon},${p.lat}`).join('\n')}\n`)
  const out = join(folder, 'out')
  pointsRan = await batchLater('points', STUDY, ...HOW, '--points', list)
  horizonRan = await batchLater('horizon', STUDY, ...HOW, '--step', '15')
  ledgerRan = await batchLater('cell', STUDY, ...HOW, '--at', `${loudest().lon},${loudest().lat}`)
  runRan = await batchLater('run', STUDY, '--out', out, ...HOW, '--no-memo')
}, 300_000)
afterAll(() => rmSync(folder, { recursive: true, force: true }))

/** Centre of the cell with the highest clutter-to-noise. */
function loudest() {
  const { cnrDb } = cells.clutter
  let best = 0
  for (let k = 1; k < cnrDb.length; k++) if (cnrDb[k] > cnrDb[best] || Number.isNaN(cnrDb[best])) best = k
  return cellCentre(cells.place, cells.site.grid, best)
}

describe('the batch command on the demo', () => {
  test('points: at the centre of a cell it says what the map shows there', () => {
    expect(pointsRan).toMatchObject({ code: 0 })
    const rows = rowsOf(pointsRan.out)
    expect(rows).toHaveLength(CELLS)
    let compared = 0
    rows.forEach((row, k) => {
      const cell = chosen[k]
      expect(Math.abs(Number(row.coverage_floor_m) - cells.mask.floorM[cell]), `floor at ${row.lon},${row.lat}`).toBeLessThan(0.05)
      if (cells.mask.state[cell] === CELL.inSight) expect(row.in_sight).toBe('1')
      const cnr = cells.clutter.cnrDb[cell]
      expect(row.clutter_to_noise_db === '').toBe(Number.isNaN(cnr))
      if (Number.isNaN(cnr)) return
      compared++
      expect(Math.abs(Number(row.clutter_to_noise_db) - cnr), `C/N at ${row.lon},${row.lat}`).toBeLessThan(0.05)
    })
    expect(compared).toBeGreaterThan(CELLS / 4)
  })

  test('horizon: the rows of the sweep', () => {
    expect(horizonRan).toMatchObject({ code: 0 })
    const rows = rowsOf(horizonRan.out)
    expect(rows).toHaveLength(24)
    const { azimuthStepDeg } = cells.site.grid
    for (const row of rows) {
      const swept = cells.mask.horizon[Math.round(Number(row.azimuth_deg) / azimuthStepDeg)]
      expect(Math.abs(Number(row.elevation_deg) - swept.elevationDeg)).toBeLessThan(0.002)
    }
  })

  test('cell: the lines of the ledger add up to its results', () => {
    expect(ledgerRan).toMatchObject({ code: 0 })
    const ledger = JSON.parse(ledgerRan.out) as {
      lines: { value: number | string | null; op: string; of?: string }[]
      results: Record<string, number | null>
    }
    const parts = new Map<string, number>()
    for (const { value, op, of } of ledger.lines) {
      if (op === 'info' || of === undefined || of === '' || typeof value !== 'number') continue
      parts.set(of, (parts.get(of) ?? 0) + (op === 'subtract' ? -value : value))
    }
    expect(parts.size).toBeGreaterThan(0)
    for (const [name, sum] of parts) expect(Math.abs(sum - ledger.results[name]!), name).toBeLessThan(0.01)
  })

  test('run: summary and sight raster agree with the figures', async () => {
    expect(runRan).toMatchObject({ code: 0 })
    const summary = JSON.parse(readFileSync(join(folder, 'out/summary.json'), 'utf8'))
    expect(summary.options).toHaveLength(1)
    expect(summary.options[0].figures).toEqual(JSON.parse(JSON.stringify(figures.flat)))

    const source = await FileSource.open(join(folder, 'out/C/20m/in-sight.tif'))
    const head = await readClasses(source)
    const { codes, classes } = await head.readClassesInto(head.shape)
    await source.close()
    const cellKm2 = Math.abs(head.shape.colX * head.shape.rowY) / 1e6
    let seenKm2 = 0
    for (const code of codes) if (classes[code] <= 100) seenKm2 += (classes[code] / 100) * cellKm2
    expect(seenKm2 / figures.groundInSightKm2).toBeGreaterThan(0.98)
    expect(seenKm2 / figures.groundInSightKm2).toBeLessThan(1.02)
  })
})
