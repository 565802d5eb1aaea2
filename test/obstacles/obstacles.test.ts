import { describe, expect, it } from 'vitest'
import { InputError, readFeatures, readObstacles, readRoads, roadClassOf } from '../../core/index.ts'

const features = (...list: [string, unknown, object][]) =>
  readFeatures(
    JSON.stringify({
      type: 'FeatureCollection',
      features: list.map(([type, coordinates, properties]) => ({ type: 'Feature', geometry: { type, coordinates }, properties })),
    }),
    'o.geojson',
  )
const LINE = [
  [0, 0],
  [0.1, 0.1],
]

describe('obstacles', () => {
  it('points, lines and outlines with their properties', () => {
    const got = readObstacles(
      features(
        ['Point', [1, 2], { name: 'Chimney', heightM: 120, widthM: 8, rcsM2: '40', verticalErrorM: 1, colour: 'red' }],
        ['LineString', LINE, { topM: 310 }],
      ),
      'o.geojson',
    )
    expect(got[0]).toEqual({
      name: 'Chimney',
      path: [{ lon: 1, lat: 2 }],
      heightM: 120,
      topM: null,
      widthM: 8,
      rcsM2: 40,
      verticalErrorM: 1,
    })
    expect(got[1]).toMatchObject({ name: 'obstacle 2', heightM: null, topM: 310, widthM: 0, rcsM2: null })
    expect(got[1].path).toHaveLength(2)
  })
  it.each([
    [{}, /feature 1: neither heightM nor topM is given; give heightM/],
    [{ heightM: 3, topM: 9 }, /both/],
    [{ name: 'Mast', heightM: -5 }, /feature 1 \("Mast"\), heightM: heightM is -5; give a number from 0/],
    [{ heightM: 'tall' }, /heightM is "tall"/],
    [{ heightM: 5, widthM: -1 }, /widthM is -1/],
  ])('refused: %j', (properties, why) => {
    expect(() => readObstacles(features(['Point', [1, 2], properties]), 'o.geojson')).toThrow(InputError)
    expect(() => readObstacles(features(['Point', [1, 2], properties]), 'o.geojson')).toThrow(why)
  })
})

describe('roads', () => {
  it('lines with class and speed; points are passed over', () => {
    const got = readRoads(
      features(
        ['LineString', LINE, { name: 'Coast road', highway: 'primary', maxspeedKmh: 70 }],
        ['LineString', LINE, { railway: 'rail', maxspeed: '30 mph' }],
        ['LineString', LINE, { ref: 'B 7', highway: 'motorway', maxspeed: 'none' }],
        ['Point', [1, 2], { highway: 'crossing' }],
        ['LineString', LINE, { highway: 'trunk', tunnel: 'yes' }],
        ['LineString', LINE, { highway: 'trunk', tunnel: 'no' }],
      ),
      'r.geojson',
    )
    expect(got.map((r) => [r.name, r.highway])).toEqual([
      ['Coast road', 'primary'],
      ['road 2', 'rail'],
      ['B 7', 'motorway'],
      ['road 5', 'trunk'],
      ['road 6', 'trunk'],
    ])
    expect(got.map((r) => r.tunnel)).toEqual([false, false, false, true, false])
    expect(got[0].maxspeedKmh).toBe(70)
    expect(got[1].maxspeedKmh).toBeCloseTo(48.28, 2)
    expect(got[2].maxspeedKmh).toBeNull()
  })
  it('classes: slip roads with their road, rails together, ways without vehicles none', () => {
    const of = ['motorway_link', 'trunk', 'tertiary', 'residential', 'light_rail', 'cycleway', 'construction', 'abandoned'].map(roadClassOf)
    expect(of).toEqual(['motorway', 'trunk', 'other', 'other', 'rail', null, null, null])
  })
})
