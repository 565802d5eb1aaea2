import { CELL } from '../polar/index.ts'

/** A place is in sight when its floor is at most this far above its own surface, m. */
export const SIGHT_ALLOWANCE_M = 0.0005
/** The allowance holds only for a place at most this share of the posting behind the point that hides it: rounding beside a crest, not a grazing line. */
export const ALLOWANCE_REACH = 0.5
/** Rounding of a running maximum, m. */
const ROUNDING_M = 1e-6
/** Share of a cell's ground that makes it in sight as a whole. */
export const WHOLE_CELL = 0.995

/** Is a place in sight whose floor stands `depthM` above its surface, hidden by a point `behindM` nearer the radar? */
export const isInSight = (depthM: number, behindM: number, postingM: number): boolean =>
  depthM <= ROUNDING_M || (depthM <= SIGHT_ALLOWANCE_M && behindM <= ALLOWANCE_REACH * postingM)

/** State of a cell of known ground from the share in sight, how far its centre is hidden and the error band there. */
export const knownState = (share: number, depthM: number, bandM: number): number =>
  share >= WHOLE_CELL ? CELL.inSight : share > 0 ? CELL.partly : depthM < bandM ? CELL.marginal : CELL.masked

/** Share in sight as 16 bits: 0 only if nothing is seen. */
export const packShare = (share: number): number => (share <= 0 ? 0 : Math.max(1, Math.round(Math.min(1, share) * 65535)))
