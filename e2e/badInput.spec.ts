import { spawn } from 'node:child_process'
import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import type { Page } from '@playwright/test'
import { smallDoc, UPLAND, upland } from './made.ts'
import { expect, test } from './page.ts'
import {
  dropFiles,
  everythingRun,
  expectStepState,
  form,
  goTo,
  type NamedFile,
  openEmpty,
  plain,
  readComparison,
  type StepName,
  setField,
  textFile,
} from './user.ts'

// Each kind of bad input: one sentence from the batch command, the same in the app, and nothing lost.

const smallText = (): string => JSON.stringify(smallDoc(), null, 2)
const study = (text = smallText()): NamedFile => textFile('study.json', text)
const changed = (change: (doc: ReturnType<typeof smallDoc>) => void): string => {
  const doc = smallDoc()
  change(doc)
  return JSON.stringify(doc, null, 2)
}

interface Case {
  readonly name: string
  readonly text?: string
  readonly terrain?: NamedFile
  /** `ground`: the study opens, its terrain cannot be read. `refused`: the study is not opened, the one before stays. `field`: it opens and the value waits to be put right. */
  readonly kind: 'ground' | 'refused' | 'field'
  readonly says: RegExp
  /** Only a ground shows it: said where the candidate stands, without file and key. */
  readonly onCard?: boolean
  /** Puts it right in the app, for `field`. */
  readonly repair?: (page: Page) => Promise<void>
  readonly step?: StepName
}
const bytesNamed = (bytes: Uint8Array): NamedFile => ({ name: UPLAND.name, bytes })
const editA = async (page: Page, label: string, value: string) => {
  await goTo(page, 'Candidates')
  const open = page.getByRole('button', { name: 'Edit A', exact: true })
  if (await open.isVisible()) await open.click()
  await setField(form(page, 'Candidates'), label, value)
}
const CASES: readonly Case[] = [
  {
    name: 'not a TIFF',
    terrain: bytesNamed(new TextEncoder().encode('<html><body>404 not found</body></html>')),
    kind: 'ground',
    says: /^upland\.tif.*TIFF/,
  },
  { name: 'truncated TIFF', terrain: bytesNamed(upland().bytes.slice(0, 40_000)), kind: 'ground', says: /^upland\.tif/ },
  { name: 'no CRS', terrain: upland(UPLAND.name, { geoKeys: null }), kind: 'ground', says: /terrain\[0\]\.crs/ },
  {
    name: 'all no data',
    terrain: upland(UPLAND.name, { at: () => -9999, nodata: '-9999' }),
    kind: 'ground',
    says: /^upland\.tif.*no data/,
  },
  {
    name: 'huge declared size',
    terrain: upland(UPLAND.name, { overrule: { 256: [400_000], 257: [400_000] } }),
    kind: 'ground',
    says: /^upland\.tif/,
  },
  {
    name: 'candidate off the terrain',
    text: changed((d) => Object.assign(d.candidates[0]!, { lon: -20 })),
    kind: 'field',
    says: /candidates\[0\].*off the terrain/,
    onCard: true,
    step: 'Candidates',
    repair: (page) => editA(page, 'Position', UPLAND.middle),
  },
  {
    name: 'mast height −5',
    text: changed((d) => Object.assign(d.candidates[0]!, { mastHeightsM: [-5] })),
    kind: 'field',
    says: /candidates\[0\]\.mastHeightsM\[0\].*-5 m/,
    step: 'Candidates',
    repair: (page) => editA(page, 'Mast heights', '10, 20'),
  },
  {
    name: 'JSON syntax error',
    text: smallText().replace('"version": 1,', '"version": 1'),
    kind: 'refused',
    says: /^study\.json, line 4, column \d+/,
  },
  {
    name: 'misspelt key',
    text: smallText().replace('"peakPowerW"', '"peakPowrW"'),
    kind: 'field',
    says: /radar\.peakPowrW.*did you mean "peakPowerW"\?/,
    step: 'Radar',
    repair: async (page) => {
      await page.getByRole('button', { name: 'Drop the key' }).click()
      await setField(form(page, 'Radar'), 'Peak power', '18')
    },
  },
  {
    name: 'frequency over 40 GHz',
    text: changed((d) => Object.assign(d.radar, { frequencyHz: 5e10 })),
    kind: 'field',
    says: /radar\.frequencyHz.*50 GHz/,
    step: 'Radar',
    repair: (page) => setField(form(page, 'Radar'), 'Frequency', '2.9'),
  },
  {
    name: 'frequency under 30 MHz',
    text: changed((d) => Object.assign(d.radar, { frequencyHz: 1e7 })),
    kind: 'field',
    says: /radar\.frequencyHz.*10 MHz|radar\.frequencyHz.*0\.01 GHz/,
    step: 'Radar',
    repair: (page) => setField(form(page, 'Radar'), 'Frequency', '2.9'),
  },
  { name: 'wrong version', text: smallText().replace('"version": 1', '"version": 2'), kind: 'refused', says: /version is 2/ },
]

/** Runs the batch command on a study folder. */
function batch(dir: string): Promise<{ code: number | null; out: string; err: string }> {
  return new Promise((done) => {
    const args = ['--import', 'tsx', 'app/batch/main.ts', 'horizon', join(dir, 'study.json'), '--candidate', 'A', '--height', '20']
    const child = spawn(process.execPath, args)
    let [out, err] = ['', '']
    child.stdout.on('data', (chunk) => (out += chunk))
    child.stderr.on('data', (chunk) => (err += chunk))
    child.on('close', (code) => done({ code, out, err }))
  })
}
/** What was found and what to do: the sentence without the place, which the app shows by where it stands. */
const clauses = (sentence: string): string => sentence.replace(/^.*?: /, '').replace(/\.$/, '')

for (const { name, text, terrain, kind, says, step, onCard, repair } of CASES)
  test(`bad input: ${name}`, async ({ page }, info) => {
    const dir = info.outputPath('study')
    mkdirSync(dir, { recursive: true })
    const files = [study(text), terrain ?? upland()]
    for (const f of files) writeFileSync(join(dir, f.name), f.bytes)
    const ran = batch(dir)

    await openEmpty(page)
    await dropFiles(
      page,
      textFile(
        'study.json',
        changed((d) => Object.assign(d, { name: 'Kept safe' })),
      ),
      upland(),
    )
    await everythingRun(page)
    const before = await readComparison(page)
    expect(before).toHaveLength(2)
    await goTo(page, 'Ground')

    const { code, out, err } = await ran
    const sentence = err.trimEnd()
    expect(sentence).toMatch(says)
    expect(sentence.split('\n')).toHaveLength(1)
    expect(sentence.length).toBeLessThanOrEqual(240)
    expect(sentence).not.toMatch(/Error:|^\s+at /m)
    expect(out).toBe('')
    expect(code).toBe(2)

    await dropFiles(page, ...files)
    if (step) await goTo(page, step)
    const said = page.getByRole('alert').filter({ hasText: clauses(plain(sentence)) })
    await expect(said.first(), sentence).toBeVisible()
    if (!onCard) await expect(said.filter({ hasText: sentence }), 'the whole sentence, place included').toBeVisible()

    const studyName = page.getByRole('textbox', { name: 'Study name' })
    if (kind === 'refused') {
      await expect(studyName).toHaveValue('Kept safe')
      expect(await readComparison(page), 'the study before').toEqual(before)
      return
    }
    await expect(studyName).toHaveValue('Upland trial')
    await goTo(page, 'Radar')
    await expect(form(page, 'Radar').getByRole('textbox', { name: 'Azimuth beamwidth' })).toHaveValue('1.8')
    if (repair) await repair(page)
    else await dropFiles(page, upland())
    await expectStepState(page, 'Compare', '2 options')
    await everythingRun(page)
    expect(await readComparison(page), 'put right, the same figures').toEqual(before)
  })

test('a file of no use is named and changes nothing', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, study(), upland())
  await everythingRun(page)
  const before = await readComparison(page)
  await dropFiles(page, textFile('notes.docx', 'hello'))
  await expect(page.getByRole('alert')).toContainText('notes.docx: neither GeoTIFF, GeoJSON, CSV, study nor package; give a')
  expect(await readComparison(page)).toEqual(before)
})

test('terrain that cannot be read is taken back by undo, with every figure', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, study(), upland())
  await everythingRun(page)
  const before = await readComparison(page)
  await goTo(page, 'Ground')
  await dropFiles(page, { name: 'second.tif', bytes: new TextEncoder().encode('not a raster') })
  await expect(
    page
      .getByRole('alert')
      .filter({ hasText: /^(The ground could not be read)?second\.tif.*TIFF/ })
      .first(),
  ).toBeVisible()
  await page.getByRole('button', { name: 'undo: added second.tif' }).click()
  await everythingRun(page)
  expect(await readComparison(page)).toEqual(before)
})

test('a number out of range stays in its field with the reason, and the study keeps the one before', async ({ page }) => {
  await openEmpty(page)
  await dropFiles(page, study(), upland())
  await everythingRun(page)
  await goTo(page, 'Radar')
  const field = form(page, 'Radar').getByRole('textbox', { name: 'Frequency' })
  for (const [typed, why] of [
    ['50', /40 GHz/],
    ['0.01', /from 0\.03 to 40 GHz/],
    ['abc', /number/],
  ] as const) {
    await field.fill(typed)
    await field.press('Enter')
    await expect(form(page, 'Radar').getByRole('alert')).toContainText(why)
    await expect(field).toHaveValue(typed)
    await expectStepState(page, 'Compare', '2 options')
  }
  await field.press('Escape')
  await expect(field).toHaveValue('2.9')
})
