/** A smooth path over the effective earth: distance and effective radius in m, heights of the ends above the smooth surface in m. */
export interface SmoothPath {
  readonly distanceM: number
  readonly firstM: number
  readonly secondM: number
  readonly effectiveRadiusM: number
  readonly frequencyHz: number
  readonly polarisation: 'H' | 'V'
  readonly permittivity: number
  readonly conductivitySm: number
}
/** Intermediate quantities of the first-mode method. */
export interface SphericalTerms {
  readonly admittance: number
  readonly beta: number
  readonly distance: number
  readonly heights: readonly [number, number]
  /** Loss of the first mode, dB; only meaningful beyond the horizon. */
  readonly lossDb: number
}

/** First-mode diffraction over a smooth sphere. Source: Recommendation ITU-R P.526-14 §3.1.1, from memory. */
export function firstModeDiffraction(p: SmoothPath, radiusM = p.effectiveRadiusM): SphericalTerms {
  const ae = radiusM / 1000
  const f = p.frequencyHz / 1e6
  const loss = (18000 * p.conductivitySm) / f
  const horizontal = 0.36 * (ae * f) ** (-1 / 3) * ((p.permittivity - 1) ** 2 + loss ** 2) ** -0.25
  const admittance = p.polarisation === 'H' ? horizontal : horizontal * Math.sqrt(p.permittivity ** 2 + loss ** 2)
  const k2 = admittance ** 2
  const beta = (1 + 1.6 * k2 + 0.67 * k2 * k2) / (1 + 4.5 * k2 + 1.53 * k2 * k2)
  const distance = 2.188 * beta * f ** (1 / 3) * ae ** (-2 / 3) * (p.distanceM / 1000)
  const height = (h: number) => 9.575e-3 * beta * f ** (2 / 3) * ae ** (-1 / 3) * h
  const heights = [height(p.firstM), height(p.secondM)] as const
  const far = distance >= 1.6 ? 11 + 10 * Math.log10(distance) - 17.6 * distance : -20 * Math.log10(distance) - 5.6488 * distance ** 1.425
  const gain = (y: number) => {
    const b = beta * y
    const g = b > 2 ? 17.6 * Math.sqrt(b - 1.1) - 5 * Math.log10(b - 1.1) - 8 : 20 * Math.log10(b + 0.1 * b ** 3)
    return Math.max(g, 2 + 20 * Math.log10(admittance))
  }
  return { admittance, beta, distance, heights, lossDb: -(far + gain(heights[0]) + gain(heights[1])) }
}

/**
 * Diffraction loss over a smooth sphere at any distance, dB, one way, 0 where the path is clear enough. Heights above 0 m.
 * Source: Recommendation ITU-R P.526-14 §3.2, from memory.
 */
export function sphericalLossDb(p: SmoothPath): number {
  const ae = p.effectiveRadiusM / 1000
  const d = p.distanceM / 1000
  const h1 = Math.max(p.firstM, p.secondM)
  const h2 = Math.min(p.firstM, p.secondM)
  const sight = Math.sqrt(2 * ae) * (Math.sqrt(0.001 * h1) + Math.sqrt(0.001 * h2))
  if (d >= sight) return firstModeDiffraction(p).lossDb
  const c = (h1 - h2) / (h1 + h2)
  const m = (250 * d * d) / (ae * (h1 + h2))
  const b = 2 * Math.sqrt((m + 1) / (3 * m)) * Math.cos(Math.PI / 3 + Math.acos(((3 * c) / 2) * Math.sqrt((3 * m) / (m + 1) ** 3)) / 3)
  const d1 = (d * (1 + b)) / 2
  const d2 = d - d1
  const clear = ((h1 - (500 * d1 * d1) / ae) * d2 + (h2 - (500 * d2 * d2) / ae) * d1) / d
  const lambda = 299.792458 / (p.frequencyHz / 1e6)
  const required = 17.456 * Math.sqrt((d1 * d2 * lambda) / d)
  if (clear > required) return 0
  const modified = 500 * (d / (Math.sqrt(h1) + Math.sqrt(h2))) ** 2
  const at = firstModeDiffraction(p, modified * 1000).lossDb
  return at < 0 ? 0 : (1 - clear / required) * at
}

/** Magnitudes of the first zeros of the Airy function Ai; mathematics. */
function airyZero(s: number): number {
  if (s === 1) return 2.338107410459767
  if (s === 2) return 4.08794944413097
  const t = (3 * Math.PI * (4 * s - 1)) / 8
  return t ** (2 / 3) * (1 + 5 / 48 / t ** 2 - 5 / 36 / t ** 4 + 77125 / 82944 / t ** 6)
}

/**
 * Exact diffraction loss over a smooth, perfectly conducting sphere in horizontal polarisation, dB, beyond the horizon: residue series
 * (Van der Pol and Bremmer; Fock). Height gains solve f″ = (t − y)f, f(0) = 0, f′(0) = −1. Mathematics.
 */
export function residueSeriesLossDb(
  p: Pick<SmoothPath, 'distanceM' | 'firstM' | 'secondM' | 'effectiveRadiusM' | 'frequencyHz'>,
  modes = 30,
): number {
  const k = (2 * Math.PI * p.frequencyHz) / 299_792_458
  const x = ((k * p.effectiveRadiusM) / 2) ** (1 / 3) * (p.distanceM / p.effectiveRadiusM)
  const unit = (2 / (k * p.effectiveRadiusM)) ** (1 / 3) * k
  let re = 0
  let im = 0
  for (let s = 1; s <= modes; s++) {
    const a = airyZero(s)
    const tRe = a / 2
    const tIm = (a * Math.sqrt(3)) / 2
    const [f1Re, f1Im] = heightGain(tRe, tIm, p.firstM * unit)
    const [f2Re, f2Im] = heightGain(tRe, tIm, p.secondM * unit)
    const decay = Math.exp(-x * tIm)
    const eRe = decay * Math.cos(x * tRe)
    const eIm = decay * Math.sin(x * tRe)
    const gRe = f1Re * f2Re - f1Im * f2Im
    const gIm = f1Re * f2Im + f1Im * f2Re
    re += eRe * gRe - eIm * gIm
    im += eRe * gIm + eIm * gRe
  }
  return -20 * Math.log10(2 * Math.sqrt(Math.PI * x) * Math.hypot(re, im))
}

/** f(y) by fourth-order Runge–Kutta in complex arithmetic. */
function heightGain(tRe: number, tIm: number, y: number): [number, number] {
  const steps = Math.max(200, Math.ceil(y * 400))
  const h = y / steps
  let [f, fi, g, gi] = [0, 0, -1, 0]
  const slope = (at: number, u: number, v: number): [number, number] => [(tRe - at) * u - tIm * v, (tRe - at) * v + tIm * u]
  for (let n = 0; n < steps; n++) {
    const at = n * h
    const [a1, b1] = slope(at, f, fi)
    const [a2, b2] = slope(at + h / 2, f + (h / 2) * g, fi + (h / 2) * gi)
    const [a3, b3] = slope(at + h / 2, f + (h / 2) * (g + (h / 2) * a1), fi + (h / 2) * (gi + (h / 2) * b1))
    const [a4, b4] = slope(at + h, f + h * (g + (h / 2) * a2), fi + h * (gi + (h / 2) * b2))
    f += h * g + ((h * h) / 6) * (a1 + a2 + a3)
    fi += h * gi + ((h * h) / 6) * (b1 + b2 + b3)
    g += (h / 6) * (a1 + 2 * a2 + 2 * a3 + a4)
    gi += (h / 6) * (b1 + 2 * b2 + 2 * b3 + b4)
  }
  return [f, fi]
}
