import { memo, useEffect, useState } from 'react'
import type { Change, OptionRef, StudyDoc } from '../../../core/index.ts'
import { optionKey, studyOptions } from '../../document/index.ts'
import { Button, Select } from '../../ui/index.ts'
import { CHANGE_WORDS, optionWords, type UnitSystem } from '../../words/index.ts'
import { useGround, useSession } from '../session/index.ts'
import { sentenceOf } from '../session/notices.ts'
import { ChangeTables } from './ChangeTables.tsx'

/** Obstacles offered by name, at most. */
const MOST_OBSTACLES = 200
const WITHOUT = 'without '

/** One option against another, or against itself without an obstacle: which needs and fixes change, sectors, floors and areas. */
export const ChangeSection = memo(function ChangeSection({
  doc,
  shown,
  system,
}: {
  doc: StudyDoc
  shown: OptionRef | null
  system: UnitSystem
}) {
  const { client, notices } = useSession()
  const ground = useGround((g) => g.ground)
  const obstacles = useGround((g) => g.obstacles)
  const options = studyOptions(doc)
  const [chosen, setChosen] = useState<{ before: string; after: string } | null>(null)
  const [held, setHeld] = useState<{ key: string; change: Change } | null>(null)
  const [working, setWorking] = useState(false)
  const withTilt = new Set(options.map((o) => o.tiltDeg)).size > 1
  const before = options.find((o) => optionKey(o) === (chosen?.before ?? (shown ? optionKey(shown) : ''))) ?? options[0]
  // what was found holds for this study and ground alone
  // biome-ignore lint/correctness/useExhaustiveDependencies: another study or ground is what this waits for
  useEffect(() => setHeld(null), [doc, ground])
  if (!before || !ground) return null
  const names = [...new Set(obstacles.map((o) => o.name).filter((n) => n !== ''))].slice(0, MOST_OBSTACLES)
  const afters = [
    ...options.filter((o) => o !== before).map((o) => ({ id: optionKey(o), words: optionWords(o, withTilt) })),
    ...names.map((n) => ({ id: WITHOUT + n, words: CHANGE_WORDS.without(n) })),
  ]
  if (afters.length === 0) return null
  const taller = options.find((o) => o.candidate === before.candidate && o.tiltDeg === before.tiltDeg && o.heightM > before.heightM)
  const after = afters.find((a) => a.id === chosen?.after)?.id ?? (taller ? optionKey(taller) : afters[0].id)
  const without = after.startsWith(WITHOUT) ? after.slice(WITHOUT.length) : null
  const key = `${optionKey(before)}>${after}`
  const ask = () => {
    const target = without === null ? options.find((o) => optionKey(o) === after) : before
    if (!target) return
    setWorking(true)
    client
      .ask('change', { before, after: target, ...(without === null ? {} : { without: [without] }) })
      .then((change) => change && setHeld({ key, change }))
      .catch((error: unknown) => notices.getState().say(sentenceOf(error), 'bad'))
      .finally(() => setWorking(false))
  }
  const name = optionWords(before, withTilt)
  return (
    <section className="changes" aria-label={CHANGE_WORDS.title}>
      <h3>{CHANGE_WORDS.title}</h3>
      <div className="change-row">
        <Select
          label={CHANGE_WORDS.before}
          value={optionKey(before)}
          choices={options.map((o) => ({ id: optionKey(o), words: optionWords(o, withTilt) }))}
          onChange={(id) => setChosen({ before: id, after })}
        />
        <Select
          label={CHANGE_WORDS.after}
          value={after}
          choices={afters}
          onChange={(id) => setChosen({ before: optionKey(before), after: id })}
        />
        <Button onPress={ask} disabled={working}>
          {working ? CHANGE_WORDS.working : CHANGE_WORDS.show}
        </Button>
      </div>
      {held && held.key === key ? (
        <ChangeTables
          change={held.change}
          system={system}
          words={without === null ? `${name} → ${afters.find((a) => a.id === after)?.words}` : `${name} ${CHANGE_WORDS.without(without)}`}
        />
      ) : (
        <p className="ink-2">{CHANGE_WORDS.hint}</p>
      )}
    </section>
  )
})
