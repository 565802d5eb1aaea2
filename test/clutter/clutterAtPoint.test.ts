import { beforeAll, describe, expect, it } from 'vitest'
import { type ClutterCells, clutterToNoise, discreteEchoes, pointClutter } from '../../core/clutter/index.ts'
import type { Earth } from '../../core/geodesy/index.ts'
import { type SightCells, type SiteCells, sweep } from '../../core/masking/index.ts'
import { azimuthIndexOf, CELL, cellCentre, isMasked, isUnknown, type PolarShape } from '../../core/polar/index.ts'
import type { Ground, Site } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'
import { testRadar } from '../radar/testRadar.ts'
import { hills, randomNumbers } from './hills.ts'

const GRID: PolarShape = { azimuths: 1440, ranges: 220, azimuthStepDeg: 0.25, rangeStepM: 75 }
const EARTH: Earth = { effectiveEarthFactor: 4 / 3, earthRadiusM: null }
const HEIGHT_M = 60
const RADAR = testRadar({
  pulseWidthS: 1.2e-6,
  noiseBandwidthHz: 1 / 1.2e-6,
  antenna: { azimuthBeamwidthDeg: 1.6, elevationPattern: 'cosecant-squared', sidelobeDb: -28, tiltDeg: 1 },
})

describe('clutter at a point', () => {
  let ground: Ground
  let place: Site
  let site: SiteCells
  let mask: SightCells
  let cells: ClutterCells
  beforeAll(async () => {
    ;({ ground, site: place } = await hills())
    const swept = finish(sweep(ground, place, [HEIGHT_M], GRID, EARTH))
    site = swept.site
    mask = swept.masks[0]
    cells = finish(clutterToNoise(site, mask, ground.codes, place, HEIGHT_M, EARTH, RADAR, 1))
  })

  it('equals the polar cell whose centre it is: 2 000 cells to 0.05 dB, from high ground and low', () => {
    const at = pointClutter(ground, place, HEIGHT_M, EARTH, RADAR, 1, GRID, { sideLobeCnrDb: cells.sideLobeCnrDb })
    const random = randomNumbers(3)
    let compared = 0
    let masked = 0
    const wrong: string[] = []
    while (compared < 2000) {
      const i = Math.floor(random() * GRID.azimuths)
      const j = Math.floor(random() * (GRID.ranges - 2))
      const cell = i * GRID.ranges + j
      if (isUnknown(mask.state[cell])) continue
      const point = at(cellCentre(place, GRID, cell))
      const want = cells.cnrDb[cell]
      const error = Math.abs((point.cnrDb ?? Number.NaN) - want)
      const same = Number.isNaN(want) ? point.cnrDb === null : error <= 0.05
      if (!same) wrong.push(`azimuth ${i * 0.25}, cell ${j}: cell ${want}, point ${point.cnrDb}`)
      if (isMasked(mask.state[cell])) masked++
      compared++
    }
    expect(wrong).toEqual([])
    expect(masked).toBeGreaterThan(200)
    expect(compared - masked).toBeGreaterThan(200)
  })

  it('equals the cell in what suppression leaves too, with a different improvement for each kind of clutter', () => {
    const improvementDb = { byCode: [20, 25, 30, 40, 0], sea: 10, rain: 5, discrete: 40, folded: 0 }
    const left = finish(clutterToNoise(site, mask, ground.codes, place, HEIGHT_M, EARTH, RADAR, 1, { improvementDb }))
    expect(left.cnrDb).toEqual(cells.cnrDb)
    const { sideLobeCnrDb, sideLobeResidueDb } = left
    const at = pointClutter(ground, place, HEIGHT_M, EARTH, RADAR, 1, GRID, { sideLobeCnrDb, sideLobeResidueDb, improvementDb })
    const random = randomNumbers(11)
    let compared = 0
    while (compared < 300) {
      const cell = Math.floor(random() * mask.state.length)
      if (isUnknown(mask.state[cell]) || Number.isNaN(left.residueDb[cell])) continue
      const point = at(cellCentre(place, GRID, cell))
      expect(Math.abs((point.residueDb ?? Number.NaN) - left.residueDb[cell]), `cell ${cell}`).toBeLessThanOrEqual(0.05)
      const improvement = left.cnrDb[cell] - left.residueDb[cell]
      expect(improvement).toBeGreaterThan(10 - 1e-4)
      expect(improvement).toBeLessThan(40 + 1e-4)
      compared++
    }
  })

  it('equals the cell with gas, rain, a tide and discrete echoes, and its factors add up', async () => {
    const masts = [
      { col: 330, row: 260, rcsM2: 5_000 },
      { col: 250, row: 350, rcsM2: 20_000 },
    ]
    const wet = await hills(masts)
    const swept = finish(sweep(wet.ground, wet.site, [HEIGHT_M], GRID, EARTH))
    const discretes = discreteEchoes(wet.ground, wet.site, HEIGHT_M, EARTH, 20_000)
    expect(discretes.length).toBeGreaterThan(0)
    const options = {
      weather: { gas: 'p676', rainRateMmH: 5, rainTopM: 3_000, rainExtentM: 9_000, seaState: 4, tideM: 1 },
      discretes,
      improvementDb: { byCode: [20, 25, 30, 40, 0], sea: 10, rain: 5, discrete: 45, folded: 0 },
    } as const
    const all = finish(clutterToNoise(swept.site, swept.masks[0], wet.ground.codes, wet.site, HEIGHT_M, EARTH, RADAR, 1, options))
    const { sideLobeCnrDb, sideLobeResidueDb } = all
    const at = pointClutter(wet.ground, wet.site, HEIGHT_M, EARTH, RADAR, 1, GRID, { ...options, sideLobeCnrDb, sideLobeResidueDb })
    const random = randomNumbers(5)
    const near = discretes.map((d) => azimuthIndexOf(GRID, d.azimuthDeg) * GRID.ranges + Math.floor(d.rangeM / GRID.rangeStepM))
    const places = [...near, ...Array.from({ length: 600 }, () => Math.floor(random() * all.cnrDb.length))]
    let compared = 0
    for (const cell of places) {
      if (isUnknown(swept.masks[0].state[cell]) || Number.isNaN(all.cnrDb[cell])) continue
      const point = at(cellCentre(wet.site, GRID, cell))
      expect(Math.abs((point.cnrDb ?? Number.NaN) - all.cnrDb[cell]), `cell ${cell}`).toBeLessThanOrEqual(0.05)
      expect(Math.abs((point.residueDb ?? Number.NaN) - all.residueDb[cell]), `residue of cell ${cell}`).toBeLessThanOrEqual(0.05)
      const sum = point.lines.reduce(
        (s, l) => (l.of !== 'clutter_to_noise_db' || l.op === 'info' ? s : l.op === 'subtract' ? s - l.value : s + l.value),
        0,
      )
      expect(sum).toBeCloseTo(point.cnrDb ?? Number.NaN, 6)
      compared++
    }
    expect(compared).toBeGreaterThan(400)
    const onMast = at(cellCentre(wet.site, GRID, near[0])).lines.map((l) => l.key)
    for (const key of ['gas_loss', 'rain_loss', 'rain', 'discretes', 'side_lobes']) expect(onMast).toContain(key)
  })

  it('works out the side-lobe term itself, in the grid and beyond it', () => {
    const short = { ...GRID, ranges: 100 }
    const own = pointClutter(ground, place, HEIGHT_M, EARTH, RADAR, 1, short)
    for (const j of [40, 99, 150]) {
      const point = own(cellCentre(place, GRID, 90 * GRID.ranges + j))
      expect(Math.abs((point.sideLobeCnrDb ?? Number.NaN) - cells.sideLobeCnrDb[j]), `gate ${j}`).toBeLessThan(j === 99 ? 1 : 0.01)
    }
  })

  it('gives factors that add up to RCS and C/N', () => {
    const at = pointClutter(ground, place, HEIGHT_M, EARTH, RADAR, 1, GRID, { sideLobeCnrDb: cells.sideLobeCnrDb })
    let checked = 0
    for (let cell = 37; cell < mask.state.length && checked < 40; cell += 7919) {
      if (isUnknown(mask.state[cell])) continue
      const point = at(cellCentre(place, GRID, cell))
      for (const [of, value] of [
        ['clutter_rcs_dbsm', point.rcsDbsm],
        ['clutter_to_noise_db', point.cnrDb],
      ] as const) {
        if (value === null) continue
        const sum = point.lines.reduce((s, l) => (l.of !== of || l.op === 'info' ? s : l.op === 'subtract' ? s - l.value : s + l.value), 0)
        expect(sum, of).toBeCloseTo(value, 6)
        checked++
      }
      if (point.rcsDbsm !== null) expect(point.lines.find((l) => l.key === 'mean_strength')?.mark).toBe('from memory')
    }
    expect(checked).toBeGreaterThanOrEqual(40)
  })

  it('leaves all empty outside the terrain and beyond a void, and clutter empty inside cτ/2', () => {
    const at = pointClutter(ground, place, HEIGHT_M, EARTH, RADAR, 1, GRID, { sideLobeCnrDb: cells.sideLobeCnrDb })
    const far = at({ lon: place.lon + 1, lat: place.lat })
    expect([far.rowName, far.strengthDb, far.rcsDbsm, far.cnrDb]).toEqual([null, null, null, null])
    const beyondVoid = mask.state.indexOf(CELL.beyondVoid)
    expect(beyondVoid).toBeGreaterThan(0)
    expect(at(cellCentre(place, GRID, beyondVoid)).cnrDb).toBeNull()
    const near = at(cellCentre(place, GRID, 1))
    expect(near.rowName).not.toBeNull()
    expect([near.strengthDb, near.rcsDbsm, near.cnrDb]).toEqual([null, null, null])
  })
})
