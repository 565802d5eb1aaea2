import { beforeEach, describe, expect, it } from 'vitest'
import { Scheduler } from '../../app/compute/scheduler.ts'
import type { Ask, Tell } from '../../core/index.ts'
import { hillGround, hillStudy } from '../runs/hillStudy.ts'

const SHOWN = { candidate: 'A', heightM: 10, tiltDeg: 1 }
const VIEW = { width: 60, height: 40, worldX: 1_525_000, worldY: 6_224_000, worldPerPx: 200, night: false }
let told: Tell[]
let clock: number
let scheduler: Scheduler
let nextId: number

beforeEach(() => {
  told = []
  clock = 0
  nextId = 1
  scheduler = new Scheduler(
    (tell) => told.push(tell),
    (_kind, body) => ({ body, transfer: [] }),
    () => (clock += 1),
  )
})
function send<K extends keyof Ask>(kind: K, body: Ask[K]): number {
  scheduler.take({ id: nextId, kind, body })
  return nextId++
}
const show = (hold = false): Ask['study'] => ({ doc: hillStudy(), show: { option: SHOWN, layer: 'clutter-to-noise' }, hold, have: [] })
async function drain(): Promise<void> {
  while (scheduler.slice());
  await Promise.resolve()
  await Promise.resolve()
}
const replyOf = (id: number) => told.find((t) => t.kind === 'reply' && t.id === id)

describe('scheduler', () => {
  it('answers every ask, works out the study and ends with nothing left', async () => {
    const ground = send('ground', await hillGround(160))
    const study = send('study', show())
    await drain()
    expect(replyOf(ground)).toMatchObject({ body: { minM: expect.any(Number), voidPct: 0 } })
    expect(replyOf(study)).toBeDefined()
    const status = told.filter((t) => t.kind === 'status').at(-1)
    expect(status).toMatchObject({ done: 3, total: 3 })
    expect(told.filter((t) => t.kind === 'figures').at(-1)).toMatchObject({
      holds: [expect.any(Number), expect.any(Number), expect.any(Number)],
    })
    expect(scheduler.slice()).toBe(false)
  })

  it('paints before it goes on with the study', async () => {
    send('ground', await hillGround(160))
    send('study', show())
    while (!told.some((t) => t.kind === 'figures' && t.results.length === 1)) scheduler.slice()
    const base = send('base', { view: VIEW })
    scheduler.slice()
    await Promise.resolve()
    await Promise.resolve()
    expect(replyOf(base)).toMatchObject({ body: { view: VIEW } })
    await drain()
    const paint = send('paint', { view: VIEW, layer: 'clutter-to-noise', option: SHOWN })
    await drain()
    expect(replyOf(paint)).toMatchObject({ body: { view: VIEW } })
  })

  it('answers an overtaken ask with null: the newest view wins, and a new study drops a ladder under way', async () => {
    send('ground', await hillGround(160))
    send('study', show())
    await drain()
    const first = send('paint', { view: VIEW, layer: 'masked', option: SHOWN })
    const second = send('paint', { view: { ...VIEW, worldX: VIEW.worldX + 100 }, layer: 'masked', option: SHOWN })
    const ladder = send('ladder', { candidate: 'A' })
    const again = send('study', show())
    expect(replyOf(first)).toMatchObject({ body: null })
    expect(replyOf(ladder)).toMatchObject({ body: null })
    await drain()
    expect(replyOf(second)).toMatchObject({ body: { view: { worldX: VIEW.worldX + 100 } } })
    expect(replyOf(again)).toBeDefined()
  })

  it('hold stops the work at once and keeps what is there', async () => {
    send('ground', await hillGround(160))
    send('study', show())
    while (!told.some((t) => t.kind === 'figures' && t.results.length === 1)) scheduler.slice()
    send('study', show(true))
    await drain()
    const figures = told.filter((t) => t.kind === 'figures').at(-1)
    expect(figures?.kind === 'figures' && figures.holds).toEqual([1])
  })

  it('says a fault or bad input by the id that asked, with code and remedy', async () => {
    const early = send('profile', { azimuthDeg: 10, option: SHOWN })
    await drain()
    expect(told.find((t) => t.kind === 'failure' && t.id === early)).toMatchObject({ error: { code: 'fault' } })
    send('ground', await hillGround(160))
    const doc = hillStudy()
    doc.candidates[0] = { ...doc.candidates[0], lon: 20 }
    send('study', { ...show(), doc })
    await drain()
    const other = told.filter((t) => t.kind === 'figures').at(-1)
    expect(other?.kind === 'figures' && other.results.map((r) => r.ref.candidate)).toContain('B')
  })
})
