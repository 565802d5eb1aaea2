import type { AntennaInput, BeamInput, PulseInput, RadarInput } from '../radar/index.ts'
import type { RadarDoc } from './types.ts'

/** Pulses and beams of a radar with their defaults: compressed = width, bandwidth 1/τc, a beam's own fields else the antenna's. */
export function settlePulses(r: RadarDoc, antenna: AntennaInput): Pick<RadarInput, 'pulses' | 'beams' | 'beamSwitch'> {
  const pulses = r.pulses?.map((p): PulseInput => {
    const compressedWidthS = p.compressedWidthS ?? p.widthS
    return {
      widthS: p.widthS,
      compressedWidthS,
      noiseBandwidthHz: p.noiseBandwidthHz ?? 1 / compressedWidthS,
      fromRangeM: p.fromRangeM,
      toRangeM: p.toRangeM,
      rangeSidelobeDb: p.rangeSidelobeDb ?? null,
    }
  })
  const beams = r.beams?.map(
    (b): BeamInput => ({
      name: b.name,
      gainDbi: b.gainDbi ?? antenna.gainDbi,
      offsetDeg: b.offsetDeg ?? 0,
      elevationBeamwidthDeg: b.elevationBeamwidthDeg ?? antenna.elevationBeamwidthDeg,
      elevationPattern: b.elevationPattern ?? antenna.elevationPattern,
      cosecantLimitDeg: b.cosecantLimitDeg ?? antenna.cosecantLimitDeg,
      elevationTable: b.elevationTable ?? antenna.elevationTable,
    }),
  )
  const switched = r.beamSwitch?.map(({ fromRangeM, toRangeM, transmit, receive }) => ({ fromRangeM, toRangeM, transmit, receive }))
  return {
    ...(pulses && pulses.length > 0 ? { pulses } : {}),
    ...(beams && switched && switched.length > 0 ? { beams, beamSwitch: switched } : {}),
  }
}
