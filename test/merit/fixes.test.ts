import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, elevationAngleDeg, heightOnRayM, M_PER_FT, M_PER_NM, readPlaces } from '../../core/index.ts'
import { from, plainGround, type Worked, work } from './plain.ts'

const RADIUS = (4 / 3) * 6_371_000
const RIDGE_M = 12_000
const RIDGE_TOP_M = 300
/** A wall of a ridge 12 km to the east, 300 m high, from 30° to 150°. */
const ridge = (east: number, north: number): number => {
  const r = Math.hypot(east, north)
  const azimuth = (Math.atan2(east, north) * 180) / Math.PI
  return azimuth > 30 && azimuth < 150 ? Math.max(0, 200 - Math.abs(r - RIDGE_M)) : 0
}
const ftMsl = (m: number): string => (m / M_PER_FT).toFixed(1)
const row = (name: string, azimuth: number, nm: number, ft: string): string => {
  const p = from(azimuth, nm * M_PER_NM)
  return `${name},${p.lon.toFixed(8)},${p.lat.toFixed(8)},${ft}`
}
const floorBehindRidgeM = (rangeM: number): number =>
  heightOnRayM(150, elevationAngleDeg(150, RIDGE_TOP_M, RIDGE_M, RADIUS), rangeM, RADIUS)
// twelve fixes: open plain, over and behind the ridge, beyond the horizon, off the terrain
const TWELVE = [
  'name,lon,lat,alt_ft_msl',
  row('NORDA', 0, 5, '1500'),
  row('NORDB', 350, 10, '1000'),
  row('WESTA', 270, 8, '800'),
  row('WESTB', 270, 12, ftMsl(260)),
  row('SUDAR', 200, 12, '2500'),
  row('RIDGE', 90, RIDGE_M / M_PER_NM, ftMsl(RIDGE_TOP_M + 40)),
  row('EASTA', 90, 10, ftMsl(floorBehindRidgeM(10 * M_PER_NM) + 60)),
  row('EASTB', 90, 10, ftMsl(floorBehindRidgeM(10 * M_PER_NM) + 0.5)),
  row('EASTC', 90, 10, ftMsl(floorBehindRidgeM(10 * M_PER_NM) - 60)),
  row('EASTD', 60, 12, '1200'),
  row('EASTE', 120, 9, '5000'),
  row('AFARA', 90, 40, '3000'),
].join('\r\n')

let worked: Worked
let ground: Ask['ground']
const request = { id: 'n', kind: 'fixes' as const, file: 'fixes.csv', heightM: null, heightAbove: 'sea' as const, qnhHpa: null }
beforeAll(async () => {
  ground = await plainGround(26_000, ridge)
  worked = work(ground, {
    needs: [{ id: 'n', kind: 'fixes', file: 'fixes.csv', rcsM2: 10 }],
    places: [readPlaces(TWELVE, request)],
    run: { maxRangeM: 24_000 },
    radar: { suppression: { kind: 'stated', statedDb: 60 } },
  })
})
const fixes = () => worked.result.figures.needs[0].fixes!
const fix = (name: string) => fixes().find((f) => f.name === name)!

describe('twelve fixes with altitudes', () => {
  it('floor, margin, visible and controlling obstacle by hand: the ridge, to the metre', () => {
    for (const [name, over] of [
      ['EASTA', 60],
      ['EASTC', -60],
    ] as const) {
      const f = fix(name)
      expect(f.floorM).toBeGreaterThan(floorBehindRidgeM(10 * M_PER_NM) - 2)
      expect(f.floorM).toBeLessThan(floorBehindRidgeM(10 * M_PER_NM) + 2)
      expect(Math.abs((f.marginM as number) - over)).toBeLessThan(2.5)
      expect(f.floorAglM).toBeCloseTo((f.floorM as number) - 100, 0)
      expect(f.obstacle).toBe('terrain')
      expect(Math.abs((f.obstacleRangeM as number) - RIDGE_M)).toBeLessThan(120)
    }
    expect(fix('EASTA').visible).toBe('yes')
    expect(fix('EASTB').visible).toBe('marginal')
    expect(fix('EASTC').visible).toBe('no')
    expect(fix('RIDGE').visible).toBe('yes')
    expect(fix('AFARA').visible).toBe('unknown')
    for (const name of ['NORDA', 'NORDB', 'WESTA', 'SUDAR', 'EASTE']) expect(fix(name).visible, name).toBe('yes')
  })

  it('worst first: unknown, then hidden by height margin, then lost in the signal, then those that pass', () => {
    const order = fixes().map((f) => f.name)
    expect(order).toHaveLength(12)
    expect(order[0]).toBe('AFARA')
    expect(order.indexOf('EASTC')).toBeLessThan(order.indexOf('EASTB'))
    const passing = fixes().filter((f) => f.usable)
    for (let n = 1; n < passing.length; n++) expect(passing[n].marginM as number).toBeGreaterThanOrEqual(passing[n - 1].marginM as number)
    expect(fixes().findIndex((f) => f.usable)).toBe(12 - passing.length)
  })

  it('shares are of twelve fixes; losses tell what is missing', () => {
    const n = worked.result.figures.needs[0]
    expect(n).toMatchObject({ measure: 'fixes', amount: 12, areaKm2: 0, notAssessed: null })
    const visible = fixes().filter((f) => f.visible === 'yes').length
    expect(n.inSightPct).toBeCloseTo((100 * visible) / 12, 9)
    const lost = n.losses.reduce((s, l) => s + l.amount, 0)
    expect(lost).toBe(12 - fixes().filter((f) => f.usable).length)
    expect(n.losses.find((l) => l.cause === 'unknown')).toMatchObject({ amount: 1 })
    expect(n.worst).toMatchObject({ obstacle: 'terrain' })
    expect(n.worstMarginM).toBe(Math.min(...fixes().flatMap((f) => (f.marginM === null ? [] : [f.marginM]))))
  })

  it('close over the mask the echo loses up to 12 dB to the edge; a hidden fix has no Pd', () => {
    // ν = 0 at the mask itself: knife edge 6.03 dB one way
    const near = work(ground, {
      needs: [{ id: 'n', kind: 'fixes', file: 'f.csv', rcsM2: 10 }],
      places: [
        readPlaces(
          [
            'lon,lat,alt_m_msl',
            ...[1.2, 300].map((over) => `${from(90, 18_520).lon},${from(90, 18_520).lat},${floorBehindRidgeM(18_520) + over}`),
          ].join('\n'),
          { ...request, file: 'f.csv' },
        ),
      ],
      run: { maxRangeM: 24_000 },
    }).result.figures.needs[0].fixes!
    const [low, high] = [near.find((f) => (f.marginM as number) < 10)!, near.find((f) => (f.marginM as number) > 200)!]
    const lossDb = (high.snrDb as number) - (low.snrDb as number)
    expect(lossDb).toBeGreaterThan(7)
    expect(lossDb).toBeLessThan(12.2)
    expect(fix('EASTC').pd).toBeNull()
  })

  it('a fix in sight at 4/3 may be hidden at k = 1: then the need is met and does not pass', () => {
    const rangeM = 24_000
    const at43 = floorBehindRidgeM(rangeM)
    const at1 = heightOnRayM(150, elevationAngleDeg(150, RIDGE_TOP_M, RIDGE_M, 6_371_000), rangeM, 6_371_000)
    expect(at1 - at43).toBeGreaterThan(5)
    const text = `lon,lat,alt_m_msl\n${from(90, rangeM).lon},${from(90, rangeM).lat},${(at43 + at1) / 2 + 2}`
    const n = work(ground, {
      needs: [{ id: 'n', kind: 'fixes', file: 'f.csv', rcsM2: 1000 }],
      places: [readPlaces(text, { ...request, file: 'f.csv' })],
      radar: { suppression: { kind: 'stated', statedDb: 60 } },
    }).result.figures.needs[0]
    expect(n.fixes![0]).toMatchObject({ visible: 'yes', usable: true, usableLowK: false })
    expect(n.fixes![0].visibleLowK).not.toBe('yes')
    expect(n).toMatchObject({ usablePct: 100, met: true, passes: false })
    expect(n.atLowK).toMatchObject({ k: 1, usablePct: 0 })
  })

  it('without its file a need is not assessed and says so', () => {
    const n = work(ground, { needs: [{ id: 'n', kind: 'fixes', file: 'lost.csv' }], run: { maxRangeM: 5000 } }).result.figures.needs[0]
    expect(n.notAssessed).toContain('lost.csv')
    expect(n.met).toBe(false)
  })
})

describe('files of fixes', () => {
  const read = (text: string, over: Partial<typeof request> | { qnhHpa: number } = {}) => readPlaces(text, { ...request, ...over })
  it('heights in metres or feet, above sea or ground', () => {
    expect(read('lon,lat,alt_m_msl\n15,49,250').places[0]).toMatchObject({ altM: 250, above: 'sea', name: '1' })
    expect(read('lon,lat,alt_ft_msl\n15,49,1000').places[0].altM).toBeCloseTo(304.8, 9)
    expect(read('name,lon,lat,alt_ft_agl\nX,15,49,500').places[0]).toMatchObject({ name: 'X', above: 'ground' })
    expect(read('lon,lat\n15,49', { heightM: 90 } as never).places[0]).toMatchObject({ altM: 90, above: 'sea' })
  })
  it('a flight level is refused without QNH and becomes a height with it', () => {
    expect(() => read('lon,lat,flight_level\n15,49,50')).toThrow(/fixes\.csv.*flight levels are no heights.*qnhHpa/)
    expect(read('lon,lat,flight_level\n15,49,50', { qnhHpa: 1013.25 }).places[0].altM).toBeCloseTo(5000 * 0.3048, 9)
    // low pressure: the flight level lies lower, about 27 ft for each hectopascal
    expect(read('lon,lat,flight_level\n15,49,50', { qnhHpa: 993.25 }).places[0].altM).toBeCloseTo((5000 - 546) * 0.3048, 0)
  })
  it('says the line that is wrong', () => {
    expect(() => read('lon,lat,alt_m_msl\n15,49,100\n15,95,100')).toThrow(/line 3: latitude is "95"/)
    expect(() => read('lon,lat,alt_m_msl\n15,49,high')).toThrow(/line 2: alt_m_msl is "high"/)
    expect(() => read('lon,lat\n15,49')).toThrow(/no column of heights/)
    expect(() => read('lon,lat,alt_m_msl,alt_ft_msl\n15,49,1,2')).toThrow(/heights in alt_m_msl and alt_ft_msl/)
    expect(() => read('x,y,alt_m_msl\n15,49,1')).toThrow(/give columns lon and lat/)
    expect(() => readPlaces('{"type":"FeatureCollection","features":[]}', { ...request, kind: 'polygon' })).toThrow(/no polygon/)
  })
})
