import { beforeAll, describe, expect, it } from 'vitest'
import { Answers, Engine, finish, type HorizonLine, type HorizonRow, horizonAt } from '../../core/index.ts'
import { hillGround, hillStudy } from './hillStudy.ts'

/** Rolling farmland under 8 m of cover, a ridge to the east, one tower 1.5 km north. */
let lines: readonly HorizonLine[]
let whole: readonly HorizonRow[]
beforeAll(async () => {
  const ground = await hillGround()
  const doc = hillStudy()
  const [site] = doc.candidates
  const engine = new Engine()
  const answers = new Answers(engine)
  finish(
    answers.ask('ground', {
      ...ground,
      codes: [{ terrain: 'farmland', coverHeightM: 8, sourceClass: null, mark: null }],
      obstacles: [
        {
          name: 'Tower',
          path: [{ lon: site.lon, lat: site.lat + 1500 / 111_200 }],
          heightM: null,
          topM: 260,
          widthM: 60,
          rcsM2: null,
          verticalErrorM: 1,
        },
      ],
    }),
  )
  finish(answers.ask('study', { doc, show: { option: null, layer: 'masked' }, hold: true, have: [] }))
  lines = finish(answers.ask('horizons', { option: { candidate: 'A', heightM: 10, tiltDeg: 1 } }))
  const { study, ground: held } = engine.ready()
  whole = horizonAt(
    held,
    { lon: site.lon, lat: site.lat, groundHeightM: null, clearingRadiusM: 0 },
    10,
    { effectiveEarthFactor: 4 / 3, earthRadiusM: null },
    Array.from({ length: 360 }, (_, i) => i),
    study.run.maxRangeM,
  )
}, 60_000)

describe('horizons beside the study’s own', () => {
  it('bare ground at the study’s k; bare ground and surface at k = 1; a degree apart', () => {
    expect(lines.map((l) => [Math.round(100 * l.k) / 100, l.cover])).toEqual([
      [1.33, false],
      [1, false],
      [1, true],
    ])
    for (const l of lines) expect(l.azimuthsDeg.length).toBe(360)
  })
  it('the bare ground is never over the surface, and lower by the cover where it is close', () => {
    let lower = 0
    lines[0].elevationDeg.forEach((e, i) => {
      expect(e).toBeLessThanOrEqual(whole[i].elevationDeg + 1e-9)
      if (e < whole[i].elevationDeg - 0.05) lower++
    })
    expect(lower).toBeGreaterThan(300)
  })
  it('at k = 1 the same surface stands lower the farther its horizon is', () => {
    // r/2R, and a point high over the sphere stands a little farther out
    const drop = (r: number, h: number, e: number): number =>
      ((r / 2 + h * Math.tan((e * Math.PI) / 180)) / 6_371_000) * (1 - 3 / 4) * (180 / Math.PI)
    let checked = 0
    lines[2].elevationDeg.forEach((e, i) => {
      const { elevationDeg, rangeM, heightM } = whole[i]
      expect(e).toBeLessThanOrEqual(elevationDeg + 1e-9)
      if (rangeM < 1000) return
      checked++
      // the controlling point may be a nearer one at k = 1: then it falls by less
      // half a millimetre at 1 km is 3e-5 degrees; the local radius is within half a per cent
      expect(elevationDeg - e).toBeLessThanOrEqual(drop(rangeM, heightM, elevationDeg) * 1.005 + 3e-5)
    })
    expect(checked).toBeGreaterThan(100)
  })
})
