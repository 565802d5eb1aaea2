import type { Ask, Crs, GridShape, StudyDoc } from '../../core/index.ts'
import { crsFromEpsg } from '../../core/index.ts'

/** A small invented ground: rolling farmland, one ridge to the east, 50 m posting, UTM 33N. */
export async function hillGround(size = 320): Promise<Ask['ground']> {
  const crs: Crs = await crsFromEpsg(32633)
  const shape: GridShape = { width: size, height: size, crs, x0: 400_000, y0: 5_400_000, colX: 50, colY: 0, rowX: 0, rowY: -50 }
  const heightM = new Float32Array(size * size)
  for (let row = 0; row < size; row++)
    for (let col = 0; col < size; col++) {
      const ridge = 180 * Math.exp(-(((col - size * 0.72) / 9) ** 2))
      heightM[row * size + col] = 60 + 12 * Math.sin(col / 9) * Math.cos(row / 13) + ridge
    }
  return {
    shape,
    heightM,
    code: null,
    codes: [{ terrain: 'farmland', coverHeightM: 0, sourceClass: null, mark: null }],
    obstacles: [],
    verticalErrorM: 5,
  }
}

/** Two candidates over `hillGround`, two heights each, one layer need. */
export const hillStudy = (): StudyDoc => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Hill test',
  terrain: [{ file: 'hill.tif', verticalErrorM: 5 }],
  uniformTerrain: 'farmland',
  radar: {
    frequencyHz: 2.9e9,
    peakPowerW: 15_000,
    pulseWidthS: 1e-6,
    noiseBandwidthHz: 1e6,
    prfHz: [1000],
    antenna: { gainDbi: 32, azimuthBeamwidthDeg: 2, elevationBeamwidthDeg: 4, tiltDeg: 1 },
    suppression: { kind: 'stated', statedDb: 35 },
  },
  needs: [{ id: 'n1', name: 'Low cover', kind: 'layer', heightM: 150, heightAbove: 'ground', fromRangeM: 500, toRangeM: 7000, rcsM2: 1 }],
  candidates: [
    { id: 'A', lon: 13.74, lat: 48.665, mastHeightsM: [10, 25], clearingRadiusM: 0 },
    { id: 'B', lon: 13.72, lat: 48.675, mastHeightsM: [15] },
  ],
  run: { maxRangeM: 8000, rangeStepM: 75, azimuthStepDeg: 0.5 },
})
