import { type GridShape, gridPosition, type LonLat, loadCrs, type StudyDoc, surveysOf } from '../../../core/index.ts'
import type { StudyClient } from '../../compute/client.ts'
import type { makeGroundReader } from '../../compute/intakeClient.ts'
import { type FileStore, filesOf, type GivenFile, type GroundStore, NO_GROUND, type StudyStore } from '../../document/index.ts'
import { sentenceOf } from './notices.ts'

export type ReadGround = ReturnType<typeof makeGroundReader>

/** Reads the ground again whenever its files, or what the study states about them, change, and hands it to the study worker. */
export function keepGround(
  study: StudyStore,
  given: FileStore,
  ground: GroundStore,
  client: StudyClient,
  read: ReadGround,
  onGround: () => void,
): { again(): void } {
  let latest = ''
  let round = 0
  const look = async () => {
    const { doc } = study.getState()
    const { files } = given.getState()
    const key = groundKey(doc, files)
    if (key === latest) return
    latest = key
    const mine = ++round
    const missing = filesOf(doc).filter((name) => !files.has(name))
    if (doc.terrain.length === 0 || doc.terrain.some((t) => !files.has(t.file))) {
      ground.setState({ ...NO_GROUND, missing })
      return
    }
    ground.setState({ state: 'reading', reading: { doing: 'Reading terrain', done: 0, total: 0 }, trouble: '', missing })
    try {
      const got = await read(files, doc, (doing, done, total) => {
        if (mine === round) ground.setState({ reading: { doing, done, total } })
      })
      if (mine !== round) return
      const { heightM, code } = got.ground
      const transfer = [heightM.buffer, ...(code ? [code.buffer] : [])].filter((b): b is ArrayBuffer => b instanceof ArrayBuffer)
      const answer = await client.ask('ground', got.ground, transfer)
      if (mine !== round) return
      const { notes, roads, obstacles } = got
      const posts = got.ground.shape.width * got.ground.shape.height
      ground.setState({
        state: 'ready',
        reading: null,
        ground: answer && { ...answer, corners: await cornersOf(got.ground.shape) },
        posts,
        notes,
        roads,
        obstacles,
      })
      onGround()
    } catch (error) {
      if (mine === round) ground.setState({ ...NO_GROUND, state: 'failed', trouble: sentenceOf(error), missing })
    }
  }
  study.subscribe(look)
  given.subscribe(look)
  void look()
  return {
    /** Reads the files once more: a candidate may have left the window that was read of a very large file. */
    again() {
      latest = ''
      void look()
    },
  }
}

/** Outer corners of the ground, for the map's first view. */
async function cornersOf(shape: GridShape): Promise<LonLat[]> {
  await loadCrs(shape.crs)
  const { toLonLat } = gridPosition(shape)
  const [right, bottom] = [shape.width - 0.5, shape.height - 0.5]
  return [toLonLat(-0.5, -0.5), toLonLat(right, -0.5), toLonLat(right, bottom), toLonLat(-0.5, bottom)].map(([lon, lat]) => ({ lon, lat }))
}

const serials = new WeakMap<Blob, number>()
let nextSerial = 1
const serialOf = (blob: Blob | undefined): number => {
  if (!blob) return 0
  const known = serials.get(blob) ?? nextSerial++
  serials.set(blob, known)
  return known
}
/** Everything the ground is made from: what the study states about its files, and which files these are. */
function groundKey(doc: StudyDoc, files: ReadonlyMap<string, GivenFile>): string {
  const names = [...doc.terrain.map((t) => t.file), doc.landCover?.file, doc.obstacles?.file, doc.roads?.file, doc.tables?.lowAngleLand]
  const placed = (doc.needs ?? []).flatMap((n) => (n.file ? [[n.id, n.kind, n.file, n.heightM, n.heightAbove, n.qnhHpa]] : []))
  // a need without a file is nothing to the ground: it is not read again when one comes or goes
  names.push(...(doc.needs ?? []).flatMap((n) => n.file ?? []))
  const surveyed = surveysOf(doc)
  names.push(...surveyed.map((s) => s.file))
  const blobs = names.map((n) => serialOf(n === undefined ? undefined : files.get(n)?.blob))
  return JSON.stringify([doc.terrain, doc.landCover, doc.uniformTerrain, doc.obstacles, doc.roads, doc.tables, placed, surveyed, blobs])
}
