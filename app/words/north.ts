/** Declination azimuths at the face are turned by, with the day and the model or survey it is from. */
export interface FaceNorth {
  /** Positive east, deg. */
  readonly valueDeg: number
  readonly date: string
  readonly model: string
}
/** Unit of a magnetic azimuth. */
export const MAGNETIC = '°M'

let north: FaceNorth | null = null
/** The one switch of the face from true to magnetic azimuths; null = true. Files and the batch command stay true. */
export const setFaceNorth = (to: FaceNorth | null): void => {
  north = to
}
/** What azimuths at the face are counted from; null = true north. */
export const faceNorth = (): FaceNorth | null => north

/** `3.2° E`, `0.4° W`. */
export const declinationWords = (deg: number): string => `${Math.abs(deg).toFixed(1)}° ${deg < 0 ? 'W' : 'E'}`

/** What azimuths are counted from, for the memo. */
export const northWords = (): string =>
  north === null
    ? 'Azimuths are counted from true north'
    : `Azimuths in text and tables are magnetic (°M), declination ${declinationWords(north.valueDeg)} on ${north.date} (${north.model}); charts and files keep true north`

export const NORTH_WORDS = {
  title: 'North',
  kinds: [
    { id: 'true', words: 'true north' },
    { id: 'magnetic', words: 'magnetic north' },
  ],
  files: 'Charts and files keep true north',
} as const
