import { spawn, spawnSync } from 'node:child_process'
import { mkdtempSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { encodeGeoTiff } from '../../app/batch/geoTiffWriter.ts'
import type { Crs, GridShape, StudyDoc } from '../../core/index.ts'

const utm33: Crs = { kind: 'projected', epsg: 32633, definition: 'EPSG:32633', name: 'WGS 84 / UTM zone 33N', metresPerUnit: 1 }
/** 81 × 81 posts of 100 m around 15° E, 48.75° N. */
export const tinyShape: GridShape = {
  width: 81,
  height: 81,
  crs: utm33,
  x0: 496_000,
  y0: 5_404_000,
  colX: 100,
  colY: 0,
  rowX: 0,
  rowY: -100,
}
/** The middle post. */
export const MIDDLE = { lon: 15, lat: 48.75159 } as const

/** Flat at 100 m with a ridge of 160 m along the column 2 km east of the middle. */
export function ridge(): Float32Array {
  return Float32Array.from({ length: 81 * 81 }, (_, i) => (i % 81 === 60 ? 160 : 100))
}
export async function writeTerrain(dir: string, name = 'moor.tif', samples = ridge(), shape = tinyShape): Promise<void> {
  writeFileSync(join(dir, name), await encodeGeoTiff({ shape, samples, nodata: Number.NaN, description: 'height', unit: 'm' }))
}
export const tinyDoc = (over: Partial<StudyDoc> = {}): StudyDoc => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Tiny moor',
  terrain: [{ file: 'moor.tif' }],
  uniformTerrain: 'farmland',
  radar: {
    name: 'Test set',
    frequencyHz: 2.75e9,
    peakPowerW: 20_000,
    pulseWidthS: 1.2e-6,
    prfHz: [900],
    antenna: { gainDbi: 33, azimuthBeamwidthDeg: 4 },
  },
  needs: [{ id: 'n1', name: 'Low layer', kind: 'layer', heightM: 300, toRangeM: 3000 }],
  candidates: [{ id: 'A', name: 'Middle', ...MIDDLE, mastHeightsM: [10, 40] }],
  run: { maxRangeM: 3500, rangeStepM: 150, azimuthStepDeg: 1 },
  ...over,
})

/** A folder with moor.tif and study.json. */
export async function tinyStudy(doc: unknown = tinyDoc()): Promise<{ dir: string; path: string }> {
  const dir = mkdtempSync(join(tmpdir(), 'tiny-'))
  await writeTerrain(dir)
  const path = join(dir, 'study.json')
  writeFileSync(path, typeof doc === 'string' ? doc : JSON.stringify(doc, null, 2))
  return { dir, path }
}

export interface Ran {
  readonly code: number | null
  readonly out: string
  readonly err: string
}
/** Runs the command as `npm run --silent study -- …` does. */
export function batch(...args: string[]): Ran {
  const run = spawnSync(process.execPath, ['--import', 'tsx', 'app/batch/main.ts', ...args], { encoding: 'utf8', maxBuffer: 1 << 28 })
  return { code: run.status, out: run.stdout, err: run.stderr }
}
/** Runs the command without waiting, so that runs of a table go side by side. */
export function batchLater(...args: string[]): Promise<Ran> {
  return new Promise((done) => {
    const child = spawn(process.execPath, ['--import', 'tsx', 'app/batch/main.ts', ...args])
    let out = ''
    let err = ''
    child.stdout.on('data', (chunk) => (out += chunk))
    child.stderr.on('data', (chunk) => (err += chunk))
    child.on('close', (code) => done({ code, out, err }))
  })
}
/** Rows of a CSV by column name. */
export function rowsOf(csv: string): Record<string, string>[] {
  const [head, ...lines] = csv.trimEnd().split('\r\n')
  const names = (head as string).split(',')
  return lines.map((line) => Object.fromEntries(line.split(',').map((field, i) => [names[i] as string, field])))
}
