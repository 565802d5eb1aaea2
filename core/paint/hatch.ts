import { CELL } from '../polar/index.ts'

/** Side of the repeating pattern, px: a power of two. */
export const PATTERN_PX = 8

/** One state's pattern: straight RGBA for bare ground, and how strongly its marks lie over a value's colour. */
export interface Pattern {
  /** PATTERN_PX² colours, row by row. */
  readonly bare: Uint32Array
  /** Alpha 0..1 of the mark at each place. */
  readonly mark: Float32Array
}

const rgba = (rgb: readonly [number, number, number], alpha: number): number =>
  alpha <= 0 ? 0 : ((Math.round(alpha * 255) << 24) | (rgb[2] << 16) | (rgb[1] << 8) | rgb[0]) >>> 0

/** `fill` lies everywhere; `mark(x, y)` 0..1 is the strength of the line or dot. */
function pattern(
  ground: readonly [number, number, number],
  fill: number,
  ink: readonly [number, number, number],
  strength: number,
  mark: (x: number, y: number) => number,
): Pattern {
  const bare = new Uint32Array(PATTERN_PX * PATTERN_PX)
  const marks = new Float32Array(bare.length)
  for (let y = 0; y < PATTERN_PX; y++)
    for (let x = 0; x < PATTERN_PX; x++) {
      const m = mark(x, y) * strength
      const alpha = m + fill * (1 - m)
      const mix = (k: 0 | 1 | 2) => (alpha > 0 ? Math.round((ink[k] * m + ground[k] * fill * (1 - m)) / alpha) : 0)
      bare[y * PATTERN_PX + x] = rgba([mix(0), mix(1), mix(2)], alpha)
      marks[y * PATTERN_PX + x] = m
    }
  return { bare, mark: marks }
}
const DAY_INK = [31, 36, 40] as const
const NIGHT_INK = [233, 230, 221] as const
const NIGHT_VEIL = [8, 10, 12] as const

const rising = (x: number, y: number): number => [1, 0.4, 0, 0, 0, 0, 0, 0.4][(x + y) & 7]!
const falling = (x: number, y: number): number => (((x - y) & 7) === 0 && ((x + y) & 7) < 5 ? 1 : 0)
const dots = (x: number, y: number): number => ((x & 3) === 1 && (y & 3) === ((x >> 2) & 1 ? 3 : 1) ? 1 : 0)

/** Patterns by cell state: masked = veil with 45° lines, marginal = dots, unknown = broken lines the other way. */
export function statePatterns(night: boolean): ReadonlyMap<number, Pattern> {
  const ink = night ? NIGHT_INK : DAY_INK
  const veil = night ? NIGHT_VEIL : DAY_INK
  const unknown = pattern(veil, night ? 0.25 : 0.05, ink, night ? 0.3 : 0.34, falling)
  return new Map<number, Pattern>([
    [CELL.masked, pattern(veil, night ? 0.42 : 0.17, ink, night ? 0.12 : 0.13, rising)],
    [CELL.marginal, pattern(veil, night ? 0.2 : 0.08, ink, night ? 0.5 : 0.45, dots)],
    [CELL.beyondVoid, unknown],
    [CELL.outside, unknown],
  ])
}
