import { describe, expect, it, vi } from 'vitest'
import { addCandidate, createStudyStore, createViewStore } from '../../app/document/index.ts'
import type { Session } from '../../app/steps/session/index.ts'
import { commandsOf, matching } from '../../app/steps/shell/commands.ts'
import { LAYER_WORDS } from '../../app/words/index.ts'

const sessionOf = () => {
  const study = createStudyStore()
  const view = createViewStore()
  const saveStudy = vi.fn()
  return { session: { study, view, saveStudy } as unknown as Session, study, view, saveStudy }
}
const firstBy = (session: Session, typed: string) => matching(commandsOf(session), typed)[0]

describe('finding a command', () => {
  it('has every step and every quantity of the map', () => {
    const words = commandsOf(sessionOf().session).map((c) => c.words)
    expect(words.slice(0, 6)).toEqual(['Ground', 'Radar', 'Need', 'Candidates', 'Compare', 'Memo'])
    for (const w of Object.values(LAYER_WORDS)) expect(words).toContain(`Show ${w.title}`)
    expect(new Set(commandsOf(sessionOf().session).map((c) => c.id)).size).toBe(words.length)
  })
  it('does what its words say', () => {
    const { session, view, saveStudy } = sessionOf()
    firstBy(session, 'radar')?.run()
    expect(view.getState().step).toBe('radar')
    firstBy(session, 'floor cover')?.run()
    expect(view.getState().layer).toBe('coverage-floor')
    firstBy(session, 'save study')?.run()
    expect(saveStudy).toHaveBeenCalledOnce()
    firstBy(session, 'units')?.run()
    expect(view.getState().units).toBe('metric')
  })
  it('offers undo with its words, only when there is something to undo', () => {
    const { session, study } = sessionOf()
    expect(firstBy(session, 'undo')).toBeUndefined()
    addCandidate(study, { lon: 1, lat: 2 })
    const undo = firstBy(session, 'undo')
    expect(undo?.words).toBe('Undo: placed A')
    undo?.run()
    expect(study.getState().doc.candidates).toEqual([])
  })
  it('shows a candidate by its name', () => {
    const { session, study, view } = sessionOf()
    addCandidate(study, { lon: 1, lat: 2 })
    firstBy(session, 'place a')?.run()
    expect(firstBy(session, 'show place')?.words).toBe('Show A, Place A')
    firstBy(session, 'show place')?.run()
    expect(view.getState().option?.candidate).toBe('A')
  })
  it('what begins with the word comes before what only holds it; nothing fits nothing', () => {
    const { session } = sessionOf()
    expect(matching(commandsOf(session), 'need').map((c) => c.id)).toEqual(expect.arrayContaining(['step-need', 'add-need']))
    expect(firstBy(session, 'need')?.id).toBe('step-need')
    expect(matching(commandsOf(session), 'zeppelin')).toEqual([])
  })
})
