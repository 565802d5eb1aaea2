import { memo } from 'react'
import { Button as AriaButton } from 'react-aria-components'
import { type CriterionDoc, type OptionRef, type OptionResult, rankOptions, type StudyDoc, WEIGHT_FACTORS } from '../../../core/index.ts'
import { addCriterion, problemsOf, removeCriterion, sameOption, setCriterion } from '../../document/index.ts'
import { Button, NumberField, Select } from '../../ui/index.ts'
import {
  criterionFace,
  criterionWords,
  effectWords,
  formatNumber,
  formatScore,
  optionWords,
  PLAIN,
  RANKING_WORDS,
  rankWords,
  type UnitSystem,
  VERDICT_WORDS,
} from '../../words/index.ts'
import { useSession } from '../session/index.ts'
import { figuresToRankBy, startingCriterion } from './criteria.ts'

export interface RankingProps {
  readonly doc: StudyDoc
  readonly results: readonly OptionResult[]
  readonly shown: OptionRef | null
  readonly system: UnitSystem
  readonly onShow: (option: OptionRef) => void
}
/** What counts, how the options rank by it, and whether that holds when a weight changes. */
export const RankingSection = memo(function RankingSection({ doc, results, shown, system, onShow }: RankingProps) {
  const { study } = useSession()
  const criteria = doc.ranking?.criteria ?? []
  const needs = doc.needs ?? []
  const free = figuresToRankBy(results, needs).filter((f) => criteria.every((c) => c.figure !== f))
  const sound = criteria.length > 0 && problemsOf(doc).every((p) => !p.path.startsWith('ranking'))
  const ranking = sound && results.length > 0 ? rankOptions(results, { criteria }) : null
  const withTilt = new Set(results.map((r) => r.ref.tiltDeg)).size > 1
  const ranks = ranking?.options.map((o) => o.rank) ?? []
  return (
    <section className="ranking" aria-label={RANKING_WORDS.title}>
      <h3>{RANKING_WORDS.title}</h3>
      {criteria.length === 0 ? <p className="ink-2">{RANKING_WORDS.none}</p> : <Criteria doc={doc} criteria={criteria} system={system} />}
      {free.length > 0 ? (
        <div className="pick-need">
          <Select
            label="Add a figure"
            value=""
            choices={free.map((id) => ({ id, words: criterionWords(id, needs) }))}
            onChange={(figure) => addCriterion(study, startingCriterion(figure, results, system))}
          />
        </div>
      ) : null}
      {ranking ? (
        <>
          <table className="table">
            <caption className="visually-hidden">Options by score</caption>
            <thead>
              <tr>
                <th scope="col">Rank</th>
                <th scope="col" className="text">
                  Option
                </th>
                <th scope="col" className="text">
                  Must needs
                </th>
                {criteria.map((c, i) => (
                  <th key={c.figure} scope="col" title={criterionWords(c.figure, needs)}>
                    Points {i + 1}
                  </th>
                ))}
                <th scope="col">Score of 100</th>
              </tr>
            </thead>
            <tbody>
              {ranking.options.map((o) => {
                const on = sameOption(o.ref, shown)
                return (
                  <tr key={optionWords(o.ref, true)} className={on ? 'on' : ''}>
                    <td>{rankWords(o.rank, ranks)}</td>
                    <td className="text">
                      <AriaButton className={on ? 'chip on' : 'chip'} aria-pressed={on} onPress={() => onShow(o.ref)}>
                        {optionWords(o.ref, withTilt)}
                      </AriaButton>
                    </td>
                    <td className="text">
                      {o.passes === null ? VERDICT_WORDS.oneK : o.passes ? VERDICT_WORDS.passes : VERDICT_WORDS.notMet}
                    </td>
                    {o.criteria.map((c) => (
                      <td key={c.figure}>{c.u === null ? '–' : formatScore(c.u * c.share)}</td>
                    ))}
                    <td>{formatScore(o.score)}</td>
                  </tr>
                )
              })}
            </tbody>
          </table>
          <p className="ink-2">{RANKING_WORDS.rule}</p>
          <h4>{RANKING_WORDS.effects}</h4>
          <table className="table effects">
            <caption className="visually-hidden">{RANKING_WORDS.effects}</caption>
            <thead>
              <tr>
                <th scope="col">Weight of</th>
                <th scope="col" className="text">
                  {'20\u202f% less'}
                </th>
                <th scope="col" className="text">
                  {'20\u202f% more'}
                </th>
              </tr>
            </thead>
            <tbody>
              {criteria.map((c) => (
                <tr key={c.figure}>
                  <td className="need">{criterionWords(c.figure, needs)}</td>
                  {WEIGHT_FACTORS.map((factor) => {
                    const effect = ranking.effects.find((e) => e.figure === c.figure && e.factor === factor)
                    return (
                      <td key={factor} className="text">
                        {effect ? effectWords(effect, withTilt) : ''}
                      </td>
                    )
                  })}
                </tr>
              ))}
            </tbody>
          </table>
        </>
      ) : null}
    </section>
  )
})

/** The stated values, each a field; SI in the study, face units here. */
function Criteria({ doc, criteria, system }: { doc: StudyDoc; criteria: readonly CriterionDoc[]; system: UnitSystem }) {
  const { study } = useSession()
  const sum = criteria.reduce((s, c) => s + c.weight, 0)
  return (
    <table className="table criteria">
      <caption className="visually-hidden">What options are ranked by</caption>
      <thead>
        <tr>
          <th scope="col">Figure</th>
          <th scope="col">Worst</th>
          <th scope="col">Best</th>
          <th scope="col">Weight</th>
          <th scope="col">Share</th>
          <td />
        </tr>
      </thead>
      <tbody>
        {criteria.map((c, i) => {
          const name = criterionWords(c.figure, doc.needs ?? [])
          const face = criterionFace(c.figure, system)
          const trouble = (key: string) => problemsOf(doc).find((p) => p.path === `ranking.criteria[${i}].${key}`)
          return (
            <tr key={c.figure}>
              <td className="need">
                {i + 1} {name}
              </td>
              {(['worst', 'best', 'weight'] as const).map((key) => {
                const problem = trouble(key)
                return (
                  <td key={key}>
                    <NumberField
                      label={key}
                      hideLabel
                      ariaLabel={`${key} of ${name}${key === 'weight' ? '' : `, ${face.unit}`}`}
                      value={c[key]}
                      face={key === 'weight' ? PLAIN : face}
                      required
                      onCommit={(v) => v !== undefined && setCriterion(study, c.figure, { [key]: v })}
                      trouble={problem ? `${problem.found}; ${problem.remedy}` : null}
                    />
                  </td>
                )
              })}
              <td>{`${formatNumber((100 * c.weight) / sum, 0)}\u202f%`}</td>
              <td>
                <Button small look="quiet" label={`Take out ${name}`} onPress={() => removeCriterion(study, c.figure)}>
                  take out
                </Button>
              </td>
            </tr>
          )
        })}
      </tbody>
    </table>
  )
}
