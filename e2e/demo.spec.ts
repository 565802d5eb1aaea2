import { expect, test } from './page.ts'
import { expectPainted, inkOf } from './sheets.ts'
import {
  chooseLayer,
  everythingRun,
  form,
  legend,
  map,
  memoColumn,
  numberIn,
  openDemo,
  plain,
  readColumn,
  readComparison,
  readFigure,
  readOut,
  ringPlace,
  STEP_NAMES,
  stepState,
} from './user.ts'

test('the demo opens and C/N is on the map', async ({ page }) => {
  const paintedMs = await openDemo(page)
  console.log(`navigation to painted C/N: ${Math.round(paintedMs)} ms (budget 5000 ms on a quiet machine)`)
  const ink = await expectPainted(page, 'overlay')
  expect(ink.share, 'share of the view that is painted').toBeGreaterThan(0.1)
  expect(ink.warm, 'clutter is drawn warm').toBeGreaterThan(10_000)
  await expect(legend(page)).toContainText('Clutter-to-noise')
  await expect(page.getByRole('button', { name: 'Quantity: C/N' })).toBeVisible()
  // far over any machine's need: a hang, not a slow one, fails here
  expect(paintedMs).toBeLessThan(60_000)
})

test('every step says how it stands, every option is compared, the memo writes itself', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  expect(await Promise.all(STEP_NAMES.map((s) => stepState(page, s)))).toEqual([
    'ready',
    'ready',
    '2 stated',
    '3 placed',
    '9 options',
    'draft',
  ])
  await expect(memoColumn(page)).toContainText('Vennet airfield')
  expect(numberIn(await readFigure(page, 'C/N, highest'))).toBeGreaterThan(40)
  const rows = await readComparison(page)
  expect(rows).toHaveLength(9)
  const [inSight, detectable, usable] = await Promise.all([/^in sight/i, /^detectable/i, /^usable/i].map((head) => readColumn(page, head)))
  rows.forEach((row, i) => {
    const three = [100, inSight[i], detectable[i], usable[i], 0] as number[]
    expect(three, row.join(' | ')).toEqual([...three].sort((a, b) => b - a))
  })
  // a higher mast of the same place never sees less
  for (const first of [0, 3, 6]) {
    const seen = inSight.slice(first, first + 3)
    expect(seen, rows[first]?.join(' | ')).toEqual([...seen].sort((a, b) => a - b))
  }
  expect(rows.filter((r) => r.includes('passes')).length, 'one option passes').toBeGreaterThan(0)
  expect(rows.filter((r) => r.includes('not met')).length, 'another does not').toBeGreaterThan(0)
})

const LAYERS: readonly (readonly [question: string, quantity: string, title: string, tone: 'ink' | 'warm' | 'cool'])[] = [
  ['what is hidden', 'masked ground', 'Masked ground', 'ink'],
  ['what is seen', 'coverage floor', 'Coverage floor', 'cool'],
  ['what is seen', 'height to see', 'Height to see', 'cool'],
  ['what comes back', 'depression angle', 'Depression angle', 'warm'],
  ['what comes back', 'clutter strength', 'Clutter strength', 'warm'],
  ['what comes back', 'C/N', 'Clutter-to-noise', 'warm'],
  ['what it takes', 'suppression needed', 'Suppression needed', 'warm'],
]
test('each of the seven layers paints a picture of its own', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  // C/N is there already and is what a question starts with: no other layer may look like it
  const start = await expectPainted(page, 'overlay')
  const looks = new Set([start.mark])
  for (const [question, quantity, title, tone] of LAYERS) {
    await chooseLayer(page, question, quantity)
    await expect(legend(page)).toContainText(title)
    // the picture of the layer before is still there for a moment
    let ink = await inkOf(page, 'overlay')
    const itsOwn = () =>
      ink.painted > 20_000 &&
      (tone === 'ink'
        ? ink.warm + ink.cool < 0.01 * ink.painted
        : ink[tone] > 2000 && ink[tone] > 5 * ink[tone === 'warm' ? 'cool' : 'warm'])
    await expect
      .poll(
        async () => {
          ink = await inkOf(page, 'overlay')
          return itsOwn() && (quantity === 'C/N' ? ink.mark === start.mark : !looks.has(ink.mark))
        },
        { timeout: 60_000, message: `${quantity} painted, ${tone}` },
      )
      .toBe(true)
    looks.add(ink.mark)
  }
  expect(looks.size).toBe(LAYERS.length)
})

test('a click on a cell opens its ledger, which agrees with the read-out', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  const box = await map(page).boundingBox()
  if (!box) throw new Error('no map')
  const site = await ringPlace(page, 'A')
  const ledger = page.locator('.ledger')
  let compared = 0
  for (const [dx, dy] of [
    [60, 20],
    [-45, -30],
    [40, -70],
  ] as const) {
    const at = { x: site.x + dx, y: site.y + dy }
    await page.mouse.move(at.x, at.y)
    // the map is conformal: the angle on the screen is the azimuth, to a degree
    const azimuth = (Math.atan2(dx, -dy) * 180) / Math.PI
    await expect
      .poll(async () => Math.abs(((azimuthIn(plain(await readOut(page).innerText())) - azimuth + 540) % 360) - 180), { message: 'azimuth' })
      .toBeLessThan(1)
    await expect(readOut(page)).toContainText(/C\/N|masked|below noise/)
    const shown = plain(await readOut(page).innerText())
    await page.mouse.click(at.x, at.y)
    await expect(ledger).toBeVisible()
    const heading = plain(await ledger.getByRole('heading').innerText())
    // the ledger is that of the painted cell, a quarter of a degree wide
    expect(Math.abs(azimuthIn(heading.replace('azimuth', 'az')) - azimuthIn(shown)), heading).toBeLessThan(0.25)
    const rows = await Promise.all((await ledger.locator('tbody tr').all()).map((r) => r.locator('td').allInnerTexts()))
    const total = rows.find(([label]) => plain(label ?? '') === 'C/N')
    const read = /C\/N ([−-]?[\d.]+) dB/.exec(shown)?.[1]
    if (read && total) {
      // the read-out is rounded up to whole decibels, the ledger is not
      const over = numberIn(read) - numberIn(total[1] ?? '')
      expect(over, `${shown} against ${total.map(plain).join(' ')}`).toBeGreaterThanOrEqual(-0.005)
      expect(over, `${shown} against ${total.map(plain).join(' ')}`).toBeLessThan(1)
      compared++
    }
    await page.keyboard.press('Escape')
    await expect(ledger).toHaveCount(0)
  }
  expect(compared, 'cells with a number').toBeGreaterThan(0)
})
const azimuthIn = (text: string): number => Number(/az (\d+\.\d)/.exec(text)?.[1])

test('the terrain profile opens from the horizon and closes again', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  const strip = page.getByRole('img', { name: /^Horizon/ })
  await strip.click({ position: { x: 120, y: 40 } })
  const profile = page.getByRole('application', { name: /^Terrain profile, A at/ })
  await expect(profile).toBeVisible()
  const chart = page.locator('svg.chart.terrain')
  await expect(chart).toBeVisible()
  expect(await chart.locator('path').count()).toBeGreaterThan(3)
  await page.getByRole('button', { name: 'Close', exact: true }).click()
  await expect(profile).toHaveCount(0)
  await expect(form(page, 'Ground')).toBeVisible()
})
