import type { FaceUnit, FieldWords } from './steps.ts'

/** A column of a table of the study: its key in a row, head, unit and what an empty cell stands for. */
export interface ColumnWords {
  readonly key: string
  readonly head: string
  readonly face: FieldWords['face'] | 'text'
  readonly empty?: string
  readonly required?: boolean
}
const face = (unit: string, size = 1): FaceUnit => ({ unit, size })
const US = face('µs', 1e-6)

export const PULSE_COLUMNS: readonly ColumnWords[] = [
  { key: 'widthS', head: 'Width', face: US, required: true },
  { key: 'compressedWidthS', head: 'Compressed', face: US, empty: 'as width' },
  { key: 'noiseBandwidthHz', head: 'Bandwidth', face: face('MHz', 1e6), empty: '1/compressed' },
  { key: 'fromRangeM', head: 'From', face: 'range', required: true },
  { key: 'toRangeM', head: 'To', face: 'range', required: true },
  { key: 'rangeSidelobeDb', head: 'Side lobes', face: face('dB'), empty: 'none' },
]
export const BEAM_COLUMNS: readonly ColumnWords[] = [
  { key: 'name', head: 'Beam', face: 'text', required: true },
  { key: 'gainDbi', head: 'Gain', face: face('dBi'), empty: 'antenna' },
  { key: 'offsetDeg', head: 'Over the tilt', face: face('°'), empty: '0' },
  { key: 'elevationBeamwidthDeg', head: 'Beamwidth', face: face('°'), empty: 'antenna' },
  { key: 'elevationPattern', head: 'Pattern', face: 'text', empty: 'antenna' },
  { key: 'cosecantLimitDeg', head: 'Cosecant to', face: face('°'), empty: 'antenna' },
]
export const BEAM_SWITCH_COLUMNS: readonly ColumnWords[] = [
  { key: 'fromRangeM', head: 'From', face: 'range', required: true },
  { key: 'toRangeM', head: 'To', face: 'range', required: true },
  { key: 'transmit', head: 'Transmit beam', face: 'text', required: true },
  { key: 'receive', head: 'Receive beam', face: 'text', required: true },
]
export const TABLE_WORDS = {
  paste: 'Paste cells from a spreadsheet; Enter goes down',
  pulses: 'Pulses by slant range',
  beams: 'Stacked beams',
  beamSwitch: 'Which beam where',
  pulsesTitle: 'Several pulses and beams',
} as const
