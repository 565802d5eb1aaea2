import type { NeedDoc, RadarDoc } from '../types.ts'

/** Where a value of a template comes from: read in the document named, remembered of it, worked out from others, or chosen here. */
export type Basis = 'read' | 'from memory' | 'worked out' | 'chosen here'

export interface TemplateValue {
  /** Key path inside the radar or the need: `antenna.gainDbi`. */
  readonly path: string
  readonly value: unknown
  readonly basis: Basis
  /** The document and the range it gives, or why the value was chosen. */
  readonly source: string
}
/** A generic radar, named by band and role only. Values it does not have are left for the user to state, or take the study's defaults. */
export interface RadarTemplate {
  readonly id: string
  readonly name: string
  readonly values: readonly TemplateValue[]
}
export interface NeedTemplate {
  readonly name: string
  readonly kind: 'layer'
  readonly values: readonly TemplateValue[]
}
/** A kind of work: a radar and needs to begin with. */
export interface StartingSet {
  readonly id: string
  readonly name: string
  /** Id of its radar template. */
  readonly radar: string
  readonly needs: readonly NeedTemplate[]
}

/** `from memory: ITU-R M.1464, radars A and B`: how the origin stands in the study. */
export const originWords = (v: TemplateValue): string => `${v.basis}: ${v.source}`

/** Basis of an origin as it stands in a study; null where it begins with none of the known words. */
export const basisOf = (origin: string): Basis | null => BASES.find((b) => origin.startsWith(`${b}: `)) ?? null
const BASES: readonly Basis[] = ['read', 'from memory', 'worked out', 'chosen here']

/** An object of the study filled from template values, with the origin of each under `origins`. */
export function filled<T extends RadarDoc | NeedDoc>(start: object, values: readonly TemplateValue[]): T {
  const out = structuredCloneOf(start) as Record<string, unknown>
  for (const { path, value } of values) {
    const steps = path.split('.')
    let at = out
    for (const key of steps.slice(0, -1)) {
      at[key] ??= {}
      at = at[key] as Record<string, unknown>
    }
    at[steps[steps.length - 1]!] = structuredCloneOf(value)
  }
  return { ...out, origins: Object.fromEntries(values.map((v) => [v.path, originWords(v)])) } as unknown as T
}
/** A deep copy of plain data. */
const structuredCloneOf = (value: unknown): unknown => JSON.parse(JSON.stringify(value))
