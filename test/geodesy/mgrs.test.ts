import fc from 'fast-check'
import { forward } from 'mgrs'
import { describe, expect, it } from 'vitest'
import { geodesicInverse, InputError, parseMgrs, parsePosition } from '../../core/index.ts'

describe('grid references (MGRS)', () => {
  // values of the test set of the mgrs package 1.0.0 (proj4js team), which says nothing of half a square: within 1 m and 100 m
  it.each([
    ['33UXP0500444998', 16.4145, 48.24949, 1.5],
    ['33U XP 05004 44998', 16.4145, 48.24949, 1.5],
    ['31NAA6602100000', 0, 0, 1.5],
    ['24XWT783908', -32.66433, 83.62778, 1.5],
  ])('%s', (text, lon, lat, withinM) => {
    expect(geodesicInverse(parsePosition(text), { lon, lat }).distanceM).toBeLessThan(withinM)
  })
  it('easting and northing are those of the square: 18SUJ 2348 0647 is UTM 18N 323485 4306475 at its centre', () => {
    expect(parseMgrs('18SUJ23480647')).toEqual({ zone: 18, south: false, eastingM: 323_485, northingM: 4_306_475, sideM: 10 })
  })
  it('agrees with the mgrs package all over the globe, to a metre and its own half metre', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -179.999, max: 179.999, noNaN: true }),
        fc.double({ min: -79.9, max: 83.9, noNaN: true }),
        (lon, lat) => {
          const reference = forward([lon, lat], 5)
          expect(geodesicInverse(parsePosition(reference), { lon, lat }).distanceM, reference).toBeLessThan(1.8)
        },
      ),
      { numRuns: 500 },
    )
  })
  it.each([
    ['61UXP0500444998', /zone 61/],
    ['33IXP0500444998', /band I/],
    ['33UIP0500444998', /square IP/],
    ['33UAP0500444998', /square AP does not exist in zone 33/],
    ['33UXP050044499', /9 digits/],
    ['33UXP 0500 44998', /9 digits/],
    ['33UXP0544', /has 4 digits/],
    ['ZAH1234512345', /UPS/],
  ])('refused: %s', (text, why) => {
    expect(() => parsePosition(text)).toThrow(InputError)
    expect(() => parsePosition(text)).toThrow(why)
  })
})
