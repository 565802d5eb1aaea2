import { describe, expect, it } from 'vitest'
import { exponentialDifferenceM, heightOnExponentialRay, heightOnRayM, REFERENCE_ATMOSPHERE } from '../../core/index.ts'

const A = 6_371_000
describe('ray through exponential air (Snell’s law in spherical layers, mathematics)', () => {
  it('is straight over the earth’s own radius where there is no air', () => {
    for (const [elevation, range] of [
      [0, 100_000],
      [0.5, 200_000],
      [10, 50_000],
    ])
      expect(heightOnExponentialRay(50, elevation, range, A, { surfaceN: 0, scaleHeightM: 7350 })).toBeCloseTo(
        heightOnRayM(50, elevation, range, A),
        2,
      )
  })
  it('keeps n·r·cos θ along the ray', () => {
    const n = (h: number) => 1 + 1e-6 * REFERENCE_ATMOSPHERE.surfaceN * Math.exp(-h / REFERENCE_ATMOSPHERE.scaleHeightM)
    const at = (range: number) => heightOnExponentialRay(30, 0.4, range, A)
    const start = n(30) * (A + 30) * Math.cos((0.4 * Math.PI) / 180)
    for (const range of [20_000, 120_000, 300_000]) {
      const h = at(range)
      // slope of the ray over the sphere from a central difference
      const tan = (at(range + 50) - at(range - 50)) / ((100 * (A + h)) / A)
      expect((n(h) * (A + h)) / Math.sqrt(1 + tan * tan) / start).toBeCloseTo(1, 7)
    }
  })
  it('near the ground bends as its gradient of −42.9 N/km says: k = 1.376', () => {
    const k = 1 / (1 - A * 42.857e-9)
    expect(k).toBeGreaterThan(1.37)
    expect(k).toBeLessThan(1.38)
    expect(Math.abs(heightOnExponentialRay(20, 0, 20_000, A) - heightOnRayM(20, 0, 20_000, k * A))).toBeLessThan(0.05)
  })
  it('stands over the 4/3 ray high and far, where the air is thin, and hardly differs near', () => {
    const off = (targetM: number, rangeM: number) => exponentialDifferenceM(30, targetM, rangeM, A, (4 / 3) * A)
    expect(Math.abs(off(300, 20_000))).toBeLessThan(2)
    const far = off(9000, 300_000)
    expect(far).toBeGreaterThan(30)
    expect(far).toBeLessThan(900)
    console.log(`difference at 9 000 m and 300 km: ${far.toFixed(0)} m; at 300 m and 20 km: ${off(300, 20_000).toFixed(2)} m`)
  })
})
