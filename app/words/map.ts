import { type LayerId, NEED_LAYERS, type Probe } from '../../core/index.ts'
import {
  formatAngle,
  formatAzimuth,
  formatDbDown,
  formatDbUp,
  formatFloor,
  formatHeight,
  formatHeightToSee,
  formatNumber,
  formatPd,
  formatPlaceRange,
  type Quantity,
  textOf,
} from './format.ts'
import { LAYER_WORDS } from './layers.ts'
import { toFace, type UnitSystem, unitOf } from './units.ts'

/** Words of map, ruler and horizon strip. */
export const MAP_WORDS = {
  map: 'Site map',
  mapOf: 'Map beside it:',
  help: 'Arrow keys move the map, plus and minus zoom, Home fits the ground, Enter takes the place under the cross',
  sentence: { show: 'Show', as: 'as', for: 'for', at: 'at', tilted: 'tilted', against: 'against', trial: 'on trial' },
  choose: { family: 'Question', layer: 'Quantity', candidate: 'Candidate', height: 'Mast height', tilt: 'Tilt', need: 'Need' },
  noCandidate: 'no candidate yet',
  zoomIn: 'Zoom in',
  zoomOut: 'Zoom out',
  fit: 'Fit',
  fitGround: 'Whole ground',
  fitRange: 'Range of the candidate',
  fitCandidates: 'All candidates',
  base: 'Base',
  baseCanvas: 'Plain canvas',
  baseCanvasHint: 'Works everywhere',
  baseGl: 'Graphics processor',
  baseHints: {
    processor: 'Smoother pan and zoom',
    software: 'Drawn by software in this browser: slow',
    none: 'None in this browser',
  },
  stop: 'Stop',
  left: 'left',
  close: 'Close',
  north: 'N',
  /** What stands under a place that another chart's pointer gives. */
  pointing: { map: '', horizon: 'controls the horizon', profile: 'on the profile' },
  pointHint: 'Point at a place to read it',
  placing: 'Click where the candidate stands · Esc to leave',
  movingByKeys: 'Arrows move it, Shift for small steps · Enter sets it, Esc puts it back',
  cell: 'cell of the ledger',
  profile: 'Terrain profile here',
  ground: 'ground',
  noGroundHere: 'no ground known',
  horizon: 'Horizon',
  horizonOf: 'Horizon profile, azimuth by azimuth',
  horizonEmpty: 'The horizon profile appears here once a candidate is on known ground',
  stretch: 'Stretch',
  mast: 'Mast, m',
  mastOf: 'Mast height, m above ground',
  strips: { usable: 'usable', short: 'short', inSight: 'in sight', clutter: '> 40\u202fdB' },
  stripHints: {
    usable: 'Share of the area of the first need that is usable',
    short: 'Area of all needs where more suppression is needed than there is',
    inSight: 'Share of known ground in sight',
    clutter: 'Ground with C/N over 40 dB',
  },
  stripFull: '100\u202f%',
  rejectedMark: 'rejected candidate',
  roadSeen: 'road or rail: vehicles seen',
  /** Classes of the layer `usable`, from 1. */
  usableClasses: ['in sight', 'detectable', 'usable'],
  dragMast: 'drag the mast',
  ladderWorking: 'ladder: working',
  gains: (text: string) => `to ${text}:`,
  gainsHint: (asked: boolean) =>
    asked
      ? 'Percentage points of the first need usable, by octant, one step of the ladder up'
      : 'Percentage points of ground in sight, by octant, one step of the ladder up',
  noGain: 'nothing more',
  tilt: 'Tilt',
  tiltOf: 'Tilt of the antenna, deg',
  mastKeys: 'Arrows step through stated heights, Shift for 0.5 m between',
  addHeight: (text: string) => `Add ${text}`,
  putBack: 'Put back',
  noMast: 'Place a candidate to see its mast',
  needMet: (name: string) => `${name} met`,
  needNotMet: (name: string, text: string) => `${name} not met up to ${text}`,
  needNumber: (n: number) => `need ${n}`,
} as const

/** The quantity under the pointer in the unit of the face; a word where there is no number. */
export function probeValue(layer: LayerId, value: number | null, units: UnitSystem): Quantity {
  switch (layer) {
    case 'clutter-to-noise':
    case 'clutter-strength':
    case 'second-time-around':
    case 'suppression-needed':
      return formatDbUp(value)
    case 'coverage-floor':
      return formatFloor(value, units)
    case 'height-to-see':
      return formatHeightToSee(value)
    case 'depression':
      return formatAngle(value)
    case 'probability-of-detection':
      return formatPd(value)
    case 'signal-margin':
      return formatDbDown(value)
    case 'masked':
    case 'usable':
    case 'cause-of-loss':
      return { value: '', unit: '' }
  }
}
/** `az 118.5° · 7.2 NM · ground 402 ft`; what is not known is left out. */
export function placeLine(azimuthDeg: number | null, rangeM: number | null, groundM: number | null | undefined, units: UnitSystem): string {
  const parts: string[] = []
  if (azimuthDeg !== null) parts.push(`az ${textOf(formatAzimuth(azimuthDeg))}`)
  if (rangeM !== null) parts.push(textOf(formatPlaceRange(rangeM, units)))
  if (groundM === null) parts.push(MAP_WORDS.noGroundHere)
  else if (groundM !== undefined) parts.push(`${MAP_WORDS.ground} ${textOf(formatHeight(groundM, units))}`)
  return parts.join(' · ')
}
/** Second line of the read-out: name, number, word. */
export function valueLine(probe: Probe, units: UnitSystem): { name: string; value: Quantity; word: string } {
  const value = probeValue(probe.layer, probe.value, units)
  const known = probe.value !== null && value.value !== ''
  return { name: LAYER_WORDS[probe.layer].short, value: known ? value : { value: '', unit: '' }, word: probe.word ?? '' }
}

/** Labelled stops of a legend, in the unit of the face: round numbers, at their share 0..1 of the ramp. */
export function legendStops(
  layer: LayerId,
  stops: readonly number[],
  units: UnitSystem,
): { readonly unit: string; readonly labels: readonly { readonly at: number; readonly text: string }[] } {
  const low = stops[0] ?? 0
  const high = stops[stops.length - 1] ?? 1
  const share = (v: number): number => (v - low) / (high - low)
  if (layer === 'coverage-floor' && units !== 'metric') {
    const top = toFace('height', high, units)
    const step = [500, 1000, 2000, 5000].find((s) => top / s <= 5.5) ?? 10_000
    const labels = []
    for (let v = 0; v <= top; v += step) labels.push({ at: share((v * (high - low)) / top + low), text: formatNumber(v) })
    return { unit: unitOf('height', units), labels }
  }
  return { unit: '', labels: stops.map((v) => ({ at: share(v), text: formatNumber(v, Number.isInteger(v) ? 0 : 1) })) }
}

const ABOUT_SUPPRESSION = /^suppression/i
const ABOUT_CLUTTER = /clutter|land table/i
const CLUTTER_LAYERS: readonly LayerId[] = [
  'clutter-strength',
  'clutter-to-noise',
  'second-time-around',
  'suppression-needed',
  'usable',
  'probability-of-detection',
  'signal-margin',
  'cause-of-loss',
]

/** The line under a legend, and the marks that stand under it in words: those of the layer itself, then those of the result that concern it. */
export function legendMarks(
  layer: LayerId,
  marks: readonly { readonly mark: string; readonly about: string }[],
): { readonly note: string; readonly warned: readonly string[] } {
  const parts = LAYER_WORDS[layer].note.split(' · ')
  const remembered = parts.filter((p) => p.includes('from memory'))
  // a land table of the study's own takes the place of the built-in one
  const ownTable = marks.some((m) => m.mark === 'by hand' && /^land clutter table/.test(m.about))
  const own = ownTable ? [] : remembered
  const concerns = marks.filter((m) =>
    ABOUT_SUPPRESSION.test(m.about) ? NEED_LAYERS.includes(layer) : CLUTTER_LAYERS.includes(layer) || !ABOUT_CLUTTER.test(m.about),
  )
  const others = concerns
    .filter((m) => !(m.mark === 'from memory' && own.length > 0 && /land/i.test(m.about)))
    .map((m) => `${(m.about.split(/[:,;(]/)[0] ?? '').trim()} · ${m.mark}`)
  return { note: parts.filter((p) => !remembered.includes(p)).join(' · '), warned: [...new Set([...own, ...others])] }
}

/** Round length for a scale bar at most `mostPx` long: its length in pixels and its words. */
export function scaleBar(groundPerPx: number, mostPx: number, units: UnitSystem): { px: number; text: string } {
  const most = groundPerPx * mostPx
  const far = unitOf('range', units)
  const near = unitOf('height', units)
  const inRange = toFace('range', most, units)
  // below a tenth of a mile or kilometre the bar speaks in feet or metres
  const small = inRange < (units === 'metric' ? 1 : 0.5)
  const value = small ? toFace('height', most, units) : inRange
  const power = 10 ** Math.floor(Math.log10(value))
  const lead = value / power
  const round = (lead >= 5 ? 5 : lead >= 2 ? 2 : 1) * power
  const text = `${formatNumber(round, round < 1 ? 1 : 0)}\u202f${small ? near : far}`
  return { px: (round / value) * mostPx, text }
}
/** Step between range rings, m: round in the unit of the face, at most `most` rings inside a range. */
export function ringStep(maxRangeM: number, units: UnitSystem, most: number): number {
  const max = toFace('range', maxRangeM, units)
  for (let power = 0.01; power < 1e6; power *= 10)
    for (const lead of [1, 2, 5]) if (max / (lead * power) <= most) return (lead * power * maxRangeM) / max
  return maxRangeM
}
/** Words of a ring: `10 NM`. */
export function ringText(rangeM: number, units: UnitSystem): string {
  const v = toFace('range', rangeM, units)
  return `${formatNumber(v, Math.abs(v - Math.round(v)) < 1e-6 ? 0 : v < 1 ? 2 : 1)}\u202f${unitOf('range', units)}`
}
