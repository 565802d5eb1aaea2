import { expect } from 'vitest'

/** One published or computed check case. */
export interface Case {
  readonly id: string
  readonly topic: string
  // biome-ignore lint/suspicious/noExplicitAny: inputs are as different as the models
  readonly inputs: Record<string, any>
  readonly expected: Record<string, number | null>
  readonly tolerance: number | string
  readonly source: string
  readonly confirmed: boolean
  readonly basis: string
}

/** Test title: what memory holds is said, and never called published. */
export const titleOf = (c: Case): string =>
  `${c.id}${c.basis.startsWith('memory') ? ` (from memory${c.basis.includes('corroborated') ? ', corroborated' : ''})` : ''} — ${c.source}`

/**
 * Bare numbers are absolute for dB, degrees and Weibull a_w and relative otherwise; "rel x" is relative, "x unit" absolute; half a unit of
 * the last of six printed digits is always added.
 */
export function toleranceFor(c: Case, key: string, expected: number): number {
  const text = String(c.tolerance)
  const number = Number(/([\d.]+(?:e-?\d+)?)/i.exec(text)?.[1])
  expect(Number.isFinite(number), `tolerance "${text}" of ${c.id}`).toBe(true)
  const relative = /rel/.test(text) || (/^[\d.e-]+$/i.test(text.trim()) && !/dB|deg|^aw$|Deg/i.test(key))
  const printed = expected === 0 ? 0 : 0.5 * 10 ** (Math.floor(Math.log10(Math.abs(expected))) - 5)
  return (relative ? number * Math.abs(expected) : number) + printed
}

/** Compares every expected number of a case with what was computed, and counts them. */
export function expectCase(c: Case, got: Record<string, number | null | undefined>): number {
  let compared = 0
  for (const [key, want] of Object.entries(c.expected)) {
    expect(got, `${c.id}: ${key} is not computed`).toHaveProperty(key)
    const value = got[key]
    if (want === null) expect(value, `${c.id}: ${key}`).toBeNull()
    else {
      expect(Number.isFinite(value), `${c.id}: ${key} is ${value}`).toBe(true)
      expect(Math.abs((value as number) - want), `${c.id}: ${key} got ${value}, want ${want}`).toBeLessThanOrEqual(
        toleranceFor(c, key, want),
      )
    }
    compared++
  }
  return compared
}
