import { beforeAll, describe, expect, it } from 'vitest'
import {
  Answers,
  type Ask,
  type CellLedger,
  Engine,
  fillLayer,
  finish,
  geodesicDirect,
  type LayerId,
  type OptionRef,
  type OptionResult,
  optionsOfStudy,
  pointClutter,
  polarShape,
  type StudyDoc,
  type Tell,
} from '../../core/index.ts'
import { hillGround, hillStudy } from './hillStudy.ts'

const A10: OptionRef = { candidate: 'A', heightM: 10, tiltDeg: 1 }
let ground: Ask['ground']
beforeAll(async () => {
  ground = await hillGround()
})

function started(doc: StudyDoc, option: OptionRef | null = A10) {
  const engine = new Engine()
  const answers = new Answers(engine)
  finish(answers.ask('ground', { ...ground, heightM: ground.heightM.slice() }))
  finish(answers.ask('study', { doc, show: { option, layer: 'clutter-to-noise' }, hold: false, have: [] }))
  return { engine, answers }
}
function runAll(engine: Engine): { order: string[]; tells: Tell[] } {
  const order: string[] = []
  const tells: Tell[] = []
  for (let work = engine.next(); work; work = engine.next()) {
    const told = finish(work)
    tells.push(...told)
    for (const t of told)
      if (t.kind === 'figures') {
        expect(t.results.length, 'each result is told once').toBeLessThanOrEqual(1)
        // clutter at k = 2.75 comes after all figures, in a second telling
        order.push(...t.results.filter((r) => r.figures.atHighK === null).map((r) => `${r.ref.candidate}${r.ref.heightM}`))
      }
  }
  return { order, tells }
}
const resultsOf = (engine: Engine): readonly OptionResult[] => engine.results()

describe('engine', () => {
  it('works out every option, the one on show first, then its candidate', () => {
    const { engine } = started(hillStudy(), { candidate: 'B', heightM: 15, tiltDeg: 1 })
    const { order } = runAll(engine)
    expect(order).toEqual(['B15', 'A10', 'A25'])
    expect(resultsOf(engine)).toHaveLength(3)
    expect(engine.next()).toBeNull()
  })

  it('keeps results whose keys still hold and works out only what changed', () => {
    const { engine, answers } = started(hillStudy())
    runAll(engine)
    const before = resultsOf(engine)
    const doc = hillStudy()
    doc.candidates[1] = { ...doc.candidates[1], lon: 13.721 }
    finish(answers.ask('study', { doc, show: { option: A10, layer: 'clutter-to-noise' }, hold: false, have: [] }))
    const kept = resultsOf(engine)
    expect(kept.map((r) => r.ref)).toEqual([A10, { ...A10, heightM: 25 }])
    expect(kept[0].figures).toBe(before[0].figures)
    expect(runAll(engine).order).toHaveLength(1)
  })

  it('a change of need leaves mask and clutter keys alone; a change of tilt leaves the mask', () => {
    const { engine, answers } = started(hillStudy())
    runAll(engine)
    const [first] = resultsOf(engine)
    const needs = hillStudy()
    needs.needs = [{ ...(needs.needs ?? [])[0], heightM: 300 }]
    finish(answers.ask('study', { doc: needs, show: { option: A10, layer: 'clutter-to-noise' }, hold: false, have: [] }))
    runAll(engine)
    const [changed] = resultsOf(engine)
    expect(changed.keys.clutter).toBe(first.keys.clutter)
    expect(changed.keys.needs).not.toBe(first.keys.needs)
    const tilted = hillStudy()
    tilted.radar.antenna.tiltDeg = 3
    finish(
      answers.ask('study', { doc: tilted, show: { option: { ...A10, tiltDeg: 3 }, layer: 'clutter-to-noise' }, hold: false, have: [] }),
    )
    runAll(engine)
    expect(resultsOf(engine)[0].keys.mask).toBe(first.keys.mask)
    expect(resultsOf(engine)[0].keys.clutter).not.toBe(first.keys.clutter)
  })

  it('says what is wrong with a document that cannot be settled and goes on when it is mended', () => {
    const { engine, answers } = started(hillStudy())
    const bad = hillStudy()
    bad.run = { maxRangeM: 8000, rangeStepM: 75, azimuthStepDeg: 5 }
    finish(answers.ask('study', { doc: bad, show: { option: A10, layer: 'clutter-to-noise' }, hold: false, have: [] }))
    const warnings = answers.tells.filter((t) => t.kind === 'warnings')
    expect(warnings).toHaveLength(1)
    expect(engine.next()).toBeNull()
    finish(answers.ask('study', { doc: hillStudy(), show: { option: A10, layer: 'clutter-to-noise' }, hold: false, have: [] }))
    expect(runAll(engine).order).toHaveLength(3)
  })

  it('more mast never lowers what a need has in sight by line of sight, and figures are finite', () => {
    const { engine } = started(hillStudy())
    runAll(engine)
    const [low, high] = resultsOf(engine)
    expect(high.figures.needs[0].inSightPct).toBeGreaterThanOrEqual(low.figures.needs[0].inSightPct)
    for (const r of resultsOf(engine))
      for (const [key, value] of Object.entries(r.figures.flat))
        expect(value === null || Number.isFinite(value), `${key} ${value}`).toBe(true)
    const f = low.figures
    const disc = Math.PI * 8 ** 2
    expect(f.groundInSightKm2 + f.maskedKm2 + f.unknownKm2).toBeGreaterThan(disc * 0.995)
    expect(f.groundInSightKm2 + f.maskedKm2 + f.unknownKm2).toBeLessThan(disc * 1.015)
  })
})

describe('a polar cell and the point at its centre', () => {
  it('agree to 0.05 dB in 2 000 cells', () => {
    const { engine } = started(hillStudy())
    runAll(engine)
    const o = engine.cells(A10)
    if (!o) throw new Error('cells are not held')
    const { study } = engine.ready()
    const { grid } = o.site
    const clutterAt = pointClutter(o.ground, o.place, 10, o.earth, study.radar, 1, polarShape(study.run), {
      sideLobeCnrDb: o.clutter.sideLobeCnrDb,
    })
    let seed = 12345
    const random = () => (seed = (Math.imul(seed, 1664525) + 1013904223) >>> 0) / 2 ** 32
    let compared = 0
    let worst = 0
    while (compared < 2000) {
      const i = Math.floor(random() * grid.azimuths)
      const j = 4 + Math.floor(random() * (grid.ranges - 4))
      const cell = o.clutter.cnrDb[i * grid.ranges + j]
      if (Number.isNaN(cell)) continue
      const at = geodesicDirect(o.place, i * grid.azimuthStepDeg, (j + 0.5) * grid.rangeStepM)
      const point = clutterAt(at).cnrDb
      expect(point).not.toBeNull()
      worst = Math.max(worst, Math.abs((point as number) - cell))
      compared++
    }
    console.log(`polar cell against point: ${compared} cells, worst ${worst.toFixed(4)} dB`)
    expect(worst).toBeLessThanOrEqual(0.05)
  })
})

describe('cell ledger', () => {
  it('adds up: start, add and subtract lines of every result give it, from range and angles to the signal margin', () => {
    const doc = hillStudy()
    doc.atmosphere = { gas: 'p676', rainRateMmH: 4 }
    doc.radar.suppression = { kind: 'canceller', pulses: 3, stabilityLimitDb: 45, bits: 12 }
    doc.radar.stc = { kind: 'rtoFourth', cornerM: 4000, maxDb: 40 }
    const { engine, answers } = started(doc)
    runAll(engine)
    const summed = new Map<string, number>()
    for (let n = 0; n < 40; n++) {
      const at = geodesicDirect({ lon: 13.74, lat: 48.665 }, (n * 47) % 360, 700 + 160 * n)
      const ledger = finish(answers.ask('ledger', { at, option: A10 })) as CellLedger
      for (const [key, value] of Object.entries(ledger.results)) {
        const lines = ledger.lines.filter((l) => l.of === key && l.op !== 'info')
        if (lines.length === 0 || value === null) continue
        const sum = lines.reduce((s, l) => s + (l.op === 'subtract' ? -1 : 1) * (l.value as number), 0)
        expect(Math.abs(sum - value), `${key} at ${JSON.stringify(ledger.at)}: lines give ${sum}, result ${value}`).toBeLessThan(1e-6)
        summed.set(key, (summed.get(key) ?? 0) + 1)
      }
    }
    for (const tail of ['height_margin_m', 'height_margin_k1_m', 'required_ratio_db', 'signal_to_noise_db', 'signal_margin_db'])
      expect(summed.get(`need_n1_${tail}`), tail).toBe(40)
    expect(summed.get('need_n1_residue_to_noise_db')).toBeGreaterThan(30)
    expect(summed.get('need_n1_suppression_needed_db')).toBeGreaterThan(5)
    expect(summed.get('clutter_to_noise_db')).toBeGreaterThan(30)
  })

  it('agrees with the layers of the need at cell centres: signal margin, Pd and outcome', () => {
    const doc = hillStudy()
    doc.atmosphere = { gas: 'p676', rainRateMmH: 2 }
    doc.radar.suppression = { kind: 'canceller', pulses: 2 }
    const { engine, answers } = started(doc)
    runAll(engine)
    const o = engine.cells(A10)
    const need = engine.needOnShow(undefined)
    if (!o || !need) throw new Error('cells are not held')
    const layer = (id: LayerId): Float32Array => {
      const values = new Float32Array(o.site.groundM.length)
      fillLayer(id, o, need, values)
      return values
    }
    const [margin, pd, outcome] = [layer('signal-margin'), layer('probability-of-detection'), layer('usable')]
    const { grid } = o.site
    let compared = 0
    let worst = 0
    for (let n = 0; n < 60; n++) {
      const cell = ((n * 97) % grid.azimuths) * grid.ranges + 8 + ((n * 31) % 80)
      if (Number.isNaN(margin[cell])) continue
      const at = geodesicDirect(
        o.place,
        Math.floor(cell / grid.ranges) * grid.azimuthStepDeg,
        ((cell % grid.ranges) + 0.5) * grid.rangeStepM,
      )
      const { results, lines } = finish(answers.ask('ledger', { at, option: A10 })) as CellLedger
      worst = Math.max(worst, Math.abs((results.need_n1_signal_margin_db as number) - margin[cell]))
      expect(results.need_n1_probability_of_detection).toBeCloseTo(pd[cell], 2)
      const word = lines.find((l) => l.key === 'n1_outcome')?.value
      expect(word).toBe(['', 'in sight', 'detectable', 'usable'][outcome[cell]])
      compared++
    }
    console.log(`ledger against layer: ${compared} cells, worst signal margin ${worst.toFixed(4)} dB`)
    expect(compared).toBeGreaterThan(40)
    expect(worst).toBeLessThan(0.1)
  })
})

describe('height ladder', () => {
  it('carries usable share, area short of suppression and every stretch of mast in which the need is met', () => {
    const doc = hillStudy()
    doc.needs = [{ ...(doc.needs ?? [])[0], requiredPct: 55 }]
    const { answers } = started(doc)
    const ladder = finish(answers.ask('ladder', { candidate: 'A' }))
    const count = ladder.heightsM.length
    for (const list of [ladder.inSightPct, ladder.usablePct, ladder.over40Km2, ladder.shortKm2]) expect(list).toHaveLength(count)
    for (let n = 0; n < count; n++) expect(ladder.usablePct[n]).toBeLessThanOrEqual(ladder.inSightPct[n] + 1e-9)
    const [{ intervals }] = ladder.needMet
    expect(intervals.length).toBeGreaterThan(0)
    expect(ladder.needMetAtM[0].heightM).toBe(intervals[0][0])
    // inside a stretch the usable share reaches what is asked at the study's own k
    ladder.heightsM.forEach((h, n) => {
      if (intervals.some(([from, to]) => h >= from && h <= to)) expect(ladder.usablePct[n]).toBeGreaterThanOrEqual(55)
    })
    // a stated mast stands among the rungs with the very figures of its option
    const { engine } = started(doc)
    runAll(engine)
    const own = resultsOf(engine).find((r) => r.ref.candidate === 'A' && r.ref.heightM === 25)!
    expect(ladder.usablePct[ladder.heightsM.indexOf(25)]).toBeCloseTo(own.figures.needs[0].usablePct, 6)
  })
})

describe('options of a study', () => {
  it('are candidate × mast height × tilt', () => {
    const { engine } = started(hillStudy())
    expect(optionsOfStudy(engine.ready().study)).toHaveLength(3)
  })
})
