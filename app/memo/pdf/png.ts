import { encode } from 'fast-png'

/** Opaque pixels (0xAABBGGRR as painted, or RGBA bytes) as a PNG data URL; alpha is dropped, the sheet is opaque. */
export function pngDataUrl(pixels: Uint32Array | Uint8ClampedArray | Uint8Array, width: number, height: number): string {
  const rgba = new Uint8Array(pixels.buffer, pixels.byteOffset, pixels.byteLength)
  const rgb = new Uint8Array(width * height * 3)
  for (let n = 0, o = 0; n < width * height * 4; n += 4) {
    rgb[o++] = rgba[n]
    rgb[o++] = rgba[n + 1]
    rgb[o++] = rgba[n + 2]
  }
  return `data:image/png;base64,${base64(encode({ width, height, data: rgb, channels: 3, depth: 8 }))}`
}
function base64(bytes: Uint8Array): string {
  let text = ''
  for (let at = 0; at < bytes.length; at += 0x8000) text += String.fromCharCode(...bytes.subarray(at, at + 0x8000))
  return btoa(text)
}
