import { describe, expect, it } from 'vitest'
import * as w from '../../app/words/index.ts'

const t = w.textOf
const plain = (s: string): string => s.replaceAll('\u202f', ' ')

describe('rounding to the safe side', () => {
  it('a value within single-precision noise of a step stays on it', () => {
    expect(w.roundUp(Math.fround(44.1), 0.1)).toBe(44.1)
    expect(w.roundDown(Math.fround(44.1), 0.1)).toBe(44.1)
    expect(w.roundUp(0.1 + 0.2, 0.1)).toBe(0.3)
    expect(w.roundUp(44.101, 0.1)).toBe(44.2)
    expect(w.roundDown(44.099, 0.1)).toBe(44)
  })
  it('up is toward plus infinity, also below zero, and there is no minus zero', () => {
    expect(w.roundUp(-3.2, 1)).toBe(-3)
    expect(w.roundDown(-3.2, 1)).toBe(-4)
    expect(Object.is(w.roundUp(-0.2, 1), 0)).toBe(true)
  })
})

describe('numbers at the face', () => {
  const cases: readonly (readonly [string, string, string])[] = [
    ['floor, feet: up to 100 ft', t(w.formatFloor(700, 'nautical')), '2 300 ft'],
    ['floor, feet, below 1 000 ft: up to 10 ft', t(w.formatFloor(30.6, 'nautical')), '110 ft'],
    ['floor, metres: up', t(w.formatFloor(1796.3, 'metric')), '1 797 m'],
    ['floor below the sea: up', t(w.formatFloor(-12.4, 'metric')), '−12 m'],
    ['height: nearest', t(w.formatHeight(402.4, 'metric')), '402 m'],
    ['mast: metres in both systems', t(w.formatMast(24)), '24 m'],
    ['mast with tenths', t(w.formatMast(7.5)), '7.5 m'],
    ['height to see: up', t(w.formatHeightToSee(12.31)), '12.4 m'],
    ['error band: up', t(w.formatBand(22.1, 'metric')), '23 m'],
    ['height margin: down', t(w.formatMargin(14.9, 'metric')), '14 m'],
    ['negative margin: down', t(w.formatMargin(-14.1, 'metric')), '−15 m'],
    ['range: down', t(w.formatRange(59_990, 'metric')), '59.9 km'],
    ['range in NM: down', t(w.formatRange(59_990, 'nautical')), '32.3 NM'],
    ['place of an obstacle: nearest', t(w.formatPlaceRange(11_690, 'nautical')), '6.3 NM'],
    ['place inside 1 km: hundredths', t(w.formatPlaceRange(512, 'metric')), '0.51 km'],
    ['cone radius, minimum range: up', t(w.formatRangeUp(7_921, 'nautical')), '4.3 NM'],
    ['exposure: up to 1 m', t(w.formatExposure(697.2)), '698 m'],
    ['road: up', t(w.formatRoad(5_010, 'metric')), '5.1 km'],
    ['clutter area: up', t(w.formatAreaUp(33.2, 'metric')), '34 km²'],
    ['clutter area under 10: up to 0.1', t(w.formatAreaUp(0.004, 'metric')), '0.1 km²'],
    ['area in sight: down', t(w.formatAreaDown(2100.9, 'nautical')), '612 NM²'],
    ['area in sight below the first step', t(w.formatAreaDown(0.004, 'metric')), '< 0.1 km²'],
    ['exactly no area', t(w.formatAreaUp(0, 'metric')), '0 km²'],
    ['area as information: nearest', t(w.formatArea(12.6, 'metric')), '13 km²'],
    ['C/N: up', t(w.formatDbUp(46.01)), '47 dB'],
    ['C/N below noise: up', t(w.formatDbUp(-3.6)), '−3 dB'],
    ['clutter RCS: up, in tenths', t(w.formatDbUp(18.46, 'dBsm', 0.1)), '18.5 dBsm'],
    ['available: down', t(w.formatDbDown(48.9)), '48 dB'],
    ['setting as entered', t(w.formatSetting(33.5, 'dBi')), '33.5 dBi'],
    ['setting without useless zeros', t(w.formatSetting(40, 'dB')), '40 dB'],
    ['screening angle: up', t(w.formatScreening(0.9144)), '0.92°'],
    ['screening angle below the horizontal: up', t(w.formatScreening(-0.128)), '−0.12°'],
    ['depression: nearest', t(w.formatAngle(0.2527)), '0.25°'],
    ['azimuth: three digits', t(w.formatAzimuth(7.04)), '007.0°'],
    ['azimuth that rounds to north', t(w.formatAzimuth(359.97)), '000.0°'],
    ['met: down', t(w.formatMetPct(87.9)), '87 %'],
    ['met 100 only when exact', t(w.formatMetPct(99.9999)), '99 %'],
    ['met, exactly 100', t(w.formatMetPct(100)), '100 %'],
    ['met 0 only when exact', t(w.formatMetPct(0.2)), '< 1 %'],
    ['met, exactly 0', t(w.formatMetPct(0)), '0 %'],
    ['lost: up', t(w.formatLossPct(12.1)), '13 %'],
    ['lost 100 only when exact', t(w.formatLossPct(99.4)), '> 99 %'],
    ['lost 0 only when exact', t(w.formatLossPct(1e-9)), '1 %'],
    ['Pd: down', t(w.formatPd(0.899)), '0.89'],
    ['Pd 1 only when exact', t(w.formatPd(0.9999)), '0.99'],
    ['Pd 0 only when exact', t(w.formatPd(0.004)), '< 0.01'],
    ['metric in brackets', w.withMetric((s) => w.formatHeight(100, s), 'nautical'), '328 ft (100 m)'],
    ['no brackets in the metric system', w.withMetric((s) => w.formatHeight(100, s), 'metric'), '100 m'],
    ['no number', t(w.formatDbUp(null)), '–'],
    ['not a number', t(w.formatHeight(Number.NaN, 'metric')), '–'],
    ['frequency', t(w.formatFrequency(2.75e9)), '2.75 GHz'],
    ['power', t(w.formatPower(1.3e6)), '1.3 MW'],
    ['pulse', t(w.formatPulse(1.2e-6)), '1.2 µs'],
    ['pulse under 1 µs', t(w.formatPulse(80e-9)), '80 ns'],
    ['bandwidth', t(w.formatBandwidth(833_300)), '833.3 kHz'],
    ['RCS with its dBsm', w.formatRcs(0.1), '0.1 m² (−10 dBsm)'],
    ['k', w.formatK(1.3333333), '4/3'],
    ['Pfa', w.formatPfa(1e-6), '10⁻⁶'],
    ['position', w.formatPosition({ lon: -25.698639, lat: 46.202333 }), '46°12′08.4″ N  025°41′55.1″ W'],
    ['position: seconds that round to 60 carry over', w.formatPosition({ lon: 10.99999, lat: -0.99999 }), '01°00′00.0″ S  011°00′00.0″ E'],
    ['sector all round', w.formatSector([0, 360]), 'all round'],
    ['sector', w.formatSector([350, 20]), '350° to 020°'],
    ['duration: up', w.formatDuration(4.2), '5 s'],
    ['duration in minutes', w.formatDuration(125), '2 min 05 s'],
    ['date as given', w.formatDate('2026-03-04T10:00:00Z'), '4 March 2026'],
    ['bytes', w.formatBytes(3_210_000), '3.2 MB'],
  ]
  it.each(cases)('%s', (_name, got, want) => {
    expect(plain(got)).toBe(want)
  })
  it('a face number goes in and comes out of SI unchanged', () => {
    for (const system of w.UNIT_SYSTEMS)
      for (const kind of ['range', 'height', 'area', 'speed'] as const)
        expect(w.toFace(kind, w.fromFace(kind, 12.5, system), system)).toBeCloseTo(12.5, 12)
    expect(w.fromFace('range', 60, 'nautical')).toBeCloseTo(111_120, 6)
  })
})
