import type { Page } from '@playwright/test'
import { hasShared, sharedNote, sharedPath } from '../test/helpers/sharedData.ts'
import { pdfFacts, UPLAND, upland } from './made.ts'
import { expect, test } from './page.ts'
import { expectPainted } from './sheets.ts'
import {
  card,
  choose,
  dropFiles,
  everythingRun,
  expectStepState,
  exportMemo,
  fileFrom,
  form,
  legend,
  map,
  memoColumn,
  type NamedFile,
  nextAction,
  openEmpty,
  placeCandidate,
  readColumn,
  readComparison,
  setField,
} from './user.ts'

// The main job, from nothing to the memo. That no request leaves the machine is watched over in every test (page.ts).

const STARTING = /starting values of a new study|starting values, not a radar/i

interface Job {
  readonly terrain: NamedFile
  readonly typed: string
  readonly typedShown: RegExp
  readonly rangeNm: string
  readonly heightFt: string
}
async function mainJob(page: Page, job: Job, pdfPath: string): Promise<void> {
  await openEmpty(page)
  await expect(nextAction(page)).toHaveText('Add terrain')
  await dropFiles(page, job.terrain)
  await expectStepState(page, 'Ground', 'ready')
  const hillshade = await expectPainted(page, 'base')
  expect(hillshade.spread, 'relief is seen').toBeGreaterThan(5)
  await expect(form(page, 'Ground')).toContainText(`${job.terrain.name}:`)

  await expect(nextAction(page)).toHaveText('Radar next')
  await nextAction(page).click()
  const radar = form(page, 'Radar')
  await expect(radar).toContainText(STARTING)
  await setField(radar, 'Name', 'Trial set')
  await setField(radar, 'Frequency', '2.9')
  await setField(radar, 'Peak power', '18')
  await setField(radar, 'Range', job.rangeNm)
  await expectStepState(page, 'Radar', 'ready')
  await expect(radar).not.toContainText(STARTING)

  await nextAction(page).click()
  await expect(nextAction(page)).toHaveText('State a need')
  await nextAction(page).click()
  const need = form(page, 'Need')
  await setField(need, 'Height', job.heightFt)
  await choose(need, /Heights are/, 'above sea level')
  await expectStepState(page, 'Need', '1 stated')

  await nextAction(page).click()
  await expect(nextAction(page)).toHaveText('Place on map')
  const box = await map(page).boundingBox()
  await placeCandidate(page, { x: Math.round((box?.width ?? 0) * 0.45), y: Math.round((box?.height ?? 0) * 0.5) })
  await expect(card(page, 'A')).toBeVisible()
  await placeCandidate(page, job.typed)
  await expect(card(page, 'B')).toContainText(job.typedShown)
  await expectStepState(page, 'Candidates', '2 placed')

  await everythingRun(page)
  await expectPainted(page, 'overlay')
  await expect(legend(page)).toContainText('Clutter-to-noise')
  await expect(memoColumn(page)).toContainText('Place B')
  const rows = await readComparison(page)
  expect(rows).toHaveLength(6)
  for (const share of await readColumn(page, /^usable/i)) expect(share).toBeGreaterThanOrEqual(0)
  expect(new Set(rows.map((r) => r.slice(2).join())).size, 'options differ').toBeGreaterThan(1)

  const memo = await exportMemo(page)
  expect(new TextDecoder().decode(memo.bytes.slice(0, 5))).toBe('%PDF-')
  expect(memo.bytes.length).toBeGreaterThan(20_000)
  const { pages, text } = pdfFacts(memo.bytes, pdfPath)
  if (pages === null || text === null) console.log('no poppler tools here: pages of the memo not counted')
  else {
    expect(pages).toBeGreaterThan(4)
    expect(text).toContain('Draft: prediction, not for construction or operation')
    expect(text).toContain('Trial set')
    expect(text).toContain(job.terrain.name)
  }
}

test('from a dropped GeoTIFF to the memo', async ({ page }, info) => {
  await mainJob(
    page,
    { terrain: upland(), typed: UPLAND.middle, typedShown: /40°04′48\.0″\s?S\s+0?23°55′12\.0″\s?W/, rangeNm: '3', heightFt: '1500' },
    info.outputPath('memo.pdf'),
  )
})

test(`from a real raster to the memo${sharedNote}`, async ({ page }, info) => {
  test.skip(!hasShared, 'no ../shared/data beside this checkout')
  await mainJob(
    page,
    {
      terrain: fileFrom(sharedPath('dem/bigtujunga30.tif')),
      typed: '34°19′30″ N 118°02′30″ W',
      typedShown: /34°19′30\.0″\s?N\s+118°02′30\.0″\s?W/,
      rangeNm: '6',
      heightFt: '9000',
    },
    info.outputPath('memo.pdf'),
  )
})
