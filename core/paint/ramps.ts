import type { Ramp } from './types.ts'

/** Warm is what comes back, cool is what is seen, ink is what is hidden. From faint to severe, from good to poor. */
export type RampFamily = 'warm' | 'cool' | 'ink'

/** Eight stops per family. On paper the severe end is the darkest, at night the lightest: always the one that stands out. */
export const RAMP_STOPS: Readonly<Record<RampFamily, { readonly day: readonly string[]; readonly night: readonly string[] }>> = {
  warm: {
    day: ['#fbeed6', '#f6d9a8', '#efbd75', '#e29a4f', '#c97439', '#a64f33', '#7c3230', '#4e1f2e'],
    night: ['#443a2a', '#63502f', '#856636', '#a97a3d', '#cd8747', '#ea955f', '#fba88a', '#ffcabf'],
  },
  cool: {
    day: ['#eef5f2', '#d3e8e4', '#aed5d2', '#81bcbf', '#559dab', '#357b94', '#235877', '#193855'],
    night: ['#24383b', '#2b4f53', '#32686e', '#3d8289', '#529ca6', '#74b3c6', '#9fcae2', '#cfe2f8'],
  },
  ink: {
    day: ['#e6e3dc', '#cfcdc8', '#b5b5b2', '#989a9a', '#7a7e81', '#5d6468', '#41494e', '#1f2428'],
    night: ['#33393d', '#474d50', '#5d6264', '#757978', '#8f918e', '#abaca6', '#c8c7c0', '#e9e6dd'],
  },
}

const channel = (hex: string, at: number): number => Number.parseInt(hex.slice(at, at + 2), 16)
const toLinear = (c8: number): number => {
  const c = c8 / 255
  return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4
}
const fromLinear = (c: number): number => Math.round(255 * (c <= 0.0031308 ? 12.92 * c : 1.055 * Math.max(0, c) ** (1 / 2.4) - 0.055))

/** sRGB '#rrggbb' to Oklab [L, a, b], a space of equal steps of lightness (B. Ottosson, 2020, "A perceptual color space"). */
export function oklabOfHex(hex: string): [number, number, number] {
  const [r, g, b] = [toLinear(channel(hex, 1)), toLinear(channel(hex, 3)), toLinear(channel(hex, 5))]
  const l = Math.cbrt(0.4122214708 * r + 0.5363325363 * g + 0.0514459929 * b)
  const m = Math.cbrt(0.2119034982 * r + 0.6806995451 * g + 0.1073969566 * b)
  const s = Math.cbrt(0.0883024619 * r + 0.2817188376 * g + 0.6299787005 * b)
  return [
    0.2104542553 * l + 0.793617785 * m - 0.0040720468 * s,
    1.9779984951 * l - 2.428592205 * m + 0.4505937099 * s,
    0.0259040371 * l + 0.7827717662 * m - 0.808675766 * s,
  ]
}
function rgbaOfOklab(L: number, a: number, b: number): number {
  const l = (L + 0.3963377774 * a + 0.2158037573 * b) ** 3
  const m = (L - 0.1055613458 * a - 0.0638541728 * b) ** 3
  const s = (L - 0.0894841775 * a - 1.291485548 * b) ** 3
  const red = fromLinear(4.0767416621 * l - 3.3077115913 * m + 0.2309699292 * s)
  const green = fromLinear(-1.2684380046 * l + 2.6097574011 * m - 0.3413193965 * s)
  const blue = fromLinear(-0.0041960863 * l - 0.7034186147 * m + 1.707614701 * s)
  const clip = (c: number) => Math.min(255, Math.max(0, c))
  return ((255 << 24) | (clip(blue) << 16) | (clip(green) << 8) | clip(red)) >>> 0
}

/** 256 opaque colours, evenly spaced between hex stops, interpolated in Oklab. */
export function coloursBetween(hexes: readonly string[]): Uint32Array {
  const labs = hexes.map(oklabOfHex)
  const rgba = new Uint32Array(256)
  for (let n = 0; n < 256; n++) {
    const at = (n / 255) * (labs.length - 1)
    const k = Math.min(labs.length - 2, Math.floor(at))
    const f = at - k
    const p = labs[k]!
    const q = labs[k + 1]!
    rgba[n] = rgbaOfOklab(p[0] + f * (q[0] - p[0]), p[1] + f * (q[1] - p[1]), p[2] + f * (q[2] - p[2]))
  }
  return rgba
}

/** A ramp of a family for one quantity: `stops` are the labelled values, low to high; colours run from the first to the last. `reverse`: the high end is the faint one. */
export function makeRamp(family: RampFamily, stops: readonly number[], below: Ramp['below'], reverse = false): Ramp {
  const table = (hexes: readonly string[]) => coloursBetween(reverse ? [...hexes].reverse() : hexes)
  return {
    stops,
    rgba: table(RAMP_STOPS[family].day),
    rgbaNight: table(RAMP_STOPS[family].night),
    low: stops[0]!,
    high: stops[stops.length - 1]!,
    below,
  }
}
/**
 * A ramp of differences about zero: cool at one end, warm at the other, paper between. `stops` are the labelled values, low to high, even about 0.
 * `warmEnd`: which end is warm, the one where more comes back or less is seen.
 */
export function makeDifferenceRamp(stops: readonly number[], warmEnd: 'low' | 'high'): Ramp {
  const table = (theme: 'day' | 'night', middle: string): Uint32Array => {
    const { warm, cool } = RAMP_STOPS
    const hexes = [...[6, 5, 4, 3, 1].map((n) => cool[theme][n]!), middle, ...[1, 3, 4, 5, 6].map((n) => warm[theme][n]!)]
    return coloursBetween(warmEnd === 'high' ? hexes : hexes.reverse())
  }
  return {
    stops,
    rgba: table('day', '#f4f1e8'),
    rgbaNight: table('night', '#2b3135'),
    low: stops[0]!,
    high: stops[stops.length - 1]!,
    below: 'hold',
  }
}
/** Colour of a value on a ramp as '#rrggbb', for legends and charts; null where the ground stays bare. */
export function rampHex(ramp: Ramp, value: number, night: boolean): string | null {
  if (Number.isNaN(value) || (value < ramp.low && ramp.below === 'bare')) return null
  const n = Math.round((255 * (value - ramp.low)) / (ramp.high - ramp.low))
  const c = ((night && ramp.rgbaNight) || ramp.rgba)[Math.min(255, Math.max(0, n))]!
  const two = (v: number) => (v & 255).toString(16).padStart(2, '0')
  return `#${two(c)}${two(c >>> 8)}${two(c >>> 16)}`
}
