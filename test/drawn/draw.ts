// A tiny terrain drawn as a grid of characters, and its mask drawn the same way.
//   terrain: a digit is the height of a post in tens of metres, '?' a void; posts are 100 m apart, north up, on a flat earth.
//   mask:    '@' the mast, '.' in sight, '#' masked, '~' unknown.
import { expect } from 'vitest'
import { sightPoint } from '../../core/masking/index.ts'
import type { Ground } from '../../core/terrain/index.ts'
import { type Extras, FLAT_EARTH, groundOn, placeAt, siteAt, utmShape } from '../terrain/grounds.ts'

export interface Drawing {
  /** Rows of the terrain. */
  readonly terrain: string
  /** Mast above the ground, m. */
  readonly mastM: number
  /** The mask wanted: one character per post, '@' at the mast. */
  readonly mask: string
  readonly extras?: (g: Ground) => Extras
  readonly clearingRadiusM?: number
}
const rowsOf = (text: string): string[] =>
  text
    .trim()
    .split('\n')
    .map((l) => l.trim())

export async function drawnGround(terrain: string, extras?: (g: Ground) => Extras): Promise<Ground> {
  const rows = rowsOf(terrain)
  const shape = await utmShape(rows[0].length, rows.length, 100)
  const height = (col: number, row: number): number => (rows[row][col] === '?' ? Number.NaN : 10 * Number(rows[row][col]))
  const bare = groundOn(shape, height)
  return extras ? groundOn(shape, height, extras(bare)) : bare
}
/** Checks the drawn mask post by post. */
export async function expectMask(d: Drawing): Promise<void> {
  const g = await drawnGround(d.terrain, d.extras)
  const wanted = rowsOf(d.mask)
  const row = wanted.findIndex((l) => l.includes('@'))
  const col = wanted[row].indexOf('@')
  const site = siteAt(g, col, row, { clearingRadiusM: d.clearingRadiusM ?? 0 })
  const got = wanted.map((line, r) =>
    [...line]
      .map((c, i) => {
        if (c === '@') return c
        const p = sightPoint(g, site, d.mastM, FLAT_EARTH, placeAt(g, i, r))
        return p.unknown ? '~' : p.inSight ? '.' : '#'
      })
      .join(''),
  )
  expect(`\n${got.join('\n')}\n`).toBe(`\n${wanted.join('\n')}\n`)
}
