import { addNeed, freeCandidateId, redo, STEPS, undo, undoWords, type ViewState } from '../../document/index.ts'
import { EMPTY_WORDS, LAYER_WORDS, NORTH_WORDS, STEP_WORDS, TABLE_WORDS, UNIT_SYSTEM_NAMES } from '../../words/index.ts'
import type { Session } from '../session/index.ts'

/** Something the user can do by its words. */
export interface Command {
  readonly id: string
  readonly words: string
  /** What kind of thing it is, in lighter ink. */
  readonly kind: string
  readonly keys?: string
  readonly run: () => void
}

/** Everything that can be done now: steps, quantities on the map, candidates, edits, files, the face. */
export function commandsOf(session: Session): Command[] {
  const { study, view } = session
  const { doc } = study.getState()
  const set = (part: Partial<ViewState>) => () => view.getState().set(part)
  const now = view.getState()
  const words = undoWords(study)
  const open = (dialog: ViewState['dialog'], dialogFor: string | null = null) => set({ dialog, dialogFor })
  const one = (id: string, kind: string, text: string, run: () => void, keys?: string): Command => ({ id, kind, words: text, run, keys })
  const tilt = doc.radar.antenna.tiltDeg ?? 0
  return [
    ...STEPS.map((s) => one(`step-${s}`, 'step', STEP_WORDS[s].name, set({ step: s, formOpen: true }))),
    ...(words.undo === null ? [] : [one('undo', 'edit', `Undo: ${words.undo}`, () => undo(study), 'Ctrl Z')]),
    ...(words.redo === null ? [] : [one('redo', 'edit', `Redo: ${words.redo}`, () => redo(study), 'Ctrl Y')]),
    one(
      'place',
      'edit',
      `Place candidate ${freeCandidateId(doc.candidates)} on the map`,
      set({ step: 'candidates', placing: true, formOpen: true }),
    ),
    one('add-need', 'edit', 'Add a layer need', () => {
      addNeed(study)
      view.getState().set({ step: 'need', formOpen: true })
    }),
    one('templates', 'edit', 'Start from a kind of work or a generic radar', open('templates')),
    one('candidates-table', 'table', 'Candidates as a table', open('candidates')),
    one('obstacles-table', 'table', 'Obstacles as a table', open('obstacles')),
    one('enter-fixes', 'table', 'Enter fixes', open('fixes', 'fixes')),
    one('enter-track', 'table', 'Enter a track', open('fixes', 'track')),
    one('confirmations', 'table', 'Confirmed measurements', open('confirmations')),
    one('models', 'help', 'Models and sources', open('models')),
    one('pulses-table', 'table', TABLE_WORDS.pulsesTitle, open('pulses')),
    ...doc.candidates
      .filter((c) => c.mastHeightsM.length > 0)
      .map((c) =>
        one(
          `candidate-${c.id}`,
          'candidate',
          c.name && c.name !== c.id ? `Show ${c.id}, ${c.name}` : `Show ${c.id}`,
          set({ option: { candidate: c.id, heightM: c.mastHeightsM[0], tiltDeg: c.tiltsDeg?.[0] ?? tilt } }),
        ),
      ),
    ...Object.entries(LAYER_WORDS).map(([id, w]) =>
      one(`layer-${id}`, 'quantity', `Show ${w.title}`, set({ layer: id as ViewState['layer'] })),
    ),
    one('open', 'file', 'Open a study, a package or files', () => pickFiles(session)),
    one('save', 'file', 'Save study', session.saveStudy, 'Ctrl S'),
    one('package', 'file', 'Save package', () => void session.savePackage()),
    one('studies', 'file', 'Studies on this machine', open('studies')),
    one('new', 'file', 'New study', () => void session.newStudy()),
    one('demo', 'file', EMPTY_WORDS.ground.demo, () => void session.openDemo()),
    one(
      'units',
      'face',
      `Units: ${UNIT_SYSTEM_NAMES[now.units === 'nautical' ? 'metric' : 'nautical']}`,
      set({ units: now.units === 'nautical' ? 'metric' : 'nautical' }),
    ),
    one('theme', 'face', `Sheet: ${now.theme === 'night' ? 'paper' : 'night'}`, set({ theme: now.theme === 'night' ? 'paper' : 'night' })),
    one('north', 'face', `${NORTH_WORDS.title}: true or magnetic, declination`, open('north')),
    one('memo', 'face', 'Memo column', set({ memoOpen: !now.memoOpen })),
    now.hold ? one('run', 'run', 'Run what is held', session.run) : one('stop', 'run', 'Stop and hold', session.stop),
    one('keys', 'help', 'Keys', open('keys'), 'Ctrl /'),
  ]
}

/** Those whose words hold every word typed; those that begin with the first come first. */
export function matching(commands: readonly Command[], typed: string): Command[] {
  const parts = typed.toLowerCase().split(/\s+/).filter(Boolean)
  if (parts.length === 0) return [...commands]
  const found = commands.filter((c) => parts.every((p) => `${c.words} ${c.kind}`.toLowerCase().includes(p)))
  const rank = (c: Command): number => {
    const w = c.words.toLowerCase()
    return w.startsWith(parts[0]) ? 0 : new RegExp(`\\b${parts[0].replace(/[^a-z0-9]/g, '.')}`).test(w) ? 1 : 2
  }
  return found
    .map((c, i) => ({ c, i }))
    .sort((a, b) => rank(a.c) - rank(b.c) || a.i - b.i)
    .map(({ c }) => c)
}

function pickFiles(session: Session): void {
  const input = document.createElement('input')
  input.type = 'file'
  input.multiple = true
  input.onchange = () => void session.take([...(input.files ?? [])])
  input.click()
}
