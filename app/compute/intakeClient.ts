import {
  type Ask,
  type GroundRead,
  type GroundRequest,
  InputError,
  type Obstacle,
  type Road,
  type StudyDoc,
  surveysOf,
} from '../../core/index.ts'
import type { IntakeTell } from './intakeMessages.ts'

/** The window is planned before the candidates' ranges are settled; 150 km is more than any terrain radar asks of its ground. */
const LONGEST_RANGE_M = 150_000

/** What of a document makes the ground. */
export function groundRequest(doc: StudyDoc): GroundRequest {
  const radiusM = doc.run?.maxRangeM ?? doc.radar?.instrumentedRangeM ?? LONGEST_RANGE_M
  return {
    terrain: doc.terrain,
    landCover: doc.landCover ?? null,
    uniformTerrain: doc.uniformTerrain ?? null,
    obstacles: doc.obstacles?.file ?? null,
    roads: doc.roads?.file ?? null,
    lowAngleLandTable: doc.tables?.lowAngleLand ?? null,
    needs: doc.needs ?? [],
    surveys: surveysOf(doc),
    circles: doc.candidates.map((c) => ({ lon: c.lon, lat: c.lat, radiusM })),
  }
}

/** Reads the files of a study in a worker of its own, which is ended after it: a bad file can be given up without loss. */
export function readGroundInWorker(
  request: GroundRequest,
  files: ReadonlyMap<string, Blob>,
  onProgress: (doing: string, done: number, total: number) => void = () => {},
): { result: Promise<GroundRead>; stop: () => void } {
  const worker = new Worker(new URL('./intake.worker.ts', import.meta.url), { type: 'module', name: 'intake' })
  let giveUp: (error: Error) => void = () => {}
  const result = new Promise<GroundRead>((resolve, reject) => {
    giveUp = reject
    worker.onmessage = ({ data }: MessageEvent<IntakeTell>) => {
      if (data.kind === 'progress') return onProgress(data.doing, data.done, data.total)
      worker.terminate()
      if (data.kind === 'read') resolve(data.read)
      else reject(data.kind === 'refused' ? new InputError(data.complaint) : new Error(data.message))
    }
    worker.onerror = (event) => {
      worker.terminate()
      reject(new Error(event.message || 'reading the files stopped'))
    }
  })
  worker.postMessage({ request, files })
  return {
    result,
    stop: () => {
      worker.terminate()
      giveUp(new InputError({ code: 'stopped', found: 'reading the files was stopped', remedy: 'drop them again to go on' }))
    },
  }
}

/** What the page keeps of the ground, and what it hands to the study worker. */
export interface PageGround {
  readonly ground: Ask['ground']
  readonly roads: readonly Road[]
  readonly obstacles: readonly Obstacle[]
  /** A line per file, then remarks. */
  readonly notes: readonly string[]
}

/** Reads the ground of a document from the files given to the page; an older reading still under way is given up. */
export function makeGroundReader(): (
  files: ReadonlyMap<string, { readonly blob: Blob }>,
  doc: StudyDoc,
  onProgress: (doing: string, done: number, total: number) => void,
) => Promise<PageGround> {
  let stop = () => {}
  return async (files, doc, onProgress) => {
    stop()
    const blobs = new Map([...files].map(([name, file]) => [name, file.blob]))
    const request = groundRequest(doc)
    // a need whose file is not here yet is not assessed; the ground does not wait for it
    const needs = (request.needs ?? []).filter((n) => n.file === undefined || blobs.has(n.file))
    const surveyed = (request.surveys ?? []).filter((s) => blobs.has(s.file))
    const reading = readGroundInWorker({ ...request, needs, surveys: surveyed }, blobs, onProgress)
    stop = reading.stop
    const {
      shape,
      heightM,
      code,
      codes,
      obstacles,
      roads,
      landTable,
      needPlaces,
      surveys,
      verticalErrorM,
      files: read,
      warnings,
    } = await reading.result
    return {
      ground: { shape, heightM, code, codes, obstacles, roads, surveys, verticalErrorM, landTable, needPlaces },
      roads,
      obstacles,
      notes: [...read.map((f) => `${f.name}: ${f.describe}`), ...warnings],
    }
  }
}
