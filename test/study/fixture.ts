import type { StudyDoc } from '../../core/index.ts'

/** A sound study with every required key and little else. */
export const minimal = (): StudyDoc => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Test moor',
  terrain: [{ file: 'moor.tif' }],
  radar: {
    frequencyHz: 2.75e9,
    peakPowerW: 20_000,
    pulseWidthS: 1.2e-6,
    prfHz: [900],
    antenna: { gainDbi: 33, azimuthBeamwidthDeg: 1.6 },
  },
  candidates: [{ id: 'A', lon: 10, lat: 50, mastHeightsM: [10, 20] }],
})

/** Sets the value at a key path such as `candidates[0].mastHeightsM[1]`; undefined removes the key. */
export function withValue(path: string, value: unknown, doc: unknown = minimal()): unknown {
  const copy = structuredClone(doc)
  const steps = [...path.matchAll(/\[(\d+)\]|([^.[\]]+)/g)].map((s) => (s[1] === undefined ? s[2]! : Number(s[1])))
  let at = copy as Record<string | number, unknown>
  for (const [n, key] of steps.entries()) {
    if (n === steps.length - 1) {
      if (value === undefined) delete at[key]
      else at[key] = value
    } else {
      if (at[key] === undefined) at[key] = typeof steps[n + 1] === 'number' ? [] : {}
      at = at[key] as Record<string | number, unknown>
    }
  }
  return copy
}
