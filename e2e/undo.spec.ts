import type { Page } from '@playwright/test'
import { upland } from './made.ts'
import { expect, test } from './page.ts'
import {
  card,
  choose,
  dragCandidate,
  dropFiles,
  everythingRun,
  field,
  form,
  goTo,
  openDemo,
  openEmpty,
  placeCandidate,
  plain,
  readComparison,
  ringPlace,
  type StepName,
  setField,
  stepState,
} from './user.ts'

interface Edit {
  readonly words: string
  readonly step: StepName
  readonly make: (page: Page) => Promise<void>
  /** What the user sees of it. */
  readonly look: (page: Page) => Promise<string>
}
const fieldValue = (step: StepName, label: string | RegExp) => (page: Page) =>
  form(page, step).getByRole('textbox', { name: label }).first().inputValue()
const details = async (page: Page) => {
  const open = card(page, 'A').getByRole('button', { name: 'Edit A' })
  if (await open.isVisible()) await open.click()
}
/** Letters of the cards there are. */
const cards = async (page: Page) =>
  (await Promise.all((await form(page, 'Candidates').getByRole('region').all()).map((c) => c.getAttribute('aria-label')))).join(' / ')
const place = async (page: Page) => {
  const at = await ringPlace(page, 'A')
  return `${Math.round(at.x)} ${Math.round(at.y)}`
}

const EDITS: readonly Edit[] = [
  {
    words: 'renamed the study',
    step: 'Ground',
    make: (page) => setField(page.getByRole('banner'), 'Study name', 'Second thoughts'),
    look: (page) => page.getByRole('textbox', { name: 'Study name' }).inputValue(),
  },
  {
    words: 'changed frequency',
    step: 'Radar',
    make: (page) => setField(form(page, 'Radar'), 'Frequency', '2.7'),
    look: fieldValue('Radar', 'Frequency'),
  },
  {
    words: 'changed polarisation',
    step: 'Radar',
    make: (page) => choose(form(page, 'Radar'), /Polarisation/, 'vertical'),
    look: async (page) =>
      plain(
        await form(page, 'Radar')
          .getByRole('button', { name: /Polarisation/ })
          .innerText(),
      ),
  },
  {
    words: 'added need 3',
    step: 'Need',
    make: (page) => form(page, 'Need').getByRole('button', { name: 'Add a layer need' }).click(),
    look: (page) => stepState(page, 'Need'),
  },
  {
    words: 'removed a need',
    step: 'Need',
    make: (page) => form(page, 'Need').getByRole('button', { name: 'Remove Over the whole island' }).click(),
    look: (page) => stepState(page, 'Need'),
  },
  {
    words: 'moved A',
    step: 'Candidates',
    make: (page) => dragCandidate(page, 'A', 40, -30),
    look: place,
  },
  {
    words: 'placed D',
    step: 'Candidates',
    make: (page) => placeCandidate(page, '47°40′00″ S 121°36′00″ W'),
    look: cards,
  },
  {
    words: 'renamed A',
    step: 'Candidates',
    make: async (page) => {
      await details(page)
      await setField(card(page, 'A'), 'Name', 'Apron')
    },
    look: async (page) => plain(await card(page, 'A').innerText()).slice(0, 20),
  },
  {
    words: 'changed masts of A',
    step: 'Candidates',
    make: async (page) => {
      await details(page)
      await setField(card(page, 'A'), 'Mast heights', '12, 24')
    },
    look: async (page) =>
      plain(
        await card(page, 'A')
          .getByRole('group', { name: /^Mast heights/ })
          .innerText(),
      ),
  },
  {
    words: 'removed A',
    step: 'Candidates',
    make: async (page) => {
      await details(page)
      await card(page, 'A').getByRole('button', { name: 'Delete candidate A' }).click()
    },
    look: (page) => stepState(page, 'Candidates'),
  },
  {
    words: 'took out roads.geojson',
    step: 'Ground',
    make: (page) => form(page, 'Ground').getByRole('button', { name: 'Take out roads.geojson' }).click(),
    look: async (page) => String(await form(page, 'Ground').getByText('roads.geojson').count()),
  },
]

test('each edit is taken back and made again by its name', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  for (const { words, step, make, look } of EDITS) {
    await goTo(page, step)
    const undoButton = page.getByRole('button', { name: `undo: ${words}` })
    const redoButton = page.getByRole('button', { name: `redo: ${words}` })
    const before = await look(page)
    await make(page)
    await expect(undoButton, words).toBeVisible()
    const after = await look(page)
    expect(after, words).not.toBe(before)
    await undoButton.click()
    await expect.poll(() => look(page), { message: `${words}, taken back` }).toBe(before)
    await redoButton.click()
    await expect.poll(() => look(page), { message: `${words}, made again` }).toBe(after)
    await undoButton.click()
    await expect.poll(() => look(page), { message: `${words}, taken back again` }).toBe(before)
  }
})

test('what is typed into a field takes the place of what stood there', async ({ page }) => {
  await openDemo(page)
  await goTo(page, 'Need')
  const need = form(page, 'Need')
  for (const label of ['Height', 'To range', 'Pd']) {
    const into = field(need, label).first()
    // from the field before, as a hand on the keyboard comes
    await into.focus()
    await page.keyboard.press('Shift+Tab')
    await page.keyboard.press('Tab')
    await expect(into).toBeFocused()
    await page.keyboard.type('0.7')
    await page.keyboard.press('Enter')
    await expect(into, label).toHaveValue('0.7')
  }
})

test('keys undo and redo outside of text fields', async ({ page }) => {
  await openDemo(page)
  await goTo(page, 'Need')
  await form(page, 'Need').getByRole('button', { name: 'Add a layer need' }).click()
  await expect.poll(() => stepState(page, 'Need')).toBe('3 stated')
  await page.keyboard.press('Control+z')
  await expect.poll(() => stepState(page, 'Need')).toBe('2 stated')
  await page.keyboard.press('Control+Shift+z')
  await expect.poll(() => stepState(page, 'Need')).toBe('3 stated')
  // a checkbox has no typing of its own to undo
  const must = form(page, 'Need').getByRole('checkbox', { name: 'Must be met' }).first()
  await must.focus()
  await page.keyboard.press('Space')
  await expect(must).not.toBeChecked()
  await page.keyboard.press('Control+z')
  await expect(must).toBeChecked()
  await expect.poll(() => stepState(page, 'Need')).toBe('3 stated')
})

test('a reload brings back the document, its files and its figures', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, upland())
  await goTo(page, 'Radar')
  await setField(form(page, 'Radar'), 'Name', 'Kept set')
  await setField(form(page, 'Radar'), 'Range', '3')
  await placeCandidate(page, '40°04′48″ S 23°55′12″ W')
  await everythingRun(page)
  const before = await readComparison(page)
  await expect(page.getByRole('banner')).toContainText(/saved \d\d:\d\d/)
  // the same page as a visitor comes back to it
  await page.goto('/')
  await everythingRun(page)
  expect(await readComparison(page)).toEqual(before)
  await goTo(page, 'Radar')
  await expect(form(page, 'Radar').getByRole('textbox', { name: 'Name' })).toHaveValue('Kept set')
})

test('an edit made just before the page goes away is not lost', async ({ page }) => {
  await openDemo(page)
  await goTo(page, 'Radar')
  await setField(form(page, 'Radar'), 'Noise figure', '4.4')
  await page.reload()
  await expect(form(page, 'Radar').getByRole('textbox', { name: 'Noise figure' })).toHaveValue('4.4')
  await everythingRun(page)
})
