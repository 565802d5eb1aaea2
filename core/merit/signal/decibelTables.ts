// Functions of decibels for loops over cells, from tables with linear interpolation. Mathematics.

const PER_DB = 100
const WIDE_DB = 60
const SUM_TABLE = Float64Array.from(
  { length: 2 * WIDE_DB * PER_DB + 2 },
  (_, n) => 10 * Math.log10(1 + 10 ** ((n / PER_DB - WIDE_DB) / 10)),
)

/** 10·log10(1 + 10^(x/10)): how far noise and a residue x dB over it stand above the noise alone, dB. Within 1e-5 dB; NaN (no residue) gives 0. */
export function aboveNoiseDb(residueDb: number): number {
  const at = (residueDb + WIDE_DB) * PER_DB
  if (!(at > 0)) return 0
  if (at >= 2 * WIDE_DB * PER_DB) return residueDb
  const n = at | 0
  return SUM_TABLE[n] + (at - n) * (SUM_TABLE[n + 1] - SUM_TABLE[n])
}

/** Below this the table of `roomDb` gives way to the function itself. */
const EXACT_BELOW_DB = 1
const exactRoom = (headDb: number): number => headDb + 10 * Math.log10(1 - 10 ** (-headDb / 10))
const ROOM_TABLE = Float64Array.from({ length: WIDE_DB * PER_DB + 2 }, (_, n) => (n === 0 ? 0 : exactRoom(n / PER_DB) - n / PER_DB))

/** 10·log10(10^(x/10) − 1), x > 0: how much residue over noise an echo x dB over what it needs still bears, dB; −Infinity at 0 and below. Within 1e-4 dB. */
export function roomOverNoiseDb(headDb: number): number {
  if (!(headDb > 0)) return Number.NEGATIVE_INFINITY
  if (headDb < EXACT_BELOW_DB) return exactRoom(headDb)
  const at = headDb * PER_DB
  if (at >= WIDE_DB * PER_DB) return headDb
  const n = at | 0
  return headDb + ROOM_TABLE[n] + (at - n) * (ROOM_TABLE[n + 1] - ROOM_TABLE[n])
}

const RATIO_LOW_DB = -120
const RATIO_HIGH_DB = 200
const RATIO_PER_DB = 20
const RATIO_TABLE = Float64Array.from(
  { length: (RATIO_HIGH_DB - RATIO_LOW_DB) * RATIO_PER_DB + 2 },
  (_, n) => 10 ** ((n / RATIO_PER_DB + RATIO_LOW_DB) / 10),
)
/** 10^(x/10), held at −120 and 200 dB; within 1.7e-5 of itself; NaN gives 0. */
export function ratioOfDb(db: number): number {
  const at = (db - RATIO_LOW_DB) * RATIO_PER_DB
  if (!(at > 0)) return Number.isNaN(db) ? 0 : RATIO_TABLE[0]
  const n = Math.min(RATIO_TABLE.length - 2, at | 0)
  return RATIO_TABLE[n] + Math.min(1, at - n) * (RATIO_TABLE[n + 1] - RATIO_TABLE[n])
}
