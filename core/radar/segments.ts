import type { AntennaInput } from '../antenna/index.ts'
import type { BeamSwitchInput, PulseInput, RadarInput } from './types.ts'

/** Slant ranges over which a radar uses one pulse and one pair of beams. */
export interface RangeSegment {
  /** [fromM, toM). */
  readonly fromM: number
  readonly toM: number
  /** The radar as it is there: its pulse and its beams in the plain fields, without `pulses`, `beams` and `beamSwitch`. */
  readonly radar: RadarInput
  /** Range side lobes of the pulse, dB; null = none counted. */
  readonly rangeSidelobeDb: number | null
  /** Names of the beams, "low" or "low, high" (transmit, receive); '' for the antenna's own. */
  readonly beams: string
}

/**
 * The slant ranges of a radar with several pulses or beams, nearest first; one segment for a plain radar. A range no pulse or no beam pair is
 * stated for has no segment: nothing is received there. Where two overlap the first stated holds.
 */
export function rangeSegments(r: RadarInput): RangeSegment[] {
  const { pulses = [], beams = [], beamSwitch = [], ...plain } = r
  const edges = new Set<number>([0, Number.POSITIVE_INFINITY])
  for (const { fromRangeM, toRangeM } of [...pulses, ...beamSwitch]) for (const edge of [fromRangeM, toRangeM]) edges.add(edge)
  const bounds = [...edges].sort((a, b) => a - b)
  const out: RangeSegment[] = []
  const holds = (x: { fromRangeM: number; toRangeM: number }, at: number) => at >= x.fromRangeM && at < x.toRangeM
  const antennaOf = (name: string): AntennaInput => {
    const { name: _, ...beam } = beams.find((b) => b.name === name) ?? { name }
    return { ...r.antenna, ...beam }
  }
  for (let k = 0; k + 1 < bounds.length; k++) {
    const [fromM, toM] = [bounds[k], bounds[k + 1]]
    const pulse: PulseInput | undefined = pulses.find((p) => holds(p, fromM))
    const pair: BeamSwitchInput | undefined = beamSwitch.find((b) => holds(b, fromM))
    if ((pulses.length > 0 && !pulse) || (beamSwitch.length > 0 && !pair)) continue
    const transmit = pair ? antennaOf(pair.transmit) : r.antenna
    const receive = pair && pair.receive !== pair.transmit ? antennaOf(pair.receive) : null
    out.push({
      fromM,
      toM,
      radar: {
        ...plain,
        ...(pulse
          ? { pulseWidthS: pulse.widthS, compressedPulseWidthS: pulse.compressedWidthS, noiseBandwidthHz: pulse.noiseBandwidthHz }
          : {}),
        antenna: transmit,
        ...(receive ? { receiveAntenna: receive } : {}),
      },
      rangeSidelobeDb: pulse?.rangeSidelobeDb ?? null,
      beams: !pair ? '' : receive ? `${pair.transmit}, ${pair.receive}` : pair.transmit,
    })
  }
  return out
}

/** The segment that holds a slant range, m; null where nothing is received. */
export const segmentAt = (segments: readonly RangeSegment[], slantM: number): RangeSegment | null =>
  segments.find((s) => slantM >= s.fromM && slantM < s.toM) ?? null
