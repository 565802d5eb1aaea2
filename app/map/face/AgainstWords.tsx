import { differenceInfo, type OptionRef } from '../../../core/index.ts'
import { DIFFERENCE_WORDS as D, formatAngle, formatMast, MAP_WORDS, textOf } from '../../words/index.ts'
import type { MapCandidate, MapShow } from '../types.ts'
import { Word } from './Word.tsx'

const NONE = ' none'

/** "… against **B** at **30 m** as **a difference**": the second option of the map, by words; nothing where the study has one option. */
export function AgainstWords({
  show,
  candidates,
  onShow,
}: {
  show: MapShow
  candidates: readonly MapCandidate[]
  onShow: (part: Partial<MapShow>) => void
}) {
  const { option, against = null } = show
  const others = candidates.filter((c) => optionsOf(c).some((o) => !same(o, option)))
  if (!option || others.length === 0) return null
  const second = candidates.find((c) => c.id === against?.candidate)
  const choose = (id: string) => {
    const c = candidates.find((k) => k.id === id)
    if (!c) return onShow({ against: null })
    const all = optionsOf(c).filter((o) => !same(o, option))
    // the same mast where the other candidate has it: one thing changes at a time
    const wished = against ?? option
    onShow({ against: all.find((o) => o.heightM === wished.heightM && o.tiltDeg === wished.tiltDeg) ?? all[0] ?? null })
  }
  const choices = [{ id: NONE, words: D.none }, ...others.map((c) => ({ id: c.id, words: `${c.id} ${c.name}`.trim() }))]
  if (!second || !against)
    return (
      <>
        {' '}
        <Word label={D.candidate} word={D.add} value={NONE} choices={choices} onChoose={choose} quiet />
      </>
    )
  const heights = [...new Set(second.mastHeightsM)].sort((a, b) => a - b)
  const names = differenceInfo(show.layer) === null
  return (
    <>
      {' '}
      {D.against} <Word label={D.candidate} word={second.id} value={second.id} choices={choices} onChoose={choose} />{' '}
      {MAP_WORDS.sentence.at}{' '}
      <Word
        label={D.height}
        word={textOf(formatMast(against.heightM))}
        value={String(against.heightM)}
        choices={heights.map((h) => ({ id: String(h), words: textOf(formatMast(h)) }))}
        onChoose={(h) => onShow({ against: { ...against, heightM: Number(h) } })}
      />
      {second.tiltsDeg.length > 1 ? (
        <>
          {' '}
          {MAP_WORDS.sentence.tilted}{' '}
          <Word
            label={D.tilt}
            word={textOf(formatAngle(against.tiltDeg, 0.1))}
            value={String(against.tiltDeg)}
            choices={second.tiltsDeg.map((t) => ({ id: String(t), words: textOf(formatAngle(t, 0.1)) }))}
            onChoose={(t) => onShow({ against: { ...against, tiltDeg: Number(t) } })}
          />
        </>
      ) : null}{' '}
      {D.as}{' '}
      <Word
        label={D.how}
        word={D.choices[names ? 'maps' : (show.beside ?? 'difference')]}
        value={names ? 'maps' : (show.beside ?? 'difference')}
        choices={
          names
            ? [{ id: 'maps', words: D.choices.maps, hint: D.noDifference }]
            : (['difference', 'maps'] as const).map((id) => ({ id, words: D.choices[id] }))
        }
        onChoose={(beside) => onShow({ beside: beside as 'difference' | 'maps' })}
      />
    </>
  )
}
const optionsOf = (c: MapCandidate): OptionRef[] =>
  c.mastHeightsM.flatMap((heightM) => c.tiltsDeg.map((tiltDeg) => ({ candidate: c.id, heightM, tiltDeg })))
const same = (a: OptionRef, b: OptionRef | null): boolean =>
  b !== null && a.candidate === b.candidate && a.heightM === b.heightM && a.tiltDeg === b.tiltDeg
