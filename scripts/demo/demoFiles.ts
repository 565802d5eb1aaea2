/** The files of the demo study as bytes, by name. */
import { encodeGeoTiff } from '../../app/batch/geoTiffWriter.ts'
import { crsFromEpsg, crsTransform, type GridShape, type LonLat, loadCrs } from '../../core/index.ts'
import { coverIsland } from './cover.ts'
import { makeIsland, NORTH_KM, POSTING_M, type Point, WEST_KM } from './island.ts'
import { EPSG, MIDDLE_EAST_M, MIDDLE_NORTH_M, STANDERS, WAYS } from './places.ts'
import { demoStudy } from './study.ts'
import { layWays } from './ways.ts'

/** Heights are kept to a sixteenth of a metre: fine enough for a plain, coarse enough to pack. */
const HEIGHT_STEPS_PER_M = 16

const collection = (features: readonly object[]) =>
  `{ "type": "FeatureCollection", "features": [\n${features.map((f) => JSON.stringify(f)).join(',\n')}\n] }\n`

/** Makes the whole demo. No clock and no chance: the same bytes on every run. */
export async function demoFiles(): Promise<Map<string, Uint8Array>> {
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
    geometry:
      path.length === 1 ? { type: 'Point', coordinates: position(path[0]) } : { type: 'LineString', coordinates: path.map(position) },
  })

  const island = makeIsland()
  const { width, height, heightM } = island.land
  const shape: GridShape = {
    width,
    height,
    crs,
    x0: MIDDLE_EAST_M + WEST_KM * 1000 + POSTING_M / 2,
    y0: MIDDLE_NORTH_M + NORTH_KM * 1000 - POSTING_M / 2,
    colX: POSTING_M,
    colY: 0,
    rowX: 0,
    rowY: -POSTING_M,
  }
  const about = { NOTE: 'Invented island; no place on earth' }
  const terrain = await encodeGeoTiff({
    shape,
    samples: Float32Array.from(heightM, (h) => Math.round(h * HEIGHT_STEPS_PER_M) / HEIGHT_STEPS_PER_M),
    nodata: null,
    description: 'height',
    unit: 'metre',
    metadata: { ...about, DATUM: 'mean sea level' },
  })
  const cover = await encodeGeoTiff({
    shape,
    samples: coverIsland(island),
    nodata: 0,
    description: 'land cover',
    unit: '',
    metadata: about,
  })
  const lines = layWays(island, WAYS)
  const roads = WAYS.map(({ name, highway, maxspeedKmh }, k) => {
    const kind = highway === 'rail' ? { railway: highway } : { highway }
    return feature(lines[k], { name, ...kind, ...(maxspeedKmh === null ? {} : { maxspeedKmh }) })
  })
  const obstacles = STANDERS.map(({ path, ...properties }) => feature(path, properties))
  const bytes = (text: string) => new TextEncoder().encode(text)
  return new Map([
    ['terrain.tif', terrain],
    ['cover.tif', cover],
    ['obstacles.geojson', bytes(collection(obstacles))],
    ['roads.geojson', bytes(collection(roads))],
    ['study.json', bytes(`${JSON.stringify(demoStudy(placeOf), null, 2)}\n`)],
  ])
}
