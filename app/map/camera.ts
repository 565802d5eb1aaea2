import { type LonLat, type View, viewOfBox, WORLD_WIDTH_M, worldXFromLon, worldYFromLat } from '../../core/index.ts'

/** Nearest and farthest view, web mercator metres per pixel. */
export const NEAREST = 0.25
export const FARTHEST = 20_000
const HALF_WORLD = WORLD_WIDTH_M / 2
const clamp = (v: number, low: number, high: number): number => Math.min(high, Math.max(low, v))

/** A view before anything is known. */
export const openingView = (night: boolean): View => ({ width: 0, height: 0, worldX: 0, worldY: 0, worldPerPx: 100, night })

/** The ground moves by (dx, dy) pixels: right and down are positive. The middle of the view stays on the map. */
export function panned(v: View, dx: number, dy: number): View {
  const half = (v.height / 2) * v.worldPerPx
  const middleY = clamp(v.worldY + dy * v.worldPerPx - half, -HALF_WORLD, HALF_WORLD)
  return { ...v, worldX: wrapped(v.worldX - dx * v.worldPerPx, v), worldY: middleY + half }
}
/** The view's middle is kept within half a turn of Greenwich, so that long pans lose no precision. */
const wrapped = (worldX: number, v: View): number => {
  const half = (v.width / 2) * v.worldPerPx
  return worldX - WORLD_WIDTH_M * Math.round((worldX + half) / WORLD_WIDTH_M)
}
/** Zoomed by `factor` (2 = twice as near) about a pixel, which keeps its place. */
export function zoomed(v: View, factor: number, px: number, py: number): View {
  const worldPerPx = clamp(v.worldPerPx / factor, NEAREST, FARTHEST)
  return panned(
    { ...v, worldX: v.worldX + px * (v.worldPerPx - worldPerPx), worldY: v.worldY - py * (v.worldPerPx - worldPerPx), worldPerPx },
    0,
    0,
  )
}
/** The same middle in another size. */
export function resized(v: View, width: number, height: number): View {
  return {
    ...v,
    width,
    height,
    worldX: v.worldX + ((v.width - width) / 2) * v.worldPerPx,
    worldY: v.worldY - ((v.height - height) / 2) * v.worldPerPx,
  }
}
/** Shows all places, `marginPx` from the edge and right of `insetPx`, which something covers; longitudes are taken on the turn nearest the first. */
export function fitted(v: View, places: readonly LonLat[], marginPx: number, insetPx = 0): View {
  if (places.length === 0 || v.width === 0) return v
  const first = worldXFromLon(places[0]!.lon)
  const xs = places.map((p) => {
    const x = worldXFromLon(p.lon)
    return x - WORLD_WIDTH_M * Math.round((x - first) / WORLD_WIDTH_M)
  })
  const ys = places.map((p) => worldYFromLat(p.lat))
  const box = { west: Math.min(...xs), east: Math.max(...xs), south: Math.min(...ys), north: Math.max(...ys) }
  const free = { width: Math.max(1, v.width - insetPx), height: v.height }
  const fit = viewOfBox(box, free, marginPx, v.night)
  const worldPerPx = clamp(fit.worldPerPx, NEAREST, FARTHEST)
  const middleX = (box.west + box.east) / 2
  const middleY = (box.south + box.north) / 2
  return panned(
    { ...v, worldPerPx, worldX: middleX - (insetPx + free.width / 2) * worldPerPx, worldY: middleY + (v.height / 2) * worldPerPx },
    0,
    0,
  )
}
/** The view to paint for a view on the page: device pixels up to a budget, and a margin all round where the budget has room, so that small pans need nothing new. */
export function paintView(v: View, pixelRatio: number, budgetPx: number, marginPx: number): View {
  const scale = Math.min(pixelRatio, Math.sqrt(budgetPx / Math.max(1, v.width * v.height)))
  let margin = marginPx
  while (margin > 0 && (v.width + 2 * margin) * (v.height + 2 * margin) * scale * scale > budgetPx) margin -= 8
  margin = Math.max(0, margin)
  const width = Math.max(1, Math.round((v.width + 2 * margin) * scale))
  const height = Math.max(1, Math.round((v.height + 2 * margin) * scale))
  return {
    width,
    height,
    worldX: v.worldX - margin * v.worldPerPx,
    worldY: v.worldY + margin * v.worldPerPx,
    worldPerPx: (v.worldPerPx * (v.width + 2 * margin)) / width,
    night: v.night,
  }
}
/** How a picture of one view lies in another: translate (px), then scale. */
export function placement(picture: View, now: View): { x: number; y: number; scale: number } {
  return {
    x: (picture.worldX - now.worldX) / now.worldPerPx,
    y: (now.worldY - picture.worldY) / now.worldPerPx,
    scale: picture.worldPerPx / now.worldPerPx,
  }
}
/** Does a picture fill a view, whatever its scale? */
export function covers(picture: View, now: View): boolean {
  const p = placement(picture, now)
  const eps = 0.75
  return p.x <= eps && p.y <= eps && p.x + picture.width * p.scale >= now.width - eps && p.y + picture.height * p.scale >= now.height - eps
}
