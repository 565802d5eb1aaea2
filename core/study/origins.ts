import type { NeedDoc, OriginOf, RadarDoc, StudyDoc } from './types.ts'

/** The origins that a study states for values it holds, in the order written. */
export function originsOf(doc: StudyDoc): OriginOf[] {
  return [...listed(doc.radar, 'radar'), ...(doc.needs ?? []).flatMap((n, i) => listed(n, `needs[${i}]`))]
}

function listed(part: RadarDoc | NeedDoc, at: string): OriginOf[] {
  return Object.entries(part.origins ?? {}).flatMap(([key, origin]) => {
    const value = valueIn(part, key)
    return value === undefined ? [] : [{ path: `${at}.${key}`, value, origin }]
  })
}

function valueIn(part: object, path: string): unknown {
  let at: unknown = part
  for (const key of path.split('.')) {
    if (at === null || typeof at !== 'object') return undefined
    at = (at as Record<string, unknown>)[key]
  }
  return at ?? undefined
}

/**
 * Takes away the origin of a value that is changed by hand, at its key path (`radar.antenna.gainDbi`, `needs[1].pd`); the same document where
 * none is stated.
 */
export function withoutOrigin(doc: StudyDoc, path: string): StudyDoc {
  const need = /^needs(?:\[(\d+)\]|\.(\d+))\.(.+)$/.exec(path)
  if (path.startsWith('radar.')) {
    const radar = dropped(doc.radar, path.slice('radar.'.length))
    return radar === doc.radar ? doc : { ...doc, radar }
  }
  if (!need || !doc.needs) return doc
  const at = Number(need[1] ?? need[2])
  const before = doc.needs[at]
  if (!before) return doc
  const after = dropped(before, need[3]!)
  return after === before ? doc : { ...doc, needs: doc.needs.map((n, i) => (i === at ? after : n)) }
}

function dropped<T extends RadarDoc | NeedDoc>(part: T, key: string): T {
  const kept = Object.entries(part.origins ?? {}).filter(([k]) => k !== key && !k.startsWith(`${key}.`) && !key.startsWith(`${k}[`))
  if (kept.length === Object.keys(part.origins ?? {}).length) return part
  const { origins: _gone, ...rest } = part
  return (kept.length > 0 ? { ...rest, origins: Object.fromEntries(kept) } : rest) as T
}
