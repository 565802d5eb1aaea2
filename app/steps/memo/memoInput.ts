import {
  geodesicDirect,
  type LayerId,
  layerInfo,
  type OptionResult,
  type SettledStudy,
  type StudyDoc,
  type View,
} from '../../../core/index.ts'
import { version } from '../../../package.json'
import type { StudyClient } from '../../compute/client.ts'
import { filesOf, optionKey, studyOptions } from '../../document/index.ts'
import { fitted, openingView } from '../../map/camera.ts'
import { cutOf, type MemoFile, type MemoInput, type MemoMap } from '../../memo/model/index.ts'
import type { Session } from '../session/index.ts'
import { remarksOf, settledOf } from '../settled.ts'

/** Layer of the memo's maps, and their size in pixels. */
const MAP_LAYER: LayerId = 'clutter-to-noise'
const MAP_PX = { width: 920, height: 920 }
const MAP_MARGIN_PX = 12

/** Results in the order of the study's options; those not computed yet are left out. */
export const resultsInOrder = (doc: StudyDoc, byOption: ReadonlyMap<string, OptionResult>): OptionResult[] =>
  studyOptions(doc).flatMap((o) => byOption.get(optionKey(o)) ?? [])

const digests = new WeakMap<Blob, string>()
async function sha256(blob: Blob): Promise<string> {
  let digest = digests.get(blob)
  if (digest === undefined) {
    const bytes = new Uint8Array(await crypto.subtle.digest('SHA-256', await blob.arrayBuffer()))
    digest = [...bytes].map((b) => b.toString(16).padStart(2, '0')).join('')
    digests.set(blob, digest)
  }
  return digest
}

/** Files of the study with what was read of them, without checksums. */
export function memoFiles(session: Session): MemoFile[] {
  const { notes } = session.ground.getState()
  const { files } = session.files.getState()
  return filesOf(session.study.getState().doc).map((name) => {
    const note = notes.find((n) => n.startsWith(`${name}: `))
    return { name, sha256: null, describe: note ? note.slice(name.length + 2) : files.has(name) ? 'not read' : 'not here' }
  })
}
/** The same with the checksum of each file that is here. */
export async function memoFilesWithDigests(session: Session): Promise<MemoFile[]> {
  const { files } = session.files.getState()
  return Promise.all(
    memoFiles(session).map(async (file) => {
      const blob = files.get(file.name)?.blob
      return blob ? { ...file, sha256: await sha256(blob) } : file
    }),
  )
}

/** One picture per option, ground and C/N of the whole range in day colours, and its range-height plane. */
export async function memoMaps(
  client: StudyClient,
  study: SettledStudy,
  results: readonly OptionResult[],
  png: (rgba: Uint8ClampedArray, width: number, height: number) => string,
  onDone: (done: number) => void,
): Promise<MemoMap[]> {
  const maps: MemoMap[] = []
  for (const result of results) {
    const { ref } = result
    const site = study.candidates.find((c) => c.id === ref.candidate)
    if (!site) continue
    const edge = [0, 90, 180, 270].map((azimuth) => geodesicDirect(site, azimuth, study.run.maxRangeM))
    const view: View = fitted({ ...openingView(false), ...MAP_PX }, edge, MAP_MARGIN_PX)
    const answer = await client.ask('map', { view, layer: MAP_LAYER, option: ref })
    const about = cutOf(result, study.run.maxRangeM)
    const cut = about && (await client.ask('vertical', { option: ref, ...about }))
    if (answer)
      maps.push({
        ref,
        layer: MAP_LAYER,
        view: answer.view,
        ramp: layerInfo(MAP_LAYER).ramp,
        png: png(answer.rgba, answer.view.width, answer.view.height),
        cut,
      })
    onDone(maps.length)
  }
  return maps
}

/** Everything the memo is made from but pictures and checksums; null while a value of the study has to change. */
export function memoInput(session: Session, files: readonly MemoFile[], maps: readonly MemoMap[], date: string): MemoInput | null {
  const { doc } = session.study.getState()
  const study = settledOf(doc)
  if (!study) return null
  return {
    study,
    doc,
    results: resultsInOrder(doc, session.results.getState().byOption),
    files,
    maps,
    system: session.view.getState().units,
    date,
    version,
    warnings: remarksOf(doc),
  }
}
