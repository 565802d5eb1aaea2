import { compressionGainDb, noiseDbw } from '../../radar/index.ts'
import { fromDb, toDb, wavelengthM } from '../../units/index.ts'
import type { LandTable } from '../land/landTable.ts'
import type { ModelMark } from '../types.ts'
import type { Segment } from './segment.ts'

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
  readonly rowName: string | null
  readonly rcsDbsm: number | null
  readonly groundCnrDb: number | null
  readonly rainCnrDb: number | null
  readonly discreteCnrDb: number | null
  readonly rangeLobeCnrDb: number | null
  readonly sideLobeCnrDb: number | null
  readonly foldedCnrDb: number | null
  readonly gasDb: number
  readonly rainDb: number
  readonly cellAreaM2: number
  readonly shareInSight: number
}
const RADAR_EQUATION = ['radar equation', 'Skolnik, Introduction to Radar Systems'] as const
const CELL_AREA = ['resolution cell', 'A = R·θaz·cτc/2·sec ψ'] as const

/** The factors of `clutter_rcs_dbsm` and `clutter_to_noise_db`, each with model and source. */
export function clutterLines(n: Numbers, { radar: r, beams }: Segment, table: LandTable): ClutterLine[] {
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
    const sea = n.rowName === 'sea'
    const model = sea ? SEA : (['low-angle land clutter', table.source] as const)
    const strengthDb = n.rcsDbsm - areaDb - shareDb
    put(rcs, 'start', 'mean_strength', 'Mean strength σ°F⁴ of the ground in sight', strengthDb, 'dB', model, sea ? '' : table.mark)
    put(rcs, 'add', 'cell_area', 'Area of the whole resolution cell', areaDb, 'dB m²', CELL_AREA)
    put(rcs, 'add', 'share_in_sight', 'Share of the cell in sight', shareDb, 'dB', ['sight', 'terrain crossings'])
  }
  let soFarDb: number | null = null
  if (n.groundCnrDb !== null && n.rcsDbsm !== null) {
    const gainDb = r.antenna.gainDbi + (r.receiveAntenna ?? r.antenna).gainDbi
    const terms: [ClutterLine['op'], string, string, number, string, readonly [string, string]][] = [
      ['start', 'peak_power', 'Peak power', toDb(r.peakPowerW), 'dBW', RADAR_EQUATION],
      ['add', 'antenna_gain', beams ? `Antenna gain, beams ${beams}` : 'Antenna gain, both ways', gainDb, 'dB', RADAR_EQUATION],
      ['add', 'wavelength', 'Wavelength squared', 20 * Math.log10(wavelengthM(r.frequencyHz)), 'dB m²', RADAR_EQUATION],
      ['add', 'compression', 'Pulse compression τ/τc', compressionGainDb(r), 'dB', RADAR_EQUATION],
      ['add', 'clutter_rcs', 'Clutter RCS', n.rcsDbsm, 'dBsm', RADAR_EQUATION],
      ['subtract', 'spreading', '(4π)³', 30 * Math.log10(4 * Math.PI), 'dB', RADAR_EQUATION],
      ['subtract', 'slant_range', 'Slant range to the fourth power', 40 * Math.log10(n.slantRangeM), 'dB m⁴', RADAR_EQUATION],
      ['subtract', 'noise', 'Receiver noise kT₀BFn', noiseDbw(r), 'dBW', RADAR_EQUATION],
      ['subtract', 'system_loss', 'System losses', r.systemLossDb, 'dB', RADAR_EQUATION],
    ]
    if (n.gasDb > 0) terms.push(['subtract', 'gas_loss', 'Gas loss, both ways', n.gasDb, 'dB', GAS])
    if (n.rainDb > 0) terms.push(['subtract', 'rain_loss', 'Rain loss, both ways', n.rainDb, 'dB', RAIN_LOSS])
    for (const [op, key, label, value, unit, model] of terms) put(cnr, op, key, label, value, unit, model)
    const sum = terms.reduce((s, [op, , , value]) => s + (op === 'subtract' ? -value : value), 0)
    const label = 'Elevation pattern, both ways, mean over the cell'
    put(cnr, 'add', 'elevation_gain', label, n.groundCnrDb - sum, 'dB', ['elevation pattern', 'cell centres, side-lobe floor'])
    soFarDb = n.groundCnrDb
  }
  const others: [string, string, number | null, readonly [string, string]][] = [
    ['rain', 'Rain in the beam and gate', n.rainCnrDb, RAIN],
    ['range_side_lobes', 'Range side lobes of the pulse', n.rangeLobeCnrDb, RANGE_LOBES],
    ['discretes', 'Discrete echoes of obstacles', n.discreteCnrDb, DISCRETES],
    ['side_lobes', 'Azimuth side lobes all round', n.sideLobeCnrDb, SIDE_LOBES],
    ['folded', 'Second-time-around clutter', n.foldedCnrDb, FOLDED],
  ]
  for (const [key, label, db, model] of others) {
    if (db === null) continue
    const total: number = soFarDb === null ? db : toDb(fromDb(soFarDb) + fromDb(db))
    put(cnr, soFarDb === null ? 'start' : 'add', key, label, soFarDb === null ? db : total - soFarDb, 'dB', model)
    put(cnr, 'info', `${key}_alone`, `${label}: alone`, db, 'dB', model)
    soFarDb = total
  }
  return lines
}
const SIDE_LOBES = ['side-lobe term', 'ring mean × two-way level × 360°/θaz'] as const
const FOLDED = ['range ambiguity', 'sum over R + n·c/2f, strength and gain of the true place'] as const
const RANGE_LOBES = ['range side lobes', 'level × sum of the gates within the pulse'] as const
const DISCRETES = ['discrete echo', 'stated RCS through pattern and gate'] as const
const RAIN = ['rain clutter', 'Marshall and Palmer (1948), Rayleigh scattering, beam after Probert-Jones (1962)'] as const
const SEA = ['sea clutter', 'Gregers-Hansen and Mital, NRL/MR/5310--12-9346 (2012)'] as const
const GAS = ['gas loss', 'ITU-R P.676-12'] as const
const RAIN_LOSS = ['rain loss', 'ITU-R P.838-3'] as const
