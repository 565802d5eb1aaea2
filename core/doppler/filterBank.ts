import { toDb } from '../units/index.ts'

export type FilterWindow = 'uniform' | 'hamming' | 'optimum'
/** Correlation of clutter between pulses, by lag in pulse intervals; its mean velocity is zero. */
export type LagCorrelation = (lag: number) => number

/** Symmetric window of N weights. Mathematics. */
export function windowWeights(kind: 'uniform' | 'hamming', pulses: number): Float64Array {
  return Float64Array.from({ length: pulses }, (_, n) =>
    kind === 'uniform' || pulses === 1 ? 1 : 0.54 - 0.46 * Math.cos((2 * Math.PI * n) / (pulses - 1)),
  )
}

/** Clutter covariance of N pulses with a white floor, row by row. */
export function clutterCovariance(pulses: number, correlation: LagCorrelation, floor: number): Float64Array {
  const m = new Float64Array(pulses * pulses)
  for (let i = 0; i < pulses; i++) for (let j = 0; j < pulses; j++) m[i * pulses + j] = correlation(Math.abs(i - j)) + (i === j ? floor : 0)
  return m
}

export interface FilterGain {
  /** |wᴴs|²/(wᴴMw), dB: improvement over clutter at the filter's frequency. */
  readonly improvementDb: number
  /** |wᴴs|²/(wᴴw), ratio: gain over white noise. */
  readonly noiseGain: number
}

/**
 * One filter of a bank of N pulses tuned to a Doppler frequency (share of the PRF), against clutter of covariance M (unit diagonal plus floor).
 * `optimum` takes w = M⁻¹s. Mathematics. N up to 64.
 */
export function filterGain(window: FilterWindow, pulses: number, frequencyOverPrf: number, m: Float64Array): FilterGain {
  const re = new Float64Array(pulses)
  const im = new Float64Array(pulses)
  for (let n = 0; n < pulses; n++) {
    re[n] = Math.cos(2 * Math.PI * frequencyOverPrf * n)
    im[n] = Math.sin(2 * Math.PI * frequencyOverPrf * n)
  }
  const taper = window === 'optimum' ? null : windowWeights(window, pulses)
  const factor = taper ? null : cholesky(m, pulses)
  const wRe = taper ? re.map((x, n) => x * taper[n]) : solve(factor as Float64Array, pulses, re)
  const wIm = taper ? im.map((x, n) => x * taper[n]) : solve(factor as Float64Array, pulses, im)
  let sRe = 0
  let sIm = 0
  let noise = 0
  let clutter = 0
  for (let i = 0; i < pulses; i++) {
    sRe += wRe[i] * re[i] + wIm[i] * im[i]
    sIm += wRe[i] * im[i] - wIm[i] * re[i]
    noise += wRe[i] ** 2 + wIm[i] ** 2
    let mRe = 0
    let mIm = 0
    for (let j = 0; j < pulses; j++) {
      mRe += m[i * pulses + j] * wRe[j]
      mIm += m[i * pulses + j] * wIm[j]
    }
    clutter += wRe[i] * mRe + wIm[i] * mIm
  }
  const signal = sRe ** 2 + sIm ** 2
  return { improvementDb: toDb(signal / clutter), noiseGain: signal / noise }
}

/** Lower triangle L of M = LLᵀ, M symmetric and positive. */
function cholesky(m: Float64Array, n: number): Float64Array {
  const l = new Float64Array(n * n)
  for (let i = 0; i < n; i++)
    for (let j = 0; j <= i; j++) {
      let sum = m[i * n + j]
      for (let k = 0; k < j; k++) sum -= l[i * n + k] * l[j * n + k]
      l[i * n + j] = i === j ? Math.sqrt(sum) : sum / l[j * n + j]
    }
  return l
}
function solve(l: Float64Array, n: number, b: Float64Array): Float64Array {
  const x = Float64Array.from(b)
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < i; k++) x[i] -= l[i * n + k] * x[k]
    x[i] /= l[i * n + i]
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) x[i] -= l[k * n + i] * x[k]
    x[i] /= l[i * n + i]
  }
  return x
}
