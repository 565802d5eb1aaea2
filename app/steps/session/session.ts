import { canonicalJson, InputError, type StudyDoc } from '../../../core/index.ts'
import type { StudyClient } from '../../compute/client.ts'
import {
  type Autosave,
  autosave,
  createFileStore,
  createGroundStore,
  createOwnRadars,
  createResultsStore,
  createSaveStore,
  createStudyShelf,
  createStudyStore,
  createViewStore,
  emptyStudy,
  type FileState,
  type FileStore,
  fileStem,
  forgetResults,
  type GroundStore,
  hasStartingRadar,
  type OwnRadarStore,
  openShelf,
  packStudy,
  type ResultsStore,
  restore,
  type SaveStore,
  type Shelf,
  type StudyShelf,
  type StudyStore,
  studyText,
  takeTell,
  type ViewStore,
} from '../../document/index.ts'
import { download, type FileRole, openServed, type TakenIn, takeIn } from '../../files/index.ts'
import { keepGround, type ReadGround } from './groundKeeper.ts'
import { createNoticeStore, type NoticeStore, sentenceOf } from './notices.ts'
import { keepRunning } from './runKeeper.ts'

/** One open page: its stores, the study worker behind it, and what the user can do with the whole of it. */
export interface Session {
  readonly study: StudyStore
  readonly files: FileStore
  readonly view: ViewStore
  readonly results: ResultsStore
  readonly ground: GroundStore
  readonly save: SaveStore
  readonly notices: NoticeStore
  /** Radars the user keeps for other studies. */
  readonly radars: OwnRadarStore
  /** Studies kept on this machine beside the open one. */
  readonly studies: StudyShelf
  /** Opens a study of the list; the open one goes there. */
  openListed(id: string): Promise<void>
  /** Puts a copy of the open study on the list. */
  duplicateOpen(): Promise<void>
  readonly client: StudyClient
  /** Dropped or picked files; `as` says what they are. */
  take(files: readonly File[], as?: FileRole): Promise<void>
  openDemo(): Promise<void>
  newStudy(): Promise<void>
  saveStudy(): void
  savePackage(): Promise<void>
  /** Reads the ground from its files once more. */
  readAgain(): void
  run(): void
  stop(): void
}

const DEMO_FOLDER = `${import.meta.env.BASE_URL}demo/`

/** Starts the page: restores what was there, else opens the demo (`?empty`: nothing), then keeps ground, results and saves up to date. */
export async function startSession(client: StudyClient, readGround: ReadGround): Promise<Session> {
  const study = createStudyStore()
  const files = createFileStore()
  const dark = matchMedia('(prefers-color-scheme: dark)').matches
  const view = createViewStore(window.localStorage, dark)
  const results = createResultsStore()
  const ground = createGroundStore()
  const save = createSaveStore()
  const notices = createNoticeStore()
  const { say } = notices.getState()
  const shelf = await openShelf().catch(() => noShelf())
  const own = createOwnRadars(shelf)
  void own.load().catch(() => {})
  const studies = createStudyShelf(shelf, Date.now)
  void studies.load().catch(() => {})
  const saver = autosave(study, files, save, shelf, window.localStorage, Date.now)

  client.listen((tell) => {
    takeTell(results, tell, Date.now())
    if (tell.kind !== 'failure') return
    const { message, remedy } = tell.error
    say(remedy === undefined ? sentenceOf(new Error(message)) : message, 'bad')
    // a fault of ours ends the run: it is not tried again by itself
    if (remedy === undefined) runner.stop()
  })
  const runner = keepRunning(study, view, ground, results, client, notices)

  const opened = ({ warnings, missing, trouble }: Pick<TakenIn, 'warnings' | 'missing' | 'trouble'>) => {
    forgetResults(results)
    view.getState().set({ cell: null, chart: null, placing: false })
    for (const w of warnings) say(w)
    if (trouble !== null) say(trouble, 'bad')
    if (missing.length > 0)
      say(`${missing.join(', ')}: named by the study, not here yet; drop ${missing.length > 1 ? 'them' : 'it'} on the page`)
  }
  const guarded = async (work: () => Promise<void>) => {
    notices.getState().clear()
    try {
      await work()
    } catch (error) {
      say(sentenceOf(error), 'bad')
    }
  }
  /** The document as it was last saved to a file, or opened as the demo: nothing is lost with it. */
  let safe: StudyDoc | null = null
  /** Puts a study on the list before another takes its place; throws when it has changes that would be lost. */
  const keep = async (doc: StudyDoc, given: FileState['files']) => {
    if (doc === safe || (doc.terrain.length === 0 && doc.candidates.length === 0 && hasStartingRadar(doc))) return
    try {
      await studies.setAside(doc, given)
    } catch {
      throw new InputError({
        code: 'not-kept',
        found: `${doc.name} could not be kept in this browser`,
        remedy: 'save it to a file or package first, then go on',
      })
    }
  }
  const keepOpen = () => keep(study.getState().doc, files.getState().files)
  const openDemo = async () => {
    const demo = await openServed(DEMO_FOLDER)
    if (canonicalJson(demo.doc) !== canonicalJson(study.getState().doc)) await keepOpen()
    safe = demo.doc
    files.getState().replace(demo.files)
    study.getState().load(demo.doc)
    opened(demo)
  }
  let readAgain = () => {}
  const session: Session = {
    study,
    files,
    view,
    results,
    ground,
    save,
    notices,
    radars: own.store,
    studies,
    client,
    take: (dropped, as) =>
      guarded(async () => {
        const taken = await takeIn(study, files, dropped, as, keepOpen)
        if (taken.opened) opened(taken)
      }),
    openListed: (id) =>
      guarded(async () => {
        const kept = await studies.read(id)
        if (!kept) return
        await keepOpen()
        files.getState().replace(kept.files)
        study.getState().load(kept.doc)
        opened({ warnings: [], missing: [], trouble: null })
        await saver.flush()
        if (save.getState().state === 'saved') await studies.remove(id)
      }),
    duplicateOpen: () =>
      guarded(async () => {
        const { doc } = study.getState()
        await studies.setAside({ ...doc, name: `${doc.name}, copy` }, files.getState().files)
      }),
    openDemo: () => guarded(openDemo),
    newStudy: () =>
      guarded(async () => {
        await keepOpen()
        files.getState().replace([])
        study.getState().load(emptyStudy())
        opened({ warnings: [], missing: [], trouble: null })
        view.getState().set({ step: 'ground' })
      }),
    saveStudy: () => {
      const { doc } = study.getState()
      safe = doc
      download(new Blob([studyText(doc)], { type: 'application/json' }), `${fileStem(doc)}.json`)
    },
    savePackage: () =>
      guarded(async () => {
        const { doc } = study.getState()
        safe = doc
        download(await packStudy(doc, files.getState().files), `${fileStem(doc)}.zip`)
      }),
    readAgain: () => readAgain(),
    run: runner.run,
    stop: runner.stop,
  }
  await firstStudy(session, saver, shelf, openDemo)
  readAgain = keepGround(study, files, ground, client, readGround, runner.onGround).again
  const leave = () => void saver.flush()
  document.addEventListener('visibilitychange', () => document.visibilityState === 'hidden' && leave())
  window.addEventListener('pagehide', leave)
  return session
}

async function firstStudy(session: Session, saver: Autosave, shelf: Shelf, openDemo: () => Promise<void>): Promise<void> {
  const { study, files, notices } = session
  if (new URLSearchParams(location.search).has('empty')) return
  try {
    const kept = await restore(shelf, window.localStorage)
    if (kept) {
      saver.known(kept.files)
      files.getState().replace(kept.files)
      study.getState().load(kept.doc)
      return
    }
  } catch (error) {
    notices
      .getState()
      .say(`The study of the last visit could not be read: ${error instanceof Error ? error.message : error}; open a saved package`, 'bad')
  }
  try {
    await openDemo()
  } catch {
    // served without the demo: the Ground step says what to do next
  }
}

/** Private windows may refuse a database: the page works, and the save state says that nothing is kept. */
function noShelf(): Shelf {
  const refuse = () => Promise.reject(new Error('this browser keeps nothing here'))
  return { get: async () => undefined, set: refuse, del: refuse, keys: async () => [] }
}
