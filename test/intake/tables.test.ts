import { describe, expect, it } from 'vitest'
import { InputError, readFeatures, readTable } from '../../core/index.ts'

const message = (f: () => unknown): string => {
  try {
    f()
  } catch (e) {
    expect(e).toBeInstanceOf(InputError)
    return (e as Error).message
  }
  return expect.unreachable()
}

describe('tables (RFC 4180)', () => {
  it('quotes, commas and line ends inside quotes, CRLF, byte order mark, blank lines', () => {
    const t = readTable('\uFEFFlon, lat,note\r\n1,2,"a ""b"", c"\r\n\r\n3,4,"two\nlines"\n5,6,', 'p.csv')
    expect(t.columns).toEqual(['lon', 'lat', 'note'])
    expect(t.rows).toEqual([
      ['1', '2', 'a "b", c'],
      ['3', '4', 'two\nlines'],
      ['5', '6', ''],
    ])
    expect([0, 1, 2].map((i) => t.lineOf(i))).toEqual([2, 4, 6])
  })
  it('a header alone has no rows', () => expect(readTable('lon,lat\n', 'p.csv').rows).toEqual([]))
  it.each([
    ['', /line 1: the table is empty/],
    ['lon,lat\n1,2\n3', /line 3: 1 fields where the header has 2/],
    ['lon,lat\n1,"2', /line 2: a quote is opened/],
    ['lon;lat\n1,5;2,5', /semicolons/],
  ])('refused: %j', (text, why) => expect(message(() => readTable(text, 'p.csv'))).toMatch(why))
})

describe('GeoJSON', () => {
  const collection = (geometry: unknown, properties = {}): string =>
    JSON.stringify({ type: 'FeatureCollection', features: [{ type: 'Feature', geometry, properties }] })
  it('multi-geometries and collections are taken apart, heights of positions dropped', () => {
    const { features } = readFeatures(
      collection(
        {
          type: 'GeometryCollection',
          geometries: [
            {
              type: 'MultiPoint',
              coordinates: [
                [1, 2, 99],
                [190, 4],
              ],
            },
            {
              type: 'MultiLineString',
              coordinates: [
                [
                  [0, 0],
                  [1, 1],
                ],
              ],
            },
            {
              type: 'Polygon',
              coordinates: [
                [
                  [0, 0],
                  [1, 0],
                  [1, 1],
                  [0, 0],
                ],
              ],
            },
          ],
        },
        { a: 1 },
      ),
      'f.geojson',
    )
    expect(features.map((f) => f.kind)).toEqual(['Point', 'Point', 'LineString', 'Polygon'])
    expect(features[1].path).toEqual([{ lon: -170, lat: 4 }])
    expect(features.every((f) => f.number === 1 && f.properties.a === 1)).toBe(true)
  })
  it('a feature without geometry holds nothing', () => expect(readFeatures(collection(null), 'f').features).toEqual([]))
  it.each([
    ['{"type":"FeatureCollection",\n"features":[}', /line 2, column 13: not JSON/],
    ['[]', /not GeoJSON/],
    ['{"type":"Topology"}', /FeatureCollection/],
    [collection({ type: 'Point', coordinates: [500000, 5400000] }), /feature 1: position 500000, 5400000 is not degrees/],
    [collection({ type: 'Point', coordinates: ['1', 2] }), /not two numbers/],
    [collection({ type: 'LineString', coordinates: [[1, 2]] }), /fewer than 2/],
    [collection({ type: 'Curve', coordinates: [] }), /"Curve" is not known/],
    [JSON.stringify({ type: 'FeatureCollection', crs: { properties: { name: 'EPSG:25832' } }, features: [] }), /not WGS 84/],
  ])('refused: %s', (text, why) => expect(message(() => readFeatures(text, 'f.geojson'))).toMatch(why))
})
