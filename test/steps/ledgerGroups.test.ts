import { describe, expect, test } from 'vitest'
import { ledgerGroups } from '../../app/steps/panes/ledgerGroups.ts'
import { textOf } from '../../app/words/index.ts'
import type { CellLedger, LedgerLine } from '../../core/index.ts'

const line = (
  key: string,
  value: number | string,
  unit: string,
  op: LedgerLine['op'],
  of?: string,
  model = 'Model',
  source = '',
): LedgerLine => ({
  key,
  label: key,
  value,
  unit,
  op,
  model,
  source,
  mark: '',
  ...(of === undefined ? {} : { of }),
})
const ledger: CellLedger = {
  at: { lon: 0, lat: 0, azimuthDeg: 10, rangeM: 18_520 },
  option: { candidate: 'A', heightM: 20, tiltDeg: 0 },
  lines: [
    line('azimuth', 10, 'deg', 'info'),
    line('ground_range', 18_520, 'm', 'info'),
    line('mast_height', 20, 'm', 'info'),
    line('electrical_centre', 304.8, 'm', 'start', 'coverage_floor_m', 'Ray'),
    line('ray_rise', 30.48, 'm', 'add', 'coverage_floor_m', 'Ray'),
    line('peak_power', 60, 'dBW', 'start', 'clutter_to_noise_db', 'radar equation', 'book'),
    line('noise', -20.5, 'dBW', 'subtract', 'clutter_to_noise_db', 'radar equation', 'book'),
    line('side_lobes', 0.25, 'dB', 'add', 'clutter_to_noise_db', 'side-lobe term'),
    { ...line('n1_target_height', 609.6, 'm', 'start', 'need_n1_height_margin_m', 'Ray'), label: 'Low: target, MSL' },
  ],
  results: { coverage_floor_m: 335.28, clutter_to_noise_db: 80.75, need_n1_height_margin_m: 274.32, height_to_see_m: 12.3 },
}
const groups = ledgerGroups(ledger, [{ id: 'n1', name: 'Low' }], 'nautical')
const named = (name: string) => groups.find((g) => g.name === name)!

describe('ledger of a cell', () => {
  test('results come first, C/N before the rest, the place last', () => {
    expect(groups.map((g) => g.name)).toEqual(['C/N', 'Coverage floor, MSL', 'Low: height margin', 'Height to see, mast', 'Place'])
  })
  test('the total is the sum of the lines under it', () => {
    const g = named('C/N')
    const sum = g.rows.reduce((s, r) => s + (r.sign === '−' ? -1 : 1) * Number(r.value.value.replace(/[()]/g, '').replace('−', '-')), 0)
    expect(Number(g.total?.value)).toBeCloseTo(sum, 2)
    expect(g.rows[1]?.value.value).toBe('(−20.50)')
    expect(g.onMap).toBe('81\u202fdB')
  })
  test('model and source stand once, at a line only where they differ', () => {
    expect(named('C/N').origin).toBe('radar equation · book')
    expect(named('C/N').rows.map((r) => r.origin)).toEqual(['', '', 'side-lobe term'])
  })
  test('units follow the switch; mast heights stay in metres, angles carry the sign', () => {
    expect(textOf(named('Coverage floor, MSL').total!)).toBe('1\u202f100.0\u202fft')
    expect(named('Place').rows.map((r) => textOf(r.value))).toEqual(['010.0°', '10.00\u202fNM', '20\u202fm'])
    const metric = ledgerGroups(ledger, [], 'metric').find((g) => g.name === 'Place')!
    expect(textOf(metric.rows[1]!.value)).toBe('18.52\u202fkm')
  })
  test('a line of a need is told without the name of the need again', () => {
    expect(named('Low: height margin').rows[0]?.label).toBe('Target, MSL')
  })
})

describe('values that are none', () => {
  const masked: CellLedger = {
    at: { lon: 0, lat: 0, azimuthDeg: 10, rangeM: 18_520 },
    option: { candidate: 'A', heightM: 20, tiltDeg: 0 },
    lines: [
      line('in_sight', 'no', '', 'info'),
      line('controlling', 'Harl Edge', '', 'info'),
      line('table_row', 'sea', '', 'info'),
      { ...line('spread', 0, '', 'info'), value: null },
      { ...line('side_lobes', -2.6, 'dB', 'start', 'clutter_to_noise_db'), label: 'Azimuth side lobes all round' },
      { ...line('side_lobes_alone', -2.6, 'dB', 'info', 'clutter_to_noise_db'), label: 'Azimuth side lobes all round: alone' },
      { ...line('folded', 3, 'dB', 'add', 'clutter_to_noise_db'), label: 'Second-time-around clutter' },
      { ...line('folded_alone', -2.6, 'dB', 'info', 'clutter_to_noise_db'), label: 'Second-time-around clutter: alone' },
    ],
    results: {
      clutter_to_noise_db: 0.4,
      clutter_strength_db: null,
      need_n1_residue_to_noise_db: null,
      need_n1_suppression_needed_db: null,
    },
  }
  const of = (ledger: CellLedger, name: string) => ledgerGroups(ledger, [{ id: 'n1', name: 'Low' }], 'metric').find((g) => g.name === name)
  test('say why in words', () => {
    expect(of(masked, 'Clutter strength σ°F⁴')?.total).toEqual({ value: 'water, masked', unit: '' })
    expect(of(masked, 'Low: residue over noise')?.total?.value).toBe('no clutter in its cell')
    expect(of(masked, 'Low: suppression needed')?.total?.value).toBe('too weak for any suppression')
    expect(of(masked, 'Place')?.rows.find((r) => r.key === 'spread')?.value.value).toBe('water, masked')
    const swap = (key: string, value: string): CellLedger => ({
      ...masked,
      lines: masked.lines.map((l) => (l.key === key ? { ...l, value } : l)),
    })
    expect(of(swap('controlling', 'terrain'), 'Clutter strength σ°F⁴')?.total?.value).toBe('water, below the horizon')
    expect(of(swap('table_row', 'forest low relief'), 'Clutter strength σ°F⁴')?.total?.value).toBe('masked')
    expect(of(swap('in_sight', 'unknown'), 'Clutter strength σ°F⁴')?.total?.value).toBe('unknown ground')
  })
  test('a part is named once; what it is by itself follows only where something stood before it', () => {
    expect(of(masked, 'C/N')?.rows.map((r) => r.label)).toEqual(['Azimuth side lobes all round', 'Second-time-around clutter', 'By itself'])
  })
})
