import type { AntennaInput } from '../antenna/index.ts'

export type { AntennaInput } from '../antenna/index.ts'

export interface SuppressionInput {
  readonly kind: 'none' | 'stated' | 'canceller' | 'filterBank'
  readonly statedDb: number
  readonly pulses: number
  readonly stabilityLimitDb: number | null
  readonly bits: number | null
}
export interface StcInput {
  readonly kind: 'none' | 'curve' | 'rtoFourth'
  /** [slant range m, attenuation dB] */
  readonly curve: readonly (readonly [number, number])[]
  readonly cornerM: number
  readonly maxDb: number
}
/** The radar as the kernels need it: every field settled, SI units, degrees. Follows the `radar` part of the study file. */
export interface RadarInput {
  readonly name: string
  readonly frequencyHz: number
  readonly peakPowerW: number
  readonly pulseWidthS: number
  readonly compressedPulseWidthS: number
  readonly noiseBandwidthHz: number
  readonly prfHz: readonly number[]
  readonly prfMode: 'single' | 'pulseStagger' | 'dwellStagger'
  readonly coherentTransmitter: boolean
  readonly polarisation: 'H' | 'V' | 'circular'
  readonly rotationRpm: number
  readonly noiseFigureDb: number
  readonly systemLossDb: number
  readonly pfa: number
  readonly antenna: AntennaInput
  readonly suppression: SuppressionInput
  readonly stc: StcInput
  readonly instrumentedRangeM: number
}
