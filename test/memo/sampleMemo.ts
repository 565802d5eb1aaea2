import type { MemoInput, MemoMap } from '../../app/memo/model/index.ts'
import { pngDataUrl } from '../../app/memo/pdf/png.ts'
import type { UnitSystem } from '../../app/words/index.ts'
import { LAYERS, type LonLat, pixelAtLonLat, rampHex, viewOfBox, worldXFromLon, worldYFromLat } from '../../core/index.ts'
import { sampleDoc, sampleResults, sampleStudy } from './sample.ts'

/** A painted picture that stands in for a map: stripes of echo that fade with range over a grey ground. */
function samplePicture(at: LonLat, size: number): MemoMap['png'] {
  const { ramp } = LAYERS['clutter-to-noise']
  const view = sampleView(at, size)
  const [cx, cy] = pixelAtLonLat(view, at)
  const pixels = new Uint32Array(size * size)
  for (let y = 0; y < size; y++)
    for (let x = 0; x < size; x++) {
      const d = Math.hypot(x - cx, y - cy) / (size / 2)
      const grey = 205 + Math.round(22 * Math.sin(x / 23) * Math.cos(y / 31))
      const echo = 62 - 62 * d + 14 * Math.sin(x / 17 + Math.cos(y / 40) * 3)
      const hex = d < 0.93 && Math.sin(x / 41) + Math.cos(y / 29) > -0.2 ? rampHex(ramp, echo, false) : null
      const rgb = hex === null ? (grey << 16) | (grey << 8) | (grey - 8) : Number.parseInt(hex.slice(1), 16)
      pixels[y * size + x] = ((255 << 24) | ((rgb & 255) << 16) | (rgb & 0xff00) | (rgb >> 16)) >>> 0
    }
  return pngDataUrl(pixels, size, size)
}
function sampleView(at: LonLat, size: number): MemoMap['view'] {
  const x = worldXFromLon(at.lon)
  const y = worldYFromLat(at.lat)
  const half = 82_000
  return viewOfBox({ west: x - half, east: x + half, south: y - half, north: y + half }, { width: size, height: size }, 0, false)
}

/** Everything the memo asks for, invented. */
export function sampleMemo(system: UnitSystem, size = 600): MemoInput {
  const maps = sampleResults.map((r): MemoMap => {
    const at = sampleStudy.candidates.find((c) => c.id === r.ref.candidate)!
    return {
      ref: r.ref,
      layer: 'clutter-to-noise',
      ramp: LAYERS['clutter-to-noise'].ramp,
      view: sampleView(at, size),
      png: samplePicture(at, size),
    }
  })
  return {
    study: sampleStudy,
    doc: sampleDoc,
    results: sampleResults,
    files: [
      {
        name: 'ostrel-30m.tif',
        sha256: 'a3f1'.repeat(16),
        describe: '2 400 × 2 400 posts of 30.0 m, WGS 84 / UTM zone 10S, orthometric metres, 90 % error 6 m',
      },
      { name: 'ostrel-cover.tif', sha256: '09bc'.repeat(16), describe: '5 classes on the same lattice, custom legend' },
      { name: 'ostrel-masts.geojson', sha256: null, describe: '7 obstacles' },
    ],
    maps,
    system,
    date: '2026-03-04',
    version: '0.1.0',
    warnings: ["candidates[1]: the stated ground of B stands 21 m under the raster's, more than three times its error"],
  }
}
