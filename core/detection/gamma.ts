// Incomplete gamma function; mathematics (series and Lentz continued fraction).

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059, 12.507343278686905,
  -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
]
/** ln Γ(x), x > 0; about 15 digits (Lanczos, g = 7). */
export function lnGamma(x: number): number {
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - lnGamma(1 - x)
  const z = x - 1
  let sum = LANCZOS[0]
  for (let i = 1; i < LANCZOS.length; i++) sum += LANCZOS[i] / (z + i)
  const t = z + 7.5
  return 0.5 * Math.log(2 * Math.PI) + (z + 0.5) * Math.log(t) - t + Math.log(sum)
}

/** Regularised upper incomplete gamma function Q(a, x), a > 0, x ≥ 0. */
export function gammaQ(a: number, x: number): number {
  if (!(x > 0)) return 1
  const scale = Math.exp(a * Math.log(x) - x - lnGamma(a))
  if (x < a + 1) {
    let term = 1 / a
    let sum = term
    for (let n = 1; n < 10_000 && term > sum * 1e-17; n++) sum += term *= x / (a + n)
    return Math.max(0, 1 - sum * scale)
  }
  const tiny = 1e-300
  let b = x + 1 - a
  let c = 1 / tiny
  let d = 1 / b
  let h = d
  for (let n = 1; n < 10_000; n++) {
    const an = -n * (n - a)
    b += 2
    d = an * d + b
    d = 1 / (Math.abs(d) < tiny ? tiny : d)
    c = b + an / c
    if (Math.abs(c) < tiny) c = tiny
    const step = d * c
    h *= step
    if (Math.abs(step - 1) < 1e-15) break
  }
  return h * scale
}
