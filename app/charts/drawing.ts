/** Colour names of the sheet. On screen each is the CSS variable of the same name (`--ink-2`), in print the paper's hex. */
export type Ink =
  | 'sheet'
  | 'raised'
  | 'line'
  | 'ink'
  | 'ink-2'
  | 'ink-3'
  | 'accent'
  | 'warn'
  | 'warm-3'
  | 'warm-5'
  | 'warm-6'
  | 'warm-7'
  | 'cool-2'
  | 'cool-4'
  | 'cool-6'
  | 'cool-7'
/** A colour by name, or a fixed `#rrggbb` (ramps). */
export type Paint = Ink | `#${string}`

interface Styled {
  readonly stroke?: Paint
  readonly fill?: Paint
  readonly width?: number
  readonly dash?: readonly number[]
  readonly opacity?: number
}
export type Item =
  | ({ readonly kind: 'path'; readonly d: string } & Styled)
  | ({ readonly kind: 'circle'; readonly x: number; readonly y: number; readonly r: number } & Styled)
  | {
      readonly kind: 'text'
      readonly x: number
      readonly y: number
      readonly text: string
      readonly size: number
      readonly ink: Paint
      readonly anchor?: 'start' | 'middle' | 'end'
      readonly strong?: boolean
      /** Degrees about (x, y), clockwise. */
      readonly turn?: number
      /** Sheet-coloured outline, so that text stays readable over a picture. */
      readonly halo?: boolean
    }
/** A chart as plain marks: the same data becomes React elements on screen and an SVG string in the memo. */
export interface Drawing {
  readonly width: number
  readonly height: number
  /** One sentence for those who do not see it, also the memo's caption where none is given. */
  readonly title: string
  readonly items: readonly Item[]
}
/** Plot area inside a drawing. */
export interface Box {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}
export type Point = readonly [x: number, y: number]

/** Three places are far under a pixel and keep snapshots and files the same on every machine. */
export const round3 = (x: number): number => {
  const r = Math.round(x * 1000) / 1000
  return r === 0 ? 0 : r
}
/** Polyline of points; `close` adds Z. Points that are not numbers break the line. */
export function pathOf(points: readonly Point[], close = false): string {
  let d = ''
  let pen = false
  for (const [x, y] of points) {
    if (!Number.isFinite(x) || !Number.isFinite(y)) pen = false
    else {
      d += `${pen ? 'L' : 'M'}${round3(x)} ${round3(y)}`
      pen = true
    }
  }
  return close && d !== '' ? `${d}Z` : d
}
export const lineOf = (x1: number, y1: number, x2: number, y2: number): string =>
  pathOf([
    [x1, y1],
    [x2, y2],
  ])
export const boxPath = (left: number, top: number, right: number, bottom: number): string =>
  `M${round3(left)} ${round3(top)}H${round3(right)}V${round3(bottom)}H${round3(left)}Z`

/** Straight scale with its inverse. */
export interface Scale {
  readonly from: number
  readonly to: number
  at(value: number): number
  invert(px: number): number
}
export function scaleOf(from: number, to: number, pxFrom: number, pxTo: number): Scale {
  const slope = to === from ? 0 : (pxTo - pxFrom) / (to - from)
  return { from, to, at: (v) => pxFrom + (v - from) * slope, invert: (px) => (slope === 0 ? from : from + (px - pxFrom) / slope) }
}
