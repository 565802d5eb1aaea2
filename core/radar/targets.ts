/** Where the ship rule was fitted. */
export const SHIP_LIMITS = { displacementKt: { low: 2, high: 17 } } as const

/** Median radar cross section of a ship near zero grazing, m²: 52 f^½ D^1.5, f in MHz, D in kilotons. Source: Skolnik, from memory. */
export const shipRcsM2 = (frequencyHz: number, displacementKt: number): number => 52 * Math.sqrt(frequencyHz / 1e6) * displacementKt ** 1.5
