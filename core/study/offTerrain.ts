import type { CandidateDoc } from './types.ts'

/** What is said of a candidate under which no ground is known, in the batch command and in the app. */
export const offTerrain = (c: Pick<CandidateDoc, 'id' | 'lon' | 'lat'>): { code: string; found: string; remedy: string } => ({
  code: 'off-terrain',
  found: `candidate ${c.id} at ${c.lon}, ${c.lat} is off the terrain or on a void`,
  remedy: 'move it onto known ground, or add a terrain file that covers it',
})
