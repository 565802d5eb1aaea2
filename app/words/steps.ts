/** A unit of a form field: its word and how many SI units it is. */
export interface FaceUnit {
  readonly unit: string
  readonly size: number
}
/** A number of the study as the form shows it. `face` 'range' and 'height' follow the unit switch. */
export interface FieldWords {
  /** Key path in the study file. */
  readonly path: string
  readonly label: string
  readonly face: FaceUnit | 'range' | 'height'
  /** What an empty field stands for, where that is no number. */
  readonly emptyWords?: string
  readonly required?: boolean
}
const face = (unit: string, size = 1): FaceUnit => ({ unit, size })

export const DB = face('dB')
export const DEG = face('°')
export const METRES = face('m')
export const PLAIN = face('')

const field = (path: string, label: string, unit: FieldWords['face'], more: Partial<FieldWords> = {}): FieldWords => ({
  path,
  label,
  face: unit,
  ...more,
})
const NEEDED = { required: true } as const

/** Numbers of the radar form, by group; choices and lists stand among them in the form itself. */
export const RADAR_FIELDS = {
  transmitter: [
    field('radar.frequencyHz', 'Frequency', face('GHz', 1e9), NEEDED),
    field('radar.peakPowerW', 'Peak power', face('kW', 1e3), NEEDED),
    field('radar.pulseWidthS', 'Pulse width', face('µs', 1e-6), NEEDED),
    field('radar.compressedPulseWidthS', 'Compressed pulse', face('µs', 1e-6)),
    field('radar.noiseBandwidthHz', 'Noise bandwidth', face('MHz', 1e6)),
  ],
  antenna: [
    field('radar.antenna.gainDbi', 'Gain', face('dBi'), NEEDED),
    field('radar.antenna.azimuthBeamwidthDeg', 'Azimuth beamwidth', DEG, NEEDED),
    field('radar.antenna.elevationBeamwidthDeg', 'Elevation beamwidth', DEG),
    field('radar.antenna.tiltDeg', 'Tilt', DEG),
    field('radar.antenna.sidelobeDb', 'Azimuth side lobes', DB),
    field('radar.antenna.elevationSidelobeDb', 'Elevation side lobes', DB),
    field('radar.antenna.apertureWidthM', 'Aperture width', METRES, { emptyWords: 'not stated' }),
    field('radar.antenna.apertureHeightM', 'Aperture height', METRES, { emptyWords: 'not stated' }),
    field('radar.rotationRpm', 'Rotation', face('rpm')),
  ],
  receiver: [
    field('radar.noiseFigureDb', 'Noise figure', DB),
    field('radar.systemLossDb', 'System loss', DB),
    field('radar.pfa', 'Pfa', PLAIN),
    field('radar.instrumentedRangeM', 'Instrumented range', 'range'),
  ],
  /** Seldom stated; folded in the form. */
  processing: [
    field('radar.straddleLossDb', 'Straddling loss', DB),
    field('radar.cfarLossDb', 'Threshold loss', DB, { emptyWords: 'not stated' }),
    field('radar.cfarReferenceCells', 'Reference cells', PLAIN, { emptyWords: 'not stated' }),
    field('radar.recoveryS', 'Recovery time', face('µs', 1e-6)),
    field('radar.receiverLinearRangeDb', 'Linear range', DB, { emptyWords: 'from bits' }),
  ],
  air: [
    field('atmosphere.effectiveEarthFactor', 'Effective-earth k', PLAIN),
    field('atmosphere.earthRadiusM', 'Earth radius', face('km', 1e3), { emptyWords: 'by azimuth' }),
    field('atmosphere.windMs', 'Wind', face('m/s')),
    field('atmosphere.seaState', 'Sea state', PLAIN),
    field('atmosphere.tideM', 'Tide', METRES),
    field('atmosphere.rainRateMmH', 'Rain rate', face('mm/h')),
    field('atmosphere.rainTopM', 'Rain top', 'height'),
    field('atmosphere.rainExtentM', 'Rain extent', 'range'),
  ],
  grid: [
    field('run.maxRangeM', 'Range', 'range'),
    field('run.rangeStepM', 'Range step', METRES),
    field('run.azimuthStepDeg', 'Azimuth step', DEG),
    field('run.foldRangeM', 'Folded clutter to', 'range'),
  ],
} as const satisfies Record<string, readonly FieldWords[]>

export const COSECANT_FIELD = field('radar.antenna.cosecantLimitDeg', 'Cosecant-squared to', DEG)
export const SUPPRESSION_FIELDS = {
  stated: [field('radar.suppression.statedDb', 'Suppression', DB, NEEDED)],
  canceller: [
    field('radar.suppression.pulses', 'Pulses', PLAIN),
    field('radar.suppression.stabilityLimitDb', 'Stability limit', DB, { emptyWords: 'none' }),
    field('radar.suppression.bits', 'Converter bits', PLAIN, { emptyWords: 'none' }),
  ],
} as const satisfies Record<string, readonly FieldWords[]>
/** How echoes of sea and rain move; empty: worked out from the wind. */
export const MOTION_FIELDS = [
  field('atmosphere.seaMeanMs', 'Sea, mean', face('m/s'), { emptyWords: 'from wind' }),
  field('atmosphere.seaSpreadMs', 'Sea, spread', face('m/s'), { emptyWords: 'from wind' }),
  field('atmosphere.rainMeanMs', 'Rain, mean', face('m/s'), { emptyWords: 'from wind' }),
  field('atmosphere.rainSpreadMs', 'Rain, spread', face('m/s'), { emptyWords: 'from wind' }),
] as const satisfies readonly FieldWords[]
export const CIRCULAR_FIELDS = [
  field('radar.circular.rainLossDb', 'Rejection of rain', DB),
  field('radar.circular.targetLossDb', 'Loss of a target', DB),
] as const satisfies readonly FieldWords[]
export const STC_FIELDS = [
  field('radar.stc.cornerM', 'Corner range', 'range', NEEDED),
  field('radar.stc.maxDb', 'Largest attenuation', DB, NEEDED),
] as const satisfies readonly FieldWords[]

interface Choice<T extends string> {
  readonly id: T
  readonly words: string
  readonly hint?: string
}
/** On how many PRFs a target must be usable, where they change from dwell to dwell. */
export const DWELLS_FIELD = field('radar.dwellsNeeded', 'PRFs needed', PLAIN, { emptyWords: 'all' })
export const PRF_MODES: readonly Choice<'single' | 'pulseStagger' | 'dwellStagger'>[] = [
  { id: 'single', words: 'single' },
  { id: 'pulseStagger', words: 'pulse to pulse' },
  { id: 'dwellStagger', words: 'dwell to dwell' },
]
export const POLARISATIONS: readonly Choice<'H' | 'V' | 'circular'>[] = [
  { id: 'H', words: 'horizontal' },
  { id: 'V', words: 'vertical' },
  { id: 'circular', words: 'circular' },
]
export const ELEVATION_PATTERNS: readonly Choice<'gaussian' | 'cosecant-squared' | 'table'>[] = [
  { id: 'gaussian', words: 'Gaussian' },
  { id: 'cosecant-squared', words: 'cosecant-squared' },
  { id: 'table', words: 'table' },
]
export const DETECTORS: readonly Choice<'noise' | 'areaCfar'>[] = [
  { id: 'noise', words: 'over noise' },
  { id: 'areaCfar', words: 'over local clutter' },
]
export const SUPPRESSION_KINDS: readonly Choice<'none' | 'stated' | 'canceller' | 'filterBank'>[] = [
  { id: 'none', words: 'none' },
  { id: 'stated', words: 'stated' },
  { id: 'canceller', words: 'canceller' },
  { id: 'filterBank', words: 'filter bank' },
]
export const FILTER_WINDOWS: readonly Choice<'uniform' | 'hamming'>[] = [
  { id: 'hamming', words: 'Hamming' },
  { id: 'uniform', words: 'uniform' },
]
export const STC_KINDS: readonly Choice<'none' | 'curve' | 'rtoFourth'>[] = [
  { id: 'none', words: 'none' },
  { id: 'rtoFourth', words: 'fourth power of range' },
  { id: 'curve', words: 'curve' },
]
export const GAS_KINDS: readonly Choice<'none' | 'p676'>[] = [
  { id: 'none', words: 'none' },
  { id: 'p676', words: 'ITU-R P.676' },
]
export const TERRAIN_CHOICES: readonly Choice<'rural' | 'forest' | 'farmland' | 'open' | 'urban' | 'water'>[] = [
  { id: 'rural', words: 'rural (general)' },
  { id: 'forest', words: 'forest' },
  { id: 'farmland', words: 'farmland' },
  { id: 'open', words: 'open (desert, marsh, grass)' },
  { id: 'urban', words: 'urban' },
  { id: 'water', words: 'water' },
]
export const LEGENDS: readonly Choice<'worldcover' | 'nlcd' | 'corine' | 'custom'>[] = [
  { id: 'worldcover', words: 'ESA WorldCover' },
  { id: 'nlcd', words: 'NLCD' },
  { id: 'corine', words: 'CORINE' },
  { id: 'custom', words: 'own classes' },
]
export const HEIGHT_UNITS: readonly Choice<'file' | 'm' | 'ft' | 'us-ft'>[] = [
  { id: 'file', words: 'as the file says' },
  { id: 'm', words: 'metres' },
  { id: 'ft', words: 'feet' },
  { id: 'us-ft', words: 'US survey feet' },
]
export const FILE_ROLES: readonly Choice<'terrain' | 'landCover' | 'obstacles' | 'roads'>[] = [
  { id: 'terrain', words: 'terrain heights' },
  { id: 'landCover', words: 'land cover' },
  { id: 'obstacles', words: 'obstacles' },
  { id: 'roads', words: 'roads' },
]
export const NEED_KINDS: readonly Choice<'layer' | 'fixes' | 'track' | 'polygon'>[] = [
  { id: 'layer', words: 'layer' },
  { id: 'fixes', words: 'fixes', hint: 'a CSV of points with heights' },
  { id: 'track', words: 'track', hint: 'a CSV of points in order' },
  { id: 'polygon', words: 'polygon', hint: 'a GeoJSON area' },
]
export const SWERLING_CASES: readonly Choice<'0' | '1' | '2' | '3' | '4'>[] = [
  { id: '0', words: 'steady (0)' },
  { id: '1', words: 'Swerling 1' },
  { id: '2', words: 'Swerling 2' },
  { id: '3', words: 'Swerling 3' },
  { id: '4', words: 'Swerling 4' },
]

export const STEP_WORDS = {
  ground: { name: 'Ground' },
  radar: { name: 'Radar' },
  need: { name: 'Need' },
  candidates: { name: 'Candidates' },
  compare: { name: 'Compare' },
  memo: { name: 'Memo' },
} as const

/** What to do about the radar of a new study; stands after the remark that it is none. */
export const STARTING_ADVICE = ': enter yours and name it before relying on any figure'

/** Empty states: the next action and a one-line reason. */
export const EMPTY_WORDS = {
  ground: {
    title: 'No terrain yet',
    reason: 'Every figure comes from an elevation raster',
    action: 'Drop a GeoTIFF here, pick one, or open the demo study',
    demo: 'Open the demo study',
  },
  need: { title: 'No need stated', reason: 'Without a need there is nothing to meet: only ground and clutter are counted' },
  candidates: { title: 'No candidate placed', reason: 'A candidate is a place where the radar could stand' },
  compare: { title: 'Nothing to compare', reason: 'Comparison takes a ground and at least one candidate' },
} as const
