import type { RadarInput } from './types.ts'

/**
 * Attenuation ahead of the first noise by short-range sensitivity (STC), dB >= 0, at a slant range in metres. It lowers echo and clutter, not
 * noise. A curve is linear in dB between its points, holds its first value inward and is 0 beyond the last; `rtoFourth` undoes R⁴ inside
 * its corner, up to `maxDb`.
 */
export function stcDb(r: RadarInput, slantRangeM: number): number {
  const { stc } = r
  if (stc.kind === 'rtoFourth')
    return slantRangeM >= stc.cornerM ? 0 : Math.min(stc.maxDb, 40 * Math.log10(stc.cornerM / Math.max(slantRangeM, 1)))
  const points = stc.kind === 'curve' ? stc.curve : []
  const last = points.length - 1
  if (last < 0 || slantRangeM > points[last][0]) return 0
  if (slantRangeM <= points[0][0]) return points[0][1]
  const i = points.findIndex(([rangeM]) => slantRangeM <= rangeM)
  const [r0, d0] = points[i - 1]
  const [r1, d1] = points[i]
  return d0 + ((d1 - d0) * (slantRangeM - r0)) / (r1 - r0)
}
