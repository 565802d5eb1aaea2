import { compressionGainDb, noiseDbw, type RadarInput } from '../../radar/index.ts'
import { toDb, wavelengthM } from '../../units/index.ts'
import type { LandTable } from '../land/landTable.ts'
import type { ModelMark } from '../types.ts'

/** One factor of a clutter figure; start, add and subtract lines of one result (`of`) give it. */
export interface ClutterLine {
  readonly key: string
  readonly label: string
  readonly value: number
  readonly unit: string
  readonly op: 'start' | 'add' | 'subtract' | 'info'
  readonly model: string
  readonly source: string
  readonly mark: ModelMark | ''
  readonly of: string
}
interface Numbers {
  readonly slantRangeM: number
  readonly rcsDbsm: number | null
  readonly cnrDb: number | null
  readonly mainCnrDb: number | null
  readonly sideLobeCnrDb: number | null
  readonly cellAreaM2: number
  readonly shareInSight: number
}
const RADAR_EQUATION = ['radar equation', 'Skolnik, Introduction to Radar Systems'] as const
const CELL_AREA = ['resolution cell', 'A = R·θaz·cτc/2·sec ψ'] as const

/** The factors of `clutter_rcs_dbsm` and `clutter_to_noise_db`, each with model and source. */
export function clutterLines(n: Numbers, r: RadarInput, table: LandTable): ClutterLine[] {
  const lines: ClutterLine[] = []
  const put = (
    of: string,
    op: ClutterLine['op'],
    key: string,
    label: string,
    value: number,
    unit: string,
    [model, source]: readonly [string, string],
    mark: ClutterLine['mark'] = '',
  ) => lines.push({ key, label, value, unit, op, model, source, mark, of })
  const rcs = 'clutter_rcs_dbsm'
  const cnr = 'clutter_to_noise_db'
  if (n.rcsDbsm !== null) {
    const areaDb = toDb(n.cellAreaM2)
    const shareDb = toDb(n.shareInSight)
    const land = ['low-angle land clutter', table.source] as const
    put(rcs, 'start', 'mean_strength', 'Mean strength σ°F⁴ of the ground in sight', n.rcsDbsm - areaDb - shareDb, 'dB', land, table.mark)
    put(rcs, 'add', 'cell_area', 'Area of the whole resolution cell', areaDb, 'dB m²', CELL_AREA)
    put(rcs, 'add', 'share_in_sight', 'Share of the cell in sight', shareDb, 'dB', ['sight', 'terrain crossings'])
  }
  if (n.mainCnrDb !== null && n.rcsDbsm !== null) {
    const terms: [ClutterLine['op'], string, string, number, string][] = [
      ['start', 'peak_power', 'Peak power', toDb(r.peakPowerW), 'dBW'],
      ['add', 'antenna_gain', 'Antenna gain, both ways', 2 * r.antenna.gainDbi, 'dB'],
      ['add', 'wavelength', 'Wavelength squared', 20 * Math.log10(wavelengthM(r.frequencyHz)), 'dB m²'],
      ['add', 'compression', 'Pulse compression τ/τc', compressionGainDb(r), 'dB'],
      ['add', 'clutter_rcs', 'Clutter RCS', n.rcsDbsm, 'dBsm'],
      ['subtract', 'spreading', '(4π)³', 30 * Math.log10(4 * Math.PI), 'dB'],
      ['subtract', 'slant_range', 'Slant range to the fourth power', 40 * Math.log10(n.slantRangeM), 'dB m⁴'],
      ['subtract', 'noise', 'Receiver noise kT₀BFn', noiseDbw(r), 'dBW'],
      ['subtract', 'system_loss', 'System losses', r.systemLossDb, 'dB'],
    ]
    for (const [op, key, label, value, unit] of terms) put(cnr, op, key, label, value, unit, RADAR_EQUATION)
    const soFar = terms.reduce((sum, [op, , , value]) => sum + (op === 'subtract' ? -value : value), 0)
    put(cnr, 'add', 'elevation_gain', 'Elevation pattern, both ways, mean over the cell', n.mainCnrDb - soFar, 'dB', [
      'elevation pattern',
      'cell centres, side-lobe floor',
    ])
    if (n.cnrDb !== null) put(cnr, 'add', 'side_lobes', 'Azimuth side lobes all round', n.cnrDb - n.mainCnrDb, 'dB', SIDE_LOBES)
  } else if (n.sideLobeCnrDb !== null) put(cnr, 'start', 'side_lobes', 'Azimuth side lobes all round', n.sideLobeCnrDb, 'dB', SIDE_LOBES)
  if (n.sideLobeCnrDb !== null) put(cnr, 'info', 'side_lobe_level', 'Side-lobe term alone', n.sideLobeCnrDb, 'dB', SIDE_LOBES)
  return lines
}
const SIDE_LOBES = ['side-lobe term', 'ring mean × two-way level × 360°/θaz'] as const
