const BITS = 12
const LOG = new Float64Array((1 << BITS) + 1)
for (let i = 0; i < LOG.length; i++) LOG[i] = 10 * Math.log10(1 + i / (1 << BITS))
const DB_PER_OCTAVE = 10 * Math.log10(2)
const number = new Float64Array(1)
const words = new Uint32Array(number.buffer)
const littleEndian = new Uint8Array(new Uint32Array([1]).buffer)[0] === 1
const HIGH = littleEndian ? 1 : 0
const FRACTION = 1 / (1 << (20 - BITS))

/** 10·log10(x) from a table, for loops over millions of cells: error under 1e-5 dB; x a normal positive number (>= 1e-300), else NaN. */
export function decibel(x: number): number {
  if (!(x >= 1e-300)) return Number.NaN
  number[0] = x
  const w = words[HIGH]
  const mantissa = w & 0xfffff
  const i = mantissa >>> (20 - BITS)
  const l = LOG[i]
  return ((w >>> 20) - 1023) * DB_PER_OCTAVE + l + (LOG[i + 1] - l) * ((mantissa & ((1 << (20 - BITS)) - 1)) + 0.5) * FRACTION
}
