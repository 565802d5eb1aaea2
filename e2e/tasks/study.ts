import { mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { expect, type Locator, type Page } from '@playwright/test'
import { unzipSync } from 'fflate'
import type { roadsSummary } from '../../app/batch/commands/optionFiles.ts'
import { geodesicDirect, type LonLat, type Ranking, type StudyDoc } from '../../core/index.ts'
import { batchLater, rowsOf } from '../../test/batch/tinyStudy.ts'
import { makeTiff } from '../../test/helpers/tiffMaker.ts'
import { dropFiles, everythingRun, goTo, LONG, memoColumn, type NamedFile, openEmpty, plain, savedFrom, textFile } from '../user.ts'

/**
 * Invented ground in the open ocean for the tasks of a siting study: flat at 40 m, a ridge of 250 m one post wide 12 km east of A,
 * 18 km long, and a hill of 160 m 6 km west of it. A post is 278 m.
 */
const POST_DEG = 0.0025
const POSTS = 152
const WEST = -24.19
const NORTH = -0.31
const RIDGE_COL = 119
const MIDDLE_ROW = 76
/** 12 km west of the ridge, on a row of posts. */
export const A: LonLat = geodesicDirect(
  { lon: WEST + (RIDGE_COL + 0.5) * POST_DEG, lat: NORTH - (MIDDLE_ROW + 0.5) * POST_DEG },
  270,
  12_000,
)

const groundAt = (col: number, row: number): number => {
  if (col === RIDGE_COL && Math.abs(row - MIDDLE_ROW) <= 32) return 250
  const hill = 120 * Math.exp(-((col - 54) ** 2 + (row - 72) ** 2) / 12)
  return 40 + (hill > 1 ? hill : 0)
}
/** A place by azimuth and range from A. */
export const from = (azimuthDeg: number, rangeM: number): LonLat => geodesicDirect(A, azimuthDeg, rangeM)
export const ground = (): NamedFile => ({
  name: 'plain.tif',
  bytes: makeTiff({
    width: POSTS,
    height: POSTS,
    kind: 'f32',
    at: groundAt,
    tile: 64,
    compression: 8,
    pixelScale: [POST_DEG, POST_DEG, 0],
    tiePoint: [0, 0, 0, WEST, NORTH, 0],
  }),
})
/** A study on it: one candidate, two masts, no need. */
export const doc = (over: Partial<StudyDoc> = {}): StudyDoc => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Plain with a ridge',
  terrain: [{ file: 'plain.tif' }],
  uniformTerrain: 'farmland',
  radar: {
    name: 'Trial set',
    frequencyHz: 2.8e9,
    peakPowerW: 20_000,
    pulseWidthS: 1.2e-6,
    prfHz: [1000],
    antenna: { gainDbi: 33, azimuthBeamwidthDeg: 4, elevationBeamwidthDeg: 4 },
  },
  candidates: [{ id: 'A', name: 'Plain', lon: A.lon, lat: A.lat, mastHeightsM: [10, 25] }],
  run: { maxRangeM: 15_000, rangeStepM: 150, azimuthStepDeg: 1 },
  ...over,
})
/** Opens a study with its files, dropped together, and waits until all of it is worked out. */
export async function open(page: Page, study: StudyDoc, ...files: NamedFile[]): Promise<void> {
  await openEmpty(page)
  await dropFiles(page, textFile('study.json', JSON.stringify(study)), ground(), ...files)
  await everythingRun(page)
}

// --- the batch command on the study as the page saves it
/** Saves the package from the page and unpacks it into a folder; returns the path of its study. */
export async function savedBeside(page: Page, dir: string): Promise<string> {
  const { bytes } = await savedFrom(page, 'Save package')
  for (const [name, data] of Object.entries(unzipSync(bytes))) {
    mkdirSync(dirname(join(dir, name)), { recursive: true })
    writeFileSync(join(dir, name), data)
  }
  return join(dir, 'study.json')
}
/** What the batch command prints. */
export async function command(...args: string[]): Promise<string> {
  const { code, out, err } = await batchLater(...args)
  expect(code, err).toBe(0)
  return out
}
export const table = async (...args: string[]): Promise<Record<string, string>[]> => rowsOf(await command(...args))

/** What summary.json says of roads. */
type RoadsSummary = ReturnType<typeof roadsSummary>
export interface Summary {
  readonly options: readonly {
    readonly candidate: string
    readonly heightM: number
    readonly tiltDeg: number
    readonly figures: Readonly<Record<string, number>>
    readonly roads: RoadsSummary
  }[]
  readonly ranking: Ranking
}
/** Works the study out into a folder beside it, without the memo, and reads summary.json. */
export async function summaryOf(path: string, ...more: string[]): Promise<Summary> {
  const out = join(dirname(path), 'results')
  await command('run', path, '--out', out, '--no-memo', ...more)
  return JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8'))
}

// --- what the page shows
/** Every row of a table of the page, its cells as texts. */
export async function rowsShown(within: Locator): Promise<string[][]> {
  const rows = await within.locator('tbody tr').all()
  return Promise.all(rows.map(async (r) => (await r.locator('td').allInnerTexts()).map(plain)))
}
/** A table of the memo column by its title: one record a row, heads as keys, the row's own name under ''. */
export async function memoTable(page: Page, title: RegExp): Promise<Record<string, string>[]> {
  const rows = await memoColumn(page)
    .locator('.memo-table')
    .filter({ has: page.getByRole('heading', { name: title }) })
    .evaluateAll((tables) =>
      tables.flatMap((t) =>
        [...t.querySelectorAll('dl')].map((list) => [
          ['', list.parentElement?.querySelector('.memo-row')?.textContent ?? ''],
          ...[...list.children].map((pair) => [pair.querySelector('dt')?.textContent ?? '', pair.querySelector('dd')?.textContent ?? '']),
        ]),
      ),
    )
  return rows.map((r) => Object.fromEntries(r.map(([head, text]) => [plain(head ?? ''), plain(text ?? '')])))
}
/** The memo column as one text. */
export const memoText = async (page: Page): Promise<string> => plain(await memoColumn(page).innerText())
export const section = (page: Page, name: string): Locator => page.getByRole('region', { name, exact: true })
/** Sets two options against each other at the Compare step; returns the section once the change is there. */
export async function showChange(page: Page, before: RegExp, after: RegExp): Promise<Locator> {
  await goTo(page, 'Compare')
  const changes = section(page, 'Before and after')
  for (const [label, words] of [
    ['Before', before],
    ['After', after],
  ] as const) {
    await changes.locator('.field').filter({ hasText: label }).getByRole('button').click()
    await page.getByRole('option', { name: words }).first().click()
  }
  await changes.getByRole('button', { name: 'Show what changes' }).click()
  await expect(changes.getByRole('table', { name: 'Needs' })).toBeVisible({ timeout: LONG })
  return changes
}
