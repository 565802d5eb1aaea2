import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import { join } from 'node:path'
import {
  finish,
  geodesicDirect,
  type LonLat,
  layerInfo,
  type OptionCells,
  type OptionResult,
  paintSheet,
  type SettledStudy,
  type StudyDoc,
  type View,
  verticalCut,
  viewOfBox,
  WORLD_WIDTH_M,
  worldXFromLon,
  worldYFromLat,
} from '../../../core/index.ts'
import { buildMemo, cutOf, type MemoFile, type MemoMap, makePdf, pngDataUrl } from '../../memo/index.ts'

/** Size of a map picture and its margin, pixels: as in the app. */
const MAP_PX = { width: 920, height: 920 }
const MAP_MARGIN_PX = 12

/** The view that holds a candidate's circle, north up. */
export function circleView(at: LonLat, radiusM: number): View {
  const edge = (azimuthDeg: number) => geodesicDirect(at, azimuthDeg, radiusM)
  const x = worldXFromLon(at.lon)
  // Longitudes on the turn nearest the candidate, so that a circle over the antimeridian stays whole.
  const near = (lon: number) => worldXFromLon(lon) - WORLD_WIDTH_M * Math.round((worldXFromLon(lon) - x) / WORLD_WIDTH_M)
  const box = {
    west: near(edge(270).lon),
    east: near(edge(90).lon),
    south: worldYFromLat(edge(180).lat),
    north: worldYFromLat(edge(0).lat),
  }
  return viewOfBox(box, MAP_PX, MAP_MARGIN_PX, false)
}

/** Clutter-to-noise over shaded ground and the range-height plane, as the memo prints them. */
export function memoMap(cells: OptionCells, result: OptionResult, study: SettledStudy): MemoMap {
  const radiusM = study.run.maxRangeM
  const view = circleView(cells.place, radiusM)
  const pixels = paintSheet(cells, 'clutter-to-noise', null, view)
  const png = pngDataUrl(pixels, view.width, view.height)
  const about = cutOf(result, radiusM)
  const need = about && study.needs.find((n) => n.id === about.need)
  const cut = about && need ? finish(verticalCut(cells, need, about.window)) : null
  return { ref: result.ref, layer: 'clutter-to-noise', view, ramp: layerInfo('clutter-to-noise').ramp, png, cut }
}

/** Version of the program. */
async function programVersion(): Promise<string> {
  const text = await readFile(new URL('../../../package.json', import.meta.url), 'utf8')
  return (JSON.parse(text) as { version: string }).version
}

/** Day of the memo: today, or the one stated by SOURCE_DATE_EPOCH for runs that must repeat byte by byte. */
function today(): string {
  const stated = Number(process.env.SOURCE_DATE_EPOCH)
  return (stated > 0 ? new Date(stated * 1000) : new Date()).toISOString().slice(0, 10)
}

export interface MemoParts {
  readonly study: SettledStudy
  readonly doc: StudyDoc
  readonly results: readonly OptionResult[]
  readonly files: readonly MemoFile[]
  readonly maps: readonly MemoMap[]
  readonly warnings: readonly string[]
}

/** The memo as PDF bytes; the same model as in the app. */
export async function memoPdf(parts: MemoParts): Promise<Uint8Array> {
  const fonts = join(createRequire(import.meta.url).resolve('@expo-google-fonts/source-sans-3/package.json'), '..')
  const face = async (name: string) => new Uint8Array(await readFile(join(fonts, name, `SourceSans3_${name}.ttf`)))
  const [regular, semibold] = await Promise.all([face('400Regular'), face('600SemiBold')])
  const model = buildMemo({ ...parts, system: 'nautical', date: today(), version: await programVersion() })
  return makePdf(model, { regular, semibold })
}
