import { describe, expect, it } from 'vitest'
import { declinationAt, InputError } from '../../core/index.ts'

describe('magnetic declination', () => {
  // NOAA NCEI and British Geological Survey, test values of the World Magnetic Model 2025: latitude, longitude, height km, epoch, declination
  it.each([
    [43, 93, 65, '2025-01-01', 0.5],
    [-33, 109, 51, '2025-01-01', -5.49],
    [-59, -8, 39, '2025-01-01', -15.75],
    [-50, -103, 3, '2025-01-01', 27.96],
    [-5, 159, 98, '2027-07-02', 7.79],
    [-2, 158, 93, '2029-07-02', 7.09],
  ])('lat %d lon %d, %d km, on %s: %d°', async (lat, lon, heightKm, date, deg) => {
    const d = await declinationAt({ lon, lat }, date, heightKm * 1000)
    expect(Math.abs(d.valueDeg - deg)).toBeLessThan(0.01)
    expect(d).toMatchObject({ date, model: 'WMM-2025' })
  })
  it('an earlier day takes the model of then', async () => {
    expect((await declinationAt({ lon: 10, lat: 50 }, '2021-06-01')).model).toBe('WMM-2020')
  })
  it.each(['2014-06-01', '2030-01-01', '2026-02-30', 'tomorrow'])('refused: %s', async (date) => {
    await expect(declinationAt({ lon: 10, lat: 50 }, date)).rejects.toThrow(InputError)
  })
})
