import type { LayerId, LayerInfo, LossCause } from '../../core/index.ts'

/** What the map's sentence and legend say of a layer. Its ramp and rounding side are core's (`LayerInfo`). */
export interface LayerWords {
  /** In the sentence: "Show what comes back as **C/N** for…". */
  readonly short: string
  /** Legend title. */
  readonly title: string
  /** After the title in lighter ink: unit and what the value is. */
  readonly of: string
  /** Meaning of the two ends of the ramp, low then high; null where the numbers say enough. */
  readonly ends: readonly [string, string] | null
  /** Line under the ramp: what is left bare, what is hatched. */
  readonly note: string
  /** One sentence for help and the memo's figure caption. */
  readonly meaning: string
}
export const LAYER_WORDS: Record<LayerId, LayerWords> = {
  masked: {
    short: 'masked ground',
    title: 'Masked ground',
    of: 'line of sight only',
    ends: null,
    note: 'hatched: masked · dotted: marginal or partly · crossed: unknown',
    meaning: 'Ground whose surface the antenna does not see, by line of sight over terrain, cover and obstacles',
  },
  'coverage-floor': {
    short: 'coverage floor',
    title: 'Coverage floor',
    of: 'MSL, nominal',
    ends: ['low, good', 'high, poor'],
    note: 'error band on the pointer · bare: unknown',
    meaning: 'Lowest height in sight above each place, above mean sea level',
  },
  'height-to-see': {
    short: 'height to see',
    title: 'Height to see',
    of: 'm of mast, nominal',
    ends: ['low, good', 'high, poor'],
    note: 'bare: unknown or over the ramp',
    meaning: 'Lowest mast height that brings the ground of a place into sight',
  },
  depression: {
    short: 'depression angle',
    title: 'Depression angle',
    of: 'deg, at the ground, smooth earth',
    ends: ['small', 'steep'],
    note: 'slope not included · hatched: masked',
    meaning: 'Angle of the ray below the local horizontal at the ground on the smooth effective earth; the land table is entered with it',
  },
  'clutter-strength': {
    short: 'clutter strength',
    title: 'Clutter strength σ°F⁴',
    of: 'dB, mean',
    ends: ['faint', 'severe'],
    note: 'hatched: masked, none modelled · land table from memory',
    meaning: 'Mean clutter strength per unit area of land or sea, propagation included',
  },
  'clutter-to-noise': {
    short: 'C/N',
    title: 'Clutter-to-noise',
    of: 'dB, mean, one pulse',
    ends: ['faint', 'severe'],
    note: 'bare: below noise · hatched: masked · colour under hatch: through side lobes · land table from memory',
    meaning:
      'Mean clutter of land, sea, rain and single obstacles against receiver noise in each resolution cell, per pulse, before suppression and short-range sensitivity',
  },
  'suppression-needed': {
    short: 'suppression needed',
    title: 'Suppression needed',
    of: 'dB, for the need on show',
    ends: ['little', 'much'],
    note: 'bare: none needed or too weak · hatched: masked · land table from memory',
    meaning: 'Improvement factor that lets the target of the need stand above mean clutter and noise',
  },
  'second-time-around': {
    short: 'clutter of an earlier pulse',
    title: 'Second-time-around clutter',
    of: 'dB over noise, mean, one pulse',
    ends: ['faint', 'severe'],
    note: 'bare: none, or not evaluated so far out · land table from memory',
    meaning:
      'Clutter from beyond the unambiguous range at the range where it appears, worst PRF, before suppression and short-range sensitivity',
  },
  usable: {
    short: 'in sight, detectable, usable',
    title: 'In sight, detectable, usable',
    of: 'for the need on show',
    ends: ['in sight', 'usable'],
    note: 'bare: masked or outside the need · land table from memory',
    meaning:
      'Where the target of the need is in sight, where its echo stands over noise, and where over clutter and noise after suppression',
  },
  'probability-of-detection': {
    short: 'probability of detection',
    title: 'Probability of detection',
    of: 'one scan, for the need on show',
    ends: ['low', 'high'],
    note: 'bare: unknown or outside the need · land table from memory',
    meaning: 'Chance that one scan detects the target of the need over mean clutter and noise, at its worst level',
  },
  'signal-margin': {
    short: 'signal margin',
    title: 'Signal margin',
    of: 'dB over the required ratio',
    ends: ['short', 'ample'],
    note: 'bare: target masked or outside the need · land table from memory',
    meaning: 'Echo over residue and noise, less the ratio the need asks for, at its worst level',
  },
  'cause-of-loss': {
    short: 'cause of loss',
    title: 'Cause of loss',
    of: 'for the need on show',
    ends: null,
    note: 'bare: usable or outside the need · land table from memory',
    meaning: 'First cause that keeps the target of the need from being usable',
  },
}
/** Causes of loss by id, as the layer, the probe and the figures name them. */
export const LOSS_WORDS: Record<LossCause, string> = {
  unknown: 'unknown ground',
  'out-of-range': 'out of range',
  masked: 'masked',
  marginal: 'marginal',
  'short-range-sensitivity': 'short-range sensitivity',
  'above-beam': 'above the beam',
  'below-beam': 'below the beam',
  clutter: 'clutter',
  'blind-speed': 'blind speed',
  'too-weak': 'too weak',
  several: 'several causes together',
  lobing: 'null of lobing',
}
/** What each cause means, for help and the memo. */
export const LOSS_MEANINGS: Record<LossCause, string> = {
  unknown: 'Beyond a void or past the edge of the terrain',
  'out-of-range': 'Beyond the instrumented range, inside the minimum range, or eclipsed by a later pulse',
  masked: 'Behind ground, cover or an obstacle',
  marginal: 'Inside the error band of the coverage floor',
  'short-range-sensitivity': 'Usable but for the short-range sensitivity setting',
  'above-beam': 'Usable but for the elevation pattern, above the peak',
  'below-beam': 'Usable but for the elevation pattern, below the peak',
  clutter: 'Usable but for clutter left after suppression',
  'blind-speed': 'Usable but for a blind speed or a path across the beam',
  'too-weak': 'Under the required ratio on the beam peak without clutter or short-range sensitivity',
  several: 'Several causes together; none alone would make it usable',
  lobing: 'Usable but for the ray that comes off water or level open ground: direct and reflected ray cancel',
}
/** The map's families, in the words of its sentence. */
export const FAMILY_WORDS: Record<LayerInfo['family'], string> = {
  hidden: 'what is hidden',
  seen: 'what is seen',
  echo: 'what comes back',
  lost: 'what is lost',
  takes: 'what it takes',
}
