import { describe, expect, it } from 'vitest'
import {
  bendRay,
  fillReflectingRay,
  fresnelReflection,
  leastGrazingRad,
  makeReflectingRay,
  pointOnSurface,
  REFLECTS,
  RELIEF,
  type ReflectingRay,
  reflectingCodes,
  reflectionPoint,
  reflectionsAt,
  reflectionTable,
  reflectionTo,
  SURFACES,
  toDb,
  twoRayFactor,
  twoRayPower,
  waterRoughnessM,
  wavelengthM,
} from '../../core/index.ts'

const CELLS = 400
const STEP_M = 75
const F_HZ = 2.8e9
const CODES = [
  { terrain: 'water', coverHeightM: 0, sourceClass: null, mark: null },
  { terrain: 'open', coverHeightM: 0, sourceClass: null, mark: null },
  { terrain: 'forest', coverHeightM: 15, sourceClass: null, mark: null },
] as const
const cellsOf = (code: (i: number) => number, groundM: (i: number) => number = () => 0, relief: number = RELIEF.low) => ({
  groundM: Float32Array.from({ length: CELLS }, (_, i) => groundM(i)),
  code: Uint8Array.from({ length: CELLS }, (_, i) => code(i)),
  relief: new Uint8Array(CELLS).fill(relief),
  inSight: new Uint16Array(CELLS).fill(65_535),
})
const codes = reflectingCodes(CODES)!
function rayOver(cells: ReturnType<typeof cellsOf>, antennaM: number, c = 0): ReflectingRay {
  const ray = makeReflectingRay(CELLS, STEP_M)
  fillReflectingRay(ray, codes, cells, 0, CELLS, STEP_M / 2, antennaM, 0)
  bendRay(ray, c)
  return ray
}
const smooth = reflectionTable('water', F_HZ, 'H', 0)
const powerAt = (ray: ReflectingRay, cell: number, targetM: number): number => {
  const rangeM = (cell + 0.5) * STEP_M
  reflectionTo(ray, cell, rangeM, targetM, 0)
  if (ray.atKind === REFLECTS.none) return 1
  const p = pointOnSurface(ray.antennaM, targetM, ray.atHeightM, rangeM, ray.c)
  return p ? twoRayPower(p, smooth, wavelengthM(F_HZ), 1) : 1
}

describe('nulls of two rays off level water (Kerr, Propagation of Short Radio Waves, 1951: λ/2h apart in elevation)', () => {
  for (const [heightM, spacingDeg] of [
    [8, 0.38],
    [15, 0.2],
    [25, 0.12],
    [30, 0.1],
  ] as const)
    it(`S band, antenna ${heightM} m: ${spacingDeg}° apart`, () => {
      const ray = rayOver(
        cellsOf(() => 0),
        heightM,
      )
      const cell = 300
      const rangeM = (cell + 0.5) * STEP_M
      // elevations of the deepest places between half a spacing and five of them
      const nulls: number[] = []
      let before = 0
      let last = Number.NaN
      for (let e = 0.6 * spacingDeg; e < 6.4 * spacingDeg; e += spacingDeg / 400) {
        const power = powerAt(ray, cell, heightM + rangeM * Math.tan((e * Math.PI) / 180))
        if (power > last && before < 0) nulls.push(e - spacingDeg / 400)
        before = power - last
        last = power
      }
      expect(nulls.length).toBeGreaterThan(3)
      const spacing = (nulls[nulls.length - 1] - nulls[0]) / (nulls.length - 1)
      expect(spacing).toBeCloseTo(((wavelengthM(F_HZ) / (2 * heightM)) * 180) / Math.PI, 3)
      expect(Math.abs(spacing - spacingDeg)).toBeLessThan(0.006)
      console.log(`antenna ${heightM} m: nulls ${spacing.toFixed(3)}° apart`)
    })
})

describe('two rays over cells', () => {
  it('give the factor of the closed form over a sphere, and the same place of reflection', () => {
    const c = 1 / ((4 / 3) * 6_371_000)
    const ray = rayOver(
      cellsOf(() => 0),
      40,
      c,
    )
    let compared = 0
    for (let cell = 60; cell < CELLS; cell += 17)
      for (const targetM of [100, 300, 700]) {
        const rangeM = (cell + 0.5) * STEP_M
        const p = reflectionPoint(40, targetM, rangeM, 1 / c)
        const power = powerAt(ray, cell, targetM)
        expect(ray.atKind).toBe(REFLECTS.water)
        const { magnitude, phaseDeg } = fresnelReflection(SURFACES.sea, F_HZ, p.grazingDeg).horizontal
        const [h1, h2] = p.effectiveM
        // straight rays over the tangent plane: 2h₁h₂/d is their difference for low targets only
        const pathDifferenceM = Math.hypot(rangeM, h1 + h2) - Math.hypot(rangeM, h1 - h2)
        const closed = twoRayFactor({ ...p, pathDifferenceM }, wavelengthM(F_HZ), magnitude, phaseDeg)
        // away from nulls, where a hundredth of a turn is many decibels
        if (closed > 0.4) {
          expect(Math.abs(toDb(power) - 2 * toDb(closed))).toBeLessThan(0.05)
          compared++
        }
      }
    expect(compared).toBeGreaterThan(25)
  })

  it('only where the point lies on water or low-relief open ground, seen from both ends', () => {
    const at = (ray: ReflectingRay, cell = 200, targetM = 300): number => {
      reflectionTo(ray, cell, (cell + 0.5) * STEP_M, targetM, 0)
      return ray.atKind
    }
    expect(
      at(
        rayOver(
          cellsOf(() => 0),
          30,
        ),
      ),
    ).toBe(REFLECTS.water)
    expect(
      at(
        rayOver(
          cellsOf(() => 1),
          30,
        ),
      ),
    ).toBe(REFLECTS.open)
    expect(
      at(
        rayOver(
          cellsOf(() => 2),
          30,
        ),
      ),
    ).toBe(REFLECTS.none)
    expect(
      at(
        rayOver(
          cellsOf(() => 1, undefined, RELIEF.high),
          30,
        ),
      ),
    ).toBe(REFLECTS.none)
    // the point toward 300 m at 15 km lies 1 367 m out; forest there, water elsewhere
    expect(
      at(
        rayOver(
          cellsOf((i) => (i > 15 && i < 21 ? 2 : 0)),
          30,
        ),
      ),
    ).toBe(REFLECTS.none)
    // a hill that the reflected ray meets, and the direct one clears
    const hill = rayOver(
      cellsOf(
        () => 0,
        (i) => (i === 60 ? 80 : 0),
      ),
      30,
    )
    expect(at(hill)).toBe(REFLECTS.none)
    expect(at(hill, 50, 300)).toBe(REFLECTS.water)
    const hidden = cellsOf(() => 0)
    hidden.inSight.fill(0)
    expect(at(rayOver(hidden, 30))).toBe(REFLECTS.none)
    expect(reflectingCodes([CODES[2]])).toBeNull()
  })

  it('found the same from a start that nearer targets left and from the radar on', () => {
    const rough = cellsOf(
      (i) => (i % 37 < 4 ? 2 : i % 2),
      (i) => 3 * Math.sin(i / 7),
    )
    const walked = rayOver(rough, 35)
    const fresh = rayOver(rough, 35)
    let start = 0
    let found = 0
    for (let cell = 2; cell < CELLS; cell++) {
      const rangeM = (cell + 0.5) * STEP_M
      start = reflectionTo(walked, cell, rangeM, 400, start)
      reflectionTo(fresh, cell, rangeM, 400, 0)
      expect(walked.atKind).toBe(fresh.atKind)
      if (fresh.atKind !== REFLECTS.none) expect(walked.atHeightM).toBe(fresh.atHeightM)
      if (fresh.atKind !== REFLECTS.none) found++
    }
    expect(found).toBeGreaterThan(100)
  })

  it('one height at a time over a whole ray gives the same surfaces', () => {
    const rough = cellsOf(
      (i) => (i % 37 < 4 ? 2 : i % 5 === 0 ? 0 : 1),
      (i) => 2 * Math.sin(i / 9),
    )
    let found = 0
    for (const c of [0, 1 / 8_494_667])
      for (const targetM of [60, 400, 1500]) {
        const ray = rayOver(rough, 35, c)
        const seen = new Map<number, number>()
        reflectionsAt(ray, targetM, 2, CELLS, (from, to, kind, heightM) => {
          for (let j = from; j < to; j++) seen.set(j, kind * 1000 + heightM)
        })
        const one = rayOver(rough, 35, c)
        for (let j = 2; j < CELLS; j++) {
          reflectionTo(one, j, (j + 0.5) * STEP_M, targetM, 0)
          expect(seen.get(j) ?? 0, `cell ${j} at ${targetM} m`).toBe(one.atKind === REFLECTS.none ? 0 : one.atKind * 1000 + one.atHeightM)
          if (one.atKind !== REFLECTS.none) found++
        }
      }
    expect(found).toBeGreaterThan(200)
  })

  it('rougher water throws back less; a perfect null has a floor', () => {
    const size = (t: { real: Float64Array; imaginary: Float64Array }) => Math.hypot(t.real[200], t.imaginary[200])
    const waves = [0, 1, 3, 5].map((s) => size(reflectionTable('water', F_HZ, 'V', waterRoughnessM(s))))
    for (let n = 1; n < waves.length; n++) expect(waves[n]).toBeLessThan(waves[n - 1])
    const ray = rayOver(
      cellsOf(() => 0),
      30,
    )
    for (let h = 1; h < 2000; h += 0.5) expect(powerAt(ray, 250, h)).toBeGreaterThan(0)
    expect(leastGrazingRad(0.1, 8.5e6)).toBeCloseTo(0.00123, 4)
  })
})
