import type { Weather } from '../atmosphere/index.ts'
import type { GroundCode } from '../landcover/index.ts'
import type { RadarInput } from '../radar/index.ts'
import { landTableNotes, NOTE_SEA } from './land/landRow.ts'
import { BUILT_IN_LAND_TABLE } from './land/landTableData.ts'
import { seaAssessed } from './sea/seaTable.ts'
import type { ModelNote } from './types.ts'

/**
 * Words that stand beside every clutter figure of a study: the table and its standing, a frequency beyond its bands, land cover nobody stated,
 * water without a model (no weather given, or a frequency the sea model does not cover). What single cells add (steep or negative depression)
 * is in `ClutterCells.notes`. `ownTable`: the study brings its own land table. Throws InputError for a frequency outside 30 MHz to 40 GHz.
 */
export function clutterMarks(codes: readonly GroundCode[], r: RadarInput, ownTable: boolean, weather?: Weather): ModelNote[] {
  const [built, ...rest] = landTableNotes(r.frequencyHz, BUILT_IN_LAND_TABLE)
  const notes: ModelNote[] = [ownTable ? { mark: 'by hand', about: 'land clutter table: from the study' } : built, ...rest]
  const unstated = new Set(codes.filter((c) => c.mark === 'default').map((c) => c.terrain))
  for (const terrain of unstated) notes.push({ mark: 'default', about: `land cover not stated: ${terrain}` })
  const assessed = weather !== undefined && seaAssessed(r.frequencyHz)
  if (!assessed && codes.some((c) => c.terrain === 'water')) notes.push(NOTE_SEA)
  return notes
}
