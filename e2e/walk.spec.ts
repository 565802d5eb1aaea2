import { mkdirSync, writeFileSync } from 'node:fs'
import type { Locator, Page } from '@playwright/test'
import { hasShared, sharedNote, sharedPath } from '../test/helpers/sharedData.ts'
import { pdfPictures } from './made.ts'
import { expect, test } from './page.ts'
import { expectPainted, inkOf } from './sheets.ts'
import {
  card,
  choose,
  chooseLayer,
  chooseWord,
  dropFiles,
  everythingRun,
  exportMemo,
  fileFrom,
  form,
  goTo,
  LONG,
  legend,
  map,
  nextAction,
  openDemo,
  openEmpty,
  placeCandidate,
  ringPlace,
  STEP_NAMES,
  setField,
  setTheme,
} from './user.ts'

// The walk takes pictures of everything a user meets, for eyes to judge, and checks on each what a program can: nothing cut, nothing overlapping,
// the next action named.
const OUT = 'test-results/walk'
const HOME = { width: 1440, height: 900 }
const NARROW = { width: 1024, height: 768 }
interface Look {
  readonly size: { readonly width: number; readonly height: number }
  readonly theme: 'paper' | 'night'
}
const EVERY_LOOK: readonly Look[] = [HOME, NARROW].flatMap((size) => (['paper', 'night'] as const).map((theme) => ({ size, theme })))
/** Each size and each theme once. */
const TWO_LOOKS: readonly Look[] = [
  { size: HOME, theme: 'paper' },
  { size: NARROW, theme: 'night' },
]
const WIDE: Look = { size: { width: 1920, height: 1080 }, theme: 'paper' }

test.beforeAll(() => mkdirSync(OUT, { recursive: true }))
test.describe.configure({ timeout: 600_000 })

/** One picture of what is there, in each size and theme asked for. */
async function pictures(page: Page, name: string, looks = EVERY_LOOK, open?: (page: Page) => Promise<void>): Promise<void> {
  for (const { size, theme } of looks) {
    await page.setViewportSize(size)
    await setTheme(page, theme)
    await open?.(page)
    await page.mouse.move(2, 2)
    await stillness(page, theme)
    await page.screenshot({ path: `${OUT}/${name}-${size.width}-${theme}.png` })
    expect.soft(await flaws(page), `${name} at ${size.width} px, ${theme}`).toEqual([])
    await expect(page.getByRole('dialog').or(nextAction(page)).first()).toBeVisible()
    if (open) await shut(page)
  }
  await page.setViewportSize(HOME)
  await setTheme(page, 'paper')
}
/** Closes what is asked over the page; the first Escape may give up what stands in a table and cannot be read yet. */
async function shut(page: Page): Promise<void> {
  for (let n = 0; n < 3 && (await page.getByRole('dialog').count()) > 0; n++) await page.keyboard.press('Escape')
  await expect(page.getByRole('dialog')).toHaveCount(0)
}
/** Waits until the map has the picture of this size and theme: no request of it is under way and nothing moves. */
async function stillness(page: Page, theme: 'paper' | 'night'): Promise<void> {
  // the ground is painted in the colours of the theme
  const right = ({ painted, light }: { painted: number; light: number }) => painted === 0 || (theme === 'night' ? light < 110 : light > 120)
  await expect.poll(async () => right(await inkOf(page, 'base')), { timeout: 60_000, message: `the map in ${theme} colours` }).toBe(true)
  await page.waitForFunction(
    () => {
      const w = window as unknown as { last?: string; since?: number }
      const now = [...document.querySelectorAll<HTMLCanvasElement>('.map-sheet canvas')]
        .map((c) => `${c.width} ${c.height} ${c.style.visibility} ${c.style.transform}`)
        .join('|')
      const moving = document.getAnimations().some((a) => a.playState === 'running')
      if (now !== w.last || moving) [w.last, w.since] = [now, performance.now()]
      return performance.now() - (w.since ?? 0) > 400
    },
    null,
    { polling: 100, timeout: 60_000 },
  )
}

/** The first choice of these words. */
async function pick(scope: Locator, label: RegExp, option: RegExp): Promise<void> {
  await scope.getByRole('button', { name: label }).first().click()
  await scope.page().getByRole('option', { name: option }).first().click()
}
/** Found by these words, each stands over the page under its title. */
const ASKED = [
  ['', 'Find a command'],
  ['start from', 'Start from'],
  ['candidates as a table', 'Candidates'],
  ['obstacles as a table', 'Obstacles'],
  ['enter fixes', 'Fixes'],
  ['several pulses', 'Several pulses and beams'],
  ['true or magnetic', 'North'],
  ['studies on this', 'Studies on this machine'],
  ['keys', 'Keys'],
] as const

/** What a program can see of a bad layout: words cut by their own box or the window's edge, cards lying over each other, the page scrolling sideways. */
function flaws(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const found: string[] = []
    const shown = (e: Element) => e.checkVisibility({ checkOpacity: true, checkVisibilityCSS: true })
    const name = (e: Element) =>
      `${e.tagName.toLowerCase()}.${e.getAttribute('class') ?? ''} "${(e.textContent ?? '').trim().slice(0, 50)}"`
    if (document.documentElement.scrollWidth > innerWidth + 1) found.push(`page is ${document.documentElement.scrollWidth} px wide`)
    if (document.documentElement.scrollHeight > innerHeight + 1) found.push(`page is ${document.documentElement.scrollHeight} px high`)
    const hidden = (e: Element) => e.closest('.visually-hidden, [hidden], .popover') !== null
    for (const e of document.querySelectorAll<HTMLElement>('p, span, button, dt, dd, h1, h2, h3, h4, td, th, label, li, b')) {
      if (!shown(e) || hidden(e) || e.children.length > 0 || !e.textContent?.trim()) continue
      const style = getComputedStyle(e)
      // a need has the name its author gave it: beside a narrow chart it is shortened, and whole in the chart's own line
      if (e.closest('.chart-head .field:not(:first-of-type)')) continue
      if (style.overflow !== 'visible' && (e.scrollWidth > e.clientWidth + 1 || e.scrollHeight > e.clientHeight + 2))
        found.push(`cut: ${name(e)}`)
      const box = e.getBoundingClientRect()
      // cut by a box that does not scroll
      for (let up = e.parentElement; up; up = up.parentElement) {
        const s = getComputedStyle(up)
        if (s.overflowX === 'auto' || s.overflowX === 'scroll') {
          if (up.scrollWidth > up.clientWidth + 1) found.push(`has to be scrolled sideways: ${up.tagName.toLowerCase()}.${up.className}`)
          break
        }
        const frame = up.getBoundingClientRect()
        if (s.overflowX === 'hidden' || s.overflowX === 'clip') {
          if (box.right > frame.right + 1.5 || box.left < frame.left - 1.5) found.push(`cut by ${up.className}: ${name(e)}`)
          break
        }
      }
      if (box.right > innerWidth + 1) found.push(`over the right edge: ${name(e)}`)
    }
    const cards = [...document.querySelectorAll<HTMLElement>('.map-card, .map-lower, .notice')].filter(shown)
    for (const [i, a] of cards.entries())
      for (const b of cards.slice(i + 1)) {
        if (a.contains(b) || b.contains(a)) continue
        const [p, q] = [a.getBoundingClientRect(), b.getBoundingClientRect()]
        const [w, h] = [Math.min(p.right, q.right) - Math.max(p.left, q.left), Math.min(p.bottom, q.bottom) - Math.max(p.top, q.top)]
        if (w > 1 && h > 1) found.push(`overlap of ${Math.round(w)} × ${Math.round(h)} px: ${name(a)} and ${name(b)}`)
      }
    for (const group of ['.ruler-scale', '.horizon-chart svg', 'svg.chart.options', 'svg.chart.terrain']) {
      const texts = [...document.querySelectorAll<SVGTextElement>(`${group} text`)].filter((t) => shown(t) && (t.textContent ?? '').trim())
      for (const [i, a] of texts.entries())
        for (const b of texts.slice(i + 1)) {
          const [p, q] = [a.getBoundingClientRect(), b.getBoundingClientRect()]
          const [w, h] = [Math.min(p.right, q.right) - Math.max(p.left, q.left), Math.min(p.bottom, q.bottom) - Math.max(p.top, q.top)]
          if (w > 2 && h > 5) found.push(`words over words in ${group}: ${name(a)} and ${name(b)}`)
        }
      for (const t of texts) {
        const frame = t.ownerSVGElement?.getBoundingClientRect()
        const box = t.getBoundingClientRect()
        if (frame && (box.left < frame.left - 2 || box.right > frame.right + 2)) found.push(`cut in ${group}: ${name(t)}`)
      }
    }
    return [...new Set(found)]
  })
}

/** Every step, the figure, the ledger, the profile, and the memo's pages. */
async function everySheet(page: Page, prefix: string, candidate: string, looks: readonly Look[]): Promise<void> {
  for (const step of STEP_NAMES) {
    await goTo(page, step)
    await pictures(page, `${prefix}-${step.toLowerCase()}`, looks)
  }
  await goTo(page, 'Candidates')
  await chooseLayer(page, 'what is seen', 'coverage floor')
  await expect(legend(page)).toContainText('Coverage floor')
  await pictures(page, `${prefix}-floor`, TWO_LOOKS)
  await chooseLayer(page, 'what comes back', 'C/N')
  const site = await ringPlace(page, candidate)
  await page.mouse.click(site.x + 60, site.y + 25)
  await expect(page.locator('.ledger')).toBeVisible()
  await pictures(page, `${prefix}-ledger`, TWO_LOOKS)
  await page.keyboard.press('Escape')
  await page.getByRole('img', { name: /^Horizon/ }).click({ position: { x: 120, y: 40 } })
  await expect(page.locator('svg.chart.terrain')).toBeVisible()
  await pictures(page, `${prefix}-profile`, TWO_LOOKS)
  await page.keyboard.press('Escape')
  const memo = await exportMemo(page)
  writeFileSync(`${OUT}/${prefix}-memo.pdf`, memo.bytes)
  if (!pdfPictures(`${OUT}/${prefix}-memo.pdf`, `${OUT}/${prefix}-memo`)) console.log('no pdftoppm here: the memo is kept as PDF only')
}

test('walk through the demo', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await everySheet(page, 'demo', 'A', [...EVERY_LOOK, WIDE])
})

test('walk through what opens over the steps', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  for (const [words, title] of ASKED)
    await pictures(page, `over-${title.toLowerCase().replaceAll(' ', '-')}`, TWO_LOOKS, async () => {
      await page.keyboard.press('Control+k')
      await expect(page.getByRole('dialog', { name: 'Find a command' })).toBeVisible()
      if (words === '') return
      await page.getByRole('combobox', { name: /^Command/ }).fill(words)
      await page.keyboard.press('Enter')
      await expect(page.getByRole('dialog', { name: title })).toBeVisible()
    })
  await goTo(page, 'Memo')
  for (const title of ['Models and sources', 'Enter a measurement'])
    await pictures(page, `over-${title.toLowerCase().replaceAll(' ', '-')}`, TWO_LOOKS, async () => {
      await form(page, 'Memo').getByRole('button', { name: title }).click()
      await expect(page.getByRole('dialog')).toBeVisible()
    })
  await goTo(page, 'Candidates')
  await card(page, 'A').getByRole('button', { name: 'Edit A' }).click()
  await pictures(page, 'over-candidate', TWO_LOOKS)
  await page.getByRole('img', { name: /^Horizon/ }).click({ position: { x: 120, y: 40 } })
  for (const chart of ['Range-height diagram', 'Clutter by ring and octant', 'Suppression needed and available']) {
    await page.locator('.chart-panel').getByRole('button', { name: /Chart$/ }).click() // biome-ignore format: one line
    await page.getByRole('option', { name: chart }).click()
    await expect(page.locator('.chart-panel svg.chart')).toBeVisible()
    await pictures(page, `over-${chart.toLowerCase().replaceAll(' ', '-')}`, TWO_LOOKS)
  }
  await page.keyboard.press('Escape')
  await page.getByRole('button', { name: /^Against candidate: / }).click()
  await page.getByRole('menuitemradio', { name: /^B/ }).first().click()
  await pictures(page, 'over-difference', TWO_LOOKS)
  await chooseWord(page, 'How', 'two maps')
  await pictures(page, 'over-two-maps', TWO_LOOKS, async () => {
    const fold = form(page, 'Candidates').getByRole('button', { name: 'fold' })
    if (await fold.isVisible()) await fold.click()
    await expect(page.getByRole('application')).toHaveCount(2)
  })
  await chooseWord(page, 'Against candidate', 'nothing else')
  await goTo(page, 'Compare')
  const ranking = page.getByRole('region', { name: 'Ranking', exact: true })
  for (const figure of [/^Usable, Low over/, /^Mast height/]) await pick(ranking, /Add a figure/, figure)
  await page.getByRole('button', { name: 'Show what changes' }).click()
  await expect(page.getByRole('region', { name: 'Before and after', exact: true }).getByRole('table').first()).toBeVisible({
    timeout: LONG,
  })
  for (const part of ['Ranking', 'Before and after'])
    await pictures(page, `over-${part.toLowerCase().replaceAll(' ', '-')}`, TWO_LOOKS, (p) =>
      p.getByRole('region', { name: part, exact: true }).evaluate((section) => section.scrollIntoView({ block: 'start' })),
    )
  await pick(page.getByRole('region', { name: 'Rejected candidates', exact: true }), /Reject/, /^C /)
  await page.getByRole('textbox', { name: 'Reason' }).fill('No road to the top')
  await page.getByRole('textbox', { name: 'Reason' }).press('Enter')
  await everythingRun(page)
  await goTo(page, 'Candidates')
  await pictures(page, 'over-rejected-on-the-map', TWO_LOOKS)
})

test(`walk from the empty state with a real raster${sharedNote}`, async ({ page }) => {
  test.skip(!hasShared, 'no ../shared/data beside this checkout')
  await openEmpty(page)
  await pictures(page, 'real-0-empty')
  await goTo(page, 'Candidates')
  await pictures(page, 'real-0-empty-candidates', TWO_LOOKS)
  await goTo(page, 'Memo')
  await pictures(page, 'real-0-empty-memo', TWO_LOOKS)
  await goTo(page, 'Ground')
  await dropFiles(page, fileFrom(sharedPath('dem/bigtujunga30.tif')))
  await expectPainted(page, 'base')
  await pictures(page, 'real-1-ground', TWO_LOOKS)
  await goTo(page, 'Radar')
  const radar = form(page, 'Radar')
  await setField(radar, 'Name', 'Trial set')
  await setField(radar, 'Range', '8')
  await goTo(page, 'Need')
  await nextAction(page).click()
  const need = form(page, 'Need')
  await setField(need, 'Height', '9000')
  await choose(need, /Heights are/, 'above sea level')
  await pictures(page, 'real-2-need', TWO_LOOKS)
  const box = await map(page).boundingBox()
  await placeCandidate(page, { x: (box?.width ?? 600) * 0.4, y: (box?.height ?? 600) * 0.5 })
  await placeCandidate(page, '34°19′30″ N 118°02′30″ W')
  await everythingRun(page)
  await expect(map(page).getByRole('button', { name: /^Candidate / })).toHaveCount(2, { timeout: LONG })
  await everySheet(page, 'real', 'A', TWO_LOOKS)
})
