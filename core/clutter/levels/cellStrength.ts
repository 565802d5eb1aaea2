import type { GroundCode } from '../../landcover/index.ts'
import type { SightCells, SiteCells } from '../../masking/index.ts'
import { gateLengthM, type RadarInput } from '../../radar/index.ts'
import type { Site } from '../../terrain/index.ts'
import { RAD_PER_DEG } from '../../units/index.ts'
import { centresOf, electricalCentreM } from '../cells/clutterToNoise.ts'
import { decibel } from '../cells/decibelTable.ts'
import type { ClutterOptions } from '../cells/optionModel.ts'
import { BUILT_IN_LAND_TABLE } from '../land/landTableData.ts'
import { bandOf, CODE_KIND, ownSigma, reliefSlot, strengthTable } from '../land/strengthTable.ts'

/** Where the values of cells go, one per polar cell; null = not wanted. */
export interface CellStrength {
  /** Mean σ°F⁴ at the cell centre, dB; NaN where the cell is masked or unknown, or nothing is assessed. */
  readonly strengthDb: Float32Array | null
  /** Weibull spread a_w at the area of the whole resolution cell; 1 where no ground is in sight or nothing is assessed. */
  readonly spread: Float32Array | null
}

/**
 * Strength and spread of every cell of one option at its centre: the same table, steep ground, urban context and sea as `clutterToNoise`. Spread:
 * of the land row at the full resolution-cell area, 1 for the sea. Throws InputError for a frequency outside 30 MHz to 40 GHz.
 */
export function fillCellStrength(
  s: SiteCells,
  m: SightCells,
  codes: readonly GroundCode[],
  site: Site,
  heightM: number,
  r: RadarInput,
  options: Pick<ClutterOptions, 'landTable' | 'weather'>,
  out: CellStrength,
): void {
  const { azimuths, ranges } = s.grid
  const { landTable = BUILT_IN_LAND_TABLE, weather } = options
  const sea = weather ? { seaState: weather.seaState, polarisation: r.polarisation } : null
  const table = strengthTable(codes, r.frequencyHz, landTable, sea)
  const { edgesRad, bands, sigma, kinds, spreads } = table
  const cells = { code: s.code, relief: s.relief, slopePermille: s.slopePermille, centresM: centresOf(s.grid) }
  const antennaM = electricalCentreM(site, s.siteGroundM, heightM)
  const perRange = r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG * gateLengthM(r)
  // Where the cell's area lies between 10³ and 10⁶ m²; ground range stands for slant range, a_w within 0.01.
  const decades = cells.centresM.map((rangeM) => Math.min(1, Math.max(0, (Math.log10(rangeM * perRange) - 3) / 3)))
  let band = bands >> 1
  for (let i = 0; i < azimuths; i++) {
    const c = 1 / s.effectiveRadiusM[i]
    const from = i * ranges
    for (let j = 0; j < ranges; j++) {
      const at = from + j
      const ground = s.groundM[at]
      if (m.inSight[at] === 0 || s.code[at] === 255 || Number.isNaN(ground)) {
        if (out.strengthDb) out.strengthDb[at] = Number.NaN
        if (out.spread) out.spread[at] = 1
        continue
      }
      const range = cells.centresM[j]
      const depression = (antennaM - ground) / range - 0.5 * range * c
      band = bandOf(edgesRad, depression, band)
      const entry = (s.code[at] * 4 + reliefSlot(s.relief[at])) * bands + band
      if (out.strengthDb) {
        const water = kinds[s.code[at]] & CODE_KIND.water
        const own = depression - (water && weather ? weather.tideM / range : 0)
        out.strengthDb[at] = decibel(sigma[entry] < 0 ? ownSigma(table, cells, from, j, entry, own) : sigma[entry])
      }
      if (out.spread) {
        const row = spreads[entry]
        out.spread[at] = row ? row.spread1e3 + (row.spread1e6 - row.spread1e3) * decades[j] : 1
      }
    }
  }
}
