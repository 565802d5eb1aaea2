/** Below this ν the approximate loss is 0. */
export const KNIFE_EDGE_FROM = -0.78

/** First Fresnel radius, m, at d₁ and d₂ (m) from the ends: √(λ d₁ d₂/(d₁+d₂)). Mathematics. */
export const fresnelRadiusM = (wavelengthM: number, d1M: number, d2M: number): number => Math.sqrt((wavelengthM * d1M * d2M) / (d1M + d2M))

/** Diffraction parameter ν of an edge h metres above the straight path (negative when clear): h√[(2/λ)(1/d₁+1/d₂)]. Mathematics. */
export const edgeParameter = (clearanceLossM: number, wavelengthM: number, d1M: number, d2M: number): number =>
  clearanceLossM * Math.sqrt((2 / wavelengthM) * (1 / d1M + 1 / d2M))

/** Single knife-edge loss, dB, one way. Source: Recommendation ITU-R P.526 §4.1 approximation, from memory, corroborated by the exact integral. */
export function knifeEdgeLossDb(nu: number): number {
  if (nu <= KNIFE_EDGE_FROM) return 0
  const x = nu - 0.1
  return 6.9 + 20 * Math.log10(Math.sqrt(x * x + 1) + x)
}

/** Exact single knife-edge loss, dB, one way; negative where the edge adds. Mathematics (Fresnel integrals). */
export function knifeEdgeExactDb(nu: number): number {
  const [c, s] = fresnelIntegrals(nu)
  return -20 * Math.log10(Math.sqrt((1 - c - s) ** 2 + (c - s) ** 2) / 2)
}

/** Fresnel integrals C(x), S(x) of cos and sin(πt²/2). Mathematics: power series inside |x| = 3, asymptotic auxiliary functions beyond. */
export function fresnelIntegrals(x: number): [number, number] {
  const a = Math.abs(x)
  const sign = x < 0 ? -1 : 1
  const z = (Math.PI / 2) * a * a
  if (a < 3) {
    let term = a
    let c = a
    let s = 0
    for (let n = 1; n < 200; n++) {
      term *= z / n
      const part = (term / (2 * n + 1)) * (n % 4 < 2 ? 1 : -1)
      if (n % 2) s += part
      else c += part
      if (Math.abs(part) < 1e-17) break
    }
    return [sign * c, sign * s]
  }
  const inverse = 1 / (Math.PI * a * a) ** 2
  let f = 1
  let g = 1
  let tf = 1
  let tg = 1
  for (let n = 1; n < 8; n++) {
    tf *= -(4 * n - 1) * (4 * n - 3) * inverse
    tg *= -(4 * n + 1) * (4 * n - 1) * inverse
    f += tf
    g += tg
  }
  f /= Math.PI * a
  g /= Math.PI * Math.PI * a ** 3
  return [sign * (0.5 + f * Math.sin(z) - g * Math.cos(z)), sign * (0.5 - f * Math.cos(z) - g * Math.sin(z))]
}
