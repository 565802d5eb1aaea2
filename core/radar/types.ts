import type { AntennaInput } from '../antenna/index.ts'
import type { CircularInput } from './polarisation.ts'

export type { AntennaInput } from '../antenna/index.ts'

/** One transmitted pulse and the slant ranges its echoes are taken from. */
export interface PulseInput {
  readonly widthS: number
  readonly compressedWidthS: number
  readonly noiseBandwidthHz: number
  readonly fromRangeM: number
  readonly toRangeM: number
  /** Range side lobes of the compressed pulse, dB relative to its peak; null = none counted. */
  readonly rangeSidelobeDb: number | null
}
/** One of several beams of an antenna, stacked in elevation. */
export interface BeamInput
  extends Pick<AntennaInput, 'gainDbi' | 'elevationBeamwidthDeg' | 'elevationPattern' | 'cosecantLimitDeg' | 'elevationTable'> {
  readonly name: string
  /** Its peak over the antenna's tilt. */
  readonly offsetDeg: number
}
/** Which beams are in use from one apparent slant range to another. */
export interface BeamSwitchInput {
  readonly fromRangeM: number
  readonly toRangeM: number
  readonly transmit: string
  readonly receive: string
}
export interface SuppressionInput {
  readonly kind: 'none' | 'stated' | 'canceller' | 'filterBank'
  readonly statedDb: number
  readonly pulses: number
  readonly stabilityLimitDb: number | null
  readonly bits: number | null
  /** Window of a filter bank; absent = hamming. */
  readonly window?: 'uniform' | 'hamming'
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
  /** dwellStagger: on how many PRFs a target must be usable; absent = all. */
  readonly dwellsNeeded?: number
  readonly coherentTransmitter: boolean
  readonly polarisation: 'H' | 'V' | 'circular'
  /** What circular polarisation takes off; the defaults where absent. */
  readonly circular?: CircularInput
  readonly rotationRpm: number
  readonly noiseFigureDb: number
  readonly systemLossDb: number
  readonly pfa: number
  readonly antenna: AntennaInput
  /** The receiving antenna where it is not the transmitting one. */
  readonly receiveAntenna?: AntennaInput
  /** Pulses by range; absent or empty: the one of pulseWidthS at every range. */
  readonly pulses?: readonly PulseInput[]
  /** Stacked beams and the ranges they are used at; absent or empty: the antenna's own at every range. */
  readonly beams?: readonly BeamInput[]
  readonly beamSwitch?: readonly BeamSwitchInput[]
  readonly suppression: SuppressionInput
  readonly stc: StcInput
  readonly instrumentedRangeM: number
  /** Loss of an echo that falls between gates and filters, dB; absent = 1. Added to the required ratio of a target. */
  readonly straddleLossDb?: number
  /** Threshold over noise, or over the clutter of an area: spiky clutter then raises it; absent = noise. */
  readonly detector?: 'noise' | 'areaCfar'
  /** Loss of an adaptive threshold, dB: stated, or worked out from its reference cells; neither = 0. */
  readonly cfarLossDb?: number | null
  readonly cfarReferenceCells?: number | null
  /** Time after the pulse during which the receiver recovers, s; absent = 0. */
  readonly recoveryS?: number
  /** Range of clutter-to-noise the receiver takes linearly, dB; absent = 6.02 bits − 6, or no limit where bits are not stated. */
  readonly receiverLinearRangeDb?: number | null
}
