import type { RadarDoc } from '../types.ts'
import { type Basis, filled, type RadarTemplate, type TemplateValue } from './types.ts'

/**
 * Generic radars by band and role. Where a source gives a range the middle of it is taken, rounded (the geometric middle for power and pulse
 * width), and the range stands in the origin.
 */

type Row = readonly [path: string, value: unknown, range?: string]
const from = (basis: Basis, source: string, rows: readonly Row[]): TemplateValue[] =>
  rows.map(([path, value, range]) => ({ path, value, basis, source: range === undefined ? source : `${source}: ${range}` }))

const M1464_AB = 'ITU-R M.1464, radars A and B'
const M1464_C = 'ITU-R M.1464, radar C'
const M1463_1 = 'ITU-R M.1463, system 1'
const M1463_23 = 'ITU-R M.1463, systems 2 and 3'
const TERMINAL_STUDY = 'DTIC ADA072691, terminal radar study'
const WEATHER_BOOK = 'US National Research Council 2005, p. 173'
const WEATHER_PAGE = 'NOAA Radar Operations Center, radar data'
const M1849 = 'ITU-R M.1849'
const M1849_M1796 = 'ITU-R M.1849 and M.1796'
const MARINE = 'marine radar ranges; ITU-R M.1313 leaves vessel traffic radars out'
const INLAND_RULE = 'inland navigation radar rule, art. 4.08'
const SURFACE = 'ITU-R M.1730 and M.1796'
const OFCOM = 'Ofcom primary-radar study'
const BIRD_SET = 'published bird monitoring set'
const OPEN_WORK = 'open literature on drone radars'

const NAMED = (id: string, name: string, values: readonly TemplateValue[]): RadarTemplate => ({ id, name, values })

/** Blind range of an 89 µs pulse, m: the short pulse looks up to here. */
const BLIND_89_US_M = 13_340
const LONGEST_RANGE_M = 111_120

export const RADAR_TEMPLATES: readonly RadarTemplate[] = [
  NAMED(
    'T1',
    'Terminal, S band, klystron',
    from('from memory', M1464_AB, [
      ['frequencyHz', 2.8e9, '2 700 to 2 900 MHz'],
      ['peakPowerW', 1_360_000, '1 320 to 1 400 kW'],
      ['pulseWidthS', 1.03e-6, '0.6 or 1.03 µs'],
      ['prfHz', [1100], '973 to 1 172 Hz'],
      ['coherentTransmitter', true, 'klystron'],
      ['antenna.gainDbi', 33.5],
      ['antenna.azimuthBeamwidthDeg', 1.3],
      ['antenna.elevationBeamwidthDeg', 4.8],
      ['antenna.elevationPattern', 'cosecant-squared'],
      ['antenna.cosecantLimitDeg', 30],
      ['noiseFigureDb', 4],
      ['rotationRpm', 12.5],
    ]),
  ),
  NAMED('T2', 'Terminal, S band, solid state', [
    ...from('from memory', M1464_C, [
      ['frequencyHz', 2.8e9, '2 700 to 2 900 MHz'],
      ['peakPowerW', 25_000],
      ['pulseWidthS', 89e-6, '1 and 89 µs'],
      ['prfHz', [900], '722 to 1 050 Hz'],
      ['coherentTransmitter', true, 'solid state'],
      ['antenna.gainDbi', 34],
      ['antenna.azimuthBeamwidthDeg', 1.45],
      ['antenna.elevationBeamwidthDeg', 4.8],
      ['antenna.elevationPattern', 'cosecant-squared'],
      ['noiseFigureDb', 3.3],
      ['rotationRpm', 12.5],
    ]),
    ...from('chosen here', 'the gate of the short pulse holds for both', [
      ['compressedPulseWidthS', 1e-6],
      [
        'pulses',
        [
          { widthS: 1e-6, compressedWidthS: 1e-6, fromRangeM: 0, toRangeM: BLIND_89_US_M },
          { widthS: 89e-6, compressedWidthS: 1e-6, fromRangeM: BLIND_89_US_M, toRangeM: LONGEST_RANGE_M },
        ],
        'the long pulse from its blind range on',
      ],
    ]),
    ...from('chosen here', '60 NM', [['instrumentedRangeM', LONGEST_RANGE_M]]),
  ]),
  NAMED(
    'T3',
    'Terminal, L band (no power, no gain given)',
    from('read', TERMINAL_STUDY, [
      ['frequencyHz', 1.3e9, '1 250 to 1 350 MHz'],
      ['pulseWidthS', 1e-6],
      ['prfHz', [1200], '1 100 to 1 360 Hz'],
      ['antenna.azimuthBeamwidthDeg', 2.25],
      ['antenna.elevationPattern', 'cosecant-squared', 'cover from 0.3 to 30°'],
      ['antenna.cosecantLimitDeg', 30, 'cover from 0.3 to 30°'],
      ['rotationRpm', 15],
    ]),
  ),
  NAMED('E1', 'En-route, L band, tube', [
    ...from('from memory', M1463_1, [
      ['frequencyHz', 1.3e9, '1 215 to 1 400 MHz'],
      ['peakPowerW', 5_000_000],
      ['pulseWidthS', 2e-6],
      ['prfHz', [340], '310 to 380 Hz'],
      ['antenna.gainDbi', 34.5],
      ['antenna.azimuthBeamwidthDeg', 1.2],
      ['antenna.elevationBeamwidthDeg', 3.6, 'beam of 3.6°, cosecant-squared to 44°'],
      ['antenna.elevationPattern', 'cosecant-squared', 'beam of 3.6°, cosecant-squared to 44°'],
      ['antenna.cosecantLimitDeg', 44, 'beam of 3.6°, cosecant-squared to 44°'],
      ['noiseFigureDb', 2],
      ['rotationRpm', 5],
    ]),
    ...from('read', OFCOM, [['instrumentedRangeM', 296_320, 'over 80, typically 160 NM']]),
  ]),
  NAMED('E2', 'En-route, L band, solid state', [
    ...from('from memory', M1463_23, [
      ['frequencyHz', 1.3e9, '1 215 to 1 400 MHz'],
      ['peakPowerW', 80_000, '60 to 100 kW'],
      ['pulseWidthS', 90e-6, '60 and 90 µs'],
      ['prfHz', [380], '200 to 554 Hz'],
      ['coherentTransmitter', true, 'solid state'],
      ['antenna.gainDbi', 37, '35 to 39 dBi'],
      ['antenna.azimuthBeamwidthDeg', 2.3, '1.4 to 3.2°'],
      ['noiseFigureDb', 3],
      ['rotationRpm', 5.5, '5 to 6 rpm'],
    ]),
    ...from('chosen here', 'the gate of a 2 µs pulse', [['compressedPulseWidthS', 2e-6]]),
    ...from('chosen here', 'one fan in place of the stacked beams', [
      ['antenna.elevationPattern', 'cosecant-squared'],
      ['antenna.elevationBeamwidthDeg', 3.6],
    ]),
    ...from('read', OFCOM, [['instrumentedRangeM', 296_320, 'over 80, typically 160 NM']]),
  ]),
  NAMED('W1', 'Weather, S band', [
    ...from('read', WEATHER_BOOK, [
      ['frequencyHz', 2.85e9, '2 700 to 3 000 MHz'],
      ['peakPowerW', 750_000],
      ['prfHz', [1000], '322 to 1 282 Hz with the short pulse'],
      ['antenna.azimuthBeamwidthDeg', 0.95],
      ['antenna.elevationBeamwidthDeg', 0.95],
      ['noiseBandwidthHz', 630_000],
    ]),
    ...from('read', WEATHER_PAGE, [
      ['suppression.kind', 'stated'],
      ['suppression.statedDb', 30, '30 to 50 dB; the lower is taken'],
    ]),
    ...from('from memory', WEATHER_BOOK, [
      ['pulseWidthS', 1.57e-6],
      ['antenna.gainDbi', 45.5],
      ['rotationRpm', 3, 'about 3 rpm'],
    ]),
    ...from('worked out', '10 log₁₀(450 K / 290 K), the system temperature read', [['noiseFigureDb', 1.9]]),
  ]),
  NAMED(
    'W2',
    'Weather, C band',
    from('from memory', M1849, [
      ['frequencyHz', 5.5e9, '5 250 to 5 725 MHz'],
      ['peakPowerW', 250_000],
      ['pulseWidthS', 1e-6, '0.5 to 2 µs'],
      ['prfHz', [700], '250 to 1 200 Hz'],
      ['antenna.gainDbi', 44.5, '44 to 45 dBi'],
      ['antenna.azimuthBeamwidthDeg', 1],
      ['antenna.elevationBeamwidthDeg', 1],
      ['noiseFigureDb', 2.5, '2 to 3 dB'],
      ['rotationRpm', 4.5, '3 to 6 rpm'],
    ]),
  ),
  NAMED('W3', 'Weather, X band, gap filler', [
    ...from('from memory', M1849_M1796, [
      ['frequencyHz', 9.4e9, '9 300 to 9 500 MHz'],
      ['peakPowerW', 2000, '0.1 to 50 kW'],
      ['pulseWidthS', 6e-6, '1 to 40 µs'],
      ['prfHz', [1250], '500 to 2 000 Hz'],
      ['antenna.gainDbi', 41.5, '40 to 43 dBi'],
      ['antenna.azimuthBeamwidthDeg', 1.25, '1.0 to 1.5°'],
      ['antenna.elevationBeamwidthDeg', 1.25, '1.0 to 1.5°'],
      ['noiseFigureDb', 4, '3 to 5 dB'],
      ['rotationRpm', 9, '6 to 12 rpm'],
    ]),
    ...from('chosen here', 'a gate of 150 m', [['compressedPulseWidthS', 1e-6]]),
  ]),
  NAMED('V1', 'Coastal, X band, fan beam', [
    ...from('from memory', MARINE, [
      ['frequencyHz', 9.4e9, '9 300 to 9 500 MHz'],
      ['peakPowerW', 25_000],
      ['pulseWidthS', 0.2e-6, '0.05 to 1 µs'],
      ['prfHz', [2000], '1 000 to 4 000 Hz'],
      ['antenna.gainDbi', 33.5, '32 to 35 dBi'],
      ['antenna.azimuthBeamwidthDeg', 0.55, '0.4 to 0.7°'],
      ['antenna.elevationBeamwidthDeg', 18, '15 to 22°'],
      ['noiseFigureDb', 5, '4 to 6 dB'],
      ['rotationRpm', 20],
    ]),
    ...from('read', 'IMO MSC.192(79), 5.3', [['pfa', 1e-4]]),
  ]),
  NAMED(
    'V2',
    'Inland waters, X band (antenna rule only)',
    from('read', INLAND_RULE, [
      ['frequencyHz', 9.4e9, 'over 9 000 MHz'],
      ['polarisation', 'H'],
      ['antenna.azimuthBeamwidthDeg', 1.2, 'at most 1.2°'],
      ['antenna.elevationBeamwidthDeg', 30, 'at most 30°'],
      ['antenna.sidelobeDb', -25, 'to 10° off the axis, −32 dB beyond'],
    ]),
  ),
  NAMED('G1', 'Surface movement, X band', [
    ...from('from memory', SURFACE, [
      ['frequencyHz', 9e9, '9 000 MHz, or 15 700 to 16 200 MHz'],
      ['peakPowerW', 1000, '0.05 to 20 kW'],
      ['pulseWidthS', 40e-9],
      ['prfHz', [10_000], '4 000 to 16 000 Hz'],
      ['antenna.gainDbi', 39.5, '35 to 44 dBi'],
      ['antenna.azimuthBeamwidthDeg', 0.32, '0.25 to 0.4°'],
      ['noiseFigureDb', 6],
      ['rotationRpm', 60],
    ]),
    ...from('read', OFCOM, [['instrumentedRangeM', 4630, 'about 2.5 NM']]),
  ]),
  NAMED('B1', 'Bird, X band, marine type', [
    ...from('read', BIRD_SET, [
      ['frequencyHz', 9.41e9],
      ['peakPowerW', 25_000],
      ['antenna.azimuthBeamwidthDeg', 1],
      ['antenna.elevationBeamwidthDeg', 24],
      ['instrumentedRangeM', 1500],
    ]),
    ...from('from memory', BIRD_SET, [
      ['pulseWidthS', 0.15e-6, '0.07 to 0.3 µs'],
      ['prfHz', [1900], '1 700 to 2 100 Hz'],
      ['antenna.gainDbi', 30],
      ['noiseFigureDb', 6],
      ['rotationRpm', 36, '24 to 48 rpm'],
    ]),
  ]),
  NAMED(
    'D1',
    'Drone, X band, continuous wave (state sweep and rate)',
    from('from memory', OPEN_WORK, [
      ['frequencyHz', 9.5e9, '8 500 to 10 500 MHz'],
      ['peakPowerW', 20, '1 to 500 W'],
      ['coherentTransmitter', true],
      ['antenna.gainDbi', 31.5, '25 to 38 dBi'],
      ['antenna.azimuthBeamwidthDeg', 2.5, '1 to 4°'],
      ['antenna.elevationBeamwidthDeg', 20, '10 to 30°'],
      ['noiseFigureDb', 6, '5 to 7 dB'],
      ['rotationRpm', 45, '30 to 60 rpm, or staring'],
      ['instrumentedRangeM', 2000, 'about 2 km on a small quadcopter at 8.75 GHz'],
    ]),
  ),
]

/**
 * The radar of a template as the study writes it, the origin of each value under `origins`. Values that a template lacks and the study cannot
 * do without are left out (an empty list for `prfHz`), so that the form asks for them.
 * @throws Error for an id that no template has
 */
export function radarOfTemplate(id: string): RadarDoc {
  const t = RADAR_TEMPLATES.find((x) => x.id === id)
  if (!t) throw new Error(`no radar template ${id}`)
  return filled<RadarDoc>({ name: t.name.replace(/ \(.*\)$/, ''), prfHz: [], antenna: {} }, t.values)
}
