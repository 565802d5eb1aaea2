import { beforeAll, describe, expect, it } from 'vitest'
import {
  edgeParameter,
  finish,
  heightOnRayM,
  knifeEdgeLossDb,
  lossCauseAt,
  pdCurve,
  type VerticalCut,
  verticalCut,
  wavelengthM,
} from '../../core/index.ts'
import { layerNeed, plainGround, uniformLand, type Worked, work } from './plain.ts'

/** A plain with a long ridge of 150 m, 12 km east of a 50 m mast; clutter far under the noise. */
const RIDGE_M = 12_000
let flat: Worked
let cut: VerticalCut
let shadow: VerticalCut
const cutOf = (w: Worked, azimuthDeg: number, rows = 121): VerticalCut => {
  const need = w.engine.needOnShow(undefined)
  if (!need) throw new Error('no need')
  return finish(
    verticalCut(w.cells, need, { azimuthDeg, fromRangeM: 0, toRangeM: 38_000, fromHeightM: 100, toHeightM: 3100, columns: 95, rows }),
  )
}
const at = (c: VerticalCut, rangeM: number, heightM: number): number => {
  const near = (values: Float64Array, v: number) =>
    values.reduce((best, x, i) => (Math.abs(x - v) < Math.abs(values[best] - v) ? i : best), 0)
  return near(c.rangeM, rangeM) * c.heightM.length + near(c.heightM, heightM)
}

beforeAll(async () => {
  const ground = await plainGround(40_000, (east) => (Math.abs(east - RIDGE_M) < 250 ? 150 : 0))
  flat = work(ground, {
    needs: [layerNeed({ heightM: 1000, toRangeM: 36_000, swerling: 0, pd: 0.8 })],
    landTable: uniformLand(-120),
    run: { maxRangeM: 38_000, rangeStepM: 150, azimuthStepDeg: 0.325 },
  })
  cut = cutOf(flat, 270)
  shadow = cutOf(flat, 90)
}, 60_000)

describe('range-height plane', () => {
  it('S/N follows the radar equation: 27.11 dB for 1 m² at 20 NM falls by 40 log R (computed)', () => {
    for (const rangeM of [15_000, 25_000, 37_000]) {
      const n = at(cut, rangeM, 1500)
      const r = cut.rangeM[Math.floor(n / cut.heightM.length)]
      const h = cut.heightM[n % cut.heightM.length] - cut.antennaM
      const slantM = Math.hypot(r, h)
      expect(cut.snrDb[n]).toBeCloseTo(27.11 - 40 * Math.log10(slantM / (20 * 1852)), 1)
    }
  })
  it('margin 0 is the Pd that the need asks for, and each contour stands where its Pd is reached', () => {
    const need = flat.engine.needOnShow(undefined)
    if (!need) throw new Error('no need')
    const curve = pdCurve(need.required)
    expect(cut.contours.map((c) => Math.round(100 * c.pd))).toEqual([50, 80, 90])
    for (const c of cut.contours) expect(curve(c.marginDb)).toBeCloseTo(c.pd, 3)
    expect(cut.contours.filter((c) => c.ofNeed).map((c) => c.marginDb)).toEqual([0])
    let counted = 0
    for (let n = 0; n < cut.pdAt.length; n++) {
      if (cut.cause[n] !== 0 || !(cut.pdAt[n] > 0)) continue
      counted++
      expect(cut.marginDb[n]).toBeGreaterThanOrEqual(0)
      expect(cut.pdAt[n]).toBeCloseTo(curve(cut.marginDb[n]), 4)
    }
    expect(counted).toBeGreaterThan(5000)
  })
  it('the floor behind a ridge is the line over it, and everything under it is masked or marginal with Pd 0', () => {
    const top = Math.atan2(250 - shadow.antennaM, RIDGE_M - 250)
    let under = 0
    for (let i = 0; i < shadow.rangeM.length; i++) {
      const r = shadow.rangeM[i]
      if (r < RIDGE_M + 1000) continue
      const line = heightOnRayM(shadow.antennaM, (180 / Math.PI) * top, r, shadow.effectiveRadiusM)
      // the flank of the ridge lies between two posts, and the earth drops by 8 m on the way to it
      expect(Math.abs(shadow.floorM[i] - line)).toBeLessThan(0.02 * r * 0.05 + 15)
      for (let k = 0; k < shadow.heightM.length; k++) {
        const n = i * shadow.heightM.length + k
        if (shadow.heightM[k] >= shadow.floorM[i] || shadow.heightM[k] < shadow.groundM[i]) continue
        under++
        expect(['masked', 'marginal']).toContain(lossCauseAt(shadow.cause[n]))
        expect(shadow.pdAt[n]).toBe(0)
      }
    }
    expect(under).toBeGreaterThan(200)
  })
  it('under the floor the echo is down by at least the knife edge of the ridge both ways, and no more than a profile of two edges adds', () => {
    const rows = shadow.heightM.length
    const wave = wavelengthM(flat.cells.radar.frequencyHz)
    let counted = 0
    for (const rangeM of [16_000, 24_000, 32_000]) {
      const i = Math.floor(at(shadow, rangeM, 500) / rows)
      const r = shadow.rangeM[i]
      let before = Number.POSITIVE_INFINITY
      for (let k = rows - 1; k >= 0; k--) {
        const n = i * rows + k
        if (shadow.heightM[k] >= shadow.floorM[i] || Number.isNaN(shadow.snrDb[n])) continue
        const under = shadow.floorM[i] - shadow.heightM[k]
        const over = (under * RIDGE_M) / r
        const knifeDb = knifeEdgeLossDb(edgeParameter(over, wave, RIDGE_M, r - RIDGE_M))
        const lossDb = 27.11 - 40 * Math.log10(r / (20 * 1852)) - shadow.snrDb[n]
        expect(lossDb).toBeGreaterThan(2 * knifeDb - 1)
        expect(lossDb).toBeLessThan(2 * (knifeDb + 10 + 0.02 * 38 + 8))
        expect(shadow.snrDb[n]).toBeLessThan(before)
        before = shadow.snrDb[n]
        counted++
      }
    }
    expect(counted).toBeGreaterThan(5)
  })
  it('a wide pattern has no cone on a plain; a cosecant-squared one loses what stands above its end', () => {
    const end = finish(
      verticalCut(
        {
          ...flat.cells,
          radar: {
            ...flat.cells.radar,
            antenna: {
              ...flat.cells.radar.antenna,
              elevationPattern: 'cosecant-squared',
              elevationBeamwidthDeg: 4,
              cosecantLimitDeg: 20,
              tiltDeg: 2,
            },
          },
          tiltDeg: 2,
        },
        flat.engine.needOnShow(undefined) ?? fail(),
        { azimuthDeg: 270, fromRangeM: 0, toRangeM: 12_000, fromHeightM: 100, toHeightM: 5100, columns: 60, rows: 101 },
      ),
    )
    expect(end.rays.map((r) => [r.is, Math.round(10 * r.elevationDeg) / 10 + 0])).toEqual([
      ['peak', 2],
      ['lower', 0],
      ['upper', 4],
      ['end', 20],
    ])
    const causes = new Set<string | null>()
    let over = 0
    for (let i = 0; i < 60; i++)
      for (let k = 0; k < 101; k++) {
        const elevation = Math.atan2(end.heightM[k] - end.antennaM, end.rangeM[i]) * (180 / Math.PI)
        if (elevation < 20.3) continue
        over++
        causes.add(lossCauseAt(end.cause[i * 101 + k]))
      }
    expect(over).toBeGreaterThan(500)
    // inside the pulse nothing is heard; near it clutter alone would do as well
    expect([...causes].every((c) => c === 'above-beam' || c === 'out-of-range' || c === 'several')).toBe(true)
    expect(causes.has('above-beam')).toBe(true)
    expect(end.cones[0].radiusM).toBeGreaterThan(2400)
  })
  it('levels of the need are drawn inside its ranges only', () => {
    const [level] = cut.levels
    expect(level.levelM).toBe(1000)
    expect(Number.isNaN(level.heightM[0])).toBe(true)
    expect(Number.isNaN(level.heightM[94])).toBe(true)
    expect(level.heightM[40]).toBeCloseTo(1100, 3)
  })
})

function fail(): never {
  throw new Error('no need')
}
