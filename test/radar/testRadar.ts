import type { AntennaInput, RadarInput } from '../../core/radar/index.ts'

type Over = Partial<Omit<RadarInput, 'antenna'>> & { antenna?: Partial<AntennaInput> }

/** An invented radar for tests: flat elevation pattern, side lobes far down, 1 µs pulse, 1 MHz. */
export function testRadar(over: Over = {}): RadarInput {
  return {
    name: 'test',
    frequencyHz: 2.8e9,
    peakPowerW: 25_000,
    pulseWidthS: 1e-6,
    compressedPulseWidthS: over.pulseWidthS ?? 1e-6,
    noiseBandwidthHz: 1e6,
    prfHz: [1000],
    prfMode: 'single',
    coherentTransmitter: true,
    polarisation: 'V',
    rotationRpm: 12,
    noiseFigureDb: 2.5,
    systemLossDb: 6,
    pfa: 1e-6,
    suppression: { kind: 'none', statedDb: 0, pulses: 0, stabilityLimitDb: null, bits: null },
    stc: { kind: 'none', curve: [], cornerM: 0, maxDb: 0 },
    instrumentedRangeM: 100_000,
    ...over,
    antenna: {
      gainDbi: 34,
      azimuthBeamwidthDeg: 1.5,
      elevationBeamwidthDeg: 5,
      elevationPattern: 'table',
      cosecantLimitDeg: 30,
      elevationTable: [
        [-90, 0],
        [90, 0],
      ],
      sidelobeDb: -200,
      elevationSidelobeDb: -30,
      tiltDeg: 0,
      apertureWidthM: null,
      apertureHeightM: null,
      ...over.antenna,
    },
  }
}

/** S band, 1.3 MW, 33.5 dBi, 1.03 µs, 1.3°, noise figure 4 dB, losses 6 dB. */
export const sBandRadar = (over: Over = {}): RadarInput =>
  testRadar({
    frequencyHz: 2.8e9,
    peakPowerW: 1.3e6,
    pulseWidthS: 1.03e-6,
    noiseBandwidthHz: 1 / 1.03e-6,
    noiseFigureDb: 4,
    systemLossDb: 6,
    ...over,
    antenna: { gainDbi: 33.5, azimuthBeamwidthDeg: 1.3, ...over.antenna },
  })
