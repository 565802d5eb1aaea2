// From the decoded bytes of one strip or tile to the samples of one band. Predictors are undone here because the TIFF reader's own
// are right for little-endian files only.

export type Samples = Uint8Array | Int8Array | Uint16Array | Int16Array | Uint32Array | Int32Array | Float32Array | Float64Array

export interface BlockLayout {
  readonly width: number
  /** Samples per pixel inside the block (1 when bands are stored apart). */
  readonly stride: number
  readonly bytesPerSample: number
  /** 1 unsigned, 2 signed, 3 float. */
  readonly format: 1 | 2 | 3
  readonly predictor: number
  readonly littleEndian: boolean
}

/** Samples of a decoded block in the machine's own order, all bands interleaved. Rows beyond the end of the data are not there. */
export function samplesOf(bytes: ArrayBuffer, layout: BlockLayout): Samples {
  const { bytesPerSample, format, predictor, width, stride } = layout
  const whole = bytes.byteLength - (bytes.byteLength % bytesPerSample)
  const data = whole === bytes.byteLength ? bytes : bytes.slice(0, whole)
  const rowSamples = width * stride
  if (predictor === 3) undoFloatPredictor(new Uint8Array(data), rowSamples, stride, bytesPerSample)
  else if (!layout.littleEndian && bytesPerSample > 1) swap(new Uint8Array(data), bytesPerSample)
  if (predictor === 2) undoDifferences(unsigned(data, bytesPerSample), rowSamples, stride)
  return typed(data, format, bytesPerSample)
}

function typed(data: ArrayBuffer, format: 1 | 2 | 3, bytes: number): Samples {
  if (format === 3) return bytes === 8 ? new Float64Array(data) : new Float32Array(data)
  if (bytes === 1) return format === 2 ? new Int8Array(data) : new Uint8Array(data)
  if (bytes === 2) return format === 2 ? new Int16Array(data) : new Uint16Array(data)
  return format === 2 ? new Int32Array(data) : new Uint32Array(data)
}
function unsigned(data: ArrayBuffer, bytes: number): Uint8Array | Uint16Array | Uint32Array {
  return bytes === 1 ? new Uint8Array(data) : bytes === 2 ? new Uint16Array(data) : new Uint32Array(data)
}

function swap(b: Uint8Array, size: number): void {
  for (let i = 0; i + size <= b.length; i += size)
    for (let lo = i, hi = i + size - 1; lo < hi; lo++, hi--) {
      const t = b[lo]
      b[lo] = b[hi]
      b[hi] = t
    }
}

/** Horizontal differencing (TIFF 6.0, section 14), in place. */
function undoDifferences(v: Uint8Array | Uint16Array | Uint32Array, rowSamples: number, stride: number): void {
  for (let row = 0; row < v.length; row += rowSamples) {
    const end = Math.min(row + rowSamples, v.length)
    for (let i = row + stride; i < end; i++) v[i] += v[i - stride]
  }
}

/** Floating-point predictor (TIFF Technical Note 3): byte planes, most significant first, differenced by bytes; leaves little-endian samples. */
function undoFloatPredictor(b: Uint8Array, rowSamples: number, stride: number, size: number): void {
  const rowBytes = rowSamples * size
  const copy = new Uint8Array(rowBytes)
  for (let row = 0; row + rowBytes <= b.length; row += rowBytes) {
    const end = row + rowBytes
    for (let i = row + stride; i < end; i++) b[i] += b[i - stride]
    copy.set(b.subarray(row, end))
    for (let plane = 0; plane < size; plane++)
      for (let i = plane * rowSamples, last = i + rowSamples, at = row + size - 1 - plane; i < last; i++, at += size) b[at] = copy[i]
  }
}

/** TIFF's variant of LZW (codes from 9 to 12 bits, most significant bit first, early change), into a buffer of known size. */
export function decodeLzw(input: Uint8Array, expected: number): ArrayBuffer {
  const out = new Uint8Array(expected)
  const prefix = new Uint16Array(4096)
  const suffix = new Uint8Array(4096)
  const length = new Uint16Array(4096)
  for (let i = 0; i < 256; i++) {
    suffix[i] = i
    length[i] = 1
  }
  let next = 258
  let bits = 9
  let old = -1
  let at = 0
  let buffer = 0
  let held = 0
  let place = 0
  while (at < expected) {
    while (held < bits) {
      if (place >= input.length) throw new Error('LZW data end early')
      buffer = ((buffer << 8) | input[place++]) >>> 0
      held += 8
    }
    const code = (buffer >>> (held - bits)) & ((1 << bits) - 1)
    held -= bits
    buffer &= (1 << held) - 1
    if (code === 257) break
    if (code === 256) {
      next = 258
      bits = 9
      old = -1
      continue
    }
    if (old < 0) {
      if (code > 255) throw new Error('LZW data are damaged')
      out[at++] = code
      old = code
      continue
    }
    if (code > next || next > 4096) throw new Error('LZW data are damaged')
    const known = code < next
    const run = known ? length[code] : length[old] + 1
    let c = known ? code : old
    const end = Math.min(at + run, expected)
    // written backwards from the chain of prefixes; what reaches past the block's end is dropped
    let write = at + (known ? run : run - 1) - 1
    while (write >= at) {
      if (write < end) out[write] = suffix[c]
      c = prefix[c]
      write--
    }
    const firstByte = out[at]
    if (!known && at + run - 1 < expected) out[at + run - 1] = firstByte
    if (next < 4096) {
      prefix[next] = old
      suffix[next] = firstByte
      length[next] = length[old] + 1
      next++
      if (next === (1 << bits) - 1 && bits < 12) bits++
    }
    at = end
    old = code
  }
  if (at < expected) return out.slice(0, at).buffer
  return out.buffer
}
