import { readFileSync } from 'node:fs'
import { basename } from 'node:path'
import { type Download, expect, type Locator, type Page } from '@playwright/test'

/** What the user says and does, in the user's words. Places on the map are pixels from the map's upper left corner. */

export type StepName = 'Ground' | 'Radar' | 'Need' | 'Candidates' | 'Compare' | 'Memo'
export const STEP_NAMES: readonly StepName[] = ['Ground', 'Radar', 'Need', 'Candidates', 'Compare', 'Memo']

/** Working through a whole study can take a while on a busy machine. */
export const LONG = 120_000

export interface NamedFile {
  readonly name: string
  readonly bytes: Uint8Array
}
export const fileFrom = (path: string, name = basename(path)): NamedFile => ({ name, bytes: readFileSync(path) })
export const textFile = (name: string, text: string): NamedFile => ({ name, bytes: new TextEncoder().encode(text) })

// --- places on the page
export const map = (page: Page): Locator => page.getByRole('application', { name: 'Site map' })
export const legend = (page: Page): Locator => page.getByRole('region', { name: /^Legend/ })
export const readOut = (page: Page): Locator => page.locator('.readout')
export const form = (page: Page, step: StepName): Locator => page.getByRole('region', { name: step, exact: true })
export const mast = (page: Page): Locator => page.getByRole('slider', { name: /^Mast height/ })
export const ring = (page: Page, candidate: string): Locator =>
  map(page).getByRole('button', { name: new RegExp(`^Candidate ${candidate}\\b`) })
export const card = (page: Page, candidate: string): Locator => page.getByRole('region', { name: `Candidate ${candidate}`, exact: true })
export const comparison = (page: Page): Locator => page.getByRole('table', { name: 'Options compared' })
export const memoColumn = (page: Page): Locator => page.getByRole('article', { name: 'Memo', exact: true })
const stepButton = (page: Page, step: StepName): Locator =>
  page.getByRole('navigation', { name: 'Steps' }).getByRole('button', { name: new RegExp(`^${step}`) })

// --- opening
/** Opens the page as a new visitor finds it: on the demo study; returns once C/N is painted, with the milliseconds from navigation to that. */
export async function openDemo(page: Page): Promise<number> {
  await watchPaint(page)
  await page.goto('/')
  await waitForPaint(page, LONG)
  return page.evaluate(() => (window as unknown as Watched).firstPaintMs)
}
export async function openEmpty(page: Page): Promise<void> {
  await page.goto('/?empty')
  // a page that was here before comes back to the step it was at
  await goTo(page, 'Ground')
  await expect(form(page, 'Ground').getByText('No terrain yet')).toBeVisible()
}
interface Watched {
  firstPaintMs: number
}
/** Notes when the first picture of the overlay has been on screen for a frame. */
const watchPaint = (page: Page) =>
  page.addInitScript(() => {
    const proto = ImageBitmapRenderingContext.prototype
    const give = proto.transferFromImageBitmap
    proto.transferFromImageBitmap = function (bitmap) {
      give.call(this, bitmap)
      const sheet = (this.canvas as HTMLCanvasElement).closest('.map-sheet')
      const watched = window as unknown as { firstPaintMs?: number }
      if (sheet?.classList.contains('overlay') && watched.firstPaintMs === undefined)
        requestAnimationFrame(() => requestAnimationFrame(() => (watched.firstPaintMs ??= performance.now())))
    }
  })
async function waitForPaint(page: Page, timeout: number): Promise<void> {
  await page.waitForFunction(() => (window as unknown as Partial<Watched>).firstPaintMs !== undefined, null, { timeout })
}

// --- files
/** Drops files on the page, as from a file manager. */
export async function dropFiles(page: Page, ...files: readonly NamedFile[]): Promise<void> {
  const carried = await page.evaluateHandle(
    (list) => {
      const data = new DataTransfer()
      for (const { name, base64 } of list) data.items.add(new File([Uint8Array.from(atob(base64), (c) => c.charCodeAt(0))], name))
      return data
    },
    files.map(({ name, bytes }) => ({ name, base64: Buffer.from(bytes).toString('base64') })),
  )
  await page.dispatchEvent('body', 'dragover', { dataTransfer: carried })
  await page.dispatchEvent('body', 'drop', { dataTransfer: carried })
}
export async function chooseInFileMenu(page: Page, entry: string): Promise<void> {
  await page.getByRole('button', { name: 'File', exact: true }).click()
  await page.getByRole('menuitem', { name: new RegExp(`^${entry}`) }).click()
}
export async function openFiles(page: Page, ...files: readonly NamedFile[]): Promise<void> {
  const chooser = page.waitForEvent('filechooser')
  await chooseInFileMenu(page, 'Open…')
  await (await chooser).setFiles(files.map((f) => ({ name: f.name, mimeType: '', buffer: Buffer.from(f.bytes) })))
}
export async function savedFrom(page: Page, entry: 'Save study' | 'Save package'): Promise<NamedFile> {
  const [download] = await Promise.all([page.waitForEvent('download'), chooseInFileMenu(page, entry)])
  return downloaded(download)
}
export const downloaded = async (download: Download): Promise<NamedFile> => ({
  name: download.suggestedFilename(),
  bytes: readFileSync(await download.path()),
})

// --- steps and work
export async function goTo(page: Page, step: StepName): Promise<void> {
  const button = stepButton(page, step)
  if ((await button.getAttribute('aria-current')) !== 'step') await button.click()
  await expect(form(page, step)).toBeVisible()
}
/** The state that stands under a step's name. */
export const stepState = async (page: Page, step: StepName): Promise<string> =>
  (await stepButton(page, step).innerText()).split('\n').slice(1).join(' ').trim()
export async function expectStepState(page: Page, step: StepName, words: string | RegExp, timeout = LONG): Promise<void> {
  await expect(stepButton(page, step)).toContainText(words, { timeout })
}
/** Waits until every option is worked out and nothing runs any more. */
export async function everythingRun(page: Page): Promise<void> {
  await expectStepState(page, 'Compare', /\d+ options/)
  await expect(page.locator('.working')).toHaveCount(0, { timeout: LONG })
}
/** A field by its label, whatever mark stands beside it. */
export const field = (scope: Locator, label: string): Locator =>
  scope.getByRole('textbox', {
    name: new RegExp(`^${label.replace(/[()]/g, '\\$&')}(\\s*(default|from memory|by hand|worked out|read|chosen here))?$`),
  })
export async function setField(scope: Locator, label: string, value: string): Promise<void> {
  const into = field(scope, label)
  await into.fill(value)
  await into.press('Enter')
}
export async function choose(scope: Locator, label: string | RegExp, option: string): Promise<void> {
  await scope.getByRole('button', { name: label }).click()
  await scope.page().getByRole('option', { name: option }).click()
}
/** The one next action, at the right of the top bar. */
export const nextAction = (page: Page): Locator => page.getByRole('banner').locator('.primary')

// --- candidates
export async function placeCandidate(page: Page, where: { x: number; y: number } | string): Promise<void> {
  await goTo(page, 'Candidates')
  const place = form(page, 'Candidates')
  if (typeof where === 'string') {
    await place.getByRole('button', { name: 'Enter position' }).click()
    await setField(place, 'Position', where)
    return
  }
  await place.getByRole('button', { name: 'Place on map' }).click()
  await map(page).click({ position: where })
}
const middleOf = async (of: Locator): Promise<{ x: number; y: number }> => {
  const box = await of.boundingBox()
  if (!box) throw new Error('not on the page')
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 }
}
/** Where a candidate's ring is on the page. */
export const ringPlace = (page: Page, candidate: string) => middleOf(ring(page, candidate).locator('circle.dot'))
/** Takes hold of a candidate, or with `the mast` of the mast on its ruler. */
export async function takeHold(page: Page, what: string): Promise<{ x: number; y: number }> {
  const at = what === 'the mast' ? await middleOf(mast(page).locator('circle.grip')) : await ringPlace(page, what)
  await page.mouse.move(at.x, at.y)
  await page.mouse.down()
  return at
}
export async function dragCandidate(page: Page, candidate: string, dx: number, dy: number): Promise<void> {
  const at = await takeHold(page, candidate)
  await page.mouse.move(at.x + dx / 2, at.y + dy / 2)
  await page.mouse.move(at.x + dx, at.y + dy)
  await page.mouse.up()
}
/** Drags the mast on its ruler by pixels, up negative; returns the height it stands at, m. */
export async function dragMast(page: Page, dy: number): Promise<number> {
  const at = await takeHold(page, 'the mast')
  await page.mouse.move(at.x, at.y + dy / 2)
  await page.mouse.move(at.x, at.y + dy)
  await page.mouse.up()
  return mastHeight(page)
}
export const mastHeight = async (page: Page): Promise<number> => Number(await mast(page).getAttribute('aria-valuenow'))

// --- the map's sentence
export async function chooseWord(page: Page, word: string, choice: string | RegExp): Promise<void> {
  await page.getByRole('button', { name: new RegExp(`^${word}: `) }).click()
  await page.getByRole('menuitemradio', { name: choice }).click()
}
/** Shows a quantity of a question: `chooseLayer(page, 'what is seen', 'coverage floor')`. */
export async function chooseLayer(page: Page, question: string, quantity: string): Promise<void> {
  await chooseWord(page, 'Question', new RegExp(`^${question}`))
  await chooseWord(page, 'Quantity', new RegExp(`^${quantity}`))
}

// --- figures
/** A figure of the memo column beside its words, as text. */
export const readFigure = async (page: Page, label: string): Promise<string> =>
  plain(await memoColumn(page).locator('dl > div, tr').filter({ hasText: label }).first().innerText())
    .replace(label, '')
    .trim()
/** Every row of the comparison, cells as text. */
export async function readComparison(page: Page): Promise<string[][]> {
  await goTo(page, 'Compare')
  await expect(comparison(page)).toBeVisible()
  const rows = await comparison(page).locator('tbody tr').all()
  return Promise.all(rows.map(async (r) => (await r.locator('td').allInnerTexts()).map(plain)))
}
/** One column of the comparison by the words at its head, as numbers. */
export async function readColumn(page: Page, head: RegExp): Promise<number[]> {
  const over = await comparison(page)
    .getByRole('columnheader', { name: head })
    .evaluate((th) => {
      const { left, right } = th.getBoundingClientRect()
      return (left + right) / 2
    })
  const rows = await comparison(page).locator('tbody tr').all()
  const texts = rows.map((r) =>
    r.locator('td').evaluateAll((cells, x) => cells.find((c) => c.getBoundingClientRect().right >= x)?.textContent ?? '', over),
  )
  return (await Promise.all(texts)).map(numberIn)
}
/** Thin and no-break spaces as plain ones. */
export const plain = (text: string): string => text.replace(/[\u202f\u2009\u00a0\s]+/g, ' ').trim()
/** First number of a text; a true minus counts. */
export const numberIn = (text: string): number =>
  Number(/[-−]?\d[\d ]*(?:\.\d+)?/.exec(plain(text))?.[0].replace('−', '-').replaceAll(' ', ''))

/** Text that a copy button of a chart hands over. */
export async function copied(chart: Locator, button: 'Copy SVG' | 'Copy CSV'): Promise<string> {
  const page = chart.page()
  await page.evaluate(() => {
    const held = window as unknown as { copiedText?: string }
    held.copiedText = undefined
    Object.defineProperty(navigator, 'clipboard', {
      configurable: true,
      value: { writeText: (text: string) => Promise.resolve().then(() => (held.copiedText = text)) },
    })
  })
  await chart.getByRole('button', { name: button }).click()
  await expect(chart.getByText('Copied')).toBeVisible()
  return page.evaluate(() => (window as unknown as { copiedText: string }).copiedText)
}

export async function exportMemo(page: Page): Promise<NamedFile> {
  await goTo(page, 'Memo')
  const button = page.getByRole('button', { name: 'Export PDF' })
  await expect(button).toBeEnabled()
  const [download] = await Promise.all([page.waitForEvent('download', { timeout: LONG }), button.click()])
  return downloaded(download)
}

// --- looks
export async function setTheme(page: Page, theme: 'paper' | 'night'): Promise<void> {
  const button = page.getByRole('button', { name: /^Sheet: / })
  if (!(await button.getAttribute('aria-label'))?.includes(theme)) await button.click()
  await expect(page.locator('html')).toHaveAttribute('data-theme', theme)
}
