import type { Page } from '@playwright/test'
import { expect, test } from './page.ts'
import { everythingRun, form, goTo, map, openDemo, setField } from './user.ts'

/** What is measured here is printed; only what no machine should ever need is asserted. */
const LONG_TASK_BUDGET_MS = 50
const UNPAINTED_BUDGET_MS = 200
const median = (xs: number[]): number => [...xs].sort((a, b) => a - b)[Math.floor(xs.length / 2)] ?? 0

test('a run does not hold up the page', async ({ page }) => {
  await page.addInitScript(() => {
    const w = window as unknown as { longTasksMs: number[] }
    w.longTasksMs = []
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) w.longTasksMs.push(entry.duration)
    }).observe({ type: 'longtask', buffered: true })
  })
  await openDemo(page)
  await everythingRun(page)
  await goTo(page, 'Radar')
  const longest: number[] = []
  for (const watts of ['31', '32', '33']) {
    await page.waitForTimeout(500)
    await page.evaluate(() => ((window as unknown as { longTasksMs: number[] }).longTasksMs = []))
    await setField(form(page, 'Radar'), 'Peak power', watts)
    await everythingRun(page)
    longest.push(await page.evaluate(() => Math.max(0, ...(window as unknown as { longTasksMs: number[] }).longTasksMs)))
  }
  console.log(
    `longest task of the page in a run: median ${Math.round(median(longest))} ms of ${longest.map(Math.round).join(' ')} (budget ${LONG_TASK_BUDGET_MS} ms on a quiet machine; 0 = none over 50)`,
  )
  expect(median(longest)).toBeLessThan(20 * LONG_TASK_BUDGET_MS)
})

/** Notes when the last turn of the wheel came and when each sheet got a picture after it. */
async function watchWheel(page: Page): Promise<void> {
  await page.evaluate(() => {
    const w = window as unknown as { turnedAt: number; baseAt: number; overlayAt: number }
    window.addEventListener('wheel', (e) => Object.assign(w, { turnedAt: e.timeStamp, baseAt: 0, overlayAt: 0 }), true)
    const proto = ImageBitmapRenderingContext.prototype
    const give = proto.transferFromImageBitmap
    proto.transferFromImageBitmap = function (bitmap) {
      give.call(this, bitmap)
      const overlay = (this.canvas as HTMLCanvasElement).closest('.map-sheet.overlay') !== null
      Object.assign(w, { [overlay ? 'overlayAt' : 'baseAt']: performance.now() })
    }
  })
}
test('the map is painted again soon after each turn of the wheel', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  await watchWheel(page)
  const box = await map(page).boundingBox()
  await page.mouse.move((box?.x ?? 0) + 300, (box?.y ?? 0) + 400)
  const times: number[] = []
  for (const turn of [300, 300, -300, -300, -300, 300]) {
    await page.mouse.wheel(0, turn)
    const painted = await page.waitForFunction(
      () => {
        const { turnedAt, baseAt, overlayAt } = window as unknown as { turnedAt: number; baseAt: number; overlayAt: number }
        return turnedAt && baseAt > turnedAt && overlayAt > turnedAt ? Math.max(baseAt, overlayAt) - turnedAt : 0
      },
      null,
      { polling: 50 },
    )
    times.push(Number(await painted.jsonValue()))
    await page.waitForTimeout(300)
  }
  console.log(
    `wheel to painted ground and overlay: median ${Math.round(median(times))} ms of ${times.map(Math.round).join(' ')} (budget ${UNPAINTED_BUDGET_MS} ms on a quiet machine)`,
  )
  expect(median(times)).toBeLessThan(20 * UNPAINTED_BUDGET_MS)
})
