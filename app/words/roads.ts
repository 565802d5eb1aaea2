import type { RoadClass } from '../../core/index.ts'

/** Classes of roads as they are called in tables. */
export const ROAD_CLASS_WORDS: Readonly<Record<RoadClass, string>> = {
  motorway: 'Motorway',
  trunk: 'Trunk road',
  primary: 'Primary road',
  secondary: 'Secondary road',
  other: 'Other roads',
  rail: 'Railway',
}
