/** Areas sorted into bins of a quantity: percentiles by area without keeping or sorting the cells. */
export interface AreaHistogram {
  readonly low: number
  readonly step: number
  readonly perStep: number
  readonly last: number
  readonly areas: Float64Array
}

export function areaHistogram(low: number, high: number, step: number): AreaHistogram {
  const areas = new Float64Array(Math.ceil((high - low) / step) + 1)
  return { low, step, perStep: 1 / step, last: areas.length - 1, areas }
}

/** Adds one cell; values beyond the ends go to the end bins. */
export function addArea(h: AreaHistogram, value: number, area: number): void {
  h.areas[Math.min(h.last, Math.max(0, (value - h.low) * h.perStep)) | 0] += area
}

/**
 * Value that `share` (0…1) of the area lies at or below, given as the bin's upper edge when `safe` is 'up' and its lower edge when 'down'.
 * null when the histogram is empty.
 */
export function areaPercentile(h: AreaHistogram, share: number, safe: 'up' | 'down'): number | null {
  const total = h.areas.reduce((s, area) => s + area, 0)
  if (!(total > 0)) return null
  const wanted = share * total
  let sum = 0
  let bin = 0
  for (; bin < h.areas.length; bin++) {
    sum += h.areas[bin]
    if (sum >= wanted - 1e-9 * total) break
  }
  const lower = h.low + Math.min(bin, h.last) * h.step
  return safe === 'up' ? lower + h.step : lower
}
