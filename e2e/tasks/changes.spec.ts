import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Locator } from '@playwright/test'
import {
  formatAreaDown,
  formatAreaUp,
  formatAzimuth,
  formatFloor,
  formatMetPct,
  formatNumber,
  type Quantity,
  textOf,
} from '../../app/words/index.ts'
import { expect, test } from '../page.ts'
import { everythingRun, form, goTo, plain, textFile } from '../user.ts'
import { doc, from, open, rowsShown, savedBeside, showChange, summaryOf, table } from './study.ts'

const CRANE = from(30, 1200)
/** One in the lee of the crane, one in the open. */
const FIXES = [
  { name: 'LEE', ...from(30, 10_000), altM: 300 },
  { name: 'CLEAR', ...from(200, 9_000), altM: 300 },
]
const NEEDS = [
  { id: 'n1', name: 'Low layer', kind: 'layer', heightM: 200, toRangeM: 12_000, rcsM2: 1 },
  { id: 'n2', name: 'Fixes', kind: 'fixes', file: 'fixes.csv', rcsM2: 1 },
] as const

/** Two numbers as the face sets them against each other. */
function pair(before: number, after: number, format: (x: number) => Quantity): string {
  const [a, b] = [format(before), format(after)]
  return plain(a.value === b.value ? textOf(b) : `${a.value} → ${textOf(b)}`)
}
/** A number of the list under the tables, by the words beside it. */
const told = async (changes: Locator, label: RegExp): Promise<string> =>
  plain(await changes.locator('.pairs > div').filter({ hasText: label }).locator('dd').innerText())
const floor = (m: number) => formatFloor(m, 'nautical')

test('a crane for six months, and a mast raised from 15 to 25 m', async ({ page }, info) => {
  const fixes = textFile('fixes.csv', ['name,lon,lat,alt_m_msl', ...FIXES.map((f) => [f.name, f.lon, f.lat, f.altM].join())].join('\n'))
  const radar = { ...doc().radar, suppression: { kind: 'stated', statedDb: 45 } } as const
  await open(page, doc({ radar, needs: [...NEEDS], candidates: [{ ...doc().candidates[0]!, mastHeightsM: [15, 25] }] }), fixes)
  const without = await savedBeside(page, info.outputPath('without'))

  await goTo(page, 'Ground')
  await form(page, 'Ground').getByRole('button', { name: 'Enter obstacles' }).click()
  const dialog = page.getByRole('dialog', { name: 'Obstacles' })
  await dialog.getByRole('button', { name: 'Add an obstacle' }).click()
  for (const [head, text] of [
    ['Name', 'Crane'],
    ['Latitude', String(CRANE.lat)],
    ['Longitude', String(CRANE.lon)],
    ['Above ground', '60'],
    ['Width', '4'],
  ] as const) {
    await dialog.getByRole('textbox', { name: new RegExp(`^${head}.*, row 1$`) }).fill(text)
    await page.keyboard.press('Tab')
  }
  await dialog.getByRole('button', { name: 'Use these obstacles' }).click()
  await expect(dialog).toHaveCount(0)
  await everythingRun(page)
  const withCrane = await savedBeside(page, info.outputPath('with'))
  const places = join(info.outputDir, 'places.csv')
  writeFileSync(places, ['lon,lat', ...FIXES.map((f) => `${f.lon},${f.lat}`)].join('\n'))
  const horizon = (study: string) => table('horizon', study, '--candidate', 'A', '--height', '15')
  const floorsOf = async (study: string, m: number): Promise<number[]> =>
    (await table('points', study, '--candidate', 'A', '--height', String(m), '--points', places)).map((r) => Number(r.coverage_floor_m))

  // the crane: the sector it screens, the fix behind it and the altitude lost there
  const crane = await showChange(page, /^A at 15/, /^without Crane/)
  const [bare, screened] = await Promise.all([horizon(without), horizon(withCrane)])
  const [bareM, screenedM] = await Promise.all([floorsOf(without, 15), floorsOf(withCrane, 15)])
  const lowerDeg = screened.map((r, n) => Number(r.elevation_deg) - Number(bare[n]!.elevation_deg))
  const behind = lowerDeg.flatMap((d, n) => (d > 0.02 ? [n] : []))
  expect(behind).toContain(30)
  expect(screened[30]!.obstacle).toBe('Crane')
  const edge = (deg: number) => textOf(formatAzimuth(deg))
  const sectors = crane.locator('.sectors li')
  await expect(sectors).toHaveCount(1)
  expect(plain(await sectors.innerText())).toContain(
    `azimuth ${edge(behind[0]! - 0.5)} to ${edge(behind.at(-1)! + 0.5)}, up to ${formatNumber(Math.max(...lowerDeg), 2)}° lower`,
  )
  const affected = await rowsShown(crane.getByRole('table', { name: 'Fixes affected' }))
  expect(affected).toHaveLength(1)
  expect(affected[0]!.slice(0, 2)).toEqual(['LEE', '030.0°'])
  expect(affected[0]![3]).toBe(pair(screenedM[0]!, bareM[0]!, floor))
  expect(affected[0]![4]).toBe(plain(textOf(floor(bareM[0]! - screenedM[0]!))))
  expect(affected[0]![5]).toBe('not usable → usable')

  // the mast: what comes into sight, which fix gains, clutter and floors, and where lobing moves
  const taller = await showChange(page, /^A at 15/, /^A at 25/)
  const [run, tallM] = await Promise.all([summaryOf(withCrane), floorsOf(withCrane, 25)])
  const [low, high] = run.options.map((o) => o.figures) as [Record<string, number>, Record<string, number>]
  const both = (key: string, format: (x: number) => Quantity) => pair(low[key]!, high[key]!, format)
  const [layer] = await rowsShown(taller.getByRole('table', { name: 'Needs' }))
  for (const [column, share] of ['in_sight', 'detectable', 'usable'].entries())
    expect(layer![2 + column], share).toBe(both(`need_n1_${share}_pct`, (x) => formatMetPct(x)))
  const gained = await rowsShown(taller.getByRole('table', { name: 'Fixes affected' }))
  expect(gained.find((r) => r[0] === 'LEE')?.[3]).toBe(pair(screenedM[0]!, tallM[0]!, floor))
  expect(await told(taller, /^Ground in sight/)).toBe(both('ground_in_sight_km2', (x) => formatAreaDown(x, 'nautical')))
  expect(await told(taller, /^C\/N over 40/)).toBe(both('clutter_over_40_km2', (x) => formatAreaUp(x, 'nautical')))
  expect(await told(taller, /^Floor at 5.NM/)).toBe(both('floor_5nm_worst_m', floor))
  // λ/2h at 2.8 GHz from 15 and from 25 m
  expect(await told(taller, /^Null spacing/)).toBe('0.20 → 0.12°')
})
