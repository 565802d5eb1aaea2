import {
  cellCentre,
  cellOfLonLat,
  checkStudy,
  type LonLat,
  polarShape,
  type SettledStudy,
  type StudyDoc,
  settle,
} from '../../core/index.ts'
import { problemsOf } from '../document/index.ts'

const settled = new WeakMap<StudyDoc, SettledStudy | null>()
/** The study with its defaults, once per document; null while a value has to change. */
export function settledOf(doc: StudyDoc): SettledStudy | null {
  let study = settled.get(doc)
  if (study === undefined) {
    study = problemsOf(doc).length === 0 ? settle(doc) : null
    settled.set(doc, study)
  }
  return study
}

/** Remarks on a sound study: what is kept but not assessed, and numbers that do not fit each other. */
export function remarksOf(doc: StudyDoc): string[] {
  const study = settledOf(doc)
  return study ? checkStudy(study, doc) : []
}

/** Centre of the polar cell of a candidate in which a place lies; the place itself beyond the grid. The ledger of a click is that of the cell the map has painted. */
export function cellUnder(doc: StudyDoc, candidate: string, at: LonLat): LonLat {
  const settled = settledOf(doc)
  const site = settled?.candidates.find((c) => c.id === candidate)
  if (!settled || !site) return at
  const grid = polarShape(settled.run)
  const cell = cellOfLonLat(site, grid, at)
  return cell < 0 ? at : cellCentre(site, grid, cell)
}
