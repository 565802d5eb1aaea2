import { describe, expect, it } from 'vitest'
import { openTerrain } from '../../core/index.ts'
import { makeTiff, sourceOf, type TiffPlan } from '../helpers/tiffMaker.ts'

const hill = (col: number, row: number): number => 100 + ((col * 37 + row * 101) % 400)
const base: TiffPlan = { width: 70, height: 45, kind: 'i16', at: hill }

async function read(plan: TiffPlan, stated = {}): Promise<Float32Array> {
  const head = await openTerrain(sourceOf(makeTiff(plan)), stated)
  const samples = new Float32Array(plan.width * plan.height).fill(Number.NaN)
  await head.readInto({ shape: head.shape, samples })
  return samples
}
const wanted = (plan: TiffPlan): Float32Array =>
  Float32Array.from({ length: plan.width * plan.height }, (_, i) => plan.at(i % plan.width, Math.floor(i / plan.width), 0))

const WAYS: [string, Partial<TiffPlan>][] = [
  ['one strip', {}],
  ['strips of 7 rows, the last one short', { rowsPerStrip: 7 }],
  ['tiles that reach beyond the raster', { tile: 32 }],
  ['big-endian', { bigEndian: true }],
  ['BigTIFF', { bigTiff: true, tile: 32 }],
  ['big-endian BigTIFF', { bigEndian: true, bigTiff: true }],
  ['Deflate', { compression: 8, tile: 16 }],
  ['Deflate, differences', { compression: 8, predictor: 2 }],
  ['Deflate, differences, big-endian', { compression: 8, predictor: 2, bigEndian: true }],
  ['LZW', { compression: 5 }],
  ['LZW past 4 096 codes', { compression: 5, width: 300, height: 90, kind: 'f32', at: (c, r) => Math.sin(c * 12.9 + r * 78.2) * 900 }],
  ['LZW, differences, tiles', { compression: 5, predictor: 2, tile: 32 }],
  ['UInt16', { kind: 'u16' }],
  ['Int32, differences', { kind: 'i32', compression: 8, predictor: 2 }],
  ['Float32, floating-point predictor', { kind: 'f32', compression: 8, predictor: 3, at: (c, r) => c * 1.25 - r * 3.5 }],
  [
    'Float32, floating-point predictor, big-endian',
    { kind: 'f32', compression: 8, predictor: 3, bigEndian: true, at: (c, r) => c - r / 8 },
  ],
  ['Float64', { kind: 'f64', at: (c, r) => c * 0.5 + r * 0.25 }],
  ['two bands side by side, the first is read', { bands: 2, at: (c, r, b) => hill(c, r) + 1000 * b }],
  ['two bands apart, differences', { bands: 2, planar: 2, compression: 8, predictor: 2, tile: 32, at: (c, r, b) => hill(c, r) + 1000 * b }],
  ['negative heights', { at: (c, r) => -430 + c + r }],
]

describe('ways of storing', () => {
  it.each(WAYS)('%s', async (_, way) => {
    const plan = { ...base, ...way }
    expect(await read(plan)).toEqual(wanted(plan))
  })
})

describe('voids', () => {
  const isVoid = (c: number, r: number): boolean => c > 50 && r > 30
  const expectVoids = (samples: Float32Array): void => {
    const n = samples.reduce((sum, v) => sum + (Number.isNaN(v) ? 1 : 0), 0)
    expect(n).toBe(19 * 14)
    expect(samples[10 * 70 + 60]).toBe(hill(60, 10))
  }
  it.each<[string, Partial<TiffPlan>]>([
    ['declared value', { nodata: '-32768', at: (c, r) => (isVoid(c, r) ? -32768 : hill(c, r)) }],
    ['customary value, not declared', { at: (c, r) => (isVoid(c, r) ? -9999 : hill(c, r)) }],
    ['NaN', { kind: 'f32', nodata: 'nan', at: (c, r) => (isVoid(c, r) ? Number.NaN : hill(c, r)) }],
    [
      'lowest Float32, rounded in the text',
      { kind: 'f32', nodata: '-3.40282346638529e+38', at: (c, r) => (isVoid(c, r) ? -3.4028234663852886e38 : hill(c, r)) },
    ],
    ['65535 in UInt16', { kind: 'u16', nodata: '65535', at: (c, r) => (isVoid(c, r) ? 65535 : hill(c, r)) }],
    [
      'transparent in the second band',
      { bands: 2, extraSamples: [2], at: (c, r, b) => (b === 1 ? (isVoid(c, r) ? 0 : 255) : isVoid(c, r) ? 0 : hill(c, r)) },
    ],
  ])('%s', async (_, way) => expectVoids(await read({ ...base, ...way })))

  it('a block that was never written is void, not zero', async () => {
    const samples = await read({ ...base, tile: 32, sparse: [1], nodata: 'nan', kind: 'f32' })
    expect(samples[5 * 70 + 31]).toBe(hill(31, 5))
    expect(samples[5 * 70 + 32]).toBeNaN()
    expect(samples[5 * 70 + 64]).toBe(hill(64, 5))
  })
  it('a height of -9999 is kept where another value is declared void', async () => {
    const samples = await read({ ...base, nodata: '-1', at: (c, r) => (c === 0 ? -9999 : hill(c, r)) })
    expect(samples[0]).toBe(-9999)
  })
})

describe('units, scale and offset', () => {
  const at50 = async (way: Partial<TiffPlan>, stated = {}): Promise<number> =>
    (await read({ ...base, kind: 'f32', at: () => 50, ...way }, stated))[0]
  const metadata = (items: string): string => `<GDALMetadata>${items}</GDALMetadata>`
  const unit = (word: string): string => metadata(`<Item name="UNITTYPE" sample="0" role="unittype">${word}</Item>`)
  it.each<[string, Partial<TiffPlan>, object, number]>([
    ['metres where nothing is said', {}, {}, 50],
    ['metadata: ft', { gdalMetadata: unit('ft') }, {}, 15.24],
    ['metadata: US survey foot', { gdalMetadata: unit('US survey foot') }, {}, 50 * (1200 / 3937)],
    [
      'vertical system in US survey feet',
      {
        geoKeys: [
          [1024, 2],
          [1025, 1],
          [2048, 4326],
          [4096, 6360],
          [4099, 9003],
        ],
      },
      {},
      50 * (1200 / 3937),
    ],
    [
      'vertical system alone, feet',
      {
        geoKeys: [
          [1024, 2],
          [1025, 1],
          [2048, 4326],
          [4096, 8228],
        ],
      },
      {},
      15.24,
    ],
    ['the study outranks the file', { gdalMetadata: unit('ft') }, { unit: 'm' }, 50],
    [
      'scale and offset',
      {
        gdalMetadata: metadata(
          '<Item name="SCALE" sample="0" role="scale">0.1</Item><Item name="OFFSET" sample="0" role="offset">7</Item>',
        ),
      },
      {},
      12,
    ],
  ])('%s', async (_, way, stated, want) => expect(await at50(way, stated)).toBeCloseTo(want, 4))
})
