import type { Page } from '@playwright/test'
import { expect, test } from './page.ts'
import { expectRepainted, inkOf } from './sheets.ts'
import {
  card,
  dragCandidate,
  dragMast,
  everythingRun,
  expectStepState,
  goTo,
  map,
  mast,
  mastHeight,
  openDemo,
  plain,
  readOut,
  ringPlace,
  takeHold,
} from './user.ts'

const MOVES = 10
const BUDGET_MS = 100

/** Notes every pointer move, and when each picture of the overlay has been on screen for a frame: the second frame after it was handed over. */
async function watchHand(page: Page): Promise<void> {
  await page.evaluate(() => {
    const w = window as unknown as { movedAt: number; shownAt: number }
    w.movedAt = 0
    w.shownAt = 0
    window.addEventListener('pointermove', (e) => (w.movedAt = e.timeStamp), true)
    const proto = ImageBitmapRenderingContext.prototype
    const give = proto.transferFromImageBitmap
    proto.transferFromImageBitmap = function (bitmap) {
      give.call(this, bitmap)
      if ((this.canvas as HTMLCanvasElement).closest('.map-sheet.overlay'))
        requestAnimationFrame(() => requestAnimationFrame(() => (w.shownAt = performance.now())))
    }
  })
}
/** Moves the hand once and waits for the picture of that move; no earlier picture is under way, so the next one is its own. */
async function timedMove(page: Page, x: number, y: number): Promise<number> {
  await page.evaluate(() => Object.assign(window, { movedAt: 0, shownAt: 0 }))
  await page.mouse.move(x, y)
  const times = await page.waitForFunction(
    () => {
      const w = window as unknown as { movedAt: number; shownAt: number }
      return w.movedAt > 0 && w.shownAt > w.movedAt ? w.shownAt - w.movedAt : 0
    },
    null,
    // asking at every frame would take time from the picture waited for
    { polling: 50 },
  )
  return Number(await times.jsonValue())
}
const median = (xs: number[]): number => [...xs].sort((a, b) => a - b)[Math.floor(xs.length / 2)] ?? Number.NaN
function report(what: string, times: number[]): void {
  console.log(
    `${what}: pointer to pixels, median ${Math.round(median(times))} ms of ${times.map((t) => Math.round(t)).join(' ')} (budget ${BUDGET_MS} ms on a quiet machine)`,
  )
  // a picture that comes only with the full run would take seconds
  expect(median(times)).toBeLessThan(20 * BUDGET_MS)
}

test('a dragged candidate takes the map along', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await watchHand(page)
  const before = await inkOf(page, 'overlay')
  const at = await takeHold(page, 'A')
  await page.mouse.move(at.x + 6, at.y - 4)
  const trying = await expectRepainted(page, 'overlay', before)
  expect(trying.painted).toBeGreaterThan(10_000)
  await expect(page.getByText('on trial')).toBeVisible()
  await expect(readOut(page)).toContainText(/ground/)
  const times: number[] = []
  for (let n = 1; n <= MOVES; n++) times.push(await timedMove(page, at.x + 6 + 5 * n, at.y - 4 - 3 * n))
  report('candidate', times)
  await page.mouse.up()
  await expect(page.getByText('on trial')).toHaveCount(0)
  await expect(page.getByRole('button', { name: 'undo: moved A' })).toBeVisible()
  const now = await ringPlace(page, 'A')
  expect(Math.hypot(now.x - at.x - 56, now.y - at.y + 34), 'the ring stands where it was let go').toBeLessThan(2)
  await everythingRun(page)
})

test('a dragged mast takes the map along, and a height between joins the study', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Candidates')
  await watchHand(page)
  const before = await inkOf(page, 'overlay')
  const at = await takeHold(page, 'the mast')
  await page.mouse.move(at.x, at.y - 40)
  await expectRepainted(page, 'overlay', before)
  expect(await mastHeight(page)).toBeGreaterThan(10)
  const times: number[] = []
  for (let n = 1; n <= MOVES; n++) times.push(await timedMove(page, at.x, at.y - 40 - 9 * n))
  report('mast', times)
  await page.mouse.up()
  const between = await mastHeight(page)
  expect([10, 20, 35]).not.toContain(between)
  const add = page.getByRole('button', { name: /^Add / })
  await expect(add).toContainText(String(between))
  await add.click()
  const masts = card(page, 'A').getByRole('group', { name: /^Mast heights/ })
  await expect(masts.getByRole('button')).toHaveCount(4)
  await expectStepState(page, 'Compare', '10 options')
  await page.getByRole('button', { name: /^undo: changed masts of A/ }).click()
  await expect(masts.getByRole('button')).toHaveCount(3)
})

test('the mast snaps to stated heights; a let go that is refused changes nothing', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await mast(page).press('ArrowUp')
  expect(await mastHeight(page)).toBe(20)
  await expect(page.getByRole('button', { name: /^Mast height: 20/ })).toBeVisible()
  await mast(page).press('Shift+ArrowUp')
  expect(await mastHeight(page)).toBe(20.5)
  await mast(page).press('Escape')
  expect(await mastHeight(page)).toBe(20)
  const stood = await dragMast(page, -30)
  expect(stood).toBeGreaterThan(20)
  await page.getByRole('button', { name: 'Put back' }).click()
  expect(await mastHeight(page)).toBe(20)
  await expect(page.getByRole('button', { name: /^undo:/ })).toHaveCount(0)
})

test('a drag of the ground pans, a drag of another candidate selects it', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  const [a, b] = [await ringPlace(page, 'A'), await ringPlace(page, 'B')]
  const box = await map(page).boundingBox()
  if (!box) throw new Error('no map')
  const empty = { x: box.x + 40, y: box.y + box.height / 2 }
  await page.mouse.move(empty.x, empty.y)
  await page.mouse.down()
  await page.mouse.move(empty.x + 50, empty.y + 30)
  await page.mouse.move(empty.x + 80, empty.y + 40)
  await page.mouse.up()
  const panned = await ringPlace(page, 'A')
  expect(Math.hypot(panned.x - a.x - 80, panned.y - a.y - 40)).toBeLessThan(1.5)
  await dragCandidate(page, 'B', 25, 15)
  const moved = await ringPlace(page, 'B')
  expect(Math.hypot(moved.x - b.x - 105, moved.y - b.y - 55)).toBeLessThan(2)
  await expect(page.getByRole('button', { name: 'Candidate: B' })).toBeVisible()
  expect(plain(await page.getByRole('button', { name: /^undo/ }).innerText())).toBe('undo: moved B')
})
