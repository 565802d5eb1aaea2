import { type LandTable, readLandTable } from '../clutter/index.ts'
import { InputError } from '../errors/index.ts'
import { type ByteSource, openTerrain, type Progress, readClasses, readFeatures } from '../intake/index.ts'
import { type GroundCode, groundCodes, type TerrainName, uniformCode } from '../landcover/index.ts'
import { type NeedPlaces, readPlaces } from '../merit/index.ts'
import { type Obstacle, type Road, readObstacles, readRoads } from '../obstacles/index.ts'
import { type Circle, type GridShape, planGround, postingM } from '../raster/index.ts'
import type { LandCoverDoc, NeedDoc, StudyDoc, TerrainFileDoc } from '../study/index.ts'
import { readSurvey, type Survey } from '../terrain/index.ts'

/** What of a study makes its ground. */
export interface GroundRequest {
  readonly terrain: readonly TerrainFileDoc[]
  readonly landCover: LandCoverDoc | null
  readonly uniformTerrain: TerrainName | null
  readonly obstacles: string | null
  readonly roads: string | null
  readonly lowAngleLandTable: string | null
  /** Circles of the candidates: they choose the window where the terrain is too large to be read whole. */
  readonly circles: readonly Circle[]
  /** Needs as the study states them; the files of fixes, tracks and polygons are read. */
  readonly needs?: readonly NeedDoc[]
  /** Files of horizons surveyed at candidates, with the key path that names each. */
  readonly surveys?: readonly { readonly candidate: string; readonly file: string; readonly place: string }[]
}
/** What reading the files of a study gives. The arrays are fresh and may be transferred, or lie on shared memory. */
export interface GroundRead {
  readonly shape: GridShape
  readonly heightM: Float32Array
  readonly code: Uint8Array | null
  readonly codes: readonly GroundCode[]
  readonly obstacles: readonly Obstacle[]
  readonly roads: readonly Road[]
  readonly landTable: LandTable | null
  /** What the files of needs hold, in the order of the needs. */
  readonly needPlaces: readonly NeedPlaces[]
  readonly surveys: readonly Survey[]
  readonly verticalErrorM: number
  /** A line per file: what was read. */
  readonly files: readonly { readonly name: string; readonly describe: string }[]
  readonly warnings: readonly string[]
}
/** Where the bytes come from, by the name the study uses; `place` is the key path that names the file. */
export interface FileDoor {
  bytes(name: string, place: string): Promise<ByteSource>
  text(name: string, place: string): Promise<string>
}
/** Default 90 % linear error of a raster, m. */
export const DEFAULT_VERTICAL_ERROR_M = 10

/**
 * Reads every file that makes the ground, band by band into one grid: the finest terrain first, others fill what it leaves. Throws
 * InputError with the file's name. `shared` puts heights and codes on shared memory, where other threads can read them.
 */
export async function readGround(
  request: GroundRequest,
  door: FileDoor,
  onProgress: (doing: string, done: number, total: number) => void = () => {},
  shared = false,
): Promise<GroundRead> {
  if (request.terrain.length === 0)
    throw new InputError({
      code: 'no-terrain',
      place: 'terrain',
      found: 'no terrain file',
      remedy: 'name an elevation raster in terrain[0].file',
    })
  const heads = await Promise.all(
    request.terrain.map(async (t, i) =>
      openTerrain(await door.bytes(t.file, `terrain[${i}].file`), {
        crs: t.crs ?? null,
        unit: t.unit ?? null,
        place: `terrain[${i}]`,
        ...(t.heights === undefined ? {} : { heights: t.heights }),
      }),
    ),
  )
  const shape = planGround(
    heads.map((h) => h.shape),
    request.circles,
  )
  const posts = shape.width * shape.height
  const heightM = new Float32Array(shared ? new SharedArrayBuffer(4 * posts) : new ArrayBuffer(4 * posts)).fill(Number.NaN)
  const posting = new Map(heads.map((h) => [h, postingM(h.shape).meanM]))
  const finestFirst = [...heads].sort((a, b) => (posting.get(a) ?? 0) - (posting.get(b) ?? 0))
  for (const head of finestFirst) await head.readInto({ shape, samples: heightM }, told(onProgress, `Reading ${head.name}`))
  const files = heads.map((h) => ({ name: h.name, describe: h.describe }))

  const warnings: string[] = []
  const outside = uniformCode(request.uniformTerrain ?? 'rural', request.uniformTerrain === null ? 'default' : null)
  let code: Uint8Array | null = null
  let codes: readonly GroundCode[] = [outside]
  const { landCover } = request
  if (landCover) {
    const head = await readClasses(await door.bytes(landCover.file, 'landCover.file'))
    const raster = await head.readClassesInto(shape, told(onProgress, `Reading ${head.name}`))
    const made = groundCodes(raster, landCover, outside)
    codes = made.codes
    code = shared ? onShared(made.code) : made.code
    const strange = codes.flatMap((c) => (c.sourceClass !== null && c.mark === 'default' ? [c.sourceClass] : []))
    if (strange.length > 0)
      warnings.push(
        `${head.name}: class ${strange.slice(0, 12).join(', ')} is not in the legend "${landCover.legend}", taken as rural (default)`,
      )
    files.push({ name: head.name, describe: head.describe })
  }
  const { obstacles: obstacleFile, roads: roadFile, lowAngleLandTable: tableFile } = request
  const features = async (name: string, place: string) => readFeatures(await door.text(name, place), name)
  const obstacles = obstacleFile ? readObstacles(await features(obstacleFile, 'obstacles.file'), obstacleFile) : []
  const roads = roadFile ? readRoads(await features(roadFile, 'roads.file'), roadFile) : []
  if (obstacleFile) files.push({ name: obstacleFile, describe: `${obstacles.length} obstacles` })
  if (roadFile) files.push({ name: roadFile, describe: `${roads.length} roads and railways` })
  const landTable = tableFile ? readLandTable(jsonOf(await door.text(tableFile, 'tables.lowAngleLand'), tableFile), tableFile) : null
  if (tableFile) files.push({ name: tableFile, describe: 'low-angle land clutter table' })
  const needPlaces: NeedPlaces[] = []
  for (const [i, need] of (request.needs ?? []).entries()) {
    const { id, kind, file } = need
    if (kind === 'layer' || file === undefined) continue
    const heightM = typeof need.heightM === 'number' ? need.heightM : (need.heightM?.[0] ?? null)
    const asked = { id, kind, file, heightM, heightAbove: need.heightAbove ?? 'sea', qnhHpa: need.qnhHpa ?? null } as const
    const read = readPlaces(await door.text(file, `needs[${i}].file`), asked)
    needPlaces.push(read)
    files.push({ name: file, describe: placesWords(read) })
  }
  const surveys: Survey[] = []
  for (const { candidate, file, place } of request.surveys ?? []) {
    const rows = readSurvey(await door.text(file, place), file)
    surveys.push({ candidate, file, rows })
    files.push({ name: file, describe: `surveyed horizon, ${rows.length} azimuths` })
  }
  const verticalErrorM = request.terrain.reduce((worst, t) => Math.max(worst, t.verticalErrorM ?? DEFAULT_VERTICAL_ERROR_M), 0)
  return { shape, heightM, code, codes, obstacles, roads, landTable, needPlaces, surveys, verticalErrorM, files, warnings }
}

function onShared(bytes: Uint8Array): Uint8Array {
  const out = new Uint8Array(new SharedArrayBuffer(bytes.length))
  out.set(bytes)
  return out
}

/** Surveys of candidates as the ground is asked for them. */
export const surveysOf = (doc: Pick<StudyDoc, 'candidates'>): NonNullable<GroundRequest['surveys']> =>
  doc.candidates.flatMap((c, i) =>
    c.measuredHorizon && c.rejected === undefined
      ? [{ candidate: c.id, file: c.measuredHorizon.file, place: `candidates[${i}].measuredHorizon.file` }]
      : [],
  )

const placesWords = ({ kind, places, rings }: NeedPlaces): string =>
  kind === 'polygon'
    ? `outline of ${rings.length} rings`
    : kind === 'track'
      ? `track of ${places.length} corners`
      : `${places.length} fixes`

const told =
  (onProgress: (doing: string, done: number, total: number) => void, doing: string): Progress =>
  (done, total) =>
    onProgress(doing, done, total)

function jsonOf(text: string, file: string): unknown {
  try {
    return JSON.parse(text)
  } catch {
    throw new InputError({ code: 'json', file, place: 'tables.lowAngleLand', found: 'not JSON', remedy: 'give the land table as JSON' })
  }
}
