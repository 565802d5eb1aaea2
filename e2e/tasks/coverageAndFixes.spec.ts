import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import {
  formatAreaDown,
  formatFloor,
  formatHeight,
  formatMargin,
  formatMetPct,
  formatPd,
  formatPlaceRange,
  formatRange,
  formatRangeUp,
  formatRoad,
  type Quantity,
  textOf,
} from '../../app/words/index.ts'
import type { StudyDoc } from '../../core/index.ts'
import { expect, test } from '../page.ts'
import {
  choose,
  dropFiles,
  everythingRun,
  expectStepState,
  form,
  goTo,
  LONG,
  legend,
  memoColumn,
  numberIn,
  plain,
  setField,
  textFile,
} from '../user.ts'
import { command, doc, from, memoTable, memoText, open, savedBeside, summaryOf, table } from './study.ts'

const FT = 0.3048
const LEVELS_FT = [1000, 3000, 5000, 10_000]
const face = (q: Quantity): string => plain(q.value)
const csv = (head: string, rows: readonly (readonly (string | number)[])[]) => [head, ...rows.map((r) => r.join(','))].join('\n')

/** Middle of the range gate over a range, m: there cell and place are the same. */
const gateAt = (nm: number): number => (Math.floor((nm * 1852) / 150) + 0.5) * 150
/** By place in the list: two in the open to the south at the lowest level, two in the lee of the ridge; range and height, m. */
const SOUTH = [5, 7]
const OWN: Readonly<Record<number, readonly [number, number]>> = {
  2: [14_700, 150],
  3: [13_500, 220],
  5: [gateAt(2), 1000 * FT],
  7: [gateAt(7), 1000 * FT],
}
/** Twelve fixes round A. */
const FIXES = Array.from({ length: 12 }, (_, n) => {
  const [rangeM, altM] = OWN[n] ?? [n % 2 === 0 ? 8_000 : 13_500, 150 + 60 * n]
  return { name: `FIX${n + 1}`, ...from(30 * n, rangeM), altM }
})
/** A path of 3° down to half a mile short of a threshold behind the hill, from the north. */
const THRESHOLD = from(280, 10_000)
const APPROACH = [8, 0.5].map((nm) => ({
  lon: THRESHOLD.lon,
  lat: THRESHOLD.lat + (nm * 1852) / 110_574,
  altM: 40 + nm * 1852 * Math.tan((3 * Math.PI) / 180),
}))
const MOTORWAY = [from(100, 3000), from(60, 9000), from(20, 12_000)]
const RAIL = [from(300, 4000), from(270, 9000)]
const line = (properties: object, path: readonly { lon: number; lat: number }[]) => ({
  type: 'Feature',
  properties,
  geometry: { type: 'LineString', coordinates: path.map((p) => [p.lon, p.lat]) },
})

test('four levels, twelve fixes, an approach, a motorway and a railway', async ({ page }, info) => {
  await open(
    page,
    doc({
      radar: { ...doc().radar, suppression: { kind: 'stated', statedDb: 45 } },
      candidates: [{ ...doc().candidates[0]!, mastHeightsM: [10] }],
    }),
  )
  await goTo(page, 'Need')
  const need = form(page, 'Need')
  for (const ft of LEVELS_FT) {
    await need.getByRole('button', { name: 'Add a layer need' }).click()
    const card = need.locator('.card.need').last()
    await setField(card, 'Height', String(ft))
    await setField(card, 'To range', '7')
  }
  await dropFiles(
    page,
    textFile(
      'fixes.csv',
      csv(
        'name,lon,lat,alt_m_msl',
        FIXES.map((f) => [f.name, f.lon, f.lat, f.altM]),
      ),
    ),
    textFile(
      'approach.csv',
      csv(
        'lon,lat,alt_m_msl',
        APPROACH.map((p) => [p.lon, p.lat, p.altM]),
      ),
    ),
    textFile(
      'roads.geojson',
      JSON.stringify({
        type: 'FeatureCollection',
        features: [line({ highway: 'motorway' }, MOTORWAY), line({ railway: 'rail' }, RAIL)],
      }),
    ),
  )
  await expectStepState(page, 'Need', '6 stated')
  await everythingRun(page)
  await expect(memoColumn(page)).toContainText('at k = 2.75', { timeout: LONG })
  const path = await savedBeside(page, info.outputPath('study'))
  const saved = JSON.parse(readFileSync(path, 'utf8')) as StudyDoc
  const run = summaryOf(path)

  // places for the command: the fixes, then the approach every fifty metres
  const along = Array.from({ length: 281 }, (_, n) => {
    const [a, b] = APPROACH as [(typeof APPROACH)[0], (typeof APPROACH)[0]]
    const t = n / 280
    return { lon: a.lon, lat: a.lat + t * (b.lat - a.lat), altM: a.altM + t * (b.altM - a.altM) }
  })
  const file = join(info.outputDir, 'places.csv')
  writeFileSync(
    file,
    csv(
      'lon,lat',
      [...FIXES, ...along].map((p) => [p.lon, p.lat]),
    ),
  )
  const places = await table('points', path, '--candidate', 'A', '--height', '10', '--points', file)
  const { figures, roads } = (await run).options[0]!

  // the four levels: shares and area
  const layers = (saved.needs ?? []).filter((n) => n.kind === 'layer')
  const nested = await memoTable(page, /^Needs at k/)
  expect(layers).toHaveLength(4)
  for (const [n, layer] of layers.entries()) {
    expect(layer.heightM).toBeCloseTo(LEVELS_FT[n]! * FT, 6)
    const of = (tail: string) => figures[`need_${layer.id}_${tail}`]!
    expect(nested[n]).toMatchObject({
      'In sight, %': face(formatMetPct(of('in_sight_pct'))),
      'Detectable, %': face(formatMetPct(of('detectable_pct'))),
      'Usable, %': face(formatMetPct(of('usable_pct'))),
      'Usable, NM²': face(formatAreaDown(of('usable_km2'), 'nautical')),
    })
  }

  // floors and margins of the fixes, each on its own ray
  const fixes = await memoTable(page, /fixes, worst first$/)
  expect(fixes).toHaveLength(12)
  for (const [n, fix] of FIXES.entries()) {
    const floorM = Number(places[n]!.coverage_floor_m)
    const shown = fixes.find((f) => f[''] === fix.name)
    expect(shown, fix.name).toMatchObject({
      'Height, ft MSL': face(formatHeight(fix.altM, 'nautical')),
      'Floor, ft MSL': face(formatFloor(floorM, 'nautical')),
      'Margin, ft': face(formatMargin(fix.altM - floorM, 'nautical')),
    })
    if (fix.altM < floorM - 30) expect(shown?.Outcome, fix.name).toMatch(/masked/)
    if (fix.altM > floorM + 30) expect(shown?.Outcome, fix.name).not.toMatch(/masked|marginal/)
  }
  expect(fixes.filter((f) => /masked/.test(f.Outcome ?? '')).length, 'some are hidden').toBeGreaterThan(1)
  const hidden = fixes.map((f) => /masked|marginal/.test(f.Outcome ?? ''))
  expect(hidden.lastIndexOf(true), 'hidden ones first').toBe(hidden.filter(Boolean).length - 1)
  const margins = fixes.slice(0, hidden.lastIndexOf(true) + 1).map((f) => numberIn(f['Margin, ft'] ?? ''))
  expect(margins, 'worst first').toEqual([...margins].sort((x, y) => x - y))

  // the approach: where it goes under the floor, and how much of it is not usable
  const track = saved.needs?.find((n) => n.kind === 'track')?.id
  const of = (tail: string) => figures[`need_${track}_${tail}`]!
  const text = await memoText(page)
  const lost = /Last in sight at (\S+) NM from the radar, ([\d ]+) ft/.exec(text)
  const lostM = numberIn(lost?.[2] ?? '') * FT
  const next = along.findIndex((p) => p.altM < lostM)
  const [above, below] = [next - 1, next].map((n) => ({ ...along[n]!, row: places[12 + n]! }))
  const marginAt = (p: typeof above) => p!.altM - Number(p!.row.coverage_floor_m)
  const rangeAt = (p: typeof above) => face(formatPlaceRange(Number(p!.row.range_m), 'nautical'))
  expect([rangeAt(above), rangeAt(below)], text).toContain(lost?.[1])
  // in sight is over the error band of the floor
  const cell = JSON.parse(await command('cell', path, '--candidate', 'A', '--height', '10', '--at', `${below!.lon},${below!.lat}`))
  const bandM = cell.lines.find((l: { key: string }) => l.key === 'floor_band').value
  expect(marginAt(above)).toBeGreaterThan(bandM - 1)
  expect(marginAt(below)).toBeLessThan(bandM + 1)
  expect(text).toContain(plain(`Length ${textOf(formatRange(of('length_m'), 'nautical'))} (`))
  expect(text).toContain(plain(`longest gap ${textOf(formatRangeUp(of('longest_gap_m'), 'nautical'))} (`))

  // vehicles: by ring, class and radial speed
  const km = (x: number) => `${face(formatRoad(1000 * x, 'nautical'))} (${face(formatRoad(1000 * x, 'metric'))})`
  const seen = await memoTable(page, /^Roads seen, by ring/)
  expect(seen).toHaveLength(roads.rings.length + 1)
  for (const [n, ring] of [...roads.rings, roads].entries())
    expect(seen[n]).toMatchObject({
      'Within range, NM (km)': km(ring.within_range_km),
      'In sight, NM (km)': km(ring.in_sight_km),
      'Seen, NM (km)': km(ring.seen_km),
    })
  const byClass = roads.classes.map((c) => `${c.class === 'rail' ? 'railway' : c.class} ${face(formatRoad(1000 * c.seen_km, 'nautical'))}`)
  expect(seen.at(-1)?.['Seen, by class, NM']).toBe(byClass.join(', '))
  const speeds = await memoTable(page, /^Roads seen, by radial speed/)
  expect(speeds.map((r) => [r[''], r['Seen, NM (km)']])).toEqual(
    roads.radial_speeds.map((r) => [`${r.from_ms} to ${r.to_ms}`, km(r.seen_km)]),
  )
  await expect(legend(page)).toContainText('road or rail: vehicles seen')

  // short-range sensitivity off, then on: probability of detection of 1 m² at the lowest level
  const low = layers[0]!.id
  const southern = SOUTH.map((n) => FIXES[n]!)
  const detection = async (study: string) =>
    Promise.all(
      southern.map(async (f) => {
        const { results } = JSON.parse(await command('cell', study, '--candidate', 'A', '--height', '10', '--at', `${f.lon},${f.lat}`))
        return face(formatPd(results[`need_${low}_probability_of_detection`]))
      }),
    )
  const shownPd = async () => {
    const rows = await memoTable(page, /fixes, worst first$/)
    return southern.map((f) => rows.find((r) => r[''] === f.name)?.Pd)
  }
  const off = await shownPd()
  expect(off).toEqual(await detection(path))
  await goTo(page, 'Radar')
  const stc = form(page, 'Radar')
    .locator('.group')
    .filter({ has: page.getByRole('heading', { name: /STC/ }) })
  await choose(stc, /^Kind|Kind$|none/, 'fourth power of range')
  await setField(stc, 'Corner range', '12')
  await setField(stc, 'Largest attenuation', '60')
  await everythingRun(page)
  await expect.poll(shownPd).not.toEqual(off)
  expect(await shownPd()).toEqual(await detection(await savedBeside(page, info.outputPath('stc'))))
})
