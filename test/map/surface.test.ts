import { describe, expect, it } from 'vitest'
import { cameraOf, TILE_PX, tileView } from '../../app/map/sheets/tiles.ts'
import { isSoftwareRenderer } from '../../app/map/sheets/webgl.ts'
import { lonLatAtPixel, WORLD_WIDTH_M } from '../../core/paint/index.ts'

describe('the base of the map', () => {
  it('knows software renderers by their names', () => {
    for (const name of [
      'ANGLE (Google, Vulkan 1.3.0 (SwiftShader Device (Subzero)))',
      'llvmpipe (LLVM 15.0.7, 256 bits)',
      'Microsoft Basic Render Driver',
    ])
      expect(isSoftwareRenderer(name)).toBe(true)
    for (const name of ['ANGLE (Intel, Mesa Intel(R) UHD Graphics 620, OpenGL 4.6)', 'Apple M2', 'Adreno (TM) 640'])
      expect(isSoftwareRenderer(name)).toBe(false)
  })
  it('cuts the world into tiles numbered from the north-west', () => {
    const whole = tileView(0, 0, 0, false)
    expect(whole.worldX).toBeCloseTo(-WORLD_WIDTH_M / 2, 6)
    expect(whole.worldY).toBeCloseTo(WORLD_WIDTH_M / 2, 6)
    const south = tileView(3, 5, 6, true)
    expect(lonLatAtPixel(south, 0, 0).lon).toBeCloseTo(45, 9)
    expect(south.width * south.worldPerPx).toBeCloseTo(WORLD_WIDTH_M / 8, 6)
    expect(south.night).toBe(true)
  })
  it('gives the centre and zoom at which a tile is drawn pixel for pixel', () => {
    const { center, zoom } = cameraOf(tileView(7, 40, 70, false))
    expect(zoom).toBeCloseTo(7, 12)
    const middle = lonLatAtPixel(tileView(7, 40, 70, false), TILE_PX / 2, TILE_PX / 2)
    expect(center[0]).toBeCloseTo(middle.lon, 9)
    expect(center[1]).toBeCloseTo(middle.lat, 9)
  })
})
