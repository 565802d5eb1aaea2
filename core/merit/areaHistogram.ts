/** Areas sorted into bins of a quantity: percentiles by area without keeping or sorting the cells. */
export interface AreaHistogram {
  readonly low: number
  readonly step: number
  readonly areas: Float64Array
  total: number
}

export function areaHistogram(low: number, high: number, step: number): AreaHistogram {
  return { low, step, areas: new Float64Array(Math.ceil((high - low) / step) + 1), total: 0 }
}

/** Adds one cell; values beyond the ends go to the end bins. */
export function addArea(h: AreaHistogram, value: number, area: number): void {
  const last = h.areas.length - 1
  const bin = Math.floor((value - h.low) / h.step)
  h.areas[bin < 0 ? 0 : bin > last ? last : bin] += area
  h.total += area
}

/**
 * Value that `share` (0…1) of the area lies at or below, given as the bin's upper edge when `safe` is 'up' and its lower edge when 'down'.
 * null when the histogram is empty.
 */
export function areaPercentile(h: AreaHistogram, share: number, safe: 'up' | 'down'): number | null {
  if (!(h.total > 0)) return null
  const wanted = share * h.total
  let sum = 0
  let bin = 0
  for (; bin < h.areas.length; bin++) {
    sum += h.areas[bin]
    if (sum >= wanted - 1e-9 * h.total) break
  }
  const lower = h.low + Math.min(bin, h.areas.length - 1) * h.step
  return safe === 'up' ? lower + h.step : lower
}
