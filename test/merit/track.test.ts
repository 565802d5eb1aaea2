import { beforeAll, describe, expect, it } from 'vitest'
import {
  type Ask,
  elevationAngleDeg,
  heightOnRayM,
  M_PER_FT,
  M_PER_NM,
  type NeedDoc,
  readPlaces,
  type TrackFigure,
} from '../../core/index.ts'
import { from, plainGround, uniformLand, type Worked, work } from './plain.ts'

const RADIUS = (4 / 3) * 6_371_000
const RIDGE_M = 6000
const RIDGE_TOP_M = 160
/** A low ridge 6 km to the east hides what comes down behind it. */
const ridge = (east: number, north: number): number =>
  Math.max(0, RIDGE_TOP_M - 100 - Math.abs(east - RIDGE_M) / 4) * (Math.abs(north) < 8000 ? 1 : 0)

let ground: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(26_000, ridge)
})
const need = (over: Partial<NeedDoc> = {}): NeedDoc => ({ id: 'n', kind: 'track', file: 'track.csv', rcsM2: 10, ...over })
const fly = (
  text: string,
  over: Partial<NeedDoc> = {},
  parts: { radar?: object; landDb?: number } = {},
): { worked: Worked; track: TrackFigure } => {
  const places = readPlaces(text, { id: 'n', kind: 'track', file: 'track.csv', heightM: null, heightAbove: 'sea', qnhHpa: null })
  const worked = work(ground, {
    needs: [need(over)],
    places: [places],
    landTable: uniformLand(parts.landDb ?? -60),
    radar: { suppression: { kind: 'stated', statedDb: 50 }, ...parts.radar },
  })
  return { worked, track: worked.result.figures.needs[0].track! }
}
const corners = (...list: [azimuthDeg: number, rangeM: number, altM: number][]): string =>
  ['lon,lat,alt_m_msl', ...list.map(([az, r, alt]) => `${from(az, r).lon},${from(az, r).lat},${alt}`)].join('\n')

describe('an approach to half a mile from the threshold on a 3° path', () => {
  // threshold 17 km east on the plain, 50 ft over it; the path comes in from further east, away from the radar's side
  const THRESHOLD_M = 17_000
  const onPath = (fromThresholdM: number): number => 100 + 50 * M_PER_FT + fromThresholdM * Math.tan((3 * Math.PI) / 180)
  const START_M = 8000
  const END_M = 0.5 * M_PER_NM
  const approach = corners([90, THRESHOLD_M + START_M, onPath(START_M)], [90, THRESHOLD_M + END_M, onPath(END_M)])

  it('drops below the floor where the ray over the ridge says', () => {
    const { track, worked } = fly(approach, { speedMs: 70 })
    // by hand: where the path meets the ray over the ridge, less the error band of the floor there
    const floor = (rangeM: number) => heightOnRayM(150, elevationAngleDeg(150, RIDGE_TOP_M, RIDGE_M, RADIUS), rangeM, RADIUS)
    let crossing = THRESHOLD_M + START_M
    while (crossing > THRESHOLD_M + END_M && onPath(crossing - THRESHOLD_M) > floor(crossing)) crossing -= 1
    expect(crossing).toBeGreaterThan(THRESHOLD_M + END_M + 500)
    expect(track.lengthM).toBeCloseTo(START_M - END_M, 0)
    expect(track.seenFrom).toBeNull()
    const lost = track.lostAt!
    // the band of the floor (1 m of raster behind the ridge) lets it go a little earlier
    expect(lost.rangeM).toBeGreaterThan(crossing - 20)
    expect(lost.rangeM).toBeLessThan(crossing + 130)
    expect(Math.abs(lost.altM - onPath(lost.rangeM - THRESHOLD_M))).toBeLessThan(1)
    expect(lost.altM - lost.floorM).toBeGreaterThan(0)
    // one stretch in sight, then lost for good
    const causes = track.segments.map((s) => s.cause)
    expect(causes[0]).toBeNull()
    expect(causes.at(-1)).toBe('masked')
    expect(track.segments.at(-1)!.toM).toBeCloseTo(track.lengthM, 6)
    const n = worked.result.figures.needs[0]
    expect(n).toMatchObject({ measure: 'length', areaKm2: 0, must: true })
    expect(n.amount).toBeCloseTo(track.lengthM / 1000, 9)
    expect(n.usablePct).toBeCloseTo((100 * (track.lengthM - track.longestGapM)) / track.lengthM, 6)
    expect(track.longestGapS).toBeCloseTo(track.longestGapM / 70, 9)
    expect(n.usablePct + n.losses.reduce((s, l) => s + l.pct, 0)).toBeCloseTo(100, 6)
  })

  it('is cut into pieces of at most 250 m that add up, each on its own ray', () => {
    const { track } = fly(approach)
    expect(Math.max(...track.pieces.map((p) => p.lengthM))).toBeLessThanOrEqual(250)
    expect(track.pieces.reduce((s, p) => s + p.lengthM, 0)).toBeCloseTo(track.lengthM, 6)
    expect(track.pieces[0].rangeM).toBeGreaterThan(track.pieces[1].rangeM)
    expect(track.pieces.every((p) => p.radialSpeedMs === null)).toBe(true)
    expect(track.longestGapS).toBeNull()
  })
})

describe('speeds along a track', () => {
  const mti = { suppression: { kind: 'canceller', pulses: 3, stabilityLimitDb: 50, bits: 16 } }
  const blindMs = (299_792_458 / 2.8e9) * 500
  const west = corners([270, 20_000, 700], [270, 8000, 700])

  it('straight in: the radial speed is the speed; at the blind speed the whole track is blind', () => {
    const { track, worked } = fly(west, { speedMs: 80 }, { radar: mti, landDb: -30 })
    for (const p of track.pieces) {
      expect(p.radialSpeedMs as number).toBeLessThan(-79)
      expect(p.radialSpeedMs as number).toBeGreaterThanOrEqual(-80)
      expect(p.tangential || p.blind).toBe(false)
    }
    expect(worked.result.figures.needs[0].usablePct).toBe(100)
    const blind = fly(west, { speedMs: blindMs }, { radar: mti, landDb: -30 })
    expect(blind.track.blindM).toBeCloseTo(blind.track.lengthM, 6)
    expect(blind.track.tangentialM).toBe(0)
    expect(blind.worked.result.figures.needs[0]).toMatchObject({ usablePct: 0, detectablePct: 100 })
    expect(blind.worked.result.figures.needs[0].losses[0].cause).toBe('blind-speed')
  })

  it('stagger of the pulses gives the blind speed back', () => {
    const staggered = fly(west, { speedMs: blindMs }, { radar: { ...mti, prfHz: [870, 1150], prfMode: 'pulseStagger' }, landDb: -60 })
    expect(staggered.track.blindM).toBe(0)
    expect(staggered.worked.result.figures.needs[0].usablePct).toBe(100)
  })

  it('round the radar: tangential all the way, whether suppression is worked out or stated', () => {
    const ring = corners(...Array.from({ length: 19 }, (_, n): [number, number, number] => [200 + 5 * n, 15_000, 700]))
    const worked = fly(ring, { speedMs: 60 }, { radar: mti, landDb: -30 })
    expect(worked.track.tangentialM).toBeCloseTo(worked.track.lengthM, 0)
    expect(worked.worked.result.figures.needs[0].usablePct).toBe(0)
    const stated = fly(ring, { speedMs: 60 }, { landDb: -30 })
    expect(stated.track.tangentialM).toBeCloseTo(stated.track.lengthM, 0)
    expect(stated.worked.result.figures.needs[0].usablePct).toBe(100)
    const crossing = fly(corners([250, 20_000, 700], [290, 20_000, 700]), { speedMs: 60 }, { radar: mti })
    expect(crossing.track.tangentialM).toBeGreaterThan(500)
    expect(crossing.track.tangentialM).toBeLessThan(crossing.track.lengthM * 0.6)
    const middle = crossing.track.pieces[Math.floor(crossing.track.pieces.length / 2)]
    expect(Math.abs(middle.radialSpeedMs as number)).toBeLessThan(1)
  })

  it('a line of a GeoJSON file flies at the height of the need', () => {
    const line = {
      type: 'Feature',
      properties: {},
      geometry: { type: 'LineString', coordinates: [from(270, 20_000), from(270, 10_000)].map((p) => [p.lon, p.lat]) },
    }
    const request = { id: 'n', kind: 'track' as const, file: 't.geojson', heightM: 400, heightAbove: 'ground' as const, qnhHpa: null }
    const places = readPlaces(JSON.stringify(line), request)
    expect(places.places.map((p) => [p.altM, p.above])).toEqual([
      [400, 'ground'],
      [400, 'ground'],
    ])
    expect(() => readPlaces(JSON.stringify(line), { ...request, heightM: null })).toThrow(/feature 1.*no height/)
  })
})
