import { beforeAll, describe, expect, it } from 'vitest'
import {
  type Answer,
  type Ask,
  elevationAngleDeg,
  finish,
  heightOnRayM,
  M_PER_FT,
  M_PER_NM,
  nullSpacingDeg,
  readPlaces,
  sectorChanges,
} from '../../core/index.ts'
import { from, layerNeed, plainGround, type Worked, work } from './plain.ts'

const RADIUS = (4 / 3) * 6_371_000
const fix = (name: string, azimuth: number, nm: number, ft: number): string => {
  const p = from(azimuth, nm * M_PER_NM)
  return `${name},${p.lon.toFixed(8)},${p.lat.toFixed(8)},${ft}`
}
const FIXES = ['name,lon,lat,alt_ft_msl', fix('EASTA', 90, 8, 1200), fix('WESTA', 270, 8, 1200), fix('NEARB', 90, 8, 9000)].join('\n')
const CRANE = { name: 'Quay crane', path: [from(90, 1200)], heightM: 60, topM: null, widthM: 100, rcsM2: null, verticalErrorM: 1 }

let worked: Worked
let crane: Answer['change']
let raised: Answer['change']
beforeAll(async () => {
  const plain = await plainGround(20_000)
  const ground: Ask['ground'] = { ...plain, obstacles: [CRANE] }
  worked = work(ground, {
    needs: [
      { id: 'f', name: 'Fixes', kind: 'fixes', file: 'f.csv', rcsM2: 10 },
      layerNeed({ id: 'n', name: 'Layer', heightM: 150, toRangeM: 18_000 }),
    ],
    places: [readPlaces(FIXES, { id: 'f', kind: 'fixes', file: 'f.csv', heightM: null, heightAbove: 'sea', qnhHpa: null })],
    // so much suppression that ground coming into sight takes nothing away again
    radar: { suppression: { kind: 'stated', statedDb: 90 } },
    candidate: { mastHeightsM: [20, 30] },
    run: { maxRangeM: 19_000 },
  })
  const at = (heightM: number) => ({ ...worked.ref, heightM })
  // with the crane is the study itself: taken the other way round, the crane comes
  crane = finish(worked.answers.ask('change', { before: at(20), after: at(20), without: ['Quay crane'] }))
  raised = finish(worked.answers.ask('change', { before: at(20), after: at(30) }))
}, 120_000)

describe('an obstacle taken away', () => {
  it('clears the sector it screened, and no other', () => {
    expect(crane.risen).toEqual([])
    expect(crane.fallen).toHaveLength(1)
    const [sector] = crane.fallen
    // 100 m at 1 200 m are 4.8°, a step of the grid more at most on each side
    const half = (Math.atan2(50, 1200) * 180) / Math.PI
    expect(Math.abs(sector.fromDeg - (90 - half))).toBeLessThan(0.6)
    expect(Math.abs(sector.toDeg - (90 + half))).toBeLessThan(0.6)
    const edge = elevationAngleDeg(120, 160, 1200, RADIUS)
    // the plain's own horizon lies a little under the horizontal
    expect(-sector.mostDeg).toBeGreaterThan(edge)
    expect(-sector.mostDeg).toBeLessThan(edge + 0.2)
  })
  it('names the fix that gains and by how much, and leaves the others out', () => {
    expect(crane.fixes.map((f) => f.name)).toEqual(expect.arrayContaining(['EASTA', 'NEARB']))
    expect(crane.fixes.map((f) => f.name)).not.toContain('WESTA')
    const east = crane.fixes.find((f) => f.name === 'EASTA')!
    const floorBehind = heightOnRayM(120, elevationAngleDeg(120, 160, 1200, RADIUS), 8 * M_PER_NM, RADIUS)
    expect(1200 * M_PER_FT).toBeLessThan(floorBehind)
    expect(east.before).toMatchObject({ visible: 'no', usable: false, obstacle: 'Quay crane' })
    expect(east.after).toMatchObject({ visible: 'yes', usable: true, cause: null })
    expect(Math.abs(east.before.floorM! - floorBehind)).toBeLessThan(1)
    expect(east.floorRiseM!).toBeCloseTo(east.after.floorM! - east.before.floorM!, 9)
  })
  it('the need gains the area behind it and loses none; shares move by as much', () => {
    const layer = crane.needs.find((n) => n.needId === 'n')!
    expect(layer.lostKm2).toBe(0)
    expect(layer.gainedKm2!).toBeGreaterThan(0)
    const areaKm2 = worked.results.find((r) => r.ref.heightM === 20)!.figures.needs.find((n) => n.needId === 'n')!.areaKm2
    expect(layer.usablePct.after! - layer.usablePct.before!).toBeCloseTo((100 * layer.gainedKm2!) / areaKm2, 6)
    const fixes = crane.needs.find((n) => n.needId === 'f')!
    expect([fixes.gainedKm2, fixes.lostKm2]).toEqual([null, null])
  })
  it('ground behind it is seen and comes back', () => {
    expect(crane.groundInSightKm2.after!).toBeGreaterThan(crane.groundInSightKm2.before!)
    expect(crane.clutterMoreKm2!).toBeGreaterThan(0)
    expect(crane.clutterMoreKm2!).toBeGreaterThan(crane.clutterLessKm2!)
  })
  it('a name that no obstacle has is refused', () => {
    const ask = { before: worked.ref, after: worked.ref, without: ['Old chimney'] }
    expect(() => finish(worked.answers.ask('change', ask))).toThrow(/no obstacle is called Old chimney/)
  })
  it('the study keeps its own results', () => {
    expect(worked.engine.ground!.obstacles).toEqual([CRANE])
    expect(worked.engine.results()).toHaveLength(2)
  })
})

describe('a taller mast', () => {
  it('brings the nulls of two rays closer, in inverse proportion', () => {
    const { before, after } = raised.nullSpacingDeg
    expect(before! / after!).toBeCloseTo(1.5, 9)
    // λ/2h at S band, 0.1 m: 15 m 0.19°, 25 m 0.115°
    expect(nullSpacingDeg(0.1, 15)).toBeCloseTo(0.19, 2)
    expect(nullSpacingDeg(0.1, 25)).toBeCloseTo(0.115, 3)
    expect(nullSpacingDeg(0.1, 0)).toBeNull()
  })
  it('lowers the horizon of the crane and the floor behind it', () => {
    expect(raised.fallen.some((s) => s.fromDeg < 90 && s.toDeg > 90)).toBe(true)
    expect(raised.fixes.find((f) => f.name === 'EASTA')!.floorRiseM!).toBeLessThan(0)
    expect(raised.groundInSightKm2.after!).toBeGreaterThanOrEqual(raised.groundInSightKm2.before!)
  })
})

describe('sectors', () => {
  const rows = (rise: (azimuthDeg: number) => number) =>
    Array.from({ length: 360 }, (_, azimuthDeg) => ({
      azimuthDeg,
      elevationDeg: rise(azimuthDeg),
      rangeM: 1000,
      heightM: 0,
      lon: 0,
      lat: 0,
      obstacle: 'terrain',
    }))
  it('one across north stays whole; a short break does not split one, a longer does', () => {
    const north = sectorChanges(
      rows(() => 0),
      rows((a) => (a >= 350 || a < 10 ? 0.5 : 0)),
    )
    expect(north).toEqual([expect.objectContaining({ fromDeg: 349.5, toDeg: 9.5, mostDeg: 0.5 })])
    const broken = sectorChanges(
      rows(() => 0),
      rows((a) => (a > 90 && a < 130 && a !== 100 && !(a > 110 && a < 116) ? 1 : 0)),
    )
    expect(broken.map((s) => [s.fromDeg, s.toDeg])).toEqual([
      [90.5, 110.5],
      [115.5, 129.5],
    ])
  })
  it('rise and fall are apart; what moves less than 0.02° is the same', () => {
    const both = sectorChanges(
      rows(() => 0),
      rows((a) => (a < 20 ? 0.3 : a < 40 ? -0.3 : 0.019)),
    )
    expect(both.map((s) => s.mostDeg)).toEqual([0.3, -0.3])
    expect(
      sectorChanges(
        rows(() => 0),
        rows(() => 1),
      ),
    ).toEqual([expect.objectContaining({ fromDeg: 0, toDeg: 360 })])
  })
})
