declare module 'mgrs' {
  /** Grid reference of [lon, lat] with `accuracy` digits each of easting and northing. */
  export function forward(at: [number, number], accuracy?: number): string
}
