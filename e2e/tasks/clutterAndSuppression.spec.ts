import type { Page } from '@playwright/test'
import { formatAreaUp, formatMetPct, formatNumber, textOf } from '../../app/words/index.ts'
import { cellCentre, LAND_ROWS, type LonLat, polarShape, type StudyDoc } from '../../core/index.ts'
import { rowsOf } from '../../test/batch/tinyStudy.ts'
import { expect, test } from '../page.ts'
import {
  choose,
  chooseLayer,
  copied,
  everythingRun,
  form,
  goTo,
  numberIn,
  plain,
  readFigure,
  readOut,
  ringPlace,
  setField,
  textFile,
} from '../user.ts'
import { A, command, doc, memoTable, open, savedBeside, summaryOf } from './study.ts'

/** Uniform ground of −30 dB at every angle. */
const TABLE = textFile(
  'land-table.json',
  JSON.stringify({
    source: 'uniform, for a check',
    frequenciesMHz: [1000, 10_000],
    rows: Object.fromEntries(
      LAND_ROWS.map((name) => [name, [{ fromDeg: null, toDeg: null, meanDb: [-30, -30], spread1e3: 2, spread1e6: 2 }]]),
    ),
  }),
)
const RUN = { maxRangeM: 20_400, rangeStepM: 150, azimuthStepDeg: 0.325 }
/** S band, 1.3 MW, 33.5 dBi, 1.03 µs, 1.3°, noise figure 4 dB, 6 dB of losses; 1 m² at 100 m asked for with 13 dB. */
const study = (): StudyDoc =>
  doc({
    tables: { lowAngleLand: TABLE.name },
    radar: {
      name: 'S band',
      frequencyHz: 2.8e9,
      peakPowerW: 1.3e6,
      pulseWidthS: 1.03e-6,
      prfHz: [1000],
      noiseFigureDb: 4,
      systemLossDb: 6,
      antenna: { gainDbi: 33.5, azimuthBeamwidthDeg: 1.3, elevationBeamwidthDeg: 4, sidelobeDb: -200 },
    },
    needs: [{ id: 'n1', name: 'Low', kind: 'layer', heightM: 100, toRangeM: 20_300, rcsM2: 1, requiredRatioDb: 13 }],
    candidates: [{ ...doc().candidates[0]!, mastHeightsM: [40] }],
    run: RUN,
  })
/** Points along a direction of the map until the read-out says this range, opens the ledger there, and names the cell it is of. */
async function openLedger(page: Page, azimuthDeg: number, rangeM: number): Promise<LonLat> {
  const site = await ringPlace(page, 'A')
  const turn = (azimuthDeg * Math.PI) / 180
  const at = (px: number) => ({ x: site.x + px * Math.sin(turn), y: site.y - px * Math.cos(turn) })
  const nm = async (px: number): Promise<number> => {
    await page.mouse.move(at(px).x, at(px).y)
    await expect(readOut(page)).toContainText(/NM/)
    return Number(/· ([\d.]+) NM/.exec(plain(await readOut(page).innerText()))?.[1])
  }
  const scale = (await nm(120)) / 120
  const there = at(rangeM / 1852 / scale)
  await page.mouse.click(there.x, there.y)
  const heading = page.locator('.ledger').getByRole('heading')
  await expect(heading).toBeVisible()
  const rows = await ledgerShown(page)
  const shape = polarShape(RUN)
  const azimuth = Number(/azimuth (\d+\.\d)/.exec(plain(await heading.innerText()))?.[1])
  const gate = Math.round((numberIn(rows['Ground range'] ?? '') * 1852) / shape.rangeStepM - 0.5)
  return cellCentre(A, shape, Math.round(azimuth / shape.azimuthStepDeg) * shape.ranges + gate)
}
/** Every line of the ledger by its words. */
async function ledgerShown(page: Page): Promise<Record<string, string>> {
  const rows = await page
    .locator('.ledger tr')
    .evaluateAll((list) => list.map((r) => [...r.querySelectorAll('td')].map((c) => c.textContent ?? '')))
  return Object.fromEntries(rows.map(([label, value]) => [plain(label ?? ''), plain(value ?? '')]))
}
const suppressionGroup = (page: Page) =>
  form(page, 'Radar')
    .locator('.group')
    .filter({ has: page.getByRole('heading', { name: 'Clutter suppression' }) })

test('clutter by ring and octant, one cell by hand, suppression of 28 and 48 dB', async ({ page }, info) => {
  await open(page, study(), TABLE)
  const path = await savedBeside(page, info.outputPath('study'))
  const run = summaryOf(path)

  // one cell at 20 km: C/N of 56.3 dB by hand
  const at = await openLedger(page, 169, 20_025)
  const cellOf = async (of: string): Promise<Record<string, number>> =>
    JSON.parse(await command('cell', of, '--candidate', 'A', '--height', '40', '--at', `${at.lon},${at.lat}`)).results
  const two = (x: number | undefined) => plain(`${formatNumber(x ?? Number.NaN, 2)} dB`)
  const cell = await cellOf(path)
  expect((await ledgerShown(page))['C/N']).toBe(two(cell.clutter_to_noise_db))
  expect(Math.abs(cell.clutter_to_noise_db! - 56.3)).toBeLessThan(0.2)

  // all of them by ring and octant
  await page.keyboard.press('Escape')
  await page.getByRole('img', { name: /^Horizon/ }).click({ position: { x: 120, y: 40 } })
  const panel = page.locator('.chart-panel')
  await panel
    .getByRole('button', { name: /Chart$/ })
    .first()
    .click()
  await page.getByRole('option', { name: 'Clutter by ring and octant' }).click()
  await expect(panel.locator('svg.chart.levels')).toBeVisible()
  const rows = rowsOf((await copied(panel, 'Copy CSV')).replaceAll('\n', '\r\n'))
  const { figures } = (await run).options[0]!
  const [whole] = rows
  for (const [shown, key] of [
    ['mean', 'mean'],
    ['90', '90'],
    ['99', '99'],
  ])
    expect(Number(whole![`clutter_to_noise_${shown}_db`])).toBeCloseTo(figures[`clutter_to_noise_${key}_db`]!, 1)
  const over40 = (part: typeof rows) => part.reduce((sum, r) => sum + (Number(r.known_km2) * Number(r.over_40_db_pct)) / 100, 0)
  const rings = rows.filter((r) => r.to_m !== '' && r.octant === '')
  const octants = rows.filter((r) => r.to_m === '' && r.octant !== '')
  expect(rings).toHaveLength(3)
  expect(octants).toHaveLength(8)
  const km2 = figures.clutter_over_40_km2!
  for (const part of [rings, octants]) expect(Math.abs(over40(part) / km2 - 1)).toBeLessThan(0.002)
  expect(await readFigure(page, 'C/N over 40 dB')).toContain(plain(textOf(formatAreaUp(km2, 'nautical'))))
  await page.keyboard.press('Escape')

  // 1 m² over that clutter: short by 3.5 dB with 28 dB, enough with 48 dB
  await goTo(page, 'Radar')
  await choose(suppressionGroup(page), /Kind/, 'stated')
  const maps: number[] = []
  for (const [db, marginDb] of [
    [28, -3.5],
    [48, 16.5],
  ] as const) {
    await goTo(page, 'Radar')
    await setField(suppressionGroup(page), 'Suppression', String(db))
    await everythingRun(page)
    await chooseLayer(page, 'what it takes', 'suppression needed')
    await openLedger(page, 169, 20_025)
    const own = await savedBeside(page, info.outputPath(String(db)))
    const [there, worked] = await Promise.all([cellOf(own), summaryOf(own)])
    await expect.poll(async () => (await ledgerShown(page))['Low: signal margin']).toBe(two(there.need_n1_signal_margin_db))
    // by hand without noise; noise and the edge of the beam take under a decibel off
    expect(there.need_n1_signal_margin_db).toBeLessThan(marginDb + 0.2)
    expect(there.need_n1_signal_margin_db).toBeGreaterThan(marginDb - 1)
    const usable = worked.options[0]!.figures.need_n1_usable_pct!
    expect((await memoTable(page, /^Needs at k/))[0]?.['Usable, %']).toBe(formatMetPct(usable).value)
    maps.push(usable)
    await page.keyboard.press('Escape')
  }
  expect(maps[1]! - maps[0]!, 'another map').toBeGreaterThan(20)
})
