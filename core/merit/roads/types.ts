import type { LonLat } from '../../geodesy/index.ts'
import type { RoadClass } from '../../obstacles/index.ts'

/** Probability with which one scan must detect a vehicle for its road to count as seen, and the target's fluctuation. */
export const VEHICLE_PD = 0.5
export const VEHICLE_SWERLING = 1
/** Larger effective-earth factor at which roads are counted too. */
export const HIGH_K = 2.75
/** Longest piece of a road, m. */
export const ROAD_PIECE_M = 50
/** Width of a class of radial speed, m/s. */
export const SPEED_STEP_MS = 5
/** Response, dB under its mean over velocity, below which a vehicle lies in the blind zone. */
export const BLIND_ZONE_DB = -10

/** Lengths of road, m. Masked, unknown, in a tunnel and too weak make up the rest of `lengthM`. */
export interface RoadLengths {
  /** Within the range of the study. */
  readonly lengthM: number
  /** Top of the vehicle in sight. */
  readonly inSightM: number
  /** In sight, and its echo strong enough to be detected. */
  readonly seenM: number
}
export interface RoadClassFigure extends RoadLengths {
  readonly roadClass: RoadClass
}
export interface RoadRingFigure extends RoadLengths {
  readonly fromM: number
  readonly toM: number
  /** Length seen by class, m, in the order of ROAD_CLASSES. */
  readonly seenByClassM: readonly number[]
}
/** Length of road seen whose vehicles close or open at these radial speeds. */
export interface RoadSpeedFigure {
  readonly fromMs: number
  readonly toMs: number
  readonly seenM: number
}
/** Roads of a study against one option. */
export interface RoadsFigure extends RoadLengths {
  readonly rcsM2: number
  /** S/N of one pulse that a vehicle must reach, dB. */
  readonly requiredRatioDb: number
  readonly tunnelM: number
  readonly unknownM: number
  /** Classes the study has, in the order of ROAD_CLASSES. */
  readonly classes: readonly RoadClassFigure[]
  readonly rings: readonly RoadRingFigure[]
  readonly speeds: readonly RoadSpeedFigure[]
  /** Length seen whose radial speed the processing hardly passes, m; null where suppression is stated or none. */
  readonly blindM: number | null
  /** The same lengths at the larger k; null where the study's own is as large or flat. */
  readonly atHighK: (RoadLengths & { readonly k: number }) | null
}
/** Lines of roads within range, by whether their vehicles are seen, for the map. */
export interface RoadLines {
  readonly seen: readonly (readonly LonLat[])[]
  readonly hidden: readonly (readonly LonLat[])[]
}
