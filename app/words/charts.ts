/** Words of the charts over the lower half of the map. */
export const CHART_WORDS = {
  choose: 'Chart',
  charts: 'Charts',
  names: {
    profile: 'Terrain profile',
    vertical: 'Range-height diagram',
    rings: 'Clutter by ring and octant',
    suppression: 'Suppression needed and available',
  },
  azimuth: 'Azimuth',
  need: 'Need',
  zoomIn: 'Zoom in',
  zoomOut: 'Zoom out',
  whole: 'Whole',
  copySvg: 'Copy SVG',
  copyCsv: 'Copy CSV',
  copied: 'Copied',
  savedInstead: 'Saved as a file',
  /** Keys that work on a chart. */
  keys: 'Arrow keys move the reading, Shift by ten, plus and minus zoom, 0 shows the whole',
  height: 'Height',
  aboveGround: 'above ground',
  cnrTitle: 'C/N of known ground, dB, one pulse, short-range sensitivity not taken off',
  octant: 'Octant, ± 22.5°',
  mean: 'mean',
  known: 'known ground',
  noClutter: 'No clutter is modelled over known ground',
  suppressionTitle: 'Needed: dot 50\u202f%, bar 90\u202f%, heavy 99\u202f% of places · upright and filled: available',
  suppressionAxis: 'dB',
  needed: 'needed',
  available: 'available',
  shortOver: 'short over',
  noPlaces: 'no place in sight with enough signal',
  noAreaNeed: 'No need of an area is stated',
  enoughEverywhere: 'Suppression is enough over every place of every need',
  withCover: 'with cover',
  bareGround: 'bare ground',
  measured: 'measured',
  /** How much of the height of the horizon the strip shows. */
  stretchOf: (n: number) => `Height ×${n}`,
  rays: { peak: 'beam peak', lower: 'half power', upper: 'half power', end: 'end of pattern' },
  stcTo: (most: string) => `short-range sensitivity ends, up to ${most}`,
  instrumented: 'instrumented range',
  cone: 'cone of silence',
  asked: 'asked for',
  floorOf: (obstacle: string) => (obstacle === '' ? 'coverage floor' : `coverage floor, ${obstacle}`),
  masked: 'masked',
  unknown: 'unknown',
  usableTo: 'usable to',
  atSomeHeight: 'at some height',
  usableNowhere: 'usable at no range and height shown',
  drawing: 'Drawing the diagram',
  noNeed: 'State a need first: the diagram shows its target',
  pointHint: 'Point at the chart to read it',
  inGround: 'inside the ground',
  ground: 'ground',
  surface: 'surface',
  inSight: 'in sight',
  floor: 'floor',
  fresnel: 'first Fresnel zone of the ray',
  /** Clearance of the ray as a share of the first Fresnel radius, %; null where it is many times that. */
  fresnelOf: (pct: number | null) =>
    pct === null ? 'clear of the first Fresnel zone' : `clearance ${pct < 0 ? '−' : ''}${Math.abs(pct)}\u202f% of the first Fresnel radius`,
  usable: 'usable',
  diffracted: 'diffracted, not counted',
  signal: 'S/N',
  margin: 'margin',
} as const

/** A kind of clutter as a row of a chart names it. */
export const clutterKindWords = (about: string): string =>
  about === 'every'
    ? 'every kind of clutter'
    : about === 'folded'
      ? 'an earlier pulse'
      : about === 'discrete'
        ? 'single obstacles'
        : about === 'water'
          ? 'sea and water'
          : about
