import type { LayerId } from '../../core/index.ts'

/** Every caution of the app, the batch command and the memo; shown under the number it concerns, never folded away. */
export const CAUTIONS = {
  draft: 'Draft: prediction, not for construction or operation',
  prediction: 'A prediction from a raster and models, to be confirmed by survey and trial.',
  notForNavigation: 'Not for navigation, separation, minimum altitudes or operational use.',
  exposure:
    'RF exposure is for a qualified person under the local limits: antenna stopped first, near field, implants, fuel and electro-explosive devices, lock-out before work on the antenna.',
  climbing: 'Climbing, lifts and work at height follow local rules and trained crews.',
  structure: 'Mast, foundations, wind, ice, lightning and sway are for a licensed structural engineer under the local code.',
  obstruction: 'A mast may need notice, marking or lighting as an obstacle to aviation: ask the local authority before fixing its height.',
  spectrum: 'The frequency needs a licence and co-ordination with its neighbours from the national authority.',
  environment: 'Environment, heritage, birds and land use follow the local permitting authority.',
  localCodes: 'Local codes and licensed practice prevail over this memo; professional sign-off where it is reserved.',
  sensitive: "Coverage gaps can be sensitive: no publication without the owner's consent.",
  nearMast: 'Inside 3–5 km a 30 m raster does not place a horizon within 0.1°: survey.',
  landTable: 'The low-angle land table is from memory, not proof-read in print: check it before relying on a level.',
  clutterMean: 'Clutter is the mean of each cell; single cells and single moments spread by many decibels around it.',
  sightOnly: 'In sight is line of sight only: not detectable, not usable, not confirmed.',
  threeWords: 'In sight, detectable and usable are predictions, to be confirmed by trial; none of them is confirmed here.',
  meanUsable: 'Usable is worked out for the mean clutter of each cell: spiky clutter is worse in places.',
  headlineK: 'Pass holds for the k of the study and for k = 1; it says nothing about ducting.',
  edgeOnly:
    'Nulls of the ray off water or low-relief open ground count, its gains do not; their place moves with tide, waves and the level of the ground.',
  diffracted:
    'Under the coverage floor the diagram shows the diffracted level over the profile, from memory (ITU-R P.526): it is counted nowhere.',
  requiredRatio:
    'A required ratio not stated is worked out from Pd, Pfa, fluctuation and the pulses of one scan; residue is taken as noise.',
  statedSuppression: 'Suppression that is stated is taken as stated, not worked out from the waveform.',
  blindSpeeds: 'Blind speeds are in tracks only: areas and fixes take the mean response over all speeds.',
  coverDefault: 'Ground cover is a default: give land cover or a uniform terrain before relying on clutter.',
  unknownGround: 'Unknown ground counts against a need: it is never in sight and never free of clutter.',
  floorBand: 'The floor is nominal; the error band beside it is 90 %, from the raster and obstacle errors.',
  edgeHorizon: 'Where the terrain ends the horizon is "at least" the value shown.',
  survey:
    'A survey is read with the k of the study and a 90 % error of 0.05° unless it states one; between rows up to 5° apart it is taken as linear, elsewhere the raster alone holds.',
  trialAltitudes:
    'Altitudes of the trial plan are those of needs and predicted floors, not safe altitudes: terrain, obstacles, airspace and minimum altitudes are for the pilot and the authority.',
  roads:
    'Roads seen are length, not traffic: free space, one scan, and cover at the road’s own place hides its vehicles; bridges and cuttings are as the raster has them.',
  moreGround: 'More ground in sight is not better by itself: clutter comes with it.',
  ducting: 'Ducting sensitivity, not a prediction',
} as const
export type CautionId = keyof typeof CAUTIONS

/** On the memo's first page, in this order. */
export const FIRST_PAGE_CAUTIONS: readonly CautionId[] = [
  'prediction',
  'notForNavigation',
  'landTable',
  'nearMast',
  'sensitive',
  'localCodes',
]
/** What defers to local codes and licensed practice, each with its own line in the memo. */
export const DEFERRED_CAUTIONS: readonly CautionId[] = ['exposure', 'climbing', 'structure', 'obstruction', 'spectrum', 'environment']
/** Which caution stands under which kind of number. */
export const CAUTIONS_OF = {
  horizon: ['nearMast', 'edgeHorizon'],
  floor: ['floorBand', 'notForNavigation'],
  sight: ['sightOnly'],
  need: ['threeWords', 'meanUsable', 'headlineK', 'edgeOnly'],
  clutter: ['landTable', 'clutterMean'],
  suppression: ['requiredRatio', 'blindSpeeds', 'landTable'],
  exposure: ['exposure', 'structure'],
  roads: ['roads'],
  trial: ['trialAltitudes', 'threeWords'],
  survey: ['survey'],
  usable: ['threeWords', 'meanUsable', 'edgeOnly', 'landTable'],
  diagram: ['diffracted'],
  mast: ['obstruction', 'structure'],
  candidate: ['nearMast'],
  compare: ['threeWords', 'meanUsable', 'headlineK', 'landTable'],
} as const satisfies Record<string, readonly CautionId[]>
export type CautionTopic = keyof typeof CAUTIONS_OF

const LAYER_TOPIC: Record<LayerId, CautionTopic> = {
  masked: 'sight',
  'coverage-floor': 'floor',
  'height-to-see': 'mast',
  depression: 'candidate',
  'clutter-strength': 'clutter',
  'clutter-to-noise': 'clutter',
  'second-time-around': 'clutter',
  'suppression-needed': 'suppression',
  usable: 'usable',
  'probability-of-detection': 'usable',
  'signal-margin': 'usable',
  'cause-of-loss': 'usable',
}
/** Sentences to stand under a number of this topic. */
export const cautionsFor = (topic: CautionTopic): readonly string[] => CAUTIONS_OF[topic].map((id) => CAUTIONS[id])
/** Sentences to stand under the map's legend while this layer is on show. */
export const cautionsForLayer = (layer: LayerId): readonly string[] => cautionsFor(LAYER_TOPIC[layer])
