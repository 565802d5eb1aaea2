import type { OptionRef } from '../../../core/index.ts'
import { CAUTIONS, CONFIRMED_WORDS, formatDate } from '../../words/index.ts'
import { annexBlocks } from './annexSection.ts'
import { candidateBlocks } from './candidatesSection.ts'
import { optionName } from './cells.ts'
import { cautionBlocks, comparisonBlocks, notAssessedBlocks } from './closingSections.ts'
import { confirmedBlocks } from './confirmedSection.ts'
import { dataBlocks } from './dataSection.ts'
import { everyOptionBlocks } from './everyOption.ts'
import { exposureBlocks } from './exposureSection.ts'
import { modelBlocks } from './modelsSection.ts'
import { needBlocks } from './needSection.ts'
import { optionPageBlocks } from './optionPage.ts'
import { optionBlocks, optionFinding } from './optionSection.ts'
import { inOrder } from './ranking.ts'
import { hasTilts, summaryBlocks } from './summarySection.ts'
import { trialBlocks } from './trialSection.ts'
import type { Block, MemoInput, MemoModel, Section } from './types.ts'

/**
 * The memo as ordered sections of words, tables and drawings: the PDF and the app's memo column print the same model. The option that comes first is
 * given in full, every other one on a page. `only`: the summary and that option alone have blocks, the option in full with its trial plan, which is
 * what stands in the column beside the map.
 */
export function buildMemo(input: MemoInput, only?: OptionRef | null): MemoModel {
  let figures = 0
  const figure = (): number => ++figures
  const sections: Section[] = []
  const add = (id: string, title: string, blocks: () => readonly Block[], more: Partial<Section> = {}): void => {
    const wanted = only === undefined || id === 'summary' || (more.option && sameOption(more.option, only))
    sections.push({ id, number: sections.length + 1, title, blocks: wanted ? eachCautionOnce(blocks()) : [], ...more })
  }
  const ordered = inOrder(input.results, input.study.ranking)
  const [first] = ordered
  add('summary', 'Summary', () => summaryBlocks(input))
  add('need', 'Need', () => needBlocks(input), { newPage: true })
  add('comparison', 'Comparison', () => comparisonBlocks(input, figure))
  add('candidates', 'Candidates', () => candidateBlocks(input))
  add('data', 'Data and assumptions', () => dataBlocks(input))
  for (const r of ordered) {
    const blocks = (): readonly Block[] => {
      if (only) return [...optionBlocks(input, r, figure), ...trialBlocks(input, r)]
      return r === first ? optionBlocks(input, r, figure) : optionPageBlocks(input, r, figure, optionTitle(input, first.ref))
    }
    add(`option-${r.ref.candidate}-${r.ref.heightM}-${r.ref.tiltDeg}`, optionTitle(input, r.ref), blocks, {
      option: r.ref,
      finding: optionFinding(input, r).lead,
      newPage: true,
    })
  }
  add('confirmed', CONFIRMED_WORDS.title, () => confirmedBlocks(input), { newPage: true })
  add('exposure', 'RF exposure', () => exposureBlocks(input))
  if (first && first.figures.trialPlan.length > 0)
    add('trial', `Trial plan of ${optionTitle(input, first.ref)}`, () => trialBlocks(input, first))
  add('not-assessed', 'Not assessed', () => notAssessedBlocks())
  add('cautions', 'Cautions', () => cautionBlocks())
  add('models', 'Models and sources', () => modelBlocks(input))
  if (ordered.length > 1) add('every-option', 'Annex: figures of every option', () => everyOptionBlocks(input, ordered))
  add('annex', 'Annex: horizon by azimuth', () => annexBlocks(input))
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
/** A caution stands under the first figure of a section that it concerns, not under each. */
function eachCautionOnce(blocks: readonly Block[], said: Set<string> = new Set()): Block[] {
  return blocks.flatMap((block): Block[] => {
    if (block.kind === 'beside') return [{ ...block, left: eachCautionOnce(block.left, said), right: eachCautionOnce(block.right, said) }]
    if (block.kind !== 'caution') return [block]
    const texts = block.texts.filter((t) => !said.has(t) && said.add(t))
    return texts.length === 0 ? [] : [{ ...block, texts }]
  })
}
