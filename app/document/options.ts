import type { OptionRef, StudyDoc } from '../../core/index.ts'

const DEFAULT_TILT_DEG = 0

/** Every option of the study, candidate by candidate, lowest mast first; rejected candidates have none. */
export function studyOptions(doc: StudyDoc): OptionRef[] {
  const own = doc.radar.antenna.tiltDeg ?? DEFAULT_TILT_DEG
  return doc.candidates.flatMap((c) =>
    c.rejected !== undefined
      ? []
      : [...c.mastHeightsM]
          .sort((a, b) => a - b)
          .flatMap((heightM) => tiltsOf(c.tiltsDeg, own).map((tiltDeg) => ({ candidate: c.id, heightM, tiltDeg }))),
  )
}
const tiltsOf = (stated: number[] | null | undefined, own: number): number[] => (stated && stated.length > 0 ? stated : [own])

export const sameOption = (a: OptionRef | null, b: OptionRef | null): boolean =>
  a === b || (a !== null && b !== null && a.candidate === b.candidate && a.heightM === b.heightM && a.tiltDeg === b.tiltDeg)

/** The option to show: the wished one if the study has it, else the nearest mast of the same candidate, else the first. */
export function settleOption(doc: StudyDoc, wished: OptionRef | null): OptionRef | null {
  const all = studyOptions(doc)
  if (all.length === 0) return null
  if (wished) {
    const same = all.find((o) => sameOption(o, wished))
    if (same) return sameOption(same, wished) ? wished : same
    const own = all.filter((o) => o.candidate === wished.candidate)
    if (own.length > 0) {
      const off = (o: OptionRef) => Math.abs(o.heightM - wished.heightM) * 1000 + Math.abs(o.tiltDeg - wished.tiltDeg)
      return own.reduce((best, o) => (off(o) < off(best) ? o : best))
    }
  }
  return all[0]
}
