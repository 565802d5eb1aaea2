/** Classes that roads and railways are counted by; `other` is every road below secondary. */
export const ROAD_CLASSES = ['motorway', 'trunk', 'primary', 'secondary', 'other', 'rail'] as const
export type RoadClass = (typeof ROAD_CLASSES)[number]

/** Top of a vehicle above the ground, m: 5.2 on a motorway, 7.0 on rails, else 4.6. Our own engineering choice. */
export const VEHICLE_TOP_M: Readonly<Record<RoadClass, number>> = {
  motorway: 5.2,
  trunk: 4.6,
  primary: 4.6,
  secondary: 4.6,
  other: 4.6,
  rail: 7,
}
/** Radar cross-section of a vehicle where the study states none, m². Our own engineering choice. */
export const DEFAULT_VEHICLE_RCS_M2 = 30
/** Speed of vehicles where a road states none, km/h. Our own engineering choice. */
export const VEHICLE_SPEED_KMH: Readonly<Record<RoadClass, number>> = {
  motorway: 110,
  trunk: 90,
  primary: 80,
  secondary: 60,
  other: 50,
  rail: 50,
}

const RAIL = /^(rail|light_rail|narrow_gauge|tram|subway|monorail|funicular|preserved)$/
/** OpenStreetMap values that carry no vehicles, or none yet, or no more. */
const WITHOUT_VEHICLES =
  /^(footway|path|steps|cycleway|pedestrian|bridleway|corridor|elevator|platform|crossing|proposed|construction|planned|abandoned|disused|razed|dismantled|miniature|turntable|traverser)$/

/** Class of an OpenStreetMap `highway` or `railway` value; slip roads go with their road; null for ways that carry no vehicles. */
export function roadClassOf(highway: string): RoadClass | null {
  if (WITHOUT_VEHICLES.test(highway)) return null
  if (RAIL.test(highway)) return 'rail'
  const road = highway.replace(/_link$/, '')
  return road === 'motorway' || road === 'trunk' || road === 'primary' || road === 'secondary' ? road : 'other'
}
