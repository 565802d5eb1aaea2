import { latFromWorldY, lonFromWorldX, type View, WORLD_WIDTH_M } from '../../../core/index.ts'

/** Side of a tile of the ground, px. */
export const TILE_PX = 512

/** Centre and zoom of a view: at zoom 0 one tile of 512 px is the world. */
export function cameraOf(view: View): { center: [number, number]; zoom: number } {
  return {
    center: [
      lonFromWorldX(view.worldX + (view.width / 2) * view.worldPerPx),
      latFromWorldY(view.worldY - (view.height / 2) * view.worldPerPx),
    ],
    zoom: Math.log2(WORLD_WIDTH_M / TILE_PX / view.worldPerPx),
  }
}
/** The view of one map tile. */
export function tileView(z: number, x: number, y: number, night: boolean): View {
  const side = WORLD_WIDTH_M / 2 ** z
  return {
    width: TILE_PX,
    height: TILE_PX,
    worldX: x * side - WORLD_WIDTH_M / 2,
    worldY: WORLD_WIDTH_M / 2 - y * side,
    worldPerPx: side / TILE_PX,
    night,
  }
}
