import { demoFiles, demoText, UPLAND, upland } from './made.ts'
import { expect, test } from './page.ts'
import {
  dropFiles,
  everythingRun,
  form,
  goTo,
  legend,
  openDemo,
  openEmpty,
  openFiles,
  placeCandidate,
  readComparison,
  savedFrom,
  setField,
} from './user.ts'

const ZIP = [0x50, 0x4b, 3, 4]

test('a package brings the same figures back', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  const before = await readComparison(page)
  const saved = await savedFrom(page, 'Save package')
  expect(saved.name).toMatch(/^ommerel-.*\.zip$/)
  expect([...saved.bytes.slice(0, 4)]).toEqual(ZIP)
  await openEmpty(page)
  await openFiles(page, saved)
  await everythingRun(page)
  expect(await readComparison(page)).toEqual(before)
})

test('a study and its files bring the same figures back, and save as they were', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, { name: 'study.json', bytes: new TextEncoder().encode(demoText()) }, ...demoFiles())
  await everythingRun(page)
  const before = await readComparison(page)
  expect(before).toHaveLength(9)
  const saved = await savedFrom(page, 'Save study')
  expect(JSON.parse(new TextDecoder().decode(saved.bytes))).toEqual(JSON.parse(demoText()))
  await openEmpty(page)
  await openFiles(page, saved, ...demoFiles())
  await everythingRun(page)
  expect(await readComparison(page)).toEqual(before)
})

test('a study without its files says which are missing and takes them when they come', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, { name: 'study.json', bytes: new TextEncoder().encode(demoText()) })
  await expect(page.getByText(/terrain\.tif.*named by the study, not here yet/)).toBeVisible()
  await expect(form(page, 'Ground')).toContainText('not here: drop terrain.tif on the page')
  await dropFiles(page, ...demoFiles())
  await everythingRun(page)
  expect(await readComparison(page)).toHaveLength(9)
})

test('what was made by hand is in the saved study', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, upland())
  await goTo(page, 'Radar')
  await setField(form(page, 'Radar'), 'Frequency', '9.4')
  await setField(form(page, 'Radar'), 'Range', '3')
  await placeCandidate(page, UPLAND.middle)
  await everythingRun(page)
  const saved = await savedFrom(page, 'Save study')
  const doc = JSON.parse(new TextDecoder().decode(saved.bytes))
  expect(doc).toMatchObject({
    format: 'sightfell-study',
    version: 1,
    terrain: [{ file: UPLAND.name }],
    radar: { frequencyHz: 9.4e9 },
    candidates: [{ id: 'A', mastHeightsM: [10, 20, 30] }],
  })
  expect(doc.candidates[0].lon).toBeCloseTo(-23.92, 6)
  expect(doc.candidates[0].lat).toBeCloseTo(-40.08, 6)
  expect(doc.run.maxRangeM).toBeCloseTo(3 * 1852, 3)
  await expect(legend(page)).toBeVisible()
})
