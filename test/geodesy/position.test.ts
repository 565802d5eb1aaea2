import { describe, expect, it } from 'vitest'
import { formatDms, InputError, parsePosition } from '../../core/index.ts'

describe('typed positions', () => {
  it.each([
    ['51.5074 -0.1278', -0.1278, 51.5074],
    ['51.5074, -0.1278', -0.1278, 51.5074],
    ['51.5074N 0.1278W', -0.1278, 51.5074],
    ['0.1278W, 51.5074N', -0.1278, 51.5074],
    ['S33 30.0 E151 12.0', 151.2, -33.5],
    ['51°30\'26"N 000°07\'40"W', -0.12777778, 51.50722222],
    ['51 30 26 -0 7 40', -0.12777778, 51.50722222],
    ['513026N 0000740W', -0.12777778, 51.50722222],
    ['513026.5N0000740.5W', -0.12791667, 51.50736111],
    ['12.5, 190', -170, 12.5],
    ['33N 500000 5400000', 15, 48.753013],
    ['UTM 33S 500000 4600000', 15, -48.753013],
  ])('%s', (text, lon, lat) => {
    const p = parsePosition(text)
    expect(p.lon).toBeCloseTo(lon, 6)
    expect(p.lat).toBeCloseTo(lat, 6)
  })
  it.each(['', 'foo', '51.5', '95 10', '51N 52N', '51 70 00 0 0 0', '61N 500000 5400000', '1 2 3', '51.5; 0.1; 3'])(
    'refused: "%s"',
    (text) => {
      expect(() => parsePosition(text)).toThrow(InputError)
    },
  )
  it('is written in degrees, minutes, seconds, and read back', () => {
    const p = { lon: -0.1277777, lat: 51.9999999 }
    expect(formatDms(p)).toBe('52°00\'00.00"N 000°07\'40.00"W')
    const q = parsePosition(formatDms({ lon: 151.23456, lat: -33.98765 }))
    expect(q.lon).toBeCloseTo(151.23456, 5)
    expect(q.lat).toBeCloseTo(-33.98765, 5)
  })
})
