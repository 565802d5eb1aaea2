import { describe, expect, it } from 'vitest'
import { addConfirmation, createStudyStore, removeConfirmation, undo } from '../../app/document/index.ts'
import { type Block, buildMemo, cellText, type TableBlock } from '../../app/memo/model/index.ts'
import { troublesOf } from '../../app/steps/memo/ConfirmationsDialog.tsx'
import { CONFIRMED_WORDS } from '../../app/words/index.ts'
import { type ConfirmationDoc, checkDoc, checkStudy, parseStudy, type StudyDoc, settle } from '../../core/index.ts'
import { sampleDoc } from './sample.ts'
import { sampleMemo } from './sampleMemo.ts'

const whole: ConfirmationDoc = {
  need: 'n1',
  candidate: 'A',
  heightM: 24,
  who: 'E. Marl, flight inspection',
  when: '2026-05-31',
  method: 'flight trial, radial 118°',
  altitudeM: 304.8,
  result: 'seen on 9 of 10 scans to 31 km',
}
const withOne = (entry: ConfirmationDoc): StudyDoc => ({ ...sampleDoc, confirmations: [entry] })
const problems = (entry: ConfirmationDoc) => checkDoc(withOne(entry)).problems

describe('confirmations: entered, never computed', () => {
  it('a whole one settles as it stands', () => {
    expect(problems(whole)).toEqual([])
    expect(settle(withOne(whole)).confirmations).toEqual([{ ...whole, place: '' }])
    expect(settle(sampleDoc).confirmations).toEqual([])
  })
  it.each([
    ['who', 'a confirmation without who measured it'],
    ['when', 'a confirmation without when it was measured'],
    ['method', 'a confirmation without the method'],
    ['altitudeM', 'a confirmation without the altitude'],
    ['result', 'a confirmation without the result'],
  ] as const)('refused without %s, in a sentence', (part, found) => {
    for (const entry of [{ ...whole, [part]: undefined }, ...(part === 'altitudeM' ? [] : [{ ...whole, [part]: '  ' }])]) {
      const [problem] = problems(entry)
      expect(problem).toMatchObject({ path: `confirmations[0].${part}`, found })
      expect(problem?.message).toBe(`${found}; give who, when, method, altitudeM and result, or take it out.`)
      expect(problem!.message.length).toBeLessThan(240)
    }
    const text = JSON.stringify(withOne({ ...whole, [part]: undefined }), null, 2)
    expect(() => parseStudy(text, 'study.json')).toThrow(new RegExp(`study\\.json.*confirmations\\[0\\].*${found}`))
  })
  it('refused for no day, and for neither need nor place', () => {
    for (const when of ['May', '2026-13-01', '2026-02-29', '31.05.2026'])
      expect(problems({ ...whole, when })[0]).toMatchObject({ path: 'confirmations[0].when', found: `"${when}" is no day` })
    expect(problems({ ...whole, when: '2028-02-29' })).toEqual([])
    expect(problems({ ...whole, need: undefined })[0]).toMatchObject({ found: 'a confirmation of neither a need nor a place' })
    expect(problems({ ...whole, need: undefined, place: 'fix NORDA' })).toEqual([])
  })
  it('of an option or a need that is gone: kept, and said', () => {
    const doc = withOne({ ...whole, heightM: 30, need: 'n9' })
    const said = checkStudy(settle(doc), doc)
    expect(said).toContain('confirmations[0] is of A at 30 m, which is no option of the study')
    expect(said).toContain('confirmations[0] is of the need "n9", which is not in the study')
  })
})

describe('confirmations in the app and the memo', () => {
  it('entering and removing is undone step by step', () => {
    const store = createStudyStore(sampleDoc)
    addConfirmation(store, whole)
    expect(store.getState().doc.confirmations).toEqual([whole])
    removeConfirmation(store, 0)
    expect(store.getState().doc.confirmations).toBeUndefined()
    undo(store)
    expect(store.getState().doc.confirmations).toEqual([whole])
    undo(store)
    expect(store.getState().doc).toEqual(sampleDoc)
  })
  it('the form says every part that is missing, once', () => {
    expect(troublesOf(sampleDoc, { candidate: 'A', heightM: 24 })).toHaveLength(6)
    expect(troublesOf(sampleDoc, whole)).toEqual([])
  })
  it('the memo prints it with the rule of the four words, and says so when nothing is confirmed', () => {
    const sample = sampleMemo('metric', 40)
    const blocksOf = (study: typeof sample.study): readonly Block[] =>
      buildMemo({ ...sample, study }).sections.find((s) => s.id === 'confirmed')!.blocks
    const words = (blocks: readonly Block[]) => blocks.flatMap((b) => (b.kind === 'paragraph' ? [b.text] : [])).join(' ')
    const none = blocksOf(sample.study)
    expect(words(none)).toContain(CONFIRMED_WORDS.none)
    const blocks = blocksOf(settle(withOne(whole)))
    const table = blocks.find((b): b is TableBlock => b.kind === 'table')!
    expect(table.rows[0]!.map(cellText).map((t) => t.replaceAll('\u202f', ' '))).toEqual([
      'A at 24 m',
      'Ferry approach',
      '305',
      whole.result,
      whole.method,
      whole.who,
      '31 May 2026',
    ])
    for (const word of ['In sight:', 'Detectable:', 'Usable:', 'Confirmed:', 'never computed']) expect(words(blocks)).toContain(word)
  })
})
