import { PATTERN_PX } from './hatch.ts'

/** Patterns that tell classes of a layer apart where their colours alone do not: in grey, and for those who see colours otherwise. */
export const CLASS_PATTERNS = ['plain', 'rising', 'falling', 'dots', 'level', 'upright', 'grid', 'cross', 'checks', 'rings'] as const
export type ClassPattern = (typeof CLASS_PATTERNS)[number]

const RING = ['.xx.', 'x..x', 'x..x', '.xx.']
const HAS_MARK: Readonly<Record<ClassPattern, (x: number, y: number) => boolean>> = {
  plain: () => false,
  rising: (x, y) => ((x + y) & 7) < 2,
  falling: (x, y) => ((x - y) & 7) < 2,
  dots: (x, y) => (x & 3) < 2 && (y & 3) < 2 && ((x >> 2) & 1) === ((y >> 2) & 1),
  level: (_, y) => (y & 3) === 0,
  upright: (x) => (x & 3) === 0,
  grid: (x, y) => (x & 7) === 0 || (y & 7) === 0,
  cross: (x, y) => ((x + y) & 7) === 0 || ((x - y) & 7) === 0,
  checks: (x, y) => ((x >> 2) & 1) === ((y >> 2) & 1),
  rings: (x, y) => RING[y & 7]?.[x & 7] === 'x' || RING[(y - 4) & 7]?.[(x - 4) & 7] === 'x',
}
/** Does a pattern's mark lie on a pixel of the world? The pattern repeats every 8 pixels. */
export const classMarkAt = (pattern: ClassPattern, x: number, y: number): boolean => HAS_MARK[pattern](x, y)

/** Pixels of one 8 × 8 piece of a pattern that carry its mark, for a legend. */
export function classMarkPixels(pattern: ClassPattern): readonly (readonly [x: number, y: number])[] {
  const out: (readonly [number, number])[] = []
  for (let y = 0; y < PATTERN_PX; y++) for (let x = 0; x < PATTERN_PX; x++) if (HAS_MARK[pattern](x, y)) out.push([x, y])
  return out
}

const MIX = 0.42
/** Lightness of an sRGB colour, 0…1: what is left of it in grey (ITU-R BT.601 weights). */
export const greyOf = (r: number, g: number, b: number): number => (0.299 * r + 0.587 * g + 0.114 * b) / 255
/** Colour of the mark on a class: darker on light colours, lighter on dark ones. Components 0…255. */
export function classMarkColour(r: number, g: number, b: number): readonly [number, number, number] {
  const to = greyOf(r, g, b) > 0.5 ? 0 : 255
  const mix = (c: number): number => Math.round(c + (to - c) * MIX)
  return [mix(r), mix(g), mix(b)]
}
