import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'
import { batchLater, type Ran, tinyDoc, tinyShape, tinyStudy, writeTerrain } from './tinyStudy.ts'

/** What goes wrong, the study or what is done beside it, and what the sentence has to hold. */
interface Case {
  readonly name: string
  readonly doc?: unknown
  readonly prepare?: (dir: string) => void | Promise<void>
  readonly args?: readonly string[]
  readonly says: RegExp
}
const text = (change: (t: string) => string) => change(JSON.stringify(tinyDoc(), null, 2))
const bare = (bytes: Uint8Array) => (dir: string) => writeFileSync(join(dir, 'moor.tif'), bytes)
const candidate = (over: object) => tinyDoc({ candidates: [{ ...tinyDoc().candidates[0]!, ...over }] })

const cases: Case[] = [
  { name: 'not a TIFF', prepare: bare(new TextEncoder().encode('<html>not found</html>')), says: /^moor\.tif.*TIFF/ },
  { name: 'empty file', prepare: bare(new Uint8Array(0)), says: /^moor\.tif/ },
  {
    name: 'missing file',
    doc: tinyDoc({ terrain: [{ file: 'hill.tif' }] }),
    says: /^hill\.tif, terrain\[0\]\.file: there is no such file/,
  },
  {
    name: 'huge declared size',
    prepare: (dir) => {
      const path = join(dir, 'moor.tif')
      const bytes = readFileSync(path)
      // Values of the first two tags, width and height.
      for (const at of [18, 30]) bytes.writeUInt32LE(2_000_000, at)
      writeFileSync(path, bytes)
    },
    says: /^moor\.tif.*2000000 × 2000000/,
  },
  {
    name: 'all no data',
    prepare: (dir) => writeTerrain(dir, 'moor.tif', new Float32Array(81 * 81).fill(Number.NaN)),
    says: /^moor\.tif.*no data/,
  },
  {
    name: 'candidate off the terrain',
    doc: candidate({ lon: 16 }),
    says: /candidates\[0\].*candidate A at 16, 48\.75159 is off the terrain/,
  },
  {
    name: 'mast height -5',
    doc: candidate({ mastHeightsM: [-5] }),
    says: /candidates\[0\]\.mastHeightsM\[0\] \(line \d+\): mast height is -5 m/,
  },
  {
    name: 'JSON syntax',
    doc: text((t) => t.replace('"version": 1,', '"version": 1')),
    says: /^study\.json, line 4, column 3: a comma is expected/,
  },
  { name: 'misspelt key', doc: text((t) => t.replace('"peakPowerW"', '"peakPowrW"')), says: /did you mean "peakPowerW"\?/ },
  {
    name: 'frequency',
    doc: text((t) => t.replace('2750000000', '5e10')),
    says: /radar\.frequencyHz \(line \d+\): frequency is 50 GHz; give a frequency from 30 MHz to 40 GHz/,
  },
  { name: 'version', doc: text((t) => t.replace('"version": 1', '"version": 2')), says: /version is 2/ },
  { name: 'no candidates', doc: tinyDoc({ candidates: [] }), says: /candidates: no candidate/ },
  { name: 'no terrain', doc: tinyDoc({ terrain: [] }), says: /terrain: no terrain file/ },
  {
    name: 'ellipsoidal heights',
    doc: tinyDoc({ terrain: [{ file: 'moor.tif', heights: 'ellipsoidal' }] }),
    says: /terrain\[0\]\.heights.*ellipsoid/,
  },
  {
    name: 'unknown candidate',
    args: ['--candidate', 'Z', '--height', '20'],
    says: /--candidate: study\.json has no candidate "Z"; use one of A/,
  },
  { name: 'height option', args: ['--candidate', 'A', '--height', '-5'], says: /--height: mast height is "-5"; give a number above 0/ },
  {
    name: 'land cover',
    doc: tinyDoc({ landCover: { file: 'cover.tif', legend: 'worldcover' } }),
    says: /cover\.tif, landCover\.file: there is no such file/,
  },
  {
    name: 'obstacles',
    doc: tinyDoc({ obstacles: { file: 'masts.geojson' } }),
    prepare: (dir) =>
      writeFileSync(
        join(dir, 'masts.geojson'),
        '{"type":"FeatureCollection","features":[{"type":"Feature","properties":{},"geometry":{"type":"Point","coordinates":[15,48]}}]}',
      ),
    says: /^masts\.geojson, feature 1: neither heightM nor topM/,
  },
]

describe('bad input ends with 2 and one sentence', () => {
  const ran = new Map<string, Ran>()
  beforeAll(async () => {
    const queue = [...cases]
    const work = async () => {
      for (let c = queue.shift(); c; c = queue.shift()) {
        const { dir, path } = await tinyStudy(c.doc)
        await c.prepare?.(dir)
        ran.set(c.name, await batchLater('horizon', path, ...(c.args ?? ['--candidate', 'A', '--height', '20'])))
      }
    }
    await Promise.all([work(), work()])
  }, 120_000)
  it.each(cases)('$name', ({ name, says }) => {
    const { code, out, err } = ran.get(name) as Ran
    expect(err).toMatch(says)
    expect(err.trimEnd().split('\n')).toHaveLength(1)
    expect(err.trimEnd().length).toBeLessThanOrEqual(240)
    expect(err).not.toMatch(/^\s+at |Error:/)
    expect(out).toBe('')
    expect(code).toBe(2)
  })
  it('a file cut short', async () => {
    const { dir, path } = await tinyStudy()
    const whole = readFileSync(join(dir, 'moor.tif'))
    writeFileSync(join(dir, 'moor.tif'), whole.subarray(0, whole.length - 200))
    const { code, err } = await batchLater('horizon', path, '--candidate', 'A', '--height', '20')
    expect(err).toMatch(/^moor\.tif/)
    expect(code).toBe(2)
  })
  it('a raster without a CRS names the key that states it', async () => {
    const { dir, path } = await tinyStudy()
    await writeTerrain(dir, 'moor.tif', undefined, { ...tinyShape, crs: { ...tinyShape.crs, epsg: null, definition: '' } })
    const { code, err } = await batchLater('horizon', path, '--candidate', 'A', '--height', '20')
    expect(err).toMatch(/terrain\[0\]\.crs/)
    expect(code).toBe(2)
  })
  it('a study that is not there', async () => {
    const missing = join(mkdtempSync(join(tmpdir(), 'none-')), 'study.json')
    const { code, err } = await batchLater('horizon', missing, '--candidate', 'A', '--height', '20')
    expect(err).toMatch(/^study\.json: there is no such file/)
    expect(code).toBe(2)
  })
})
