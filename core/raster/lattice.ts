import type { GridShape } from './types.ts'

/** Part of a raster in pixels. */
export interface Window {
  readonly col: number
  readonly row: number
  readonly width: number
  readonly height: number
}

/** Shape of a window; the window may reach beyond the raster. */
export const subShape = (shape: GridShape, w: Window): GridShape => ({
  ...shape,
  width: w.width,
  height: w.height,
  x0: shape.x0 + w.col * shape.colX + w.row * shape.rowX,
  y0: shape.y0 + w.col * shape.colY + w.row * shape.rowY,
})

/** Where pixel (0,0) of `b` lies on the lattice of `a`, if both share CRS, steps and whole-pixel offset (to 0.01 pixel over their extent); else null. */
export function sameLattice(a: GridShape, b: GridShape): { col: number; row: number } | null {
  if (a.crs.definition !== b.crs.definition) return null
  const step = Math.hypot(a.colX, a.colY)
  const span = Math.max(a.width, a.height, b.width, b.height)
  const allowed = (0.01 * step) / span
  for (const key of ['colX', 'colY', 'rowX', 'rowY'] as const) if (Math.abs(a[key] - b[key]) > allowed) return null
  const det = a.colX * a.rowY - a.rowX * a.colY
  const dx = b.x0 - a.x0
  const dy = b.y0 - a.y0
  const col = (a.rowY * dx - a.rowX * dy) / det
  const row = (a.colX * dy - a.colY * dx) / det
  const whole = { col: Math.round(col), row: Math.round(row) }
  return Math.abs(col - whole.col) < 0.01 && Math.abs(row - whole.row) < 0.01 ? whole : null
}
