import type { LonLat } from '../geodesy/index.ts'
import type { OptionCells } from '../merit/index.ts'
import { type PolarPaint, paintHillshade, paintMap, paintPolar, type View, type WaterCodes } from '../paint/index.ts'
import type { RasterGrid } from '../raster/index.ts'
import type { SettledNeed } from '../study/index.ts'
import type { Ground } from '../terrain/index.ts'
import { fillLayer, layerInfo } from './layers.ts'
import type { LayerId, LayerInfo } from './types.ts'

const rasterOf = (g: Ground): RasterGrid => ({ ...g.shape, samples: g.heightM })

/** Where land cover says water; null without land cover. */
export function waterOf(g: Ground): WaterCodes | null {
  if (!g.code) return null
  const isWater = new Uint8Array(256)
  g.codes.forEach((c, i) => {
    if (c.terrain === 'water') isWater[i] = 1
  })
  return { code: g.code, isWater }
}

/** One option's layer over a view, straight RGBA, transparent where nothing is to be seen. */
export function paintOption(o: OptionCells, layer: LayerId, need: SettledNeed | null, view: View, opacity?: number): Uint32Array {
  const info = layerInfo(layer)
  const values = new Float32Array(o.site.groundM.length)
  fillLayer(layer, o, need, values)
  const out = new Uint32Array(view.width * view.height)
  const how = { ...howOf(info), ...(opacity === undefined ? {} : { opacity }) }
  paintPolar(o.site.grid, placeOf(o), values, o.mask.state, info.ramp, view, out, how)
  return out
}

/** The ground as shaded relief over a view, opaque RGBA; transparent outside the terrain. */
export function paintGround(g: Ground, view: View): Uint32Array {
  const out = new Uint32Array(view.width * view.height)
  paintHillshade(rasterOf(g), view, out, waterOf(g))
  return out
}

/** Ground and layer as one opaque picture, for the memo. */
export function paintSheet(o: OptionCells, layer: LayerId, need: SettledNeed | null, view: View): Uint32Array {
  const info = layerInfo(layer)
  const values = new Float32Array(o.site.groundM.length)
  fillLayer(layer, o, need, values)
  const out = new Uint32Array(view.width * view.height)
  const how = howOf(info)
  paintMap(
    rasterOf(o.ground),
    { grid: o.site.grid, site: placeOf(o), values, state: o.mask.state, ramp: info.ramp, how },
    view,
    out,
    waterOf(o.ground),
  )
  return out
}

const howOf = ({ hatchMasked, unit, patterns }: LayerInfo): PolarPaint => ({
  hatchMasked,
  smooth: unit === 'dB',
  ...(patterns ? { patterns } : {}),
})
const placeOf = (o: OptionCells): LonLat => ({ lon: o.place.lon, lat: o.place.lat })
