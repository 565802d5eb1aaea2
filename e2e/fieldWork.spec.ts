import { mkdirSync } from 'node:fs'
import AxeBuilder from '@axe-core/playwright'
import { expect, test } from './page.ts'
import { card, everythingRun, form, goTo, LONG, legend, memoColumn, openDemo, textFile } from './user.ts'

// What is for the field: roads seen, a surveyed horizon, the trial plan, what was confirmed, and the models page.
const OUT = 'test-results/field'
const SURVEY = textFile(
  'horizon-a.csv',
  ['azimuth_deg,elevation_deg,range_m,instrument_height_m,method', ...[88, 91, 94].map((az) => `${az},2.5,1200,1.6,theodolite`)].join('\n'),
)
test.beforeAll(() => mkdirSync(OUT, { recursive: true }))

test('roads seen on the map and in the memo, with the trial plan', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await expect(legend(page)).toContainText('road or rail: vehicles seen')
  await page.screenshot({ path: `${OUT}/map.png` })
  await expect(memoColumn(page)).toContainText('Roads seen, by ring and class')
  await expect(memoColumn(page)).toContainText('Trial plan, through the worst margins of the needs')
  await memoColumn(page).getByText('Roads seen, by ring and class').scrollIntoViewIfNeeded()
  await page.screenshot({ path: `${OUT}/column-roads.png` })
  await memoColumn(page).getByText('Trial plan, through the worst').scrollIntoViewIfNeeded()
  await page.screenshot({ path: `${OUT}/column-trial.png` })
})

test('a surveyed horizon is compared, then taken, and undone', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Candidates')
  const a = card(page, 'A')
  await a.getByRole('button', { name: 'Edit A' }).click()
  const bad = { name: 'bad.csv', mimeType: 'text/csv', buffer: Buffer.from('azimuth_deg\n1\n') }
  await page.locator('input[data-role=survey-A]').setInputFiles(bad)
  await expect(a.getByRole('alert')).toContainText('no column elevation_deg')
  await page
    .locator('input[data-role=survey-A]')
    .setInputFiles({ name: SURVEY.name, mimeType: 'text/csv', buffer: Buffer.from(SURVEY.bytes) })
  await expect(a).toContainText(/3 azimuths; surveyed less computed from this mast: mean/, { timeout: LONG })
  await expect(memoColumn(page)).toContainText('Surveyed horizon (horizon-a.csv) against the computed one', { timeout: LONG })
  await page.screenshot({ path: `${OUT}/survey.png` })
  await a.getByText('Take the higher of surveyed and computed').click()
  await expect(memoColumn(page)).toContainText('Taken as the higher of both', { timeout: LONG })
  await page.getByRole('button', { name: /^Undo|^undo/ }).click()
  await expect(memoColumn(page)).toContainText('Beside the computed horizon only', { timeout: LONG })
})

test('a measurement is entered whole or not at all; the models page lists basis and marks', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Memo')
  await form(page, 'Memo').getByRole('button', { name: 'Enter a measurement' }).click()
  const dialog = page.getByRole('dialog', { name: 'Confirmed by survey and trial' })
  await dialog.getByRole('button', { name: 'Enter it' }).click()
  await expect(dialog.getByRole('alert')).toContainText('a confirmation without who measured it')
  await page.screenshot({ path: `${OUT}/confirm-refused.png` })
  for (const [label, value] of [
    ['Place', 'radial 255°'],
    ['Altitude, MSL', '500'],
    ['Who', 'E. Marl'],
    ['When', '2026-05-31'],
    ['Method', 'flight trial'],
    ['Result', 'seen on 9 of 10 scans'],
  ] as const) {
    await dialog.getByLabel(label, { exact: true }).fill(value)
    await page.keyboard.press('Tab')
  }
  await dialog.getByRole('button', { name: 'Enter it' }).click()
  await expect(dialog.getByRole('listitem')).toContainText('seen on 9 of 10 scans (flight trial, E. Marl, 2026-05-31)')
  await page.screenshot({ path: `${OUT}/confirm-entered.png` })
  const found = await new AxeBuilder({ page }).withTags(['wcag2a', 'wcag2aa', 'wcag21aa', 'wcag22aa']).analyze()
  expect(found.violations.map((v) => `${v.id}: ${v.nodes[0]?.html}`)).toEqual([])
  await dialog.getByRole('button', { name: 'Close' }).click()
  await expect(form(page, 'Memo')).toContainText('seen on 9 of 10 scans')
  await form(page, 'Memo').getByRole('button', { name: 'Models and sources' }).click()
  const models = page.getByRole('dialog', { name: 'Models and sources' })
  for (const words of ['Roads seen', 'from memory', 'computed', 'read', 'Where this study leaves them'])
    await expect(models).toContainText(words)
  await page.screenshot({ path: `${OUT}/models.png` })
  await models.getByRole('button', { name: 'Close' }).click()
  await page.keyboard.press('Control+z')
  await expect(form(page, 'Memo')).toContainText('Nothing is entered as confirmed')
})
