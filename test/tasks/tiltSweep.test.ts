import { beforeAll, describe, expect, it } from 'vitest'
import type { Ask, NeedPlaces, OptionResult } from '../../core/index.ts'
import { from, plainGround, uniformLand, work } from '../merit/plain.ts'

// "Tilt sweep −1 … +3°: curve of the floor at a named fix against cells over a limit; recommended tilt with its reason."
const TILTS = [-1, -0.5, 0, 0.5, 1, 1.5, 2, 2.5, 3]
const FIX_M = 22_000
const ALT_M = 700
let ground: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(26_000, (e, n) => 25 * Math.sin(e / 1900) * Math.cos(n / 1400) + (Math.hypot(e - 14_000, n) < 900 ? 120 : 0))
})
const places: NeedPlaces = {
  needId: 'n',
  kind: 'fixes',
  rings: [],
  places: [{ ...from(90, FIX_M), name: 'WELLA', altM: ALT_M, above: 'sea' }],
}
const sweepOf = (): readonly OptionResult[] =>
  work(ground, {
    needs: [{ id: 'n', kind: 'fixes', file: 'fixes.csv', rcsM2: 1, requiredRatioDb: 13 }],
    places: [places],
    landTable: uniformLand(-25),
    radar: {
      peakPowerW: 15_000,
      suppression: { kind: 'stated', statedDb: 25 },
      antenna: {
        gainDbi: 33.5,
        azimuthBeamwidthDeg: 1.3,
        elevationBeamwidthDeg: 2,
        elevationPattern: 'gaussian',
        sidelobeDb: -200,
        elevationSidelobeDb: -40,
        tiltDeg: 0,
      },
    },
    candidate: { mastHeightsM: [25], tiltsDeg: TILTS },
  }).results

describe('a tilt sweep', () => {
  it('the floor at the fix is of the ground, not of the tilt; clutter falls as the beam is raised; the margin has its best tilt between', () => {
    const results = sweepOf()
    const rows = results.map((r) => {
      const fix = r.figures.needs[0].fixes![0]
      return {
        tiltDeg: r.ref.tiltDeg,
        floorM: fix.floorM as number,
        marginDb: fix.signalMarginDb as number,
        usable: fix.usable,
        over40Km2: r.figures.clutterOverKm2.over40,
      }
    })
    console.log(
      rows
        .map(
          (r) =>
            `${r.tiltDeg}°: floor ${r.floorM.toFixed(0)} m, margin ${r.marginDb.toFixed(1)} dB, ${r.over40Km2.toFixed(0)} km² over 40 dB`,
        )
        .join('; '),
    )
    expect(rows.map((r) => r.tiltDeg)).toEqual(TILTS)
    for (const r of rows) expect(r.floorM).toBe(rows[0].floorM)
    expect(rows[0].floorM).toBeGreaterThan(150)
    // from the tilt that looks level upward there is less and less clutter
    const level = TILTS.indexOf(0)
    for (let n = level + 1; n < rows.length; n++) expect(rows[n].over40Km2).toBeLessThanOrEqual(rows[n - 1].over40Km2)
    expect(rows[rows.length - 1].over40Km2).toBeLessThan(rows[level].over40Km2)
    const best = rows.reduce((a, b) => (b.marginDb > a.marginDb ? b : a))
    // the fix stands 1.4° up; over clutter the best tilt lies above it
    const elevationDeg = (Math.atan2(ALT_M - 125 - FIX_M ** 2 / (2 * (4 / 3) * 6_371_000), FIX_M) * 180) / Math.PI
    expect(best.tiltDeg).toBeGreaterThan(elevationDeg - 0.5)
    expect(best.tiltDeg).toBeLessThan(3)
    // recommended: least clutter among the tilts at which the fix is usable
    const usable = rows.filter((r) => r.usable)
    expect(usable.length).toBeGreaterThan(0)
    expect(usable.length).toBeLessThan(rows.length)
    const recommended = usable.reduce((a, b) => (b.over40Km2 <= a.over40Km2 ? b : a))
    expect(recommended.tiltDeg).toBe(Math.max(...usable.map((r) => r.tiltDeg)))
    console.log(`recommended tilt ${recommended.tiltDeg}°: the highest at which the fix stays usable, with the least clutter`)
  })
})
