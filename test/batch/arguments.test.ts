import { describe, expect, it } from 'vitest'
import { readArguments } from '../../app/batch/arguments.ts'
import { readPoints } from '../../app/batch/commands/points.ts'
import { csvLine, csvNumber } from '../../app/batch/csv.ts'

describe('the command line', () => {
  it('is read into command, study and options', () => {
    expect(readArguments(['points', 's.json', '--candidate', 'A', '--height=20', '--points', 'in.csv', '--tilt', '-1.5'])).toEqual({
      command: 'points',
      study: 's.json',
      options: { candidate: 'A', height: '20', points: 'in.csv', tilt: '-1.5' },
    })
    expect(readArguments(['run', 's.json', '--out', 'd', '--no-memo'])).toMatchObject({ options: { out: 'd', 'no-memo': 'yes' } })
  })
  it.each([[[]], [['--help']], [['points', '-h']]])('%j asks for help', (words) => {
    expect(readArguments(words)).toBe('help')
  })
  it.each([
    [['fly', 's.json'], /unknown command "fly"; use one of run, points, horizon, cell/],
    [['points', 's.json', '--mast', '3'], /--mast: points has no such option; use --candidate/],
    [['points', '--candidate', 'A'], /no study file given/],
    [['points', 'a.json', 'b.json'], /2 study files given/],
    [['horizon', 's.json', '--candidate', 'A'], /--height: is missing; add --height to horizon/],
    [['horizon', 's.json', '--candidate', '--height', '3'], /--candidate: no value follows/],
    [['horizon', 's.json', '--candidate', 'A', '--candidate', 'B'], /--candidate: given twice/],
    [['run', 's.json'], /--out: is missing/],
  ])('%j is refused', (words, sentence) => {
    expect(() => readArguments(words)).toThrow(sentence)
  })
})

describe('points file', () => {
  it('columns may stand in any order among others; texts are kept as given', () => {
    expect(readPoints('\uFEFFname,LAT,lon\r\n"a,b",48.50,15.0\r\n', 'p.csv')).toEqual([
      { lonText: '15.0', latText: '48.50', lon: 15, lat: 48.5 },
    ])
  })
  it('may be empty but for its header', () => {
    expect(readPoints('lon,lat\n', 'p.csv')).toEqual([])
  })
  it.each([
    ['15,48\n', /p\.csv, line 1: no column "lon" among 15, 48; begin with the header lon,lat/],
    ['lon;lat\n15;48\n', /p\.csv, line 1/],
    ['lon,lat\n15,48\n15,x\n', /p\.csv, line 3: lat is "x"; give degrees from -90 to 90/],
    ['lon,lat\n15,48\n\n15,91\n', /p\.csv, line 4: lat is "91"/],
    ['lon,lat\n15\n', /p\.csv, line 2/],
    ['lon,lon,lat\n', /two columns "lon"/],
    ['', /p\.csv, line 1/],
  ])('%j is refused with its line', (text, sentence) => {
    expect(() => readPoints(text, 'p.csv')).toThrow(sentence)
  })
})

describe('CSV', () => {
  it('follows RFC 4180', () => {
    expect(csvLine(['a', 'b,c', 'd"e', ''])).toBe('a,"b,c","d""e",\r\n')
  })
  it('numbers have a point, no minus zero, and are empty where undefined', () => {
    expect([csvNumber(-0.0001, 3), csvNumber(1234.5, 3), csvNumber(Number.NaN, 3), csvNumber(null, 3)]).toEqual([
      '0.000',
      '1234.500',
      '',
      '',
    ])
  })
})
