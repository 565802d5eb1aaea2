import { describe, expect, it } from 'vitest'
import { createFileStore, createStudyStore, setCandidates, undo } from '../../app/document/index.ts'
import { csvText, fileRole, freshName, obstacleRows, obstacleText, takeIn } from '../../app/files/index.ts'
import { InputError, readCandidates, readPlaces, readTable } from '../../core/index.ts'

const file = (name: string, text: string) => Object.assign(new Blob([text]), { name })

describe('candidates of a file', () => {
  it('CSV with degrees, masts, tilts, ground and notes', () => {
    const text =
      'id,name,lon,lat,mast_heights_m,tilts_deg,ground_m,notes\nA,North,10.5,50.25,30 10 20,0.5;1,212,"wet, in spring"\n,,11,51,,,,\n'
    expect(readCandidates(text, 'sites.csv')).toEqual([
      {
        id: 'A',
        name: 'North',
        lon: 10.5,
        lat: 50.25,
        mastHeightsM: [10, 20, 30],
        tiltsDeg: [0.5, 1],
        groundHeightM: 212,
        notes: 'wet, in spring',
      },
      { lon: 11, lat: 51 },
    ])
  })
  it('CSV with positions in any written form', () => {
    const [a, b] = readCandidates('name,position\nA,"51°30\'26""N 000°07\'40""W"\nB,33U XP 05004 44998\n', 'p.csv')
    expect(a).toMatchObject({ lon: expect.closeTo(-0.127778, 6), lat: expect.closeTo(51.507222, 6) })
    expect(b).toMatchObject({ lon: expect.closeTo(16.4145, 4), lat: expect.closeTo(48.2495, 4) })
  })
  it('GeoJSON points with properties; other features are left out', () => {
    const features = [
      { type: 'Feature', geometry: { type: 'Point', coordinates: [1, 2] }, properties: { id: 'X1', mastHeightsM: [15, 25] } },
      {
        type: 'Feature',
        geometry: {
          type: 'LineString',
          coordinates: [
            [1, 2],
            [3, 4],
          ],
        },
        properties: {},
      },
    ]
    expect(readCandidates(JSON.stringify({ type: 'FeatureCollection', features }), 'p.geojson')).toEqual([
      { id: 'X1', lon: 1, lat: 2, mastHeightsM: [15, 25] },
    ])
  })
  it.each([
    ['id,lat,lon\nA b,50,10\n', /sites\.csv, line 2: identifier is "A b"; use 1 to 32/],
    ['lat,lon,mast_heights_m\n50,10,-3\n', /line 2: mast height is "-3"; give 0 m to 1000 m/],
    ['lat,lon\n95,10\n', /line 2: latitude 95 is beyond 90 degrees/],
    ['x,y\n1,2\n', /header: columns x, y; give columns lon and lat/],
    ['lat,lon\n', /no candidate in it/],
  ])('refused: %j', (text, why) => {
    expect(() => readCandidates(text, 'sites.csv')).toThrow(InputError)
    expect(() => readCandidates(text, 'sites.csv')).toThrow(why)
  })
  it('join the study in one step, with free letters where an id is taken', async () => {
    const study = createStudyStore()
    setCandidates(study, [{ id: 'A', lon: 0, lat: 0, mastHeightsM: [12] }])
    const text = 'id,lat,lon,mast_heights_m\nA,50,10,\nQ,51,11,40\n,52,12,\n'
    expect(await fileRole(file('sites.csv', text))).toBe('candidates')
    await takeIn(study, createFileStore(), [file('sites.csv', text)])
    expect(study.getState().doc.candidates.map((c) => [c.id, c.lat, c.mastHeightsM])).toEqual([
      ['A', 0, [12]],
      ['B', 50, [12]],
      ['Q', 51, [40]],
      ['C', 52, [40]],
    ])
    expect(study.getState().change).toBe('added 3 candidates of sites.csv')
    undo(study)
    expect(study.getState().doc.candidates).toHaveLength(1)
  })
  it('a file that cannot be read changes nothing, even beside one that can', async () => {
    const study = createStudyStore()
    const both = [file('sites-1.csv', 'lat,lon\n1,2\n'), file('sites-2.csv', 'lat,lon\n99,2\n')]
    await expect(takeIn(study, createFileStore(), both)).rejects.toThrow(/sites-2\.csv, line 2/)
    expect(study.getState().doc.candidates).toEqual([])
  })
})

describe('a table of candidates', () => {
  it('rows without id or masts take the next letter and the masts above; what a row keeps stays', () => {
    const study = createStudyStore()
    setCandidates(study, [
      { id: '', lon: 1, lat: 2, mastHeightsM: [] },
      { id: 'A', lon: 1.123456789, lat: 2, mastHeightsM: [8], notes: 'kept' },
      { id: '', lon: 3, lat: 4, mastHeightsM: [] },
    ])
    expect(study.getState().doc.candidates).toEqual([
      { id: 'B', name: 'Place B', lon: 1, lat: 2, mastHeightsM: [10, 20, 30] },
      { id: 'A', name: 'Place A', lon: 1.1234568, lat: 2, mastHeightsM: [8], notes: 'kept' },
      { id: 'C', name: 'Place C', lon: 3, lat: 4, mastHeightsM: [8] },
    ])
  })
})

describe('tables written back as files', () => {
  it('a CSV of fixes reads as it was', () => {
    const text = csvText(['name', 'lat', 'lon', 'alt_ft_msl'], [['one, "A"', '50.5', '10.25', '1200']])
    expect(readTable(text, 'f.csv').rows).toEqual([['one, "A"', '50.5', '10.25', '1200']])
    const read = readPlaces(text, { id: 'n', kind: 'fixes', file: 'f.csv', heightM: null, heightAbove: 'sea', qnhHpa: null })
    expect(read.places[0]).toMatchObject({ name: 'one, "A"', lat: 50.5, lon: 10.25, altM: expect.closeTo(365.76, 9), above: 'sea' })
  })
  it('a name that is taken gets a number', () => {
    const taken = new Map([
      ['f.csv', 1],
      ['f-2.csv', 1],
    ])
    expect([freshName('f.csv', taken), freshName('f-2.csv', taken), freshName('g.csv', taken)]).toEqual(['f-3.csv', 'f-3.csv', 'g.csv'])
  })
  const masts = {
    type: 'FeatureCollection',
    features: [
      {
        type: 'Feature',
        id: 7,
        geometry: { type: 'Point', coordinates: [10, 50, 3] },
        properties: { name: 'Mast', heightM: 40, lit: true },
      },
      {
        type: 'Feature',
        geometry: {
          type: 'LineString',
          coordinates: [
            [10, 50],
            [11, 51],
          ],
        },
        properties: { name: 'Line', heightM: 20 },
      },
    ],
  }
  it('obstacles keep what the table does not show, and the features it does not hold', () => {
    const { rows, others } = obstacleRows(JSON.stringify(masts), 'o.geojson')
    expect(rows).toHaveLength(1)
    const next = [
      { ...rows[0], heightM: null, topM: 300, widthM: 2 },
      { name: '', at: { lon: 1, lat: 2 }, heightM: 12, topM: null, widthM: null, rcsM2: null, feature: null },
    ]
    const out = JSON.parse(obstacleText(next, others, 'o-2.geojson'))
    expect(out.features).toEqual([
      {
        type: 'Feature',
        id: 7,
        geometry: { type: 'Point', coordinates: [10, 50] },
        properties: { name: 'Mast', topM: 300, widthM: 2, lit: true },
      },
      { type: 'Feature', geometry: { type: 'Point', coordinates: [1, 2] }, properties: { heightM: 12 } },
      masts.features[1],
    ])
  })
  it('an obstacle with height and top both is refused with its place', () => {
    const { rows, others } = obstacleRows(JSON.stringify(masts), 'o.geojson')
    expect(() => obstacleText([{ ...rows[0], topM: 300 }], others, 'o-2.geojson')).toThrow(
      /o-2\.geojson, feature 1 \("Mast"\): both heightM and topM/,
    )
  })
})
