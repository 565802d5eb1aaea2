import { afterEach, describe, expect, it } from 'vitest'
import { declinationWords, formatAzimuth, northWords, setFaceNorth, textOf } from '../../app/words/index.ts'

const shown = (deg: number, step?: number) => textOf(formatAzimuth(deg, step))

describe('azimuths from magnetic north', () => {
  afterEach(() => setFaceNorth(null))
  it('magnetic is true less the declination east of it, over north and back', () => {
    expect(shown(7)).toBe('007.0°')
    setFaceNorth({ valueDeg: 10.5, date: '2026-12-01', model: 'WMM-2025' })
    expect(shown(7)).toBe('356.5°M')
    expect(shown(100, 1)).toBe('090°M')
    setFaceNorth({ valueDeg: -3.25, date: '2026-12-01', model: 'by hand' })
    expect(shown(358)).toBe('001.3°M')
  })
  it('the memo says which north, and that charts and files stay true', () => {
    expect(northWords()).toBe('Azimuths are counted from true north')
    setFaceNorth({ valueDeg: -3.25, date: '2026-12-01', model: 'WMM-2025' })
    expect(northWords()).toMatch(/magnetic \(°M\), declination 3\.\d° W on 2026-12-01 \(WMM-2025\); charts and files keep true north/)
    expect(declinationWords(2)).toBe('2.0° E')
  })
})
