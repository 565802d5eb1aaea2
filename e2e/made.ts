import { spawnSync } from 'node:child_process'
import { readFileSync, writeFileSync } from 'node:fs'
import { makeTiff, type TiffPlan } from '../test/helpers/tiffMaker.ts'
import { fileFrom, type NamedFile } from './user.ts'

/** An invented upland in the open ocean: two hills and a ridge between them, 320 × 320 posts of 0.0005°. */
export const UPLAND = { name: 'upland.tif', lon: -24, lat: -40, middle: '40°04′48″ S 23°55′12″ W' } as const
const hill = (x: number, y: number, atX: number, atY: number, wide: number, high: number): number =>
  high * Math.exp(-((x - atX) ** 2 + (y - atY) ** 2) / (2 * wide ** 2))
const uplandAt = (col: number, row: number): number =>
  40 +
  hill(col, row, 110, 200, 40, 260) +
  hill(col, row, 250, 90, 25, 340) +
  hill(col, row * 0.2, 190, 30, 9, 180) +
  12 * Math.sin(col / 9) * Math.cos(row / 13)
export const uplandPlan = (over: Partial<TiffPlan> = {}): TiffPlan => ({
  width: 320,
  height: 320,
  kind: 'f32',
  at: uplandAt,
  tile: 64,
  compression: 8,
  pixelScale: [0.0005, 0.0005, 0],
  tiePoint: [0, 0, 0, UPLAND.lon, UPLAND.lat, 0],
  ...over,
})
export const upland = (name: string = UPLAND.name, over: Partial<TiffPlan> = {}): NamedFile => ({ name, bytes: makeTiff(uplandPlan(over)) })

/** A small study on the upland: one candidate, two masts. */
export const smallDoc = () => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Upland trial',
  terrain: [{ file: UPLAND.name }],
  uniformTerrain: 'farmland',
  radar: {
    name: 'Trial set',
    frequencyHz: 2.9e9,
    peakPowerW: 18_000,
    pulseWidthS: 1e-6,
    prfHz: [1000],
    antenna: { gainDbi: 32, azimuthBeamwidthDeg: 1.8 },
  },
  candidates: [{ id: 'A', name: 'Middle', lon: -23.92, lat: -40.08, mastHeightsM: [10, 20] }],
  run: { maxRangeM: 5000, rangeStepM: 75, azimuthStepDeg: 0.25 },
})

/** The demo study as it is served, file by file. */
const DEMO = new URL('../public/demo/', import.meta.url).pathname
export const demoText = (): string => readFileSync(`${DEMO}study.json`, 'utf8')
export const demoFiles = (): NamedFile[] =>
  ['terrain.tif', 'cover.tif', 'obstacles.geojson', 'roads.geojson'].map((name) => fileFrom(`${DEMO}${name}`))

export interface PdfFacts {
  readonly pages: number | null
  readonly text: string | null
}
/** Pages and text of a PDF by poppler's tools; null where they are not installed. */
export function pdfFacts(bytes: Uint8Array, path: string): PdfFacts {
  writeFileSync(path, bytes)
  const info = spawnSync('pdfinfo', [path], { encoding: 'utf8' })
  const text = spawnSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' })
  return {
    pages: info.status === 0 ? Number(/^Pages:\s+(\d+)/m.exec(info.stdout)?.[1]) : null,
    text: text.status === 0 ? text.stdout : null,
  }
}
/** Pages of a PDF as PNG files beside it; none where pdftoppm is not installed. */
export function pdfPictures(path: string, stem: string): boolean {
  return spawnSync('pdftoppm', ['-png', '-r', '70', path, stem]).status === 0
}
