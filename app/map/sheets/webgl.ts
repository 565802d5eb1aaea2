/** What draws WebGL 2 here. A software renderer draws 5 to 15 frames a second: the 2-D canvas serves better. */
export type WebglKind = 'processor' | 'software' | 'none'
export function webglKind(): WebglKind {
  const gl = document.createElement('canvas').getContext('webgl2')
  if (!gl) return 'none'
  const info = gl.getExtension('WEBGL_debug_renderer_info')
  const renderer = String(info ? gl.getParameter(info.UNMASKED_RENDERER_WEBGL) : gl.getParameter(gl.RENDERER))
  gl.getExtension('WEBGL_lose_context')?.loseContext()
  return isSoftwareRenderer(renderer) ? 'software' : 'processor'
}
/** Renderer strings of the software rasterisers that browsers fall back to. */
export const isSoftwareRenderer = (renderer: string): boolean => /swiftshader|llvmpipe|softpipe|software|basic render/i.test(renderer)
