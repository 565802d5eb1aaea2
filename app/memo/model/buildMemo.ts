import type { OptionRef } from '../../../core/index.ts'
import { CAUTIONS, CONFIRMED_WORDS, formatDate } from '../../words/index.ts'
import { annexBlocks } from './annexSection.ts'
import { candidateBlocks } from './candidatesSection.ts'
import { optionName } from './cells.ts'
import { cautionBlocks, comparisonBlocks, notAssessedBlocks } from './closingSections.ts'
import { confirmedBlocks } from './confirmedSection.ts'
import { dataBlocks } from './dataSection.ts'
import { exposureBlocks } from './exposureSection.ts'
import { modelBlocks } from './modelsSection.ts'
import { needBlocks } from './needSection.ts'
import { optionBlocks, optionFinding } from './optionSection.ts'
import { hasTilts, summaryBlocks } from './summarySection.ts'
import type { Block, MemoInput, MemoModel, Section } from './types.ts'

/**
 * The memo as ordered sections of words, tables and drawings: the PDF and the app's memo column print the same model. `only`: the summary and that
 * option alone have blocks, which is all that stands in the column beside the map.
 */
export function buildMemo(input: MemoInput, only?: OptionRef | null): MemoModel {
  let figures = 0
  const figure = (): number => ++figures
  const sections: Section[] = []
  const add = (id: string, title: string, blocks: () => readonly Block[], more: Partial<Section> = {}): void => {
    const wanted = only === undefined || id === 'summary' || (more.option && sameOption(more.option, only))
    sections.push({ id, number: sections.length + 1, title, blocks: wanted ? blocks() : [], ...more })
  }
  add('summary', 'Summary', () => summaryBlocks(input))
  add('need', 'Need', () => needBlocks(input), { newPage: true })
  add('data', 'Data and assumptions', () => dataBlocks(input))
  add('candidates', 'Candidates', () => candidateBlocks(input))
  const ordered = inStudyOrder(input)
  for (const r of ordered)
    add(`option-${r.ref.candidate}-${r.ref.heightM}-${r.ref.tiltDeg}`, optionTitle(input, r.ref), () => optionBlocks(input, r, figure), {
      option: r.ref,
      finding: optionFinding(input, r).lead,
      newPage: true,
    })
  add('comparison', 'Comparison', () => comparisonBlocks(input, figure), { newPage: true })
  add('exposure', 'RF exposure', () => exposureBlocks(input))
  add('confirmed', CONFIRMED_WORDS.title, () => confirmedBlocks(input))
  add('not-assessed', 'Not assessed', () => notAssessedBlocks())
  add('cautions', 'Cautions', () => cautionBlocks())
  add('models', 'Models and sources', () => modelBlocks(input))
  add('annex', 'Annex: horizon by azimuth', () => annexBlocks(input, ordered, (r) => optionTitle(input, r.ref)), { newPage: true })
  const candidates = input.study.candidates.map((c) => c.id).join(', ')
  return {
    title: input.study.name,
    draft: CAUTIONS.draft,
    meta: [
      ['Date', formatDate(input.date)],
      ['Radar', input.study.radar.name],
      ['Candidates', candidates],
      ['Program', `Sightfell ${input.version}`],
    ],
    date: input.date,
    version: input.version,
    footer: CAUTIONS.draft,
    sections,
  }
}
const sameOption = (a: OptionRef, b: OptionRef | null): boolean =>
  a.candidate === b?.candidate && a.heightM === b.heightM && a.tiltDeg === b.tiltDeg

function optionTitle(input: MemoInput, ref: OptionRef): string {
  const name = input.study.candidates.find((c) => c.id === ref.candidate)?.name ?? ref.candidate
  const own = optionName(ref, hasTilts(input))
  return name === ref.candidate ? own : own.replace(/^\S+/, (id) => `${id} ${name}`)
}
/** Candidates as the study lists them, lower masts first. */
function inStudyOrder(input: MemoInput): MemoInput['results'] {
  const rank = new Map(input.study.candidates.map((c, i) => [c.id, i]))
  return [...input.results].sort(
    (a, b) =>
      (rank.get(a.ref.candidate) ?? 0) - (rank.get(b.ref.candidate) ?? 0) || a.ref.heightM - b.ref.heightM || a.ref.tiltDeg - b.ref.tiltDeg,
  )
}
