import { beforeAll, describe, expect, it } from 'vitest'
import { clutterToNoise, type PointOptions, pointClutter } from '../../core/clutter/index.ts'
import { elevationAngleDeg, slantRangeM } from '../../core/geodesy/index.ts'
import { type SightCells, type SiteCells, sweep } from '../../core/masking/index.ts'
import { CELL, cellCentre, isUnknown, type PolarShape } from '../../core/polar/index.ts'
import { type RadarInput, radarConstantDb, rangeSegments, segmentAt } from '../../core/radar/index.ts'
import type { Ground, Site } from '../../core/terrain/index.ts'
import { fromDb, SPEED_OF_LIGHT_MS, toDb } from '../../core/units/index.ts'
import { finish } from '../../core/work/index.ts'
import { testRadar } from '../radar/testRadar.ts'
import { clutterOf, flatCells, uniformTable } from './flatCells.ts'
import { hills, randomNumbers } from './hills.ts'

const pulse = (widthS: number, compressedWidthS: number, fromRangeM: number, toRangeM: number, rangeSidelobeDb: number | null = null) => ({
  widthS,
  compressedWidthS,
  noiseBandwidthHz: 1 / compressedWidthS,
  fromRangeM,
  toRangeM,
  rangeSidelobeDb,
})
const GATE_S = 150 / (SPEED_OF_LIGHT_MS / 2)
/** A short pulse to 6 km, a long compressed one beyond. */
const PULSES = [pulse(GATE_S, GATE_S, 0, 6_000), pulse(20 * GATE_S, GATE_S / 2, 6_000, 60_000)]
const shape = { elevationBeamwidthDeg: 4, elevationPattern: 'cosecant-squared', cosecantLimitDeg: 30, elevationTable: [] } as const
const BEAMS = [
  { name: 'low', gainDbi: 34, offsetDeg: 0, ...shape },
  { name: 'high', gainDbi: 33, offsetDeg: 4, ...shape },
] as const
const SWITCH = [
  { fromRangeM: 0, toRangeM: 8_000, transmit: 'low', receive: 'high' },
  { fromRangeM: 8_000, toRangeM: 1e6, transmit: 'low', receive: 'low' },
] as const
const GRID: PolarShape = { azimuths: 360, ranges: 200, azimuthStepDeg: 1, rangeStepM: 75 }
const at = (j: number) => 7 * 200 + j
const r = (over: Partial<RadarInput> = {}) => testRadar({ ...over, pulseWidthS: GATE_S, antenna: { azimuthBeamwidthDeg: 4 } })

describe('pulses and beams by slant range', () => {
  it('a plain radar is one segment; several are split where either changes, and nothing is received between', () => {
    expect(rangeSegments(r())).toHaveLength(1)
    const segments = rangeSegments(r({ pulses: [PULSES[0], { ...PULSES[1], fromRangeM: 7_000 }], beams: BEAMS, beamSwitch: SWITCH }))
    expect(segments.map((s) => [s.fromM, s.toM, s.beams, s.radar.pulseWidthS])).toEqual([
      [0, 6_000, 'low, high', GATE_S],
      [7_000, 8_000, 'low, high', 20 * GATE_S],
      [8_000, 60_000, 'low', 20 * GATE_S],
    ])
    expect(segmentAt(segments, 6_500)).toBeNull()
    expect(segmentAt(segments, 8_000)?.beams).toBe('low')
    expect(segments[0].radar.receiveAntenna?.gainDbi).toBe(33)
  })

  it('each gate takes its own pulse: constant, gate and blind range', () => {
    const level = uniformTable(-30)
    const both = clutterOf(flatCells(GRID, 40), r({ pulses: PULSES }), undefined, level).cnrDb
    const [short, long] = rangeSegments(r({ pulses: PULSES })).map((s) => clutterOf(flatCells(GRID, 40), s.radar, undefined, level).cnrDb)
    const change = Math.floor(6_000 / 75)
    for (const j of [10, 40, change - 1]) expect(both[at(j)]).toBeCloseTo(short[at(j)], 4)
    for (const j of [change, change + 1, 150, 199]) expect(both[at(j)]).toBeCloseTo(long[at(j)], 4)
    const blind = clutterOf(flatCells(GRID, 40), r({ pulses: [PULSES[0], { ...PULSES[1], widthS: 60 * GATE_S }] }), undefined, level).cnrDb
    // the long pulse lasts 9 km: its own gates begin there
    expect(blind[at(90)]).toBeNaN()
    expect(blind[at(119)]).toBeNaN()
    expect(blind[at(121)]).toBeGreaterThan(0)
  })

  it('range side lobes bring the gates within the pulse into a masked one', () => {
    const cells = flatCells(GRID, 40)
    for (let i = 0; i < 360; i++)
      for (let j = 100; j < 104; j++) {
        cells.mask.inSight[i * 200 + j] = 0
        cells.mask.state[i * 200 + j] = CELL.masked
      }
    const one = [pulse(10 * GATE_S, GATE_S, 0, 1e6, -35)]
    const level = uniformTable(-30)
    const quiet = clutterOf(cells, r({ pulses: [{ ...one[0], rangeSidelobeDb: null }] }), undefined, level).cnrDb
    const { cnrDb } = clutterOf(cells, r({ pulses: one }), undefined, level)
    const j = 102
    // 1 500 m of pulse to each side in cells of 75 m and gates of 150 m; cells of its own gate left out
    let sum = 0
    for (let k = j - 20; k <= j + 20; k++) {
      const share = (Math.abs(k - j) === 20 ? 0.5 : 1) - (k === j ? 1 : Math.abs(k - j) === 1 ? 0.5 : 0)
      sum += (fromDb(quiet[at(k)]) || 0) * share * (75 / 150)
    }
    expect(quiet[at(j)]).toBeNaN()
    expect(Math.abs(cnrDb[at(j)] - (toDb(sum) - 35))).toBeLessThan(0.02)
    expect(cnrDb[at(60)] - quiet[at(60)]).toBeLessThan(0.1)
  })

  it('stacked beams: gain of the pair at the cell, two-way', () => {
    const table = uniformTable(-30)
    const radar = r({ beams: BEAMS, beamSwitch: SWITCH })
    const { cnrDb } = clutterOf(flatCells(GRID, 40), radar, undefined, table)
    const flat = clutterOf(flatCells(GRID, 40), r(), undefined, table).cnrDb
    const down = (rangeM: number) => elevationAngleDeg(140, 100, rangeM, (4 / 3) * 6_371_000)
    const gaussian = (deg: number) => toDb(Math.max(Math.exp(-4 * Math.LN2 * (deg / 4) ** 2), fromDb(-30)))
    const near = 60.5 * 75
    expect(cnrDb[at(60)] - flat[at(60)]).toBeCloseTo(gaussian(down(near)) + gaussian(down(near) - 4) + 33 - 34, 2)
    const far = 150.5 * 75
    expect(slantRangeM(140, 100, far, (4 / 3) * 6_371_000)).toBeGreaterThan(8_000)
    expect(cnrDb[at(150)] - flat[at(150)]).toBeCloseTo(2 * gaussian(down(far)), 2)
    expect(radarConstantDb(rangeSegments(radar)[0].radar)).toBeCloseTo(radarConstantDb(r()) - 1, 9)
  })
})

describe('a point equals its cell with several pulses, range side lobes and beams', () => {
  const grid: PolarShape = { azimuths: 720, ranges: 160, azimuthStepDeg: 0.5, rangeStepM: 75 }
  const earth = { effectiveEarthFactor: 4 / 3, earthRadiusM: null }
  const radar = testRadar({
    pulses: [pulse(0.6e-6, 0.6e-6, 0, 5_000), pulse(12e-6, 0.6e-6, 5_000, 60_000, -32)],
    beams: BEAMS,
    beamSwitch: SWITCH,
    antenna: { azimuthBeamwidthDeg: 2, sidelobeDb: -28 },
  })
  let g: Ground
  let place: Site
  let site: SiteCells
  let mask: SightCells
  beforeAll(async () => {
    ;({ ground: g, site: place } = await hills())
    const swept = finish(sweep(g, place, [40], grid, earth))
    site = swept.site
    mask = swept.masks[0]
  })

  it('to 0.05 dB, but for gates that the change itself runs through', () => {
    const options = {
      weather: { gas: 'p676', rainRateMmH: 3, rainTopM: 3_000, rainExtentM: 9_000, seaState: 3, tideM: 0 },
      improvementDb: { byCode: [20, 25, 30, 40, 0], sea: 10, rain: 5, discrete: 45, folded: 0 },
    } as const
    const all = finish(clutterToNoise(site, mask, g.codes, place, 40, earth, radar, 1, options))
    const { sideLobeCnrDb, sideLobeResidueDb } = all
    const pointOptions: PointOptions = { ...options, sideLobeCnrDb, sideLobeResidueDb }
    const evaluate = pointClutter(g, place, 40, earth, radar, 1, grid, pointOptions)
    const random = randomNumbers(21)
    let compared = 0
    let lobes = 0
    while (compared < 250) {
      const cell = Math.floor(random() * 720 * 160)
      const j = cell % 160
      const nearChange = Math.abs((j + 0.5) * 75 - 5_000) < 200 || Math.abs((j + 0.5) * 75 - 8_000) < 200
      if (nearChange || j > 140 || isUnknown(mask.state[cell]) || Number.isNaN(all.cnrDb[cell])) continue
      const point = evaluate(cellCentre(place, grid, cell))
      expect(Math.abs((point.cnrDb ?? Number.NaN) - all.cnrDb[cell]), `cell ${cell}, gate ${j}`).toBeLessThanOrEqual(0.05)
      expect(Math.abs((point.residueDb ?? Number.NaN) - all.residueDb[cell]), `residue ${cell}, gate ${j}`).toBeLessThanOrEqual(0.05)
      const sum = point.lines.reduce(
        (s, l) => (l.of !== 'clutter_to_noise_db' || l.op === 'info' ? s : l.op === 'subtract' ? s - l.value : s + l.value),
        0,
      )
      expect(sum).toBeCloseTo(point.cnrDb ?? Number.NaN, 6)
      if (point.rangeLobeCnrDb !== null) lobes++
      compared++
    }
    expect(lobes).toBeGreaterThan(100)
  })
})
