import { AxeBuilder } from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { smallDoc, upland } from './made.ts'
import { expect, test } from './page.ts'
import { chooseInFileMenu, dropFiles, everythingRun, field, form, goTo, LONG, openEmpty, setTheme, textFile } from './user.ts'

async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
    .analyze()
  return found.map((v) => `${v.id}: ${v.help} — ${v.nodes.map((n) => n.target.join(' ')).join(' | ')}`)
}
async function openSmall(page: Page): Promise<void> {
  await openEmpty(page)
  await dropFiles(page, textFile('study.json', JSON.stringify(smallDoc())), upland())
  await everythingRun(page)
}
const dialog = (page: Page, title: string) => page.getByRole('dialog', { name: title })
async function find(page: Page, words: string): Promise<void> {
  await page.keyboard.press('Control+k')
  await page.getByRole('combobox', { name: /^Command/ }).fill(words)
  await page.keyboard.press('Enter')
}
async function close(page: Page, title: string): Promise<void> {
  const open = dialog(page, title)
  // the first Escape gives up what stands in a table and cannot be read yet
  await expect(async () => {
    if (await open.isVisible()) await page.keyboard.press('Escape')
    await expect(open).toHaveCount(0, { timeout: 1000 })
  }).toPass({ timeout: 10_000 })
}
/** What a spreadsheet puts on the clipboard, pasted into the cell in hand. */
const paste = (page: Page, text: string) =>
  page.evaluate((t) => {
    const clipboardData = new DataTransfer()
    clipboardData.setData('text/plain', t)
    document.activeElement?.dispatchEvent(new ClipboardEvent('paste', { clipboardData, bubbles: true, cancelable: true }))
  }, text)

for (const theme of ['paper', 'night'] as const)
  test(`what is asked over the page can be used by all, ${theme}`, async ({ page }) => {
    await openSmall(page)
    await setTheme(page, theme)
    await page.keyboard.press('Control+k')
    await expect(dialog(page, 'Find a command').getByRole('combobox')).toBeFocused()
    expect.soft(await violations(page), 'commands').toEqual([])
    await page.screenshot({ path: `test-results/habits/${theme}-commands.png` })
    await close(page, 'Find a command')
    for (const [words, title, narrow] of [
      ['start from', 'Start from', false],
      ['candidates as a table', 'Candidates', true],
      ['obstacles as a table', 'Obstacles', false],
      ['enter fixes', 'Fixes', false],
      ['several pulses', 'Several pulses and beams', true],
      ['true or magnetic', 'North', false],
      ['studies on this', 'Studies on this machine', true],
      ['keys', 'Keys', true],
    ] as const) {
      await page.setViewportSize(narrow ? { width: 1024, height: 768 } : { width: 1440, height: 900 })
      await find(page, words)
      await expect(dialog(page, title)).toBeVisible()
      if (title === 'Start from') await page.getByRole('option', { name: 'Coastal and vessel traffic' }).click()
      const add = dialog(page, title)
        .getByRole('button', { name: /^Add a / })
        .first()
      if (await add.isVisible()) await add.click()
      expect.soft(await violations(page), title).toEqual([])
      await page.screenshot({ path: `test-results/habits/${theme}-${title.toLowerCase().replaceAll(' ', '-')}.png` })
      await close(page, title)
    }
  })

test('starting from a kind of work: each value with where it comes from, one step of undo', async ({ page }) => {
  await openEmpty(page)
  await page.getByRole('button', { name: 'Start from a kind of work' }).click()
  await page.getByRole('option', { name: 'Terminal air traffic' }).click()
  await expect(dialog(page, 'Start from').getByRole('row', { name: /^Gain 33\.5/ })).toContainText(
    'from memory: ITU-R M.1464, radars A and B',
  )
  await page.getByRole('button', { name: 'Use radar and needs' }).click()
  const radar = form(page, 'Radar')
  await expect(field(radar, 'Gain')).toHaveValue('33.5')
  await expect(radar.getByText('Gain from memory')).toBeVisible()
  await field(radar, 'Gain').fill('34')
  await field(radar, 'Gain').press('Enter')
  await expect(radar.getByText('Gain from memory')).toHaveCount(0)
  await goTo(page, 'Need')
  await expect(form(page, 'Need').getByText('worked out', { exact: true })).toBeVisible()
  await find(page, 'undo')
  await find(page, 'undo: started')
  await goTo(page, 'Radar')
  await expect(field(radar, 'Name')).toHaveValue('Starting values, not a radar')
})

test('candidates pasted from a spreadsheet, in any written position', async ({ page }) => {
  await openSmall(page)
  await goTo(page, 'Candidates')
  const cards = page.getByRole('region', { name: /^Candidate / })
  await expect(cards).toHaveCount(smallDoc().candidates.length)
  await page.getByRole('button', { name: 'Edit as a table' }).click()
  await page.getByRole('button', { name: 'Add a candidate' }).click()
  await paste(page, 'Name\tLatitude\tMast heights\r\nNorth knoll\t33U XP 05004 44998\t12 24\r\nQuay\t48°15\'00"N 016°25\'00"E\t\r\n')
  await close(page, 'Candidates')
  await expect(cards).toHaveCount(smallDoc().candidates.length + 2)
  await expect(form(page, 'Candidates').getByText(/48°14′58\.\d″.N\s+016°24′52\.\d″.E/)).toBeVisible()
  await expect(page.getByRole('banner').getByRole('button', { name: 'undo: changed the candidates' })).toBeVisible()
})

test('studies on this machine: set aside, opened again with their files, deleted and put back', async ({ page }) => {
  await openSmall(page)
  const name = await page.getByRole('textbox', { name: 'Study name' }).inputValue()
  await chooseInFileMenu(page, 'New study')
  await expect(page.getByRole('textbox', { name: 'Study name' })).toHaveValue('Untitled study')
  await chooseInFileMenu(page, 'Studies on this machine')
  const list = dialog(page, 'Studies on this machine')
  await list.getByRole('button', { name: `Delete ${name}` }).click()
  await expect(list.getByText(`${name} is deleted`)).toBeVisible()
  await list.getByRole('button', { name: 'Undo' }).click()
  await list.getByRole('button', { name: `Duplicate ${name}` }).click()
  await expect(list.getByRole('button', { name: `Open ${name}, copy` })).toBeVisible()
  await list.getByRole('button', { name: `Open ${name}`, exact: true }).click()
  await expect(page.getByRole('textbox', { name: 'Study name' })).toHaveValue(name)
  await everythingRun(page)
})

test('azimuths follow the switch to magnetic north', async ({ page }) => {
  await openSmall(page)
  await page.getByRole('button', { name: /^Azimuths from true north/ }).click()
  const north = dialog(page, 'North')
  await north.getByRole('textbox', { name: /^Declination/ }).fill('10')
  await north.getByRole('textbox', { name: /^Declination/ }).press('Enter')
  await north.getByRole('button', { name: /Azimuths from/ }).click()
  await page.getByRole('option', { name: 'magnetic north' }).click()
  await expect(page.getByRole('button', { name: /^Azimuths from magnetic north/, includeHidden: true })).toHaveText('mag. north, 10.0° E')
  // the page keeps its state: the dialog stands and holds the focus
  await expect(north.locator(':focus')).toHaveCount(1)
  await page.keyboard.press('Escape')
  await goTo(page, 'Memo')
  const magnetic = form(page, 'Memo').getByText(/magnetic \(°M\), declination 10\.0° E on .* \(by hand\)/)
  await expect(magnetic.first()).toBeVisible({ timeout: LONG })
})

test.describe('without a network', () => {
  test.use({ serviceWorkers: 'allow' })
  test('the page opens again, with the study', async ({ page, context }) => {
    await openSmall(page)
    const name = await page.getByRole('textbox', { name: 'Study name' }).inputValue()
    await expect(page.getByRole('banner').getByText(/^saved/)).toBeVisible()
    await page.evaluate(() => navigator.serviceWorker.ready.then(() => true))
    await page.waitForFunction(() => navigator.serviceWorker.controller !== null)
    await context.setOffline(true)
    await page.goto('/')
    await expect(page.getByRole('textbox', { name: 'Study name' })).toHaveValue(name)
    await everythingRun(page)
    await goTo(page, 'Memo')
    await context.setOffline(false)
  })
})
