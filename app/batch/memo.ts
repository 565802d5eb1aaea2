import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import { join } from 'node:path'
import {
  geodesicDirect,
  type LonLat,
  layerInfo,
  type OptionCells,
  type OptionResult,
  paintSheet,
  type SettledStudy,
  type StudyDoc,
  type View,
  worldXFromLon,
  worldYFromLat,
} from '../../core/index.ts'
import { buildMemo, type MemoFile, type MemoMap } from '../memo/model/index.ts'

/** Width and height of a map picture, pixels. */
const MAP_PX = 1000

/** The view that holds a candidate's circle, north up. */
export function circleView(at: LonLat, radiusM: number): View {
  const x = worldXFromLon(at.lon)
  const y = worldYFromLat(at.lat)
  const reach = Math.max(worldYFromLat(geodesicDirect(at, 0, radiusM).lat) - y, y - worldYFromLat(geodesicDirect(at, 180, radiusM).lat))
  const half = 1.03 * reach
  return { width: MAP_PX, height: MAP_PX, worldX: x - half, worldY: y + half, worldPerPx: (2 * half) / MAP_PX, night: false }
}

/** Clutter-to-noise over shaded ground, as the memo prints it. */
export async function memoMap(cells: OptionCells, result: OptionResult, radiusM: number): Promise<MemoMap> {
  const { pngDataUrl } = await import('../memo/pdf/png.ts')
  const view = circleView(cells.place, radiusM)
  const pixels = paintSheet(cells, 'clutter-to-noise', null, view)
  const png = pngDataUrl(pixels, view.width, view.height)
  return { ref: result.ref, layer: 'clutter-to-noise', view, ramp: layerInfo('clutter-to-noise').ramp, png }
}

/** Version of the program. */
async function programVersion(): Promise<string> {
  const text = await readFile(new URL('../../package.json', import.meta.url), 'utf8')
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
  const { makePdf } = await import('../memo/pdf/makePdf.ts')
  const fonts = join(createRequire(import.meta.url).resolve('@expo-google-fonts/source-sans-3/package.json'), '..')
  const face = async (name: string) => new Uint8Array(await readFile(join(fonts, name, `SourceSans3_${name}.ttf`)))
  const [regular, semibold] = await Promise.all([face('400Regular'), face('600SemiBold')])
  const model = buildMemo({ ...parts, system: 'metric', date: today(), version: await programVersion() })
  return makePdf(model, { regular, semibold })
}
