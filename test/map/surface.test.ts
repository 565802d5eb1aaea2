import { describe, expect, it } from 'vitest'
import { isSoftwareRenderer } from '../../app/map/sheets/webgl.ts'

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
})
