import { basename, resolve } from 'node:path'
import {
  buildGround,
  type Ground,
  type GroundRead,
  groundAt,
  InputError,
  offTerrain,
  readGround,
  type SettledCandidate,
  surveysOf,
} from '../../core/index.ts'
import { FileSource } from './fileSource.ts'
import { type LoadedStudy, readText } from './loadStudy.ts'
import { drive, type Progress } from './progress.ts'

/** Everything of a study that lies in files. */
export interface LoadedGround {
  readonly ground: Ground
  readonly read: GroundRead
  readonly warnings: readonly string[]
}

/**
 * Reads the ground of a study from the files beside it.
 * @param candidates those whose circles and places the terrain has to hold
 * @param shared heights and codes lie where helper threads can read them
 * @throws InputError for a file that cannot be used and a candidate off the terrain
 */
export async function loadGround(
  loaded: LoadedStudy,
  candidates: readonly SettledCandidate[],
  progress: Progress,
  shared = false,
): Promise<LoadedGround> {
  const { study, dir } = loaded
  const open: FileSource[] = []
  const door = {
    async bytes(name: string, place: string) {
      const source = await FileSource.open(resolve(dir, name), place)
      open.push(source)
      return source
    },
    text: (name: string, place: string) => readText(resolve(dir, name), place),
  }
  try {
    const request = {
      terrain: study.terrain,
      landCover: study.landCover,
      uniformTerrain: study.uniformTerrainMark === null ? study.uniformTerrain : null,
      obstacles: study.obstacles,
      roads: study.roads,
      lowAngleLandTable: study.lowAngleLandTable,
      needs: loaded.doc.needs ?? [],
      surveys: surveysOf(loaded.doc).filter((s) => candidates.some((c) => c.id === s.candidate)),
      circles: candidates.map((c) => ({ lon: c.lon, lat: c.lat, radiusM: study.run.maxRangeM })),
    }
    const read = await readGround(request, door, (doing, done, total) => progress.say(doing, done, total), shared)
    const { shape, heightM, code, codes, obstacles, roads, surveys, verticalErrorM } = read
    const ground = await drive(
      buildGround({ serial: 1, shape, heightM, code, codes, obstacles, roads, surveys, verticalErrorM }),
      progress,
      'Relief',
    )
    return { ground, read, warnings: [...read.warnings, ...checkPlaces(loaded, ground, candidates)] }
  } finally {
    await Promise.all(open.map((s) => s.close()))
  }
}

/** @returns remarks @throws InputError for a candidate that stands on no known ground */
function checkPlaces(loaded: LoadedStudy, ground: Ground, candidates: readonly SettledCandidate[]): string[] {
  const warnings: string[] = []
  for (const c of candidates) {
    const height = groundAt(ground, c.lon, c.lat)
    const stated = c.groundHeightM
    if (Number.isNaN(height) && stated === null)
      throw new InputError({
        ...offTerrain(c),
        file: basename(loaded.path),
        place: `candidates[${loaded.doc.candidates.findIndex((d) => d.id === c.id)}]`,
      })
    if (stated !== null && Math.abs(stated - height) > 3 * ground.verticalErrorM)
      warnings.push(
        `candidate ${c.id}: stated ground ${stated} m differs from the raster's ${height.toFixed(1)} m by more than three times its error`,
      )
  }
  return warnings
}
