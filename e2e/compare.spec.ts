import type { Page } from '@playwright/test'
import { expect, test } from './page.ts'
import { inkOf } from './sheets.ts'
import {
  card,
  comparison,
  everythingRun,
  expectStepState,
  goTo,
  legend,
  numberIn,
  openDemo,
  plain,
  readColumn,
  ring,
  setField,
} from './user.ts'

const section = (page: Page, name: string) => page.getByRole('region', { name, exact: true })
async function pick(page: Page, within: string, label: string, option: RegExp): Promise<void> {
  await section(page, within).locator('.field').filter({ hasText: label }).getByRole('button').click()
  await page.getByRole('option', { name: option }).first().click()
}
async function word(page: Page, label: string, choice: RegExp | string): Promise<void> {
  await page.getByRole('button', { name: new RegExp(`^${label}: `) }).click()
  await page.getByRole('menuitemradio', { name: choice }).first().click()
}

test('options are ranked by stated values and weights, those that fail a must need last; each is one step back', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Compare')
  await pick(page, 'Ranking', 'Add a figure', /^Usable, Low over/)
  await pick(page, 'Ranking', 'Add a figure', /^Mast height/)
  const weight = page.getByRole('textbox', { name: /^weight of Mast height/ })
  await weight.fill('3')
  await weight.press('Enter')
  const rows = page.getByRole('table', { name: 'Options by score' }).locator('tbody tr')
  await expect(rows).toHaveCount(9)
  const cells = await Promise.all((await rows.all()).map(async (r) => (await r.locator('td').allInnerTexts()).map(plain)))
  const verdicts = cells.map((c) => c[2])
  expect(verdicts.lastIndexOf('passes'), verdicts.join(' ')).toBeLessThan(verdicts.indexOf('not met'))
  for (const c of cells) expect(numberIn(c[3] ?? '') + numberIn(c[4] ?? ''), c.join(' | ')).toBeCloseTo(numberIn(c[5] ?? ''), 0)
  for (const verdict of ['passes', 'not met']) {
    const scores = cells.filter((c) => c[2] === verdict).map((c) => numberIn(c[5] ?? ''))
    expect(scores).toEqual([...scores].sort((a, b) => b - a))
  }
  await expect(page.getByRole('table', { name: /^Does the ranking hold/ }).locator('tbody tr')).toHaveCount(2)
  // each edit is one step back, with its name
  const undo = page.getByRole('banner').getByRole('button', { name: /^undo/i })
  await expect(undo).toContainText('changed weight in the ranking')
  await undo.click()
  await expect(weight).toHaveValue('1')
  await expect(undo).toContainText('added to the ranking')
  await undo.click()
  await expect(weight).toHaveCount(0)
})

test('a rejected candidate is no longer compared and stands in the memo with its reason', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Compare')
  await pick(page, 'Rejected candidates', 'Reject', /^B /)
  const reason = page.getByRole('textbox', { name: 'Reason' })
  await reason.fill('No road to the top')
  await reason.press('Enter')
  await expect(comparison(page).locator('tbody tr')).toHaveCount(6)
  await expectStepState(page, 'Compare', '6 options')
  await goTo(page, 'Memo')
  await expect(page.getByRole('group', { name: 'Rejected candidates' })).toContainText('No road to the top')
  await goTo(page, 'Compare')
  await page.getByRole('button', { name: 'Take back B' }).click()
  await expectStepState(page, 'Compare', '9 options')
  // the same in the candidate's own form, seen on the map
  await goTo(page, 'Candidates')
  await card(page, 'B').getByRole('button', { name: /^B\b/ }).click()
  await card(page, 'B').getByRole('button', { name: 'Edit B' }).click()
  await setField(card(page, 'B'), 'Reject', 'No road to the top')
  await expect(card(page, 'B').getByRole('textbox', { name: 'Rejected' })).toHaveValue('No road to the top')
  await expect(ring(page, 'B')).toHaveCount(0)
  await expect(legend(page)).toContainText('rejected candidate')
  await card(page, 'B').getByRole('button', { name: 'Take back B' }).click()
  await expect(ring(page, 'B')).toBeVisible()
  await expect(legend(page)).not.toContainText('rejected candidate')
})

test('a layer against a second option: warm and cool differences with words at both ends, or two maps of the same view', async ({
  page,
}) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Candidates')
  await word(page, 'Against candidate', /^B/)
  await expect(legend(page)).toContainText('less B at')
  await expect(legend(page)).toContainText('more comes back for A')
  await expect
    .poll(
      async () => {
        const ink = await inkOf(page, 'overlay')
        return ink.warm > 2000 && ink.cool > 2000
      },
      { timeout: 60_000, message: 'warm and cool' },
    )
    .toBe(true)
  await word(page, 'How', 'two maps')
  await expect(page.getByRole('application', { name: /^Map beside it: B at/ })).toBeVisible()
  await word(page, 'Against candidate', 'nothing else')
  await expect(page.getByRole('application')).toHaveCount(1)
})

test('before and after: a taller mast tells the same figures as the comparison, an obstacle left out names its sector', async ({
  page,
}) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Compare')
  const usable = await readColumn(page, /^usable/i)
  const changes = section(page, 'Before and after')
  await pick(page, 'Before and after', 'Before', /^A at 10/)
  await pick(page, 'Before and after', 'After', /^A at 35/)
  await changes.getByRole('button', { name: 'Show what changes' }).click()
  const needs = changes.getByRole('table', { name: 'Needs' })
  await expect(needs).toBeVisible({ timeout: 60_000 })
  const row = (await needs.locator('tbody tr').first().locator('td').allInnerTexts()).map(plain)
  expect(row[4]).toBe(`${usable[0]} → ${usable[2]} %`)
  await pick(page, 'Before and after', 'After', /^without Vennet airfield tower/)
  await changes.getByRole('button', { name: 'Show what changes' }).click()
  await expect(changes.locator('.sectors li').first()).toContainText(/azimuth \d+\.\d° to \d+\.\d°, up to \d+\.\d+° lower/, {
    timeout: 60_000,
  })
})
