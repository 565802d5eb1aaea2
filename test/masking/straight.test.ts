import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { elevationAngleDeg, heightOnRayM } from '../../core/geodesy/index.ts'
import { heightOfY, rangeOfX, straightDrop, straightX, straightY } from '../../core/masking/plane/straight.ts'

// The projective map against plane trigonometry on the sphere (rooms' own sight geometry, which has its own reference tests).
describe('straight plane', () => {
  it('makes every straight ray over the sphere a straight line, to a millimetre at 300 km', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -400, max: 9000, noNaN: true }),
        fc.double({ min: -3, max: 15, noNaN: true }),
        fc.double({ min: 50, max: 300_000, noNaN: true }),
        fc.double({ min: 0.01, max: 1, noNaN: true }),
        (antennaM, elevationDeg, rangeM, share) => {
          const inverse = 1 / 8_504_183
          const z = heightOnRayM(antennaM, elevationDeg, rangeM, 8_504_183)
          if (Math.abs(z) > 20_000) return
          const near = rangeM * share
          const tangent =
            (straightY(z, straightDrop(rangeM, inverse), inverse) - straightY(antennaM, 0, inverse)) / straightX(rangeM, inverse)
          const back = heightOfY(straightY(antennaM, 0, inverse) + tangent * straightX(near, inverse), straightDrop(near, inverse), inverse)
          expect(Math.abs(back - heightOnRayM(antennaM, elevationDeg, near, 8_504_183))).toBeLessThan(0.001)
        },
      ),
    )
  })
  it('orders directions as elevation angles do, and goes back from X to range', () => {
    const inverse = 1 / 6_371_000
    const tangent = (z: number, d: number): number => (straightY(z, straightDrop(d, inverse), inverse) - 50) / straightX(d, inverse)
    expect(tangent(250, 12_000)).toBeCloseTo(Math.tan((elevationAngleDeg(50, 250, 12_000, 6_371_000) * Math.PI) / 180), 6)
    for (const d of [1, 1000, 150_000, 250_000]) expect(rangeOfX(straightX(d, inverse), inverse)).toBeCloseTo(d, 3)
  })
  it('is the plain plane on a flat earth', () => {
    expect([straightX(5000, 0), straightDrop(5000, 0), straightY(70, 0, 0), heightOfY(70, 0, 0), rangeOfX(5000, 0)]).toEqual([
      5000, 0, 70, 70, 5000,
    ])
  })
})
