/** Writes the demo study into public/demo. No clock and no chance: the same bytes on every run. `npm run demo`. */
import { mkdirSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import { encodeGeoTiff } from '../../app/batch/geoTiffWriter.ts'
import { crsFromEpsg, crsTransform, type LonLat, loadCrs } from '../../core/geodesy/index.ts'
import type { GridShape } from '../../core/raster/index.ts'
import { coverIsland } from './cover.ts'
import { makeIsland, POSTING_M, type Point, SIDE_KM } from './island.ts'
import { EPSG, MIDDLE_EAST_M, MIDDLE_NORTH_M, STANDERS, WAYS } from './places.ts'
import { demoStudy } from './study.ts'
import { layWays } from './ways.ts'

const note = (text: string) => process.stderr.write(`${text}\n`)
const crs = await crsFromEpsg(EPSG)
await loadCrs(crs)
const { toLonLat } = crsTransform(crs)
const placeOf = ([x, y]: Point): LonLat => {
  const [lon, lat] = toLonLat(MIDDLE_EAST_M + x * 1000, MIDDLE_NORTH_M + y * 1000)
  return { lon: Math.round(lon * 1e6) / 1e6, lat: Math.round(lat * 1e6) / 1e6 }
}
const position = (at: Point) => {
  const { lon, lat } = placeOf(at)
  return [lon, lat]
}
const feature = (path: readonly Point[], properties: object) => ({
  type: 'Feature',
  properties,
  geometry: path.length === 1 ? { type: 'Point', coordinates: position(path[0]) } : { type: 'LineString', coordinates: path.map(position) },
})
const collection = (features: readonly object[]) =>
  `{ "type": "FeatureCollection", "features": [\n${features.map((f) => JSON.stringify(f)).join(',\n')}\n] }\n`

const folder = join(dirname(fileURLToPath(import.meta.url)), '../../public/demo')
mkdirSync(folder, { recursive: true })
const write = (name: string, content: string | Uint8Array) => {
  writeFileSync(join(folder, name), content)
  note(`${name}: ${Math.ceil(content.length / 1024)} kB`)
}

note('wearing down the island …')
const island = makeIsland()
const { width, height, heightM } = island.land
const half = (SIDE_KM * 1000) / 2
const shape: GridShape = {
  width,
  height,
  crs,
  x0: MIDDLE_EAST_M - half + POSTING_M / 2,
  y0: MIDDLE_NORTH_M + half - POSTING_M / 2,
  colX: POSTING_M,
  colY: 0,
  rowX: 0,
  rowY: -POSTING_M,
}
const about = { NOTE: 'Invented island; no place on earth' }
write(
  'terrain.tif',
  await encodeGeoTiff({
    shape,
    samples: Float32Array.from(heightM, (h) => Math.round(h * 16) / 16),
    nodata: null,
    description: 'height',
    unit: 'metre',
    metadata: { ...about, DATUM: 'mean sea level' },
  }),
)
write(
  'cover.tif',
  await encodeGeoTiff({ shape, samples: coverIsland(island), nodata: 0, description: 'land cover', unit: '', metadata: about }),
)
write('obstacles.geojson', collection(STANDERS.map(({ path, ...properties }) => feature(path, properties))))
const lines = layWays(island, WAYS)
write(
  'roads.geojson',
  collection(
    WAYS.map(({ name, highway, maxspeedKmh }, k) =>
      feature(lines[k], {
        name,
        ...(highway === 'rail' ? { railway: highway } : { highway }),
        ...(maxspeedKmh === null ? {} : { maxspeedKmh }),
      }),
    ),
  ),
)
write('study.json', `${JSON.stringify(demoStudy(placeOf), null, 2)}\n`)
