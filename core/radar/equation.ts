import { KT0_DBW_PER_HZ, SPEED_OF_LIGHT_MS, toDb, wavelengthM } from '../units/index.ts'
import type { RadarInput } from './types.ts'

/** 10 log (4π)³. */
const FOUR_PI_CUBED_DB = 30 * Math.log10(4 * Math.PI)

/** Receiver noise after the filter for the compressed pulse, dBW: kT₀·B·Fn, T₀ = 290 K. */
export const noiseDbw = (r: RadarInput): number => KT0_DBW_PER_HZ + toDb(r.noiseBandwidthHz) + r.noiseFigureDb

/** Signal gained by pulse compression over the peak-power ratio: τ/τc, dB; 0 without compression. */
export const compressionGainDb = (r: RadarInput): number => toDb(r.pulseWidthS / r.compressedPulseWidthS)

/**
 * Everything of the radar equation but the reflector and the range, dB: echo-to-noise ratio of 1 m² at 1 m on the beam peak, one pulse after
 * compression. Pt·G_T·G_R·λ²·(τ/τc) / [(4π)³·kT₀·B·Fn·L]; no gas, no propagation factor, no STC. Source: monostatic radar equation (Skolnik).
 */
export function radarConstantDb(r: RadarInput): number {
  return (
    toDb(r.peakPowerW) +
    r.antenna.gainDbi +
    (r.receiveAntenna ?? r.antenna).gainDbi +
    20 * Math.log10(wavelengthM(r.frequencyHz)) +
    compressionGainDb(r) -
    FOUR_PI_CUBED_DB -
    noiseDbw(r) -
    r.systemLossDb
  )
}

/** A reflector for the radar equation. */
export interface Echo {
  readonly rcsM2: number
  readonly slantRangeM: number
  /** One-way gains toward it, ratio to the peak; 1 on the beam peak. */
  readonly transmitGain?: number
  readonly receiveGain?: number
  /** Propagation factor F⁴, ratio; 1 in free space. */
  readonly f4?: number
}

/** Signal-to-noise ratio of one pulse after compression, dB, before STC. −Infinity where a gain is 0. */
export function signalToNoiseDb(r: RadarInput, echo: Echo): number {
  const { rcsM2, slantRangeM, transmitGain = 1, receiveGain = 1, f4 = 1 } = echo
  return radarConstantDb(r) + toDb(rcsM2 * transmitGain * receiveGain * f4) - 40 * Math.log10(slantRangeM)
}

/** Slant range at which a reflector on the beam peak gives a stated S/N in free space, m. */
export const rangeForSignalToNoiseM = (r: RadarInput, rcsM2: number, snrDb: number): number =>
  10 ** ((radarConstantDb(r) + toDb(rcsM2) - snrDb) / 40)

/** Length of the range gate, m: c·τc/2 of the compressed pulse. */
export const gateLengthM = (r: RadarInput): number => (SPEED_OF_LIGHT_MS * r.compressedPulseWidthS) / 2

/** Nearest slant range a pulse can be heard from, m: c·τ/2 of the transmitted pulse. Inside it clutter is undefined. */
export const minimumRangeM = (r: RadarInput): number => (SPEED_OF_LIGHT_MS * r.pulseWidthS) / 2
