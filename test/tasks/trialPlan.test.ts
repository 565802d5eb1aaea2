import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, elevationAngleDeg, heightOnRayM, type NeedPlaces, readPlaces, type TrialRow } from '../../core/index.ts'
import { from, type Parts, plainGround, work } from '../merit/plain.ts'

// A trial plan from the worst margins of a small study: plain at 100 m, antenna at 150 m, a ridge of 300 m at 12 km from 30° to 150°.
const RADIUS = (4 / 3) * 6_371_000
const RIDGE_M = 12_000
const ridge = (east: number, north: number): number => {
  const azimuth = (Math.atan2(east, north) * 180) / Math.PI
  return azimuth > 30 && azimuth < 150 ? Math.max(0, 200 - Math.abs(Math.hypot(east, north) - RIDGE_M)) : 0
}
const floorBehindM = (rangeM: number): number => heightOnRayM(150, elevationAngleDeg(150, 300, RIDGE_M, RADIUS), rangeM, RADIUS)
let ground: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(25_000, ridge)
})
const plan = (parts: Parts): readonly TrialRow[] =>
  work(ground, { run: { maxRangeM: 22_000 }, radar: { suppression: { kind: 'stated', statedDb: 60 } }, ...parts }).result.figures.trialPlan
const LAYER = { id: 'low', name: 'Low', kind: 'layer' as const, heightM: 400, fromRangeM: 2000, toRangeM: 22_000 }

describe('trial plan', () => {
  it('of a layer: radial, hold over the floor, orbit, and the ridge to survey', () => {
    const rows = plan({ needs: [LAYER] })
    const radial = rows.find((r) => r.kind === 'radial' && r.confirms === 'floor')!
    // worst behind the ridge, at the far edge: the floor rises behind it
    expect(radial).toMatchObject({
      needId: 'low',
      fromRangeM: 2000,
      toRangeM: 22_000,
      altitudeM: 400,
      predicted: 'masked',
      obstacle: 'terrain',
    })
    expect(radial.at.azimuthDeg).toBeGreaterThan(29)
    expect(radial.at.azimuthDeg).toBeLessThan(151)
    expect(radial.at.rangeM).toBeGreaterThan(21_500)
    expect(Math.abs((radial.floorM as number) - floorBehindM(radial.at.rangeM))).toBeLessThan(3)
    expect(radial.marginM).toBeCloseTo(400 - (radial.floorM as number), 6)

    const hold = rows.find((r) => r.kind === 'hold')!
    expect(hold.altitudeM).toBeCloseTo((radial.floorM as number) + (radial.floorBandM as number), 6)
    expect(hold.at).toEqual(radial.at)
    expect(['in sight', 'detectable', 'usable']).toContain(hold.predicted)

    const orbit = rows.find((r) => r.kind === 'orbit')!
    expect(orbit).toMatchObject({ fromAzimuthDeg: 0, toAzimuthDeg: 360, altitudeM: 400, confirms: 'horizon' })
    expect(orbit.at.rangeM).toBe(radial.at.rangeM)

    const survey = rows.filter((r) => r.kind === 'survey')
    expect(survey[0].at.azimuthDeg).toBeCloseTo(radial.at.azimuthDeg, 9)
    expect(Math.abs(survey[0].at.rangeM - RIDGE_M)).toBeLessThan(120)
    expect(Math.abs((survey[0].altitudeM as number) - 300)).toBeLessThan(5)
    expect(survey[0].predicted).toBeNull()
    expect(rows.indexOf(survey[0])).toBeGreaterThan(rows.indexOf(orbit))
  })

  it('of a layer with a ceiling: a radial over the cone of silence at the ceiling', () => {
    const rows = plan({
      needs: [{ ...LAYER, heightM: [1000, 4000], sectorDeg: [200, 340] }],
      radar: {
        antenna: {
          gainDbi: 33.5,
          azimuthBeamwidthDeg: 1.3,
          elevationBeamwidthDeg: 5,
          elevationPattern: 'cosecant-squared',
          cosecantLimitDeg: 30,
          tiltDeg: 2,
        },
      },
    })
    const cone = rows.find((r) => r.confirms === 'cone')!
    expect(cone).toMatchObject({ kind: 'radial', fromRangeM: 0, altitudeM: 4000 })
    expect(cone.at.azimuthDeg).toBeCloseTo(270, 6)
    // pattern ends at β = 30°, elevation 29.5°: 3 850 m over the antenna at 6.8 km
    expect(Math.abs(cone.at.rangeM - 3850 / Math.tan((29.5 * Math.PI) / 180))).toBeLessThan(250)
    expect(cone.toRangeM).toBeCloseTo(2 * cone.at.rangeM, -1)
  })

  const fixes = (names: readonly (readonly [string, number, number])[]): NeedPlaces =>
    readPlaces(
      ['name,lon,lat,alt_m_msl', ...names.map(([name, az, alt]) => `${name},${from(az, 18_000).lon},${from(az, 18_000).lat},${alt}`)].join(
        '\n',
      ),
      {
        id: 'fix',
        kind: 'fixes',
        file: 'f.csv',
        heightM: null,
        heightAbove: 'sea',
        qnhHpa: null,
      },
    )
  it('of fixes: the five worst, worst first; must needs before wishes', () => {
    const places = fixes([
      ['F1', 90, 900],
      ['F2', 95, 300],
      ['F3', 100, 200],
      ['F4', 270, 500],
      ['F5', 280, 600],
      ['F6', 290, 700],
      ['F7', 300, 800],
    ])
    const rows = plan({
      needs: [
        { ...LAYER, must: false },
        { id: 'fix', kind: 'fixes', file: 'f.csv' },
      ],
      places: [places],
    })
    expect(rows.slice(0, 5).map((r) => [r.kind, r.name])).toEqual([
      ['fix', 'F3'],
      ['fix', 'F2'],
      ['fix', 'F4'],
      // 600 m over plain at 100 m, then 900 m over the line behind the ridge at about 380 m
      ['fix', 'F5'],
      ['fix', 'F1'],
    ])
    expect(rows[0]).toMatchObject({ predicted: 'masked', altitudeM: 200, confirms: 'fix' })
    expect(rows[5].needId).toBe('low')
  })

  it('of a track: its gap, and where sight begins and ends', () => {
    const track = readPlaces(
      `lon,lat,alt_m_msl\n${from(90, 20_000).lon},${from(90, 20_000).lat},380\n${from(90, 9_000).lon},${from(90, 9_000).lat},380`,
      { id: 't', kind: 'track', file: 't.csv', heightM: null, heightAbove: 'sea', qnhHpa: null },
    )
    const rows = plan({ needs: [{ id: 't', kind: 'track', file: 't.csv' }], places: [track] })
    const [gap, edge] = rows
    expect(gap).toMatchObject({ kind: 'track', confirms: 'gap', predicted: 'masked' })
    expect(edge).toMatchObject({ kind: 'track', confirms: 'sight-edge', predicted: 'marginal' })
    // 380 m clears the line over the ridge where that line lies at 380 m
    expect(Math.abs(floorBehindM(edge.at.rangeM) - 380)).toBeLessThan(6)
  })

  it('is empty without needs and the same every time', () => {
    expect(plan({ needs: [] })).toEqual([])
    expect(plan({ needs: [LAYER] })).toEqual(plan({ needs: [LAYER] }))
  })
})
