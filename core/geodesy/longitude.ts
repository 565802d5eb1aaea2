import { wrap180 } from '../units/index.ts'

/** Longitude to [-180, 180), exact where it already lies there. */
export const normalLon = (lon: number): number => (lon >= -180 && lon < 180 ? lon : wrap180(lon))
