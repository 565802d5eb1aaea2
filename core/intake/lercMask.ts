// Which pixels of a LERC block are valid. The decoder leaves invalid pixels at 0, which would read as sea level.
// Layout: Lerc2 codec, open specification and source of Esri (Apache-2.0), versions 1 to 6.

/** One bit per pixel, row by row, most significant first, 1 = valid; null where all are; all zero where none is. Null too for what is no Lerc2. */
export function lercMask(blob: ArrayBuffer): Uint8Array | null {
  const view = new DataView(blob)
  if (blob.byteLength < 60 || view.getUint32(0) !== 0x4c657263 || view.getUint8(4) !== 0x32) return null
  const version = view.getInt32(6, true)
  let at = 10 + (version >= 3 ? 4 : 0)
  const rows = view.getInt32(at, true)
  const cols = view.getInt32(at + 4, true)
  at += 8 + (version >= 4 ? 4 : 0)
  const valid = view.getInt32(at, true)
  at += 16 // valid pixels, micro block size, blob size, data type
  at += version >= 6 ? 8 : 0 // more blobs, flags
  at += 24 // error, lowest, highest
  at += version >= 6 ? 16 : 0 // no-data values
  const bits = new Uint8Array(Math.ceil((rows * cols) / 8))
  if (valid === rows * cols) return null
  if (valid === 0) return bits
  const end = at + 4 + view.getInt32(at, true)
  at += 4
  for (let out = 0; out < bits.length && at + 2 <= end; ) {
    const count = view.getInt16(at, true)
    at += 2
    if (count === -32768) break
    if (count > 0) {
      bits.set(new Uint8Array(blob, at, Math.min(count, bits.length - out)), out)
      at += count
      out += count
    } else {
      bits.fill(view.getUint8(at), out, out - count)
      at++
      out -= count
    }
  }
  return bits
}

/** Makes the invalid samples of a decoded block NaN (floats only: whole numbers have no NaN); `bytesPerSample` 4 or 8, `perPixel` bands interleaved. */
export function voidInvalid(data: ArrayBuffer, mask: Uint8Array, bytesPerSample: number, perPixel: number): void {
  const v = bytesPerSample === 8 ? new Float64Array(data) : new Float32Array(data)
  for (let i = 0; i < v.length; i++) {
    const pixel = perPixel === 1 ? i : Math.floor(i / perPixel)
    if ((mask[pixel >> 3] & (0x80 >> (pixel & 7))) === 0) v[i] = Number.NaN
  }
}
