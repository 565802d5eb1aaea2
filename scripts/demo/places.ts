/** Where the invented island lies and what stands on it. Kilometres east and north of the island's middle; every name is made up. */
import type { Point } from './island.ts'

/** WGS 84 / UTM zone 10 south: open South Pacific, no land within two thousand kilometres. */
export const EPSG = 32710
export const MIDDLE_EAST_M = 612_000
export const MIDDLE_NORTH_M = 4_728_000

export interface Town {
  readonly name: string
  readonly at: Point
  /** Reach of the built-up ground, km. */
  readonly reachKm: number
}
export const TOWNS: readonly Town[] = [
  { name: 'Tolvane', at: [5.1, -3.6], reachKm: 1.5 },
  { name: 'Vennet', at: [-14.2, -4.6], reachKm: 0.8 },
  { name: 'Ambry', at: [-6.2, 3.6], reachKm: 0.45 },
  { name: 'Sorle', at: [4.0, 7.4], reachKm: 0.5 },
  { name: 'Norrick', at: [2.6, 14.2], reachKm: 0.7 },
  { name: 'Quillow', at: [-8.4, -7.0], reachKm: 0.4 },
  { name: 'Eddra', at: [24.2, -3.8], reachKm: 0.55 },
]

export interface Place {
  readonly id: string
  readonly name: string
  readonly at: Point
  readonly mastHeightsM: readonly number[]
  readonly clearingRadiusM: number
  readonly notes: string
}
export const CANDIDATES: readonly Place[] = [
  {
    id: 'A',
    name: 'Vennet airfield',
    at: [-11, -2.1],
    mastHeightsM: [10, 20, 35],
    clearingRadiusM: 150,
    notes: 'On the plain, power and road at hand. Dunes with pines toward the sea; the Long Hask shuts off the mountains.',
  },
  {
    id: 'B',
    name: 'Long Hask top',
    at: [-1.0, -5.0],
    mastHeightsM: [10, 20, 35],
    clearingRadiusM: 100,
    notes: 'High on the Long Hask. Sees both ways: the approach, and all the mountains behind. Track to be built.',
  },
  {
    id: 'C',
    name: 'Corlan Head',
    at: [-15.0, -13.8],
    mastHeightsM: [10, 20, 35],
    clearingRadiusM: 100,
    notes: 'Cliff top beside the old light. No mains power.',
  },
]

export interface Stander {
  readonly name: string
  readonly path: readonly Point[]
  readonly heightM: number
  readonly widthM: number
  readonly rcsM2: number
  readonly verticalErrorM: number
}
const point = (name: string, at: Point, heightM: number, widthM: number, rcsM2: number, verticalErrorM: number): Stander => ({
  name,
  path: [at],
  heightM,
  widthM,
  rcsM2,
  verticalErrorM,
})
export const STANDERS: readonly Stander[] = [
  point('Long Hask radio mast', [-0.75, 5.2], 84, 3, 150, 0.5),
  point('Vennet airfield tower', [-11.75, -2.75], 24, 9, 300, 0.3),
  point('Vennet light', [-17.9, -1.2], 31, 6, 120, 0.5),
  point('Corlan old light', [-15.5, -14.15], 18, 6, 90, 1),
  point('Ambry silo north', [-6.6, 3.9], 38, 14, 900, 0.5),
  point('Ambry silo south', [-6.55, 3.8], 38, 14, 900, 0.5),
  point('Quillow silo', [-8.7, -6.7], 34, 12, 700, 1),
  point('Tolvane chimney', [5.9, -4.2], 72, 7, 500, 0.5),
  point('Tolvane harbour crane', [5.1, -5.5], 46, 10, 1500, 1),
  point('Norrick mast', [3.2, 15.0], 60, 2, 80, 1),
  point('Eddra mast', [22.8, -2.6], 55, 2, 80, 2),
  point('North Cape beacon', [-16.6, 11.4], 22, 4, 60, 1),
  {
    name: 'Valley power line',
    path: [
      [5.6, -2.6],
      [4.9, 0.4],
      [4.3, 3.4],
      [4.4, 6.6],
      [3.6, 9.8],
      [2.9, 13.4],
    ],
    heightM: 27,
    widthM: 10,
    rcsM2: 40,
    verticalErrorM: 1.5,
  },
]

export interface Way {
  readonly name: string
  readonly highway: string
  readonly maxspeedKmh: number | null
  /** Straight between the points, or the easiest way over the ground. */
  readonly straight: boolean
  readonly via: readonly Point[]
}
export const WAYS: readonly Way[] = [
  // Begins beside candidate A and runs straight away from it to the gap in the near ridge: seen end-on from there.
  {
    name: 'Island motorway',
    highway: 'motorway',
    maxspeedKmh: 110,
    straight: true,
    via: [
      [-10.4, -2.06],
      [-2.4, -1.532],
    ],
  },
  {
    name: 'Island motorway',
    highway: 'motorway',
    maxspeedKmh: 110,
    straight: false,
    via: [
      [-2.4, -1.532],
      [4.6, -2.2],
    ],
  },
  {
    name: 'Sorle valley road',
    highway: 'secondary',
    maxspeedKmh: 80,
    straight: false,
    via: [
      [4.4, -10.5],
      [5.1, -3.6],
      [4.0, 7.4],
      [2.6, 14.2],
    ],
  },
  {
    name: 'West coast road',
    highway: 'primary',
    maxspeedKmh: 90,
    straight: false,
    via: [
      [-14.9, -13.7],
      [-13.2, -7.6],
      [-14.2, -4.6],
      [-14.4, 2],
      [-13.4, 7.6],
      [-7.5, 11],
      [-2.6, 15],
      [2.6, 14.2],
    ],
  },
  {
    name: 'Plain road',
    highway: 'tertiary',
    maxspeedKmh: 70,
    straight: false,
    via: [
      [-8.4, -7],
      [-8.2, -2],
      [-6.2, 3.6],
      [-7.5, 11],
    ],
  },
  {
    name: 'Quillow road',
    highway: 'tertiary',
    maxspeedKmh: null,
    straight: false,
    via: [
      [-13.2, -7.6],
      [-8.4, -7],
      [-3.1, -5.6],
    ],
  },
  {
    name: 'Eddra road',
    highway: 'secondary',
    maxspeedKmh: 70,
    straight: false,
    via: [
      [5.1, -3.6],
      [7.6, -10.8],
      [16.5, -13.2],
      [24.2, -3.8],
    ],
  },
  {
    name: 'Vennet and Tolvane railway',
    highway: 'rail',
    maxspeedKmh: 120,
    straight: false,
    via: [
      [-14.2, -4.3],
      [-8.8, -3.6],
      [-0.5, -1.7],
      [4.9, -3],
      [5.6, -5.2],
    ],
  },
]
