import { spawn } from 'node:child_process'
import { existsSync, mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'
import { FileSource } from '../../app/batch/fileSource.ts'
import { cellCentre, cellOfLonLat, gridPosition, openTerrain, polarShape, readClasses, type TerrainHead } from '../../core/index.ts'
import { batch, batchLater, MIDDLE, type Ran, rowsOf, tinyDoc, tinyShape, tinyStudy } from './tinyStudy.ts'

const tree = (dir: string, at = ''): string[] =>
  readdirSync(join(dir, at), { withFileTypes: true })
    .flatMap((e) => (e.isDirectory() ? tree(dir, join(at, e.name)) : [join(at, e.name)]))
    .sort()
const parts = (dir: string): string[] => readdirSync(dir).filter((name) => name.startsWith('.'))
async function floats(path: string): Promise<{ head: TerrainHead; samples: Float32Array }> {
  const source = await FileSource.open(path)
  const head = await openTerrain(source, { unit: 'm' })
  const samples = new Float32Array(head.shape.width * head.shape.height).fill(Number.NaN)
  await head.readInto({ shape: head.shape, samples })
  await source.close()
  return { head, samples }
}

describe('run', () => {
  let dir = ''
  let path = ''
  let out = ''
  let ran: Ran
  beforeAll(async () => {
    ;({ dir, path } = await tinyStudy(tinyDoc({ candidates: [{ ...tinyDoc().candidates[0]!, tiltsDeg: [0, 2] }] })))
    out = join(dir, 'results')
    ran = await batchLater('run', path, '--out', out, '--layers', 'all')
  }, 120_000)

  it('writes one folder per candidate, height and tilt, and leaves nothing beside it', () => {
    expect(ran).toMatchObject({ code: 0, out: '' })
    const needed = ['suppression-needed', 'usable', 'probability-of-detection', 'signal-margin', 'cause-of-loss']
    const tilt = ['clutter-to-noise.tif', 'trial-plan.csv', ...needed.map((name) => `${name}-n1.tif`)]
    const height = ['clutter-strength.tif', 'coverage-floor.tif', 'depression.tif', 'height-to-see.tif', 'horizon.csv', 'in-sight.tif']
    const folders = ['10m', '40m'].flatMap((h) => [
      ...['0deg', '2deg'].flatMap((t) => tilt.map((f) => `A/${h}/${t}/${f}`)),
      ...height.map((f) => `A/${h}/${f}`),
    ])
    expect(tree(out)).toEqual([...folders, 'memo.pdf', 'summary.json'].sort())
    expect(parts(dir)).toEqual([])
    expect(readFileSync(join(out, 'memo.pdf')).subarray(0, 5).toString()).toBe('%PDF-')
  })
  it('summary.json holds the figures of every option under names that end in their unit', () => {
    const summary = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8'))
    expect(summary).toMatchObject({ version: 1, study: 'Tiny moor' })
    expect(summary.options.map((o: Record<string, unknown>) => [o.candidate, o.heightM, o.tiltDeg])).toEqual([
      ['A', 10, 0],
      ['A', 10, 2],
      ['A', 40, 0],
      ['A', 40, 2],
    ])
    expect(new Set(summary.options.map((o: { key: string }) => o.key)).size).toBe(4)
    for (const name of Object.keys(summary.options[0].figures)) expect(name).toMatch(/_(km2|db|deg|pct|m)$/)
  })
  it("rasters lie on the terrain's own lattice, whose cell is over half a range step", async () => {
    const { head } = await floats(join(out, 'A/10m/coverage-floor.tif'))
    expect({ ...head.shape, crs: head.shape.crs.epsg }).toEqual({ ...tinyShape, crs: tinyShape.crs.epsg })
  })
  it('behind the ridge the ground is masked and the floor is the line over the crest', async () => {
    const source = await FileSource.open(join(out, 'A/10m/in-sight.tif'))
    const classes = await readClasses(source)
    const seen = await classes.readClassesInto(tinyShape)
    await source.close()
    const at = (col: number) => {
      const index = seen.codes[40 * 81 + col] as number
      return index === 255 ? null : (seen.classes[index] as number)
    }
    expect([at(50), at(65), at(74)]).toEqual([100, 0, 0])
    expect(at(78)).toBeNull()
    const { samples } = await floats(join(out, 'A/10m/coverage-floor.tif'))
    // From 110 m over 160 m at 2 km the line stands at 185 m at 3 km, less 0.2 m of earth.
    expect(samples[40 * 81 + 70]).toBeGreaterThan(183)
    expect(samples[40 * 81 + 70]).toBeLessThan(187)
  })
  it('clutter-to-noise of a raster cell equals points at the centre of its polar cell to 0.05 dB', async () => {
    const { samples } = await floats(join(out, 'A/40m/2deg/clutter-to-noise.tif'))
    const position = gridPosition(tinyShape)
    const grid = polarShape({ maxRangeM: 3500, rangeStepM: 150, azimuthStepDeg: 1 })
    const cells = [40 * 81 + 50, 20 * 81 + 30, 60 * 81 + 45, 43 * 81 + 66, 38 * 81 + 58]
    const centres = cells.map((n) => {
      const [lon, lat] = position.toLonLat(n % 81, Math.floor(n / 81))
      return cellCentre(MIDDLE, grid, cellOfLonLat(MIDDLE, grid, { lon, lat }))
    })
    const places = join(dir, 'centres.csv')
    writeFileSync(places, `lon,lat\n${centres.map((c) => `${c.lon},${c.lat}`).join('\n')}\n`)
    const points = batch('points', path, '--candidate', 'A', '--height', '40', '--tilt', '2', '--points', places)
    rowsOf(points.out).forEach((row, i) => {
      expect(Math.abs(Number(row.clutter_to_noise_db) - (samples[cells[i] as number] as number))).toBeLessThan(0.05)
    })
    expect(Number.isNaN(samples[40 * 81 + 79])).toBe(true)
  })
  it('usable is 1, 2 or 3 where the need is in sight, and what is not usable has a cause', async () => {
    const usable = await floats(join(out, 'A/40m/0deg/usable-n1.tif'))
    const cause = await floats(join(out, 'A/40m/0deg/cause-of-loss-n1.tif'))
    const seen = new Set([...usable.samples].filter((v) => !Number.isNaN(v)))
    expect([...seen].every((v) => v === 1 || v === 2 || v === 3)).toBe(true)
    expect(seen.has(3)).toBe(true)
    for (const [i, v] of usable.samples.entries()) if (v === 3) expect(cause.samples[i]).toBeNaN()
    for (const [i, v] of usable.samples.entries()) if (v === 1 || v === 2) expect(cause.samples[i]).toBeGreaterThan(0)
  })
  it('files of fixes and tracks beside the study are read, listed and judged', async () => {
    const needs = [
      { id: 'f', name: 'Fixes', kind: 'fixes' as const, file: 'fixes.csv' },
      { id: 't', name: 'Run in', kind: 'track' as const, file: 'track.csv', speedMs: 50 },
    ]
    const own = await tinyStudy(tinyDoc({ needs, candidates: [{ ...tinyDoc().candidates[0]!, mastHeightsM: [40] }] }))
    writeFileSync(join(own.dir, 'fixes.csv'), 'name,lon,lat,alt_m_msl\nover,15.01,48.75,900\nlow behind,15.035,48.7516,120\n')
    writeFileSync(join(own.dir, 'track.csv'), 'lon,lat,alt_m_msl\n15.02,48.75159,400\n15.005,48.75159,400\n')
    const { code, err } = await batchLater('run', own.path, '--out', join(own.dir, 'fixed'), '--no-memo')
    expect(err).not.toMatch(/fault/)
    expect(code).toBe(0)
    const { files, options } = JSON.parse(readFileSync(join(own.dir, 'fixed/summary.json'), 'utf8'))
    expect(files.map((f: { name: string }) => f.name)).toEqual(['moor.tif', 'fixes.csv', 'track.csv'])
    // one of two fixes lies under the line over the crest: (160 − 140 m) at 2 km gives about 175 m at 2.6 km
    expect(options[0].figures.need_f_in_sight_pct).toBe(50)
    expect(options[0].figures.need_t_length_m).toBeGreaterThan(1_050)
    expect(options[0].figures.need_t_length_m).toBeLessThan(1_150)
    writeFileSync(join(own.dir, 'fixes.csv'), 'lon,lat,flight_level\n15,48.75,30\n')
    const refused = await batchLater('run', own.path, '--out', join(own.dir, 'refused'), '--no-memo')
    expect(refused.code).toBe(2)
    expect(refused.err).toMatch(/fixes\.csv.*qnhHpa/)
  }, 120_000)
  it('an earlier run is replaced; options are picked; the memo may be left out', async () => {
    const again = await batchLater('run', path, '--out', out, '--height', '40', '--tilt', '2', '--no-memo')
    expect(again).toMatchObject({ code: 0, out: '' })
    expect(tree(out)).toEqual([
      'A/40m/2deg/clutter-to-noise.tif',
      'A/40m/2deg/trial-plan.csv',
      'A/40m/coverage-floor.tif',
      'A/40m/horizon.csv',
      'A/40m/in-sight.tif',
      'summary.json',
    ])
    expect(parts(dir)).toEqual([])
  })
  it('a folder with other files is refused and left alone', async () => {
    const foreign = join(dir, 'papers')
    mkdirSync(foreign)
    writeFileSync(join(foreign, 'plan.txt'), 'keep')
    const { code, err } = batch('run', path, '--out', foreign)
    expect(err).toMatch(/^--out papers: the folder holds other files; name a new or empty folder/)
    expect(code).toBe(2)
    expect(tree(foreign)).toEqual(['plan.txt'])
    expect(parts(dir)).toEqual([])
  })
  it.each([
    [['--height', '25'], /--height: the study has no height 25 m here; use one of 10, 40/],
    [['--tilt', '5'], /--tilt: the study has no tilt 5 deg here; use one of 0, 2/],
    [['--layers', 'contour'], /--layers: there is no layer "contour"; use all, or names from/],
  ])('%j is refused', (args, sentence) => {
    const { code, err } = batch('run', path, '--out', join(dir, 'none'), ...args)
    expect(err).toMatch(sentence)
    expect(code).toBe(2)
    expect(existsSync(join(dir, 'none'))).toBe(false)
  })
})

describe('points and horizon', () => {
  it('print one row per place, empty where ground is unknown', async () => {
    const { dir, path } = await tinyStudy()
    const places = join(dir, 'places.csv')
    writeFileSync(places, `lon,lat\n15.020,${MIDDLE.lat}\n15.0300,${MIDDLE.lat}\n15.2,${MIDDLE.lat}\n`)
    const { code, out } = batch('points', path, '--candidate', 'A', '--height', '20', '--points', places)
    expect(code).toBe(0)
    const [near, behind, outside] = rowsOf(out)
    expect(near).toMatchObject({
      lon: '15.020',
      in_sight: '1',
      ground_m: '100.000',
      coverage_floor_m: '100.000',
      terrain_class: 'farmland',
    })
    expect(Number(near?.clutter_to_noise_db)).toBeGreaterThan(0)
    expect(behind).toMatchObject({ lon: '15.0300', in_sight: '0', clutter_strength_db: '', note: expect.not.stringMatching(/unknown/) })
    expect(Number(behind?.coverage_floor_m)).toBeGreaterThan(160)
    expect(outside).toMatchObject({
      in_sight: '0',
      ground_m: '',
      coverage_floor_m: '',
      clutter_to_noise_db: '',
      note: 'unknown: outside the terrain',
    })
  })
  it('horizon answers in the order asked', async () => {
    const { path } = await tinyStudy()
    const { code, out } = batch('horizon', path, '--candidate', 'A', '--height', '20', '--azimuths', '90,0,45.5')
    expect(code).toBe(0)
    const rows = rowsOf(out)
    expect(rows.map((r) => r.azimuth_deg)).toEqual(['90.00000', '0.00000', '45.50000'])
    // 40 m above the electrical centre at 2 km, less the earth's 0.01°.
    expect(Number(rows[0]?.elevation_deg)).toBeCloseTo((Math.atan(40 / 2000) * 180) / Math.PI - 0.0067, 2)
    expect(rows[0]?.obstacle).toBe('terrain')
  })
  it('cell prints lines that add up to each result', async () => {
    const { path } = await tinyStudy()
    const { code, out } = batch('cell', path, '--candidate', 'A', '--height', '20', '--at', `15.01,${MIDDLE.lat}`)
    expect(code).toBe(0)
    const ledger = JSON.parse(out) as { lines: { op: string; value: number; of?: string }[]; results: Record<string, number | null> }
    const sums = new Map<string, number>()
    for (const { op, value, of } of ledger.lines)
      if (of && op !== 'info') sums.set(of, (sums.get(of) ?? 0) + (op === 'subtract' ? -value : value))
    expect(sums.size).toBeGreaterThan(0)
    for (const [of, sum] of sums) expect(Math.abs(sum - (ledger.results[of] as number)), of).toBeLessThan(1e-6)
  })
})

describe('an interrupted run', () => {
  it('ends with 130 and leaves nothing', async () => {
    const long = tinyDoc({ run: { maxRangeM: 3500, rangeStepM: 1, azimuthStepDeg: 0.1 } })
    const { dir, path } = await tinyStudy(long)
    const child = spawn(process.execPath, ['--import', 'tsx', 'app/batch/main.ts', 'run', path, '--out', join(dir, 'results'), '--no-memo'])
    const ended = new Promise<number | null>((done) => child.on('close', done))
    while (parts(dir).length === 0) await new Promise((again) => setTimeout(again, 20))
    child.kill('SIGINT')
    expect(await ended).toBe(130)
    expect(readdirSync(dir).sort()).toEqual(['moor.tif', 'study.json'])
  })
})
