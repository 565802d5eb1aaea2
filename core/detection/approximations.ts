import type { SwerlingCase } from './exactPd.ts'

/** Where the two fits hold; outside, they must not be used. */
export const ALBERSHEIM_LIMITS = { pfa: { low: 1e-7, high: 1e-3 }, pd: { low: 0.1, high: 0.9 }, pulses: { low: 1, high: 8096 } } as const
export const SHNIDMAN_LIMITS = { pfa: { low: 1e-9, high: 1e-3 }, pd: { low: 0.1, high: 0.99 }, pulses: { low: 1, high: 100 } } as const

/** S/N per pulse for a steady target, dB, within 0.2 dB. Source: Albersheim, Proc. IEEE 69 (1981), from memory, corroborated by exact values. */
export function albersheimSnrDb(pd: number, pfa: number, pulses: number): number {
  const a = Math.log(0.62 / pfa)
  const b = Math.log(pd / (1 - pd))
  return -5 * Math.log10(pulses) + (6.2 + 4.54 / Math.sqrt(pulses + 0.44)) * Math.log10(a + 0.12 * a * b + 1.7 * b)
}

/** S/N per pulse, dB, within about 0.5 dB. Source: Shnidman, IEEE Trans. AES 38 (2002), as printed by Richards, Fundamentals of Radar Signal Processing. */
export function shnidmanSnrDb(pd: number, pfa: number, pulses: number, swerling: SwerlingCase): number {
  const order = [Number.POSITIVE_INFINITY, 1, pulses, 2, 2 * pulses][swerling]
  const alpha = pulses < 40 ? 0 : 0.25
  const eta = Math.sqrt(-0.8 * Math.log(4 * pfa * (1 - pfa))) + Math.sign(pd - 0.5) * Math.sqrt(-0.8 * Math.log(4 * pd * (1 - pd)))
  const x = eta * (eta + 2 * Math.sqrt(pulses / 2 + (alpha - 0.25)))
  const c1 = (((17.7006 * pd - 18.4496) * pd + 14.5339) * pd - 3.525) / order
  const c2 = (Math.exp(27.31 * pd - 25.14) + (pd - 0.8) * (0.7 * Math.log(1e-5 / pfa) + (2 * pulses - 20) / 80)) / order
  return (pd <= 0.872 ? c1 : c1 + c2) + 10 * Math.log10(x / pulses)
}
