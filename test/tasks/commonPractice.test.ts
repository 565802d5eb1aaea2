import { describe, expect, it } from 'vitest'
import {
  azimuthKernel,
  blindSpeedMs,
  hitsPerScan,
  MS_PER_KT,
  movingSpreadMs,
  scanningSpreadOverPrf,
  toDb,
  vegetationSpectrum,
  wavelengthM,
} from '../../core/index.ts'
import { from, layerNeed, plainGround, S_BAND, uniformLand, work } from '../merit/plain.ts'

// Orders of magnitude known to whoever works with such radars: common practice, no source. Bounds are wide on purpose.
describe('a terminal radar at S band, 12 rpm, 1 000 Hz (common practice, no source)', () => {
  const { azimuthBeamwidthDeg } = S_BAND.antenna
  const hits = hitsPerScan(azimuthBeamwidthDeg, 1000, 12)
  it('about twenty pulses fall on a fixed echo', () => {
    expect(hits).toBeGreaterThan(15)
    expect(hits).toBeLessThan(30)
  })
  it('scanning spreads clutter over the order of ten knots, full width thirty decibels down; trees in wind over a few', () => {
    const sigma = (scanningSpreadOverPrf(hits) * 1000 * wavelengthM(2.8e9)) / 2
    const scanKt = (2 * sigma * Math.sqrt(2 * Math.log(1000))) / MS_PER_KT
    expect(scanKt).toBeGreaterThan(4)
    expect(scanKt).toBeLessThan(25)
    // two-sided exponential, thirty decibels under its peak
    const trees = vegetationSpectrum(7, 2.8e9)
    const treesKt = (2 * Math.log(1000)) / trees.slopeSPerM / MS_PER_KT
    expect(treesKt).toBeGreaterThan(1)
    expect(treesKt).toBeLessThan(6)
    expect(movingSpreadMs(trees)).toBeLessThan(sigma)
    console.log(`scanning ${scanKt.toFixed(1)} kt, trees ${treesKt.toFixed(1)} kt wide at −30 dB; ${hits.toFixed(1)} pulses`)
  })
  it('clutter stands tens of decibels over a small aircraft at 60 km', async () => {
    const ground = await plainGround(62_000)
    const w = work(ground, {
      needs: [layerNeed({ heightM: 800, fromRangeM: 59_000, toRangeM: 60_500 })],
      candidate: { mastHeightsM: [300] },
      landTable: uniformLand(-30),
      run: { maxRangeM: 61_000, rangeStepM: 150, azimuthStepDeg: 0.325 },
    })
    const { ranges, rangeStepM } = w.cells.site.grid
    const cnrDb = w.cells.clutter.cnrDb[100 * ranges + Math.floor(60_000 / rangeStepM)]
    const at = from(32.5, 60_000)
    const { results } = { results: w.result.figures.needs[0] }
    expect(results.inSightPct).toBeGreaterThan(99)
    // S/N of 1 m² there by the radar equation: 37.8 dB at 20 km less 40·log 3
    const snrDb = 37.82 - 40 * Math.log10(3)
    expect(cnrDb - snrDb).toBeGreaterThan(10)
    expect(cnrDb - snrDb).toBeLessThan(50)
    expect(at.lon).toBeGreaterThan(15)
    console.log(`C/N ${cnrDb.toFixed(1)} dB against S/N ${snrDb.toFixed(1)} dB at 60 km`)
  })
  it('blind at about a hundred knots', () => {
    expect(blindSpeedMs(2.8e9, 1000) / MS_PER_KT).toBeGreaterThan(80)
    expect(blindSpeedMs(2.8e9, 1000) / MS_PER_KT).toBeLessThan(130)
  })
})

describe('the beam over neighbouring azimuths', () => {
  it('keeps its energy at any step it is allowed: the weights sum to the half-power beamwidth', () => {
    for (const width of [0.8, 1.3, 2.5, 4])
      for (const share of [4, 5.3, 8, 16]) {
        const sum = azimuthKernel(width, width / share).reduce((s, w) => s + w, 0)
        expect(Math.abs(toDb(sum / ((width * Math.PI) / 180)))).toBeLessThan(0.01)
      }
  })
})
