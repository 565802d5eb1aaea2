/** Gradient noise on a hashed lattice: a pure function of position and salt, so the island is the same on every run and machine. */

const GRADIENTS = 16
const gradX = new Float64Array(GRADIENTS)
const gradY = new Float64Array(GRADIENTS)
// Sixteen directions made of square roots only (22.5 degrees apart): no sine, whose last digit may differ between engines.
const c1 = Math.sqrt((1 + Math.SQRT1_2) / 2)
const s1 = Math.sqrt((1 - Math.SQRT1_2) / 2)
const quarter = [
  [1, 0],
  [c1, s1],
  [Math.SQRT1_2, Math.SQRT1_2],
  [s1, c1],
]
for (let k = 0; k < GRADIENTS; k++) {
  const [x, y] = quarter[k % 4]
  const turn = Math.floor(k / 4)
  gradX[k] = turn === 0 ? x : turn === 1 ? -y : turn === 2 ? -x : y
  gradY[k] = turn === 0 ? y : turn === 1 ? x : turn === 2 ? -y : -x
}

/** 32-bit hash of a lattice point. */
export function hash(ix: number, iy: number, salt: number): number {
  let h = Math.imul(ix, 0x9e3779b1) ^ Math.imul(iy, 0x85ebca77) ^ Math.imul(salt, 0xc2b2ae3d)
  h = Math.imul(h ^ (h >>> 15), 0x2c1b3c6d)
  h = Math.imul(h ^ (h >>> 12), 0x297a2d39)
  return (h ^ (h >>> 15)) >>> 0
}

/** Uniform number in [0, 1) of a lattice point. */
export const chance = (ix: number, iy: number, salt: number): number => hash(ix, iy, salt) / 4294967296

function slopeOf(ix: number, iy: number, salt: number, dx: number, dy: number): number {
  const k = hash(ix, iy, salt) & (GRADIENTS - 1)
  return gradX[k] * dx + gradY[k] * dy
}

/** Gradient noise, about −1…1, feature size 1. */
export function noise(x: number, y: number, salt: number): number {
  const ix = Math.floor(x)
  const iy = Math.floor(y)
  const fx = x - ix
  const fy = y - iy
  const u = fx * fx * fx * (fx * (fx * 6 - 15) + 10)
  const v = fy * fy * fy * (fy * (fy * 6 - 15) + 10)
  const a = slopeOf(ix, iy, salt, fx, fy)
  const b = slopeOf(ix + 1, iy, salt, fx - 1, fy)
  const c = slopeOf(ix, iy + 1, salt, fx, fy - 1)
  const d = slopeOf(ix + 1, iy + 1, salt, fx - 1, fy - 1)
  return 1.6 * (a + u * (b - a) + v * (c - a) + u * v * (a - b - c + d))
}

/** Sum of octaves, each half as large and half as high as the one before. */
export function fbm(x: number, y: number, octaves: number, salt: number): number {
  let sum = 0
  let amplitude = 1
  let total = 0
  for (let o = 0; o < octaves; o++) {
    sum += amplitude * noise(x, y, salt + o)
    total += amplitude
    amplitude *= 0.5
    // A turn of about 37 degrees between octaves hides the lattice.
    const tx = 2 * (0.8 * x - 0.6 * y)
    y = 2 * (0.6 * x + 0.8 * y)
    x = tx
  }
  return sum / total
}

/** Octaves of creased noise, 0…1: sharp crests, broad hollows. */
export function ridged(x: number, y: number, octaves: number, salt: number): number {
  let sum = 0
  let amplitude = 1
  let total = 0
  let weight = 1
  for (let o = 0; o < octaves; o++) {
    const crest = 1 - Math.min(1, Math.abs(noise(x, y, salt + o)))
    const value = crest * crest * weight
    sum += amplitude * value
    total += amplitude
    weight = Math.min(1, value * 1.6)
    amplitude *= 0.5
    const tx = 2.03 * (0.8 * x - 0.6 * y)
    y = 2.03 * (0.6 * x + 0.8 * y)
    x = tx
  }
  return sum / total
}

/** 0 below `from`, 1 above `to`, smooth between; `from` may be the larger. */
export function smoothstep(from: number, to: number, value: number): number {
  const t = Math.min(1, Math.max(0, (value - from) / (to - from)))
  return t * t * (3 - 2 * t)
}

export const mix = (a: number, b: number, t: number): number => a + (b - a) * t
