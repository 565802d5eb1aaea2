import { type GainTable, twoWayGain } from '../../antenna/index.ts'
import type { SightCells, SiteCells } from '../../masking/index.ts'
import { bandOf, CODE_KIND, ownSigma, reliefSlot, type StrengthTable } from '../land/strengthTable.ts'

/**
 * Azimuth × range cells as clutter reads them: the polar grid, or a few rays around one point. Row i holds `centresM.length` cells of equal
 * depth; ground heights NaN where unknown.
 */
export interface CellRows
  extends Pick<SiteCells, 'groundM' | 'code' | 'relief' | 'slopePermille' | 'effectiveRadiusM' | 'siteGroundM'>,
    Pick<SightCells, 'inSight' | 'floorM'> {
  /** Ground range of the cell centres, m, > 0. */
  readonly centresM: Float64Array
}
/** Tables and numbers shared by every row of cells of one option. */
export interface CellModel {
  readonly antennaM: number
  readonly strength: StrengthTable
  /** What suppression leaves of each ground code's clutter, 1/I, ratio. */
  readonly left: Float64Array
  /** Water stands this much above the raster, m. */
  readonly tideM: number
}
/** The pulse and beams a row is worked out for: two-way elevation gain, and the ranges whose cells count as used, m. */
export interface RowUse {
  readonly gain: GainTable
  readonly fromM: number
  readonly toM: number
}
/** Where one row of cells is written; null = not wanted. */
export interface RowSums {
  /** With two-way elevation gain. */
  readonly patterned: Float64Array
  /** The same after suppression. */
  readonly residual: Float64Array | null
  /** Without antenna gain or suppression. */
  readonly plain: Float64Array | null
}

/**
 * Slant range squared, m², by the law of cosines over a sphere of curvature `c` (1/effective radius, 0 = flat); ranges to 1 000 km. The chord
 * of the ground arc is a series, exact to 1e-9 there.
 */
export function slantSquared(antennaM: number, groundM: number, rangeM: number, c: number): number {
  const x = rangeM * c
  const x2 = x * x
  const chord = rangeM * (1 - (x2 / 24) * (1 - x2 / 80))
  const d = antennaM - groundM
  return d * d + (1 + antennaM * c) * (1 + groundM * c) * chord * chord
}

/** Tangent of elevation at the antenna toward a height at a ground range; the same sphere and range. */
export function elevationTangent(antennaM: number, heightM: number, rangeM: number, c: number): number {
  const x = rangeM * c
  const x2 = x * x
  const tanHalf = (x / 2) * (1 + (x2 / 12) * (1 + x2 / 10))
  const sine = rangeM * (1 - (x2 / 6) * (1 - x2 / 20))
  return (heightM - antennaM) / ((1 + heightM * c) * sine) - tanHalf
}

/**
 * Clutter of cells [first, end) of row i per metre of gate and radian of azimuth: σ°F⁴ × share in sight × slant range × sec ψ, ψ the depression at the
 * ground, m. Adds the ground in sight that took each entry of the strength table to `use` (in proportion to area).
 */
export function cellClutter(
  model: CellModel,
  { gain, fromM, toM }: RowUse,
  cells: CellRows,
  i: number,
  out: RowSums,
  use: Float64Array,
  first = 0,
  end = cells.centresM.length,
): void {
  const { antennaM, strength, left, tideM } = model
  const { edgesRad, bands, sigma, kinds } = strength
  const { groundM, code, relief, inSight, centresM } = cells
  const { patterned, residual, plain } = out
  const ranges = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  const from = i * ranges
  let band = bands >> 1
  for (let j = first; j < end; j++) {
    const at = from + j
    const seen = inSight[at]
    let ground = groundM[at]
    if (seen === 0 || code[at] === 255 || Number.isNaN(ground)) {
      patterned[j] = 0
      if (residual) residual[j] = 0
      if (plain) plain[j] = 0
      continue
    }
    const r = centresM[j]
    let depression = (antennaM - ground) / r - 0.5 * r * c
    band = bandOf(edgesRad, depression, band)
    const entry = (code[at] * 4 + reliefSlot(relief[at])) * bands + band
    if (r >= fromM && r < toM) use[entry] += r * seen
    let mean = sigma[entry]
    if (mean < 0) {
      if (kinds[code[at]] & CODE_KIND.water) {
        ground += tideM
        depression -= tideM / r
      }
      mean = ownSigma(strength, cells, from, j, entry, depression)
    }
    const slant = Math.sqrt(slantSquared(antennaM, ground, r, c) * (1 + depression * depression))
    const value = mean * seen * (1 / 65535) * slant
    const gained = value === 0 ? 0 : value * twoWayGain(gain, elevationTangent(antennaM, ground, r, c))
    patterned[j] = gained
    if (residual) residual[j] = gained * left[code[at]]
    if (plain) plain[j] = value
  }
}

/**
 * Weights of neighbouring range cells in one gate, m: their overlap with a gate centred on the middle cell. They sum to the gate; a gate
 * shorter than a cell leaves the cell the mean of its gates.
 */
export function gateWeights(gateM: number, rangeStepM: number): Float64Array {
  const half = Math.max(0, Math.ceil(gateM / (2 * rangeStepM) - 0.5 - 1e-9))
  const weights = new Float64Array(2 * half + 1)
  if (half === 0) weights[0] = gateM
  else
    for (let k = -half; k <= half; k++)
      weights[k + half] = Math.max(0, Math.min(gateM / 2, (k + 0.5) * rangeStepM) - Math.max(-gateM / 2, (k - 0.5) * rangeStepM))
  return weights
}

/** Sums of a row over the gate around cells [first, end). Where the gate leaves the row, the part inside stands for all of it. */
export function gateSums(row: Float64Array, weights: Float64Array, out: Float64Array, first = 0, end = row.length): void {
  const n = row.length
  const half = weights.length >> 1
  const whole = weights.reduce((s, w) => s + w, 0)
  for (let j = first; j < end; j++) {
    const lo = Math.max(-half, -j)
    const hi = Math.min(half, n - 1 - j)
    let sum = 0
    for (let k = lo; k <= hi; k++) sum += weights[k + half] * row[j + k]
    if (hi - lo < 2 * half) {
      let inside = 0
      for (let k = lo; k <= hi; k++) inside += weights[k + half]
      sum *= whole / inside
    }
    out[j] = sum
  }
}
