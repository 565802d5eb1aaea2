import { MARK_WORDS } from '../../words/index.ts'
import { capital, inSentence } from './cells.ts'
import type { Block, Cell, MemoInput } from './types.ts'

interface ModelRow {
  readonly model: string
  readonly source: string
  readonly basis: 'read' | 'computed' | 'from memory' | 'by hand' | 'default'
  /** Where the model holds. */
  readonly limits: string
}
const GEOMETRY: readonly ModelRow[] = [
  { model: 'Geodesics, ellipsoid WGS 84', source: 'Karney, Algorithms for geodesics, 2013', basis: 'computed', limits: 'any two places' },
  {
    model: 'Effective earth, exact sight geometry',
    source: 'Spherical trigonometry on k times the radius of curvature',
    basis: 'computed',
    limits: 'one k for the whole path',
  },
  {
    model: 'Ray in air that thins out with height',
    source: 'Snell’s law in spherical layers; reference air after Recommendation ITU-R P.453',
    basis: 'from memory',
    limits: 'a difference beside k; decides nothing',
  },
  {
    model: 'Line of sight over crossings',
    source: 'Bilinear surface between posts, highest angle per segment',
    basis: 'computed',
    limits: 'posting of the raster',
  },
  {
    model: 'Error band of the floor',
    source: 'Vertical errors of terrain and obstacle, lever of their ranges',
    basis: 'computed',
    limits: '90\u202f%, errors taken as independent',
  },
  {
    model: 'Relief classes, 2° of slope',
    source: 'Billingsley, Low-Angle Radar Land Clutter, 2002, §5.4.3',
    basis: 'read',
    limits: 'posting of about 30\u202fm',
  },
  { model: 'Ground cover heights by class', source: 'Our own engineering choice, editable', basis: 'default', limits: 'opaque cover' },
]
const SIGNAL: readonly ModelRow[] = [
  { model: 'Radar equation, thermal noise', source: 'SI constants; noise figure at 290\u202fK', basis: 'computed', limits: 'one pulse' },
  {
    model: 'Knife edge near the mask',
    source: 'Recommendation ITU-R P.526, single edge, both ways',
    basis: 'from memory',
    limits: 'never a gain',
  },
  {
    model: 'Diffracted level under the floor, range-height diagram',
    source: 'Recommendation ITU-R P.526, delta-Bullington over the profile, medium dry ground',
    basis: 'from memory',
    limits: 'shown there only, counted nowhere',
  },
  {
    model: 'Two rays off water and open ground',
    source:
      'Kerr, Propagation of Short Radio Waves, 1951; ground constants after ITU-R P.527; roughness after Miller, Brown and Vegh, 1984',
    basis: 'from memory',
    limits: 'level surface at the point, never a gain; open ground 0.3\u202fm rough, water a quarter of its waves',
  },
  {
    model: 'Detection, Swerling 0 to 4',
    source: 'Exact sums of the chi-square family (Marcum, Swerling)',
    basis: 'computed',
    limits: 'threshold from Pfa, no gaps between scans',
  },
  {
    model: 'Beam-shape loss 1.24\u202fdB',
    source: 'Gaussian beam, one scanned dimension (Barton)',
    basis: 'computed',
    limits: 'many pulses in the beam',
  },
]
const SUPPRESSION: readonly ModelRow[] = [
  {
    model: 'Canceller, filter bank, scanning',
    source: 'Correlation through the filter; Gaussian two-way beam',
    basis: 'computed',
    limits: 'pulses of one dwell',
  },
  {
    model: 'Vegetation in wind',
    source: 'Billingsley, Low-Angle Radar Land Clutter, 2002',
    basis: 'from memory',
    limits: 'wind and frequency as marked',
  },
  {
    model: 'Stability and quantisation limits',
    source: 'Common practice of clutter cancellers',
    basis: 'from memory',
    limits: 'independent errors',
  },
]
const SEA: ModelRow = {
  model: 'Sea clutter',
  source: 'Gregers-Hansen and Mital, NRL, 2012',
  basis: 'read',
  limits: '0.5 to 35\u202fGHz, grazing 0.1° to 60°, sea state 0 to 6',
}
const RAIN: readonly ModelRow[] = [
  {
    model: 'Rain clutter over the beam',
    source: 'Marshall and Palmer drops; Probert-Jones, 1962',
    basis: 'read',
    limits: '0.1 to 12\u202fGHz',
  },
  { model: 'Rain loss', source: 'Recommendation ITU-R P.838-3', basis: 'read', limits: '1 to 1 000\u202fGHz' },
]
const GAS: ModelRow = {
  model: 'Gas loss',
  source: 'Recommendation ITU-R P.676-12, Annex 1',
  basis: 'read',
  limits: 'reference air at sea level, 1 to 350\u202fGHz',
}
const STEEP: ModelRow = {
  model: 'Steep ground, γ·sin ψ',
  source: 'Barton, Proc. IEEE 73(2), 1985',
  basis: 'from memory',
  limits: 'depression over 8°',
}
const SURVEY: ModelRow = {
  model: 'Surveyed horizon',
  source: 'Elevations and ranges as entered, turned into heights with the k of the study',
  basis: 'by hand',
  limits: 'rows up to 5° apart joined, error 0.05° unless stated',
}
const ROADS: ModelRow = {
  model: 'Roads seen',
  source: 'Our own definition: height, speed and echo of vehicles by class of road',
  basis: 'default',
  limits: 'pieces of 50\u202fm, free space, one scan',
}
const EXPOSURE: readonly ModelRow[] = [
  { model: 'Near field of an aperture', source: 'FCC OET Bulletin 65', basis: 'from memory', limits: 'average power' },
  {
    model: 'Exposure limits',
    source: 'ICNIRP 2020, Table 5; Table 6 read in a reprint',
    basis: 'from memory',
    limits: '30\u202fMHz to 300\u202fGHz',
  },
]

/** Models this study uses, where their numbers stand, and where the study leaves them. */
export function modelBlocks(input: MemoInput): Block[] {
  const { study } = input
  const own = study.lowAngleLandTable
  const land: ModelRow =
    own === null
      ? {
          model: 'Low-angle land clutter table',
          source: 'Billingsley, TR-786 rev. 1, 1993, and Low-Angle Radar Land Clutter, 2002',
          basis: 'from memory',
          limits: 'VHF to X band, depression to 8°',
        }
      : { model: 'Low-angle land clutter table', source: `The study's own: ${own}`, basis: 'by hand', limits: 'as its own bands' }
  const { kind } = study.radar.suppression
  const used: ModelRow[] = [
    land,
    STEEP,
    {
      model: 'Weibull spread of cell means',
      source: 'Relations of the Weibull distribution',
      basis: 'computed',
      limits: 'spread by cell area',
    },
    SEA,
    {
      model: 'Clutter from earlier pulses',
      source: 'Ground beyond the unambiguous range, folded by PRF and mode',
      basis: 'computed',
      limits: 'the fold range, or the end of the terrain',
    },
    ...(study.obstacles === null
      ? []
      : [
          {
            model: 'Echoes of single obstacles',
            source: 'RCS as each obstacle states it',
            basis: 'by hand',
            limits: 'tops in sight',
          } as const,
        ]),
    ...(study.roads === null ? [] : [ROADS]),
    ...(study.candidates.some((c) => c.measuredHorizon) ? [SURVEY] : []),
    ...(study.atmosphere.rainRateMmH > 0 ? RAIN : []),
    ...(study.atmosphere.gas === 'p676' ? [GAS] : []),
    ...GEOMETRY,
    ...SIGNAL,
    ...(kind === 'canceller' || kind === 'filterBank' ? SUPPRESSION : []),
    ...EXPOSURE,
  ]
  const marks = new Map<string, Set<string>>()
  const notes = input.results.flatMap((r) => [...r.figures.marks, ...r.figures.suppressionBy.notes])
  for (const m of notes) {
    const about = m.about.replace(`, ${m.mark}`, '')
    marks.set(about, (marks.get(about) ?? new Set()).add(m.mark))
  }
  const meanings = Object.values(MARK_WORDS).map((m) => `${m.word}: ${inSentence(m.meaning)}`)
  const blocks: Block[] = [
    { kind: 'paragraph', role: 'small', text: `Marks. ${meanings.map(capital).join('. ')}.` },
    {
      kind: 'table',
      id: 'models',
      dense: true,
      columns: [
        { head: 'Model', width: 138 },
        { head: 'Source', width: 'fill' },
        { head: 'Holds for', width: 120 },
        { head: 'Basis', keep: true },
      ],
      rows: used.map((m): Cell[] => [
        m.model,
        m.source,
        m.limits,
        m.basis === 'computed' || m.basis === 'read' ? m.basis : { text: '', mark: m.basis },
      ]),
    },
  ]
  if (marks.size > 0)
    blocks.push({
      kind: 'table',
      id: 'marks',
      title: 'Where this study leaves them, and other marks beside its figures',
      columns: [{ head: 'About', width: 'fill' }, { head: 'Mark' }],
      rows: [...marks].map(([about, words]): Cell[] => [capital(about), { text: '', mark: [...words].join(', ') }]),
    })
  return blocks
}
