import type { FileRole } from './types.ts'

const HEAD_BYTES = 65_536

/** What a dropped file most likely is, from its name and its first bytes. The Ground form lets the user say otherwise. */
export async function fileRole(file: Blob & { readonly name: string }): Promise<FileRole> {
  const name = file.name.toLowerCase()
  if (name.endsWith('.zip')) return 'package'
  const head = new Uint8Array(await file.slice(0, HEAD_BYTES).arrayBuffer())
  if (/\.tiff?$/.test(name) || isTiff(head)) return byteClasses(head) ? 'landCover' : 'terrain'
  if (/\.(geo)?json$/.test(name)) return textRole(new TextDecoder().decode(head), name)
  if (name.endsWith('.csv')) return /candidate|site/.test(name) ? 'candidates' : /track|route|approach|path/.test(name) ? 'track' : 'fixes'
  return 'unknown'
}

/** Role of a JSON text by what its beginning holds. */
export function textRole(text: string, name: string): FileRole {
  if (text.includes('"sightfell-study"')) return 'study'
  if (!text.includes('FeatureCollection') && !text.includes('"Feature"')) return /table/.test(name) ? 'landTable' : 'study'
  if (/"(highway|railway|maxspeedKmh)"/.test(text)) return 'roads'
  if (/"(heightM|topM)"/.test(text)) return 'obstacles'
  if (/"mastHeightsM"/.test(text)) return 'candidates'
  if (/"(Multi)?Polygon"/.test(text)) return 'polygon'
  return /road|rail|street/.test(name) ? 'roads' : 'obstacles'
}

const isTiff = (b: Uint8Array): boolean =>
  (b[0] === 0x49 && b[1] === 0x49 && (b[2] === 42 || b[2] === 43)) || (b[0] === 0x4d && b[1] === 0x4d && (b[3] === 42 || b[3] === 43))

const BITS = 258
const SAMPLES = 277

/** One unsigned byte per pixel, as class rasters have: read from the first directory of a classic TIFF when it lies in the head. */
function byteClasses(b: Uint8Array): boolean {
  if (!isTiff(b)) return false
  const view = new DataView(b.buffer, b.byteOffset, b.byteLength)
  const little = b[0] === 0x49
  const big = view.getUint16(2, little) === 43
  const at = big ? Number(view.getBigUint64(8, little)) : view.getUint32(4, little)
  const countBytes = big ? 8 : 2
  const entryBytes = big ? 20 : 12
  const valueAt = big ? 12 : 8
  if (at + countBytes > b.length) return false
  const count = big ? Number(view.getBigUint64(at, little)) : view.getUint16(at, little)
  let bits = 1
  let samples = 1
  for (let i = 0; i < Math.min(count, 200); i++) {
    const entry = at + countBytes + i * entryBytes
    if (entry + entryBytes > b.length) return false
    const tag = view.getUint16(entry, little)
    if (tag === BITS) bits = view.getUint16(entry + valueAt, little)
    if (tag === SAMPLES) samples = view.getUint16(entry + valueAt, little)
  }
  return bits === 8 && samples === 1
}
