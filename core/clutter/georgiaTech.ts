/** Constants of one terrain at one frequency. */
export interface GeorgiaTechTerms {
  readonly a: number
  readonly b: number
  readonly c: number
  readonly d: number
}
/**
 * Land clutter σ°, dB, at higher grazing angles: A(ψ+C)^B exp[−D/(1 + 0.1σ_h/λ)], ψ in rad. Source: Currie, in Eaves and Reedy, Principles
 * of Modern Radar (1987), form and constants from memory; never a default.
 */
export function georgiaTechStrengthDb(t: GeorgiaTechTerms, grazingDeg: number, roughnessM: number, wavelengthM: number): number {
  const psi = (grazingDeg * Math.PI) / 180
  return 10 * Math.log10(t.a * (psi + t.c) ** t.b * Math.exp(-t.d / (1 + (0.1 * roughnessM) / wavelengthM)))
}
