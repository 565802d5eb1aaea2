import { describe, expect, it } from 'vitest'
import { earthFactorOfAir } from '../../core/index.ts'

describe('k from the air at the ground', () => {
  it('15 °C, 1013.25 hPa, 60 %: 319 N units by hand, gradient N/7.35 km, k 157/(157 + gradient)', () => {
    // es 17.1 hPa, e 10.3 hPa: 77.6·1003.0/288.15 + 72·10.3/288.15 + 3.75e5·10.3/288.15² = 270.1 + 2.6 + 46.5
    const air = earthFactorOfAir({ temperatureC: 15, pressureHpa: 1013.25, relativeHumidityPct: 60 })
    expect(air.surfaceN).toBeCloseTo(319.2, 0)
    expect(air.gradientNPerKm).toBeCloseTo(-air.surfaceN / 7.35, 9)
    expect(air.effectiveEarthFactor).toBeCloseTo(157 / (157 - air.surfaceN / 7.35), 9)
    expect(air.effectiveEarthFactor).toBeGreaterThan(4 / 3)
  })
})
