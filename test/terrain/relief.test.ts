import { describe, expect, it } from 'vitest'
import { RELIEF, reliefAt, reliefBlock } from '../../core/terrain/index.ts'
import { geographicShape, groundOn, seeded, utmShape } from './grounds.ts'

const kinds = (samples: Uint8Array): number[] => [...new Set(samples)].sort((a, b) => a - b)

describe('relief', () => {
  it('is low everywhere on flat ground with 2 m of noise at 30 m posting', async () => {
    const random = seeded(1)
    const g = groundOn(await utmShape(200, 200, 30), () => 100 + 2 * (2 * random() - 1))
    expect(kinds(g.relief.samples)).toEqual([RELIEF.low])
  })
  it('is high on a slope of 2.2° and low on one of 1.8°', async () => {
    for (const [deg, kind] of [
      [2.2, RELIEF.high],
      [1.8, RELIEF.low],
    ] as const) {
      const rise = 30 * Math.tan((deg * Math.PI) / 180)
      const g = groundOn(await utmShape(120, 120, 30), (col) => col * rise)
      expect(kinds(g.relief.samples)).toEqual([kind])
    }
  })
  it('is mountains where steep ground has over 300 m between blocks within 1 km', async () => {
    const g = groundOn(await utmShape(200, 120, 30), (col) => (col < 100 ? 0 : (col - 100) * 8))
    expect(reliefAt(g, 20, 60)).toBe(RELIEF.low)
    expect(reliefAt(g, 150, 60)).toBe(RELIEF.mountains)
  })
  it('averages blocks of the smallest multiple of the posting that is at least 250 m, per axis', () => {
    expect(reliefBlock(geographicShape(100, 100, 10, 60, 1 / 1200, 1 / 1200))).toMatchObject({ cols: 6, rows: 3 })
  })
  it('is unknown inside a large void and outside the raster, known beside a small void', async () => {
    const g = groundOn(await utmShape(300, 300, 30), (col, row) =>
      (col > 150 && row > 100 && row < 260) || (col === 20 && row === 20) ? Number.NaN : 5,
    )
    expect(reliefAt(g, 250, 180)).toBe(RELIEF.unknown)
    expect(reliefAt(g, 20, 20)).toBe(RELIEF.low)
    expect(reliefAt(g, 300, 20)).toBe(RELIEF.unknown)
    expect(reliefAt(g, 299, 299)).toBe(RELIEF.low)
  })
})
