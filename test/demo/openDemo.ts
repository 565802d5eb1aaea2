import { readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'
import {
  type ByteSource,
  buildGround,
  Engine,
  type FileDoor,
  finish,
  type Ground,
  type GroundRead,
  type OptionResult,
  parseStudy,
  readGround,
  type SettledStudy,
  type StudyDoc,
  settle,
} from '../../core/index.ts'

export const DEMO_DIR = join(dirname(fileURLToPath(import.meta.url)), '../../public/demo')
export const demoFile = (name: string): Buffer => readFileSync(join(DEMO_DIR, name))

const sourceOf = (name: string): ByteSource => {
  const bytes = demoFile(name)
  return {
    name,
    size: bytes.length,
    read: async (offset, length) => new Uint8Array(bytes.subarray(offset, offset + length)).buffer,
  }
}
const door: FileDoor = { bytes: async (name) => sourceOf(name), text: async (name) => demoFile(name).toString('utf8') }

export interface OpenDemo {
  readonly doc: StudyDoc
  readonly warnings: readonly string[]
  readonly study: SettledStudy
  readonly read: GroundRead
  readonly ground: Ground
  readonly engine: Engine
}
/** The demo as the app opens it: study parsed, ground read, engine ready. */
export async function openDemo(): Promise<OpenDemo> {
  const { doc, warnings } = parseStudy(demoFile('study.json').toString('utf8'), 'study.json')
  const study = settle(doc)
  const read = await readGround(
    {
      terrain: doc.terrain,
      landCover: doc.landCover ?? null,
      uniformTerrain: doc.uniformTerrain ?? null,
      obstacles: doc.obstacles?.file ?? null,
      roads: doc.roads?.file ?? null,
      lowAngleLandTable: null,
      circles: study.candidates.map(({ lon, lat }) => ({ lon, lat, radiusM: study.run.maxRangeM })),
    },
    door,
  )
  const ground = finish(buildGround({ serial: 1, ...read }))
  const engine = new Engine()
  engine.setGround(ground, read.landTable)
  engine.setStudy(doc, { option: null, layer: 'clutter-to-noise' }, false)
  return { doc, warnings, study, read, ground, engine }
}

/** Every option of the demo worked out. */
export function allResults(engine: Engine): OptionResult[] {
  for (let work = engine.next(); work; work = engine.next())
    for (const tell of finish(work)) if (tell.kind === 'failure') throw new Error(tell.error.message)
  return engine.results()
}
