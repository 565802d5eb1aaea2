import {
  type CandidateDoc,
  type LonLat,
  type NeedDoc,
  needsOfSet,
  type RadarDoc,
  type ReadCandidate,
  radarOfTemplate,
  STARTING_SETS,
  type StudyDoc,
  withoutOrigin,
} from '../../core/index.ts'
import { freeCandidateId, freeNeedId, withValue } from './draft.ts'
import type { StudyStore } from './studyStore.ts'

const DEFAULT_MASTS_M = [10, 20, 30]
const PLACE_DECIMALS = 7

const rounded = ({ lon, lat }: LonLat): LonLat => ({ lon: Number(lon.toFixed(PLACE_DECIMALS)), lat: Number(lat.toFixed(PLACE_DECIMALS)) })
const changeCandidate = (doc: StudyDoc, id: string, part: Partial<CandidateDoc>): StudyDoc => ({
  ...doc,
  candidates: doc.candidates.map((c) => (c.id === id ? { ...c, ...part } : c)),
})

/** Sets or (undefined) clears one field by its key path. `words` names it in undo: "changed tilt". */
export const setField = (store: StudyStore, path: string, value: unknown, words: string): void =>
  store.getState().edit(words, (doc) => {
    const changed = withValue(doc, path, value)
    return changed === doc ? doc : withoutOrigin(changed, path)
  })

export const renameStudy = (store: StudyStore, name: string): void =>
  store.getState().edit('renamed the study', (doc) => (name === doc.name ? doc : { ...doc, name }))

/** A new candidate at `at`, with the masts of the last one; returns its id. */
export function addCandidate(store: StudyStore, at: LonLat): string {
  const { candidates } = store.getState().doc
  const id = freeCandidateId(candidates)
  const mastHeightsM = candidates.at(-1)?.mastHeightsM ?? DEFAULT_MASTS_M
  store.getState().edit(`placed ${id}`, (doc) => ({
    ...doc,
    candidates: [...doc.candidates, { id, name: `Place ${id}`, ...rounded(at), mastHeightsM: [...mastHeightsM] }],
  }))
  return id
}
/** Candidates of a file join those there are; one whose id is taken already gets the next free letter. Masts are those of the last one where none are stated. */
export function addCandidates(store: StudyStore, list: readonly ReadCandidate[], words: string): void {
  store.getState().edit(words, (doc) => ({ ...doc, candidates: joined(doc.candidates, list) }))
}
function joined(before: readonly CandidateDoc[], list: readonly ReadCandidate[]): CandidateDoc[] {
  const out = [...before]
  for (const c of list) {
    const id = c.id !== undefined && !out.some((o) => o.id === c.id) ? c.id : freeCandidateId(out)
    out.push({
      ...c,
      ...rounded(c),
      id,
      name: c.name ?? `Place ${id}`,
      mastHeightsM: c.mastHeightsM ?? [...(out.at(-1)?.mastHeightsM ?? DEFAULT_MASTS_M)],
    })
  }
  return out
}
/** All candidates as a table gives them: a row without id takes the next free letter, one without masts those of the row above it. */
export function setCandidates(store: StudyStore, rows: readonly CandidateDoc[]): void {
  store.getState().edit('changed the candidates', (doc) => {
    const named = rows.filter((r) => r.id !== '')
    const out: CandidateDoc[] = []
    for (const r of rows) {
      const id = r.id || freeCandidateId([...named, ...out])
      const mastHeightsM = r.mastHeightsM.length > 0 ? r.mastHeightsM : [...(out.at(-1)?.mastHeightsM ?? DEFAULT_MASTS_M)]
      out.push({ ...r, ...rounded(r), id, name: r.name ?? `Place ${id}`, mastHeightsM })
    }
    return { ...doc, candidates: out }
  })
}
/** Moves a candidate. With `dragging`, folds into one undo step until `store.getState().drop()`. */
export function moveCandidate(store: StudyStore, id: string, to: LonLat, dragging = false): void {
  const { edit, drag } = store.getState()
  const how = dragging ? drag : edit
  how(`moved ${id}`, (doc) => changeCandidate(doc, id, rounded(to)))
}
export const renameCandidate = (store: StudyStore, id: string, name: string): void =>
  store.getState().edit(`renamed ${id}`, (doc) => changeCandidate(doc, id, { name }))
export const removeCandidate = (store: StudyStore, id: string): void =>
  store.getState().edit(`removed ${id}`, (doc) => ({ ...doc, candidates: doc.candidates.filter((c) => c.id !== id) }))

/** Replaces the mast heights of a candidate; sorted, each once. Refused (no change) when none is left. */
export function setMastHeights(store: StudyStore, id: string, heightsM: readonly number[], dragging = false): void {
  const mastHeightsM = [...new Set(heightsM)].sort((a, b) => a - b)
  if (mastHeightsM.length === 0) return
  const { edit, drag } = store.getState()
  const how = dragging ? drag : edit
  how(`changed masts of ${id}`, (doc) => changeCandidate(doc, id, { mastHeightsM }))
}
/** One mast height of a candidate becomes another: what a drag on the ruler does. */
export function changeMastHeight(store: StudyStore, id: string, fromM: number, toM: number, dragging = false): void {
  const now = store.getState().doc.candidates.find((c) => c.id === id)?.mastHeightsM ?? []
  setMastHeights(
    store,
    id,
    now.map((h) => (h === fromM ? toM : h)),
    dragging,
  )
}
export const setCandidateField = <K extends keyof CandidateDoc>(
  store: StudyStore,
  id: string,
  key: K,
  value: CandidateDoc[K] | undefined,
): void =>
  store.getState().edit(`changed ${id}`, (doc) => {
    const at = doc.candidates.findIndex((c) => c.id === id)
    return at < 0 ? doc : withValue(doc, `candidates.${at}.${key}`, value)
  })

/** A new layer need; returns its id. */
export function addNeed(store: StudyStore): string {
  const needs = store.getState().doc.needs ?? []
  const id = freeNeedId(needs)
  const name = `Need ${id.slice(1)}`
  const need: NeedDoc = { id, name, must: true, kind: 'layer', heightM: 300, heightAbove: 'sea' }
  store.getState().edit(`added ${name.toLowerCase()}`, (doc) => ({ ...doc, needs: [...(doc.needs ?? []), need] }))
  return need.id
}
export const removeNeed = (store: StudyStore, id: string): void =>
  store.getState().edit('removed a need', (doc) => ({ ...doc, needs: (doc.needs ?? []).filter((n) => n.id !== id) }))

/** A radar in place of the one there is, with what the study says of its values. */
export const takeRadar = (store: StudyStore, radar: RadarDoc): void =>
  store.getState().edit(`took the radar ${radar.name ?? 'kept here'}`, (doc) => ({ ...doc, radar: structuredClone(radar) }))
export const takeTemplate = (store: StudyStore, id: string): void => takeRadar(store, radarOfTemplate(id))
/** Radar and needs of a kind of work, in place of those there are. */
export function takeStartingSet(store: StudyStore, id: string): void {
  const set = STARTING_SETS.find((s) => s.id === id)
  if (!set) return
  store
    .getState()
    .edit(`started with ${set.name.toLowerCase()}`, (doc) => ({ ...doc, radar: radarOfTemplate(set.radar), needs: needsOfSet(id) }))
}
