import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { formatAreaDown, formatAreaUp, formatExposure, formatHeight, textOf, withMetric } from '../../app/words/index.ts'
import { exposureRangeM, wavelengthM } from '../../core/index.ts'
import { pdfFacts } from '../made.ts'
import { expect, test } from '../page.ts'
import { expectPainted } from '../sheets.ts'
import {
  card,
  choose,
  chooseLayer,
  dropFiles,
  everythingRun,
  exportMemo,
  form,
  goTo,
  LONG,
  legend,
  memoColumn,
  openEmpty,
  plain,
  savedFrom,
  setField,
} from '../user.ts'
import { command, doc, from, memoText, open, rowsShown, savedBeside, summaryOf } from './study.ts'

test('clutter of earlier pulses, one pulse repetition frequency and two staggered', async ({ page }, info) => {
  await open(
    page,
    doc({
      run: { maxRangeM: 9_000, rangeStepM: 150, azimuthStepDeg: 1, foldRangeM: 14_000 },
      candidates: [{ ...doc().candidates[0]!, mastHeightsM: [10] }],
    }),
  )
  // what the ridge at 12 km is taken for at 14 000 and at 15 500 Hz
  const folded: string[] = []
  for (const prf of ['14000', '14000, 15500']) {
    await goTo(page, 'Radar')
    const radar = form(page, 'Radar')
    await setField(radar, 'PRF', prf)
    if (prf.includes(',')) await choose(radar, /PRF change/, 'pulse to pulse')
    await everythingRun(page)
    await chooseLayer(page, 'what comes back', 'clutter of an earlier pulse')
    await expectPainted(page, 'overlay')
    await expect(legend(page)).toContainText('Second-time-around clutter')
    const { figures } = (await summaryOf(await savedBeside(page, info.outputPath(`at-${folded.length}`)))).options[0]!
    const km2 = figures.second_time_around_km2!
    expect(km2).toBeGreaterThan(1)
    await expect(memoColumn(page)).toContainText('Folded from earlier pulses', { timeout: LONG })
    const shown = textOf(formatAreaUp(km2, 'nautical'))
    await expect
      .poll(async () => memoText(page))
      .toMatch(new RegExp(`Folded from earlier pulses k = 4/3 ${plain(shown).replace(/[.²]/g, '\\$&')}`))
    folded.push(shown)
  }
  expect(folded[0]).not.toBe(folded[1])
})

test('exposure, and the memo of candidate B in feet and metres, magnetic and true; opened again the numbers are the same', async ({
  page,
}, info) => {
  const b = from(200, 1500)
  await open(
    page,
    doc({
      radar: {
        ...doc().radar,
        frequencyHz: 2.75e9,
        peakPowerW: 750_000,
        pulseWidthS: 2.3e-6,
        rotationRpm: 12,
        antenna: { gainDbi: 45.5, azimuthBeamwidthDeg: 4, apertureWidthM: 8.8, apertureHeightM: 8.8 },
      },
      needs: [{ id: 'n1', name: 'Low layer', kind: 'layer', heightM: 300, toRangeM: 9_000 }],
      run: { maxRangeM: 10_000, rangeStepM: 170, azimuthStepDeg: 1 },
      declination: { valueDeg: 10, date: '2026-06-01', model: 'by hand' },
      candidates: [
        { ...doc().candidates[0]!, mastHeightsM: [10] },
        { id: 'B', name: 'South', lon: b.lon, lat: b.lat, mastHeightsM: [20] },
      ],
    }),
  )
  const showB = async (): Promise<string> => {
    await everythingRun(page)
    await goTo(page, 'Candidates')
    await card(page, 'B').getByRole('group', { name: 'Mast heights of B' }).getByRole('button').click()
    await expect(memoColumn(page)).toContainText('B South at 20')
    await expect(memoColumn(page)).toContainText('k = 2.75', { timeout: LONG })
    return memoText(page)
  }
  const first = await showB()
  await goTo(page, 'Memo')
  await expect(form(page, 'Memo')).toContainText('Keep clear, antenna stopped, main beam', { timeout: LONG })
  const exposure = Object.fromEntries((await rowsShown(form(page, 'Memo'))).map((r) => [r[0], r[1] ?? '']))
  // mean power 1 725 W and 45.5 dBi: 698 m to 10 W/m², twice that where the ground reflects all
  const duty = 2.3e-6 * 1000
  const farM = exposureRangeM(750_000 * duty, 45.5, 10)
  expect(Math.abs(farM - 697.9)).toBeLessThan(0.5)
  const clear = plain(textOf(formatExposure(2 * farM)))
  expect(exposure['Keep clear, antenna stopped, main beam']).toContain(clear)
  expect(exposure['Antenna turning, averaged over a turn']).toBe('not given: inside 0.6 D²/λ')
  expect(exposure['Average power, highest duty']).toMatch(/duty 0\.23 %/)
  expect(exposure.Limit).toMatch(/^10 W\/m², general public/)
  expect(exposure['0.6 D²/λ']).toContain(plain(textOf(formatExposure((0.6 * 8.8 ** 2) / wavelengthM(2.75e9)))))

  // the package, opened on an empty page
  const saved = await savedFrom(page, 'Save package')
  const path = await savedBeside(page, info.outputPath('study'))
  const out = join(info.outputDir, 'run')
  const run = command('run', path, '--out', out, '--candidate', 'B')
  await openEmpty(page)
  await dropFiles(page, saved)
  expect(await showB()).toBe(first)

  // the memo, magnetic; feet with metres in brackets
  await page.getByRole('button', { name: /^Azimuths from true north/ }).click()
  const north = page.getByRole('dialog', { name: 'North' })
  await north.getByRole('button', { name: /Azimuths from/ }).click()
  await page.getByRole('option', { name: 'magnetic north' }).click()
  await page.keyboard.press('Escape')
  const { bytes } = await exportMemo(page)
  await run
  const [shown, batch] = [bytes, readFileSync(join(out, 'memo.pdf'))].map((pdf, n) => pdfFacts(pdf, info.outputPath(`memo-${n}.pdf`)).text)
  if (!shown || !batch) console.log('no poppler tools here: words of the memo not read')
  else {
    const [own, theirs] = [plain(shown), plain(batch)]
    expect(own).toMatch(/\d°M/)
    expect(own).toContain('declination 10.0° E on 2026-06-01 (by hand)')
    expect(theirs).toContain('Azimuths are counted from true north')
    const lead = /has \d+ % in sight, \d+ % detectable and \d+ % usable/.exec(first)?.[0] ?? 'no sentence'
    for (const words of [lead, `is to be kept clear to ${clear}`]) for (const text of [own, theirs]) expect(text).toContain(words)
    // the batch memo is metric: its numbers stand in brackets after those of the face
    const { figures } = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8')).options[0]
    for (const km2 of [figures.ground_in_sight_km2, figures.clutter_over_40_km2]) {
      const format = km2 === figures.ground_in_sight_km2 ? formatAreaDown : formatAreaUp
      expect(theirs).toContain(plain(textOf(format(km2, 'metric'))))
      expect(first).toContain(plain(withMetric((system) => format(km2, system), 'nautical')))
    }
    const over40 = withMetric((system) => formatAreaUp(figures.clutter_over_40_km2, system), 'nautical')
    expect(own).toContain(`${plain(over40)} stand over 40 dB`)
    expect(own).toContain(plain(withMetric((system) => formatHeight(figures.antenna_m, system), 'nautical')))
  }
})
