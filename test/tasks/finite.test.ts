import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, type CellLedger, fillLayer, finish, LAYER_IDS } from '../../core/index.ts'
import { from, layerNeed, type Parts, plainGround, S_BAND, work } from '../merit/plain.ts'

let coast: Ask['ground']
beforeAll(async () => {
  const water = await plainGround(14_000, (e, n) => (e > 0 ? 90 * (1 - Math.cos(e / 1300)) * (1 + Math.sin(n / 1700)) : 0), 'water')
  const { shape } = water
  const code = Uint8Array.from({ length: water.heightM.length }, (_, at) => {
    const col = at % shape.width
    return col > shape.width * 0.7 ? 2 : col > shape.width / 2 ? 1 : 0
  })
  const more = (terrain: 'open' | 'urban', coverHeightM: number) => ({ terrain, coverHeightM, sourceClass: null, mark: null }) as const
  coast = { ...water, code, codes: [...water.codes, more('open', 0), more('urban', 8)] }
  // a corner of nothing
  for (let row = 0; row < 90; row++) coast.heightM.fill(Number.NaN, row * shape.width, row * shape.width + 120)
})

const VARIANTS: Record<string, Partial<Parts>> = {
  plain: {},
  'rain, gas, waves, tide': { atmosphere: { gas: 'p676', rainRateMmH: 40, seaState: 6, tideM: 3 } },
  'k = 2.75': { atmosphere: { effectiveEarthFactor: 2.75 } },
  'flat earth': { atmosphere: { effectiveEarthFactor: -3 } },
  'pencil beam up, canceller, short-range sensitivity': {
    radar: {
      antenna: { ...S_BAND.antenna, elevationPattern: 'gaussian', elevationBeamwidthDeg: 1, tiltDeg: 9 },
      suppression: { kind: 'canceller', pulses: 3, stabilityLimitDb: 40, bits: 10 },
      stc: { kind: 'rtoFourth', cornerM: 20_000, maxDb: 60 },
      detector: 'areaCfar',
    },
  },
  'three PRFs dwell to dwell, two needed, folding': {
    radar: { prfHz: [9000, 10_000, 11_000], prfMode: 'dwellStagger', dwellsNeeded: 2, instrumentedRangeM: 12_000 },
  },
  'circular at 35 GHz, weak': {
    radar: { frequencyHz: 35e9, polarisation: 'circular', peakPowerW: 5, suppression: { kind: 'filterBank', pulses: 8 } },
  },
  'metre waves': { radar: { frequencyHz: 60e6 } },
}

describe('nothing returns minus infinity, and nothing unknown is passed for a number', () => {
  for (const [name, parts] of Object.entries(VARIANTS))
    it(name, () => {
      const needs = [layerNeed({ heightM: [30, 900], fromRangeM: 0, toRangeM: 6_800 })]
      const w = work(coast, {
        needs,
        run: { maxRangeM: 7_000, rangeStepM: 150, azimuthStepDeg: 0.325 },
        candidate: { mastHeightsM: [18] },
        ...parts,
      })
      for (const [key, value] of Object.entries(w.result.figures.flat))
        expect(value === null || Number.isFinite(value), `${key} ${value}`).toBe(true)
      const values = new Float32Array(w.cells.site.groundM.length)
      for (const id of LAYER_IDS) {
        if (id === 'height-to-see') continue
        fillLayer(id, w.cells, w.engine.needOnShow(undefined), values)
        expect(
          values.every((v) => Number.isNaN(v) || Number.isFinite(v)),
          id,
        ).toBe(true)
      }
      for (const azimuthDeg of [77, 337]) {
        const ledger = finish(w.answers.ask('ledger', { at: from(azimuthDeg, 6200), option: w.ref })) as CellLedger
        for (const l of ledger.lines) expect(typeof l.value !== 'number' || Number.isFinite(l.value), `${l.key} ${l.value}`).toBe(true)
        for (const [key, value] of Object.entries(ledger.results))
          expect(value === null || Number.isFinite(value), `${key} ${value}`).toBe(true)
      }
    })
})
