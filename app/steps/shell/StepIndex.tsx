import { Button } from 'react-aria-components'
import { hasStartingRadar, optionKey, problemsOf, STEPS, type StepId, studyOptions } from '../../document/index.ts'
import { Button as AppButton } from '../../ui/Button.tsx'
import { STEP_WORDS } from '../../words/index.ts'
import { useDoc, useGround, useResults, useSession, useView } from '../session/index.ts'
import { Working } from './Working.tsx'

/** Which step corrects a key path. */
const RADAR = /^(radar|atmosphere|run)\b/
const NEEDS = /^needs\b/
const CANDIDATES = /^candidates\b/
const GROUND = /^(?!(radar|atmosphere|run|needs|candidates)\b)/

interface StepState {
  readonly words: string
  readonly tone: 'ready' | 'missing' | 'changed'
}
const ready = (words: string): StepState => ({ words, tone: 'ready' })
const missing = (words: string): StepState => ({ words, tone: 'missing' })
const changed = (words: string): StepState => ({ words, tone: 'changed' })

/** Each step's state in a word or two. */
function useStepStates(): Record<StepId, StepState> {
  const doc = useDoc((d) => d)
  const ground = useGround((g) => g)
  const byOption = useResults((r) => r.byOption)
  const running = useResults((r) => r.status !== null)
  const hold = useView((v) => v.hold)
  const problems = problemsOf(doc)
  const wrong = (part: RegExp) => problems.filter((p) => part.test(p.path)).length
  const options = studyOptions(doc)
  const done = options.filter((o) => byOption.has(optionKey(o))).length
  const needs = doc.needs?.length ?? 0
  const toCorrect = (n: number) => missing(`${n} to correct`)
  return {
    ground:
      ground.state === 'failed'
        ? missing('not readable')
        : ground.state === 'reading'
          ? changed('reading')
          : wrong(GROUND) > 0
            ? toCorrect(wrong(GROUND))
            : doc.terrain.length === 0
              ? missing('missing')
              : ground.missing.length > 0
                ? missing(`${ground.missing.length} file${ground.missing.length > 1 ? 's' : ''} missing`)
                : ready('ready'),
    radar: wrong(RADAR) > 0 ? toCorrect(wrong(RADAR)) : hasStartingRadar(doc) ? changed('starting values') : ready('ready'),
    need: wrong(NEEDS) > 0 ? toCorrect(wrong(NEEDS)) : needs === 0 ? missing('none stated') : ready(`${needs} stated`),
    candidates:
      wrong(CANDIDATES) > 0
        ? toCorrect(wrong(CANDIDATES))
        : doc.candidates.length === 0
          ? missing('none placed')
          : ready(`${doc.candidates.length} placed`),
    compare:
      options.length === 0
        ? missing('no options')
        : done < options.length || running
          ? changed(hold && !running ? `held, ${done} of ${options.length}` : `${done} of ${options.length}`)
          : ready(`${options.length} options`),
    memo: { words: done === 0 ? 'empty' : 'draft', tone: 'ready' },
  }
}

/** The index of the sheet: six steps, each with its state. */
export function StepIndex() {
  const { view } = useSession()
  const step = useView((v) => v.step)
  const formOpen = useView((v) => v.formOpen)
  const states = useStepStates()
  return (
    <nav className="index" aria-label="Steps">
      <ol>
        {STEPS.map((id) => (
          <li key={id}>
            <Button
              className={id === step ? 'step on' : 'step'}
              aria-current={id === step ? 'step' : undefined}
              onPress={() => view.getState().set({ step: id, formOpen: id === step ? !formOpen : true })}
            >
              <span className="step-name">{STEP_WORDS[id].name}</span>
              <span className={`step-state ${states[id].tone}`}>{states[id].words}</span>
            </Button>
          </li>
        ))}
      </ol>
      <div className="helpers">
        <AppButton small look="quiet" label="Find a command" onPress={() => view.getState().set({ dialog: 'commands' })}>
          find
        </AppButton>
        <AppButton small look="quiet" label="Keys of the page" onPress={() => view.getState().set({ dialog: 'keys' })}>
          keys
        </AppButton>
      </div>
      <Working />
    </nav>
  )
}
