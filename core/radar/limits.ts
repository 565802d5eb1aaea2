import { InputError } from '../errors/index.ts'
import type { RadarInput } from './types.ts'

/** What a radar may say, as data: outside these a study is refused. */
export const RADAR_LIMITS = {
  /** Carrier frequency, Hz. */
  frequencyHz: { low: 30e6, high: 40e9 },
  /** Noise bandwidth × compressed pulse width. */
  bandwidthTimesPulse: { low: 0.5, high: 2 },
} as const

/** Refuses a radar the equation does not hold for. Throws InputError naming the key. */
export function checkRadar(r: RadarInput, file?: string): void {
  const refuse = (place: string, found: string, remedy: string): never => {
    throw new InputError({ code: 'radar', file, place: `radar.${place}`, found, remedy })
  }
  const { frequencyHz, bandwidthTimesPulse } = RADAR_LIMITS
  if (!(r.frequencyHz >= frequencyHz.low && r.frequencyHz <= frequencyHz.high))
    refuse('frequencyHz', `is ${r.frequencyHz} Hz`, 'give 30 MHz to 40 GHz in Hz')
  const product = r.noiseBandwidthHz * r.compressedPulseWidthS
  if (!(product >= bandwidthTimesPulse.low && product <= bandwidthTimesPulse.high))
    refuse(
      'noiseBandwidthHz',
      `times compressedPulseWidthS is ${product.toPrecision(3)}`,
      `give the bandwidth of the filter for the compressed pulse, near ${(1 / r.compressedPulseWidthS).toPrecision(4)} Hz`,
    )
  if (!(r.pulseWidthS >= r.compressedPulseWidthS * (1 - 1e-9)))
    refuse('compressedPulseWidthS', 'is longer than pulseWidthS', 'give a compressed pulse no longer than the transmitted one')
}
