import { quantity } from './limits.ts'
import type { RadarDoc } from './types.ts'

type Say = (path: string, code: string, found: string, remedy: string) => void
const m = (value: number) => quantity(value, 'm')

/** Shortest gate of a radar's pulses, as the compressed pulse width, s. */
export const shortestPulseS = (r: RadarDoc): number =>
  r.pulses && r.pulses.length > 0
    ? Math.min(...r.pulses.map((p) => p.compressedWidthS ?? p.widthS))
    : (r.compressedPulseWidthS ?? r.pulseWidthS)

/** Several pulses by range and stacked beams: filters that fit, ranges that rise and do not overlap, beams that exist. */
export function checkPulses(r: RadarDoc, say: Say): void {
  r.pulses?.forEach((p, i) => {
    const compressed = p.compressedWidthS ?? p.widthS
    if (compressed > p.widthS * (1 + 1e-9))
      say(
        `radar.pulses[${i}].compressedWidthS`,
        'pulse',
        `compressed pulse ${quantity(compressed, 's')} is longer than the pulse ${quantity(p.widthS, 's')}`,
        'give a compressed width up to the width of the pulse',
      )
    const product = (p.noiseBandwidthHz ?? 1 / compressed) * compressed
    if (product < 0.5 || product > 2)
      say(
        `radar.pulses[${i}].noiseBandwidthHz`,
        'bandwidth',
        `noise bandwidth times compressed pulse width is ${quantity(product, '')}, outside 0.5 to 2`,
        `give the bandwidth of the filter for the compressed pulse, about ${quantity(1 / compressed, 'Hz')}`,
      )
  })
  checkRanges('radar.pulses', r.pulses ?? [], say)
  checkRanges('radar.beamSwitch', r.beamSwitch ?? [], say)
  const names = (r.beams ?? []).map((b) => b.name)
  names.forEach((name, i) => {
    if (names.indexOf(name) < i) say(`radar.beams[${i}].name`, 'twice', `beam "${name}" is listed twice`, 'give every beam its own name')
  })
  r.beamSwitch?.forEach((s, i) => {
    for (const key of ['transmit', 'receive'] as const)
      if (!names.includes(s[key]))
        say(
          `radar.beamSwitch[${i}].${key}`,
          'beam',
          `beam "${s[key]}" is not in radar.beams`,
          names.length > 0 ? `use ${names.slice(0, 4).join(' or ')}` : 'describe the beam in radar.beams',
        )
  })
  if (r.beams && r.beams.length > 0 && !r.beamSwitch?.length)
    say(
      'radar.beamSwitch',
      'missing',
      'beams without the ranges they are used at',
      'give rows of fromRangeM, toRangeM, transmit and receive',
    )
}

function checkRanges(path: string, list: readonly { fromRangeM: number; toRangeM: number }[], say: Say): void {
  list.forEach(({ fromRangeM, toRangeM }, i) => {
    if (toRangeM <= fromRangeM)
      say(
        `${path}[${i}].toRangeM`,
        'order',
        `range ends at ${m(toRangeM)}, not beyond its start at ${m(fromRangeM)}`,
        'give a toRangeM above fromRangeM',
      )
    const k = list.findIndex((o, n) => n < i && fromRangeM < o.toRangeM && toRangeM > o.fromRangeM)
    if (k >= 0)
      say(
        `${path}[${i}].fromRangeM`,
        'overlap',
        `slant ranges of entry ${k} and ${i} overlap at ${m(Math.max(fromRangeM, list[k]!.fromRangeM))}`,
        'end one where the other starts: one pulse and one pair of beams per range',
      )
  })
}
