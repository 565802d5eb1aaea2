import { describe, expect, it } from 'vitest'
import { type Crs, crsFromEpsg, crsFromGeoKeys, crsFromText, crsTransform, InputError, loadCrs } from '../../core/index.ts'

const UTM33 = { kind: 'projected', epsg: 32633, definition: 'EPSG:32633', metresPerUnit: 1 }

describe('CRS from what is written', () => {
  it.each([
    'EPSG:32633',
    'epsg: 32633',
    '32633',
    'UTM 33N',
    'WGS 84 / UTM zone 33N',
    'urn:ogc:def:crs:EPSG::32633',
    'PROJCS["anything",GEOGCS["WGS 84",DATUM["WGS_1984",SPHEROID["WGS 84",6378137,298.257223563]]],PROJECTION["Transverse_Mercator"],AUTHORITY["EPSG","32633"]]',
    'COMPD_CS["both",PROJCS["anything",GEOGCS["WGS 84",DATUM["WGS_1984",SPHEROID["WGS 84",6378137,298.257223563]]],PROJECTION["Transverse_Mercator"],AUTHORITY["EPSG","32633"]],VERT_CS["EGM96",VERT_DATUM["EGM96",2005]]]',
  ])('%s', async (text) => expect(await crsFromText(text)).toMatchObject(UTM33))

  it('WKT without a code goes by its parameters', async () => {
    const crs = await crsFromText(
      'PROJCS["own",GEOGCS["WGS 84",DATUM["WGS_1984",SPHEROID["WGS 84",6378137,298.257223563]],PRIMEM["Greenwich",0],UNIT["degree",0.0174532925199433]],PROJECTION["Transverse_Mercator"],PARAMETER["latitude_of_origin",0],PARAMETER["central_meridian",15],PARAMETER["scale_factor",0.9996],PARAMETER["false_easting",500000],PARAMETER["false_northing",0],UNIT["metre",1]]',
    )
    const [x, y] = crsTransform(crs).fromLonLat(14, 52)
    const [a, b] = crsTransform(await crsFromEpsg(32633)).fromLonLat(14, 52)
    expect(Math.hypot(x - a, y - b)).toBeLessThan(0.001)
  })
  it.each(['somewhere', 'EPSG:99999', '', '+proj=nothing', 'EPSG:4267', '+proj=longlat +datum=NAD27', '+proj=utm +zone=33 +ellps=intl'])(
    'refused: %s',
    async (text) => {
      await expect(crsFromText(text)).rejects.toBeInstanceOf(InputError)
    },
  )
  it('feet: one unit is a foot', async () => {
    const crs = await crsFromEpsg(2229)
    expect(crs.metresPerUnit).toBeCloseTo(1200 / 3937, 9)
    const t = crsTransform(crs)
    const [x, y] = t.fromLonLat(-118, 34)
    const [, north] = t.fromLonLat(-118, 34.01)
    expect(x).toBeCloseTo(6_561_666.667, 2)
    expect((north - y) * crs.metresPerUnit).toBeCloseTo(1109, 0)
  })
  it('user-defined keys in feet agree with the registered system', async () => {
    const keys = {
      GTModelTypeGeoKey: 1,
      GeographicTypeGeoKey: 4269,
      ProjectedCSTypeGeoKey: 32767,
      ProjectionGeoKey: 32767,
      ProjCoordTransGeoKey: 8,
      ProjLinearUnitsGeoKey: 9003,
      ProjStdParallel1GeoKey: 35.46666666666667,
      ProjStdParallel2GeoKey: 34.03333333333333,
      ProjFalseOriginLongGeoKey: -118,
      ProjFalseOriginLatGeoKey: 33.5,
      ProjFalseOriginEastingGeoKey: 6561666.666666667,
      ProjFalseOriginNorthingGeoKey: 1640416.666666667,
    }
    const [x, y] = crsTransform(await crsFromGeoKeys(keys)).fromLonLat(-117.5, 34.2)
    const [a, b] = crsTransform(await crsFromEpsg(2229)).fromLonLat(-117.5, 34.2)
    expect(Math.hypot(x - a, y - b)).toBeLessThan(0.01)
  })
})

describe('datum shifts (EPSG registry; PROJ 9.1.1 cs2cs with the same parameters)', () => {
  // lon, lat WGS 84 -> easting, northing as PROJ gives them without grids
  it.each([
    [27700, -2.5, 54, 367322.03, 456112.32],
    [2056, 7.5, 47, 2604667.48, 1205439.96],
    [28992, 5.5, 52.3, 162694.03, 479119.79],
  ])('EPSG:%d within 1 m', async (code, lon, lat, east, north) => {
    const t = crsTransform(await crsFromEpsg(code))
    const [x, y] = t.fromLonLat(lon, lat)
    expect(Math.hypot(x - east, y - north)).toBeLessThan(1)
    const back = t.toLonLat(x, y)
    expect(Math.hypot(back[0] - lon, back[1] - lat)).toBeLessThan(1e-7)
  })
})

describe('transforms', () => {
  it('longitudes come out in [-180, 180), exact where they lie there', () => {
    const wgs84: Crs = { kind: 'geographic', epsg: 4326, definition: 'EPSG:4326', name: '', metresPerUnit: 1 }
    expect(crsTransform(wgs84).toLonLat(-0.1278, 51.5)).toEqual([-0.1278, 51.5])
    expect(crsTransform(wgs84).toLonLat(190, 1)[0]).toBeCloseTo(-170, 12)
    expect(crsTransform(wgs84).toLonLat(180, 1)[0]).toBe(-180)
  })
  it('UTM across the antimeridian: zone 1 seen from 179.9 E', async () => {
    const t = crsTransform(await crsFromEpsg(32701))
    const [x] = t.fromLonLat(179.9, -17)
    expect(x).toBeLessThan(180_000)
    expect(t.toLonLat(x, 8_118_000)[0]).toBeGreaterThan(179)
  })
  it('a CRS that crossed threads as plain data needs loadCrs, and says so', async () => {
    const foreign = JSON.parse(
      JSON.stringify({
        ...UTM33,
        name: '',
        epsg: 3035,
        definition: '+proj=laea +lat_0=52 +lon_0=10 +x_0=4321000 +y_0=3210000 +ellps=GRS80',
      }),
    )
    await loadCrs(foreign)
    expect(crsTransform(foreign).fromLonLat(10, 52)[0]).toBeCloseTo(4_321_000, 3)
  })
  it('own transverse Mercator against the projection library, ± 4° of longitude, all latitudes', async () => {
    const own = crsTransform(await crsFromEpsg(32633))
    const other = await crsFromText('+proj=tmerc +lat_0=0 +lon_0=15 +k=0.9996 +x_0=500000 +y_0=0 +a=6378137 +rf=298.257223563 +units=m')
    const library = crsTransform(other)
    for (let lat = -80; lat <= 84; lat += 4)
      for (let lon = 11; lon <= 19; lon += 1) {
        const a = own.fromLonLat(lon, lat)
        const b = library.fromLonLat(lon, lat)
        expect(Math.hypot(a[0] - b[0], a[1] - b[1])).toBeLessThan(0.001)
        const back = own.toLonLat(a[0], a[1])
        expect(Math.hypot(back[0] - lon, back[1] - lat)).toBeLessThan(1e-9)
      }
  })
})
