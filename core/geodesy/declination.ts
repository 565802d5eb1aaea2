import { InputError } from '../errors/index.ts'
import type { LonLat } from './types.ts'

export interface Declination {
  /** Angle from true to magnetic north, positive east, deg. */
  readonly valueDeg: number
  /** Day it holds for, ISO 8601. */
  readonly date: string
  /** Name of the field model, `WMM-2025`. */
  readonly model: string
}
/** First and last day of the newest field model. */
export const DECLINATION_DATES = { first: '2024-11-13', last: '2029-11-13' } as const

/**
 * Magnetic declination at a place on a day, by the World Magnetic Model that holds then (2015 to November 2029); height above the ellipsoid, m; deg, positive
 * east. Better than 1° away from the magnetic poles, where compasses serve nobody. Throws InputError for a day outside the models. The model's
 * coefficients and their evaluation are those of the geomagnetism library; loaded on first use.
 * Source: NOAA NCEI and British Geological Survey, The US/UK World Magnetic Model for 2025-2030 (2024).
 */
export async function declinationAt({ lon, lat }: LonLat, date: string, heightM = 0): Promise<Declination> {
  const day = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date)
  const whole = new Date(day ? `${date}T12:00:00Z` : Number.NaN)
  const fault = (found: string) =>
    new InputError({ code: 'declination-date', found, remedy: `give a day from 2015-01-01 to ${DECLINATION_DATES.last}, as 2026-12-01` })
  if (!day || Number.isNaN(whole.getTime()) || whole.toISOString().slice(0, 10) !== date) throw fault(`"${date.slice(0, 20)}" is no day`)
  if (date < '2015-01-01' || date > DECLINATION_DATES.last) throw fault(`no field model holds on ${date}`)
  const { model } = (await import('geomagnetism')).default
  const field = model(whole)
  return { valueDeg: field.point([lat, lon, heightM / 1000]).decl, date, model: field.name }
}
