import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { panned, zoomed } from '../../app/map/camera.ts'
import { BitmapSheet, type Picture } from '../../app/map/sheets/bitmapSheet.ts'
import type { View } from '../../core/paint/index.ts'
import { type FakeElement, fakeDocument } from './fakePage.ts'

const start: View = { width: 400, height: 300, worldX: 0, worldY: 0, worldPerPx: 100, night: false }
const turn = () => vi.advanceTimersByTimeAsync(0)

function sheet() {
  const asked: { view: View; answer: (p: Picture | null) => void; fail: (e: Error) => void }[] = []
  const errors: unknown[] = []
  const made = new BitmapSheet('overlay', {
    ask: (view) => new Promise((answer, fail) => asked.push({ view, answer, fail })),
    budget: () => ({ px: 1_500_000, marginPx: 50 }),
    pixelRatio: () => 1,
    reducedMotion: () => false,
    onError: (e) => errors.push(e),
  })
  const answer = async (n: number, there = true) => {
    const { view } = asked[n]!
    asked[n]!.answer(there ? { bitmap: { width: view.width, height: view.height, close: () => {} } as unknown as ImageBitmap, view } : null)
    await turn()
  }
  return { made, asked, errors, answer, element: made.element as unknown as FakeElement }
}

describe('a sheet of the map', () => {
  let restore: () => void
  beforeEach(() => {
    vi.useFakeTimers()
    restore = fakeDocument()
  })
  afterEach(() => {
    restore()
    vi.useRealTimers()
  })

  it('asks once for changes of the same turn, one picture at a time, the newest view next', async () => {
    const s = sheet()
    s.made.refresh('A', false)
    s.made.show(start)
    await turn()
    expect(s.asked).toHaveLength(1)
    for (let n = 1; n < 5; n++) s.made.show(zoomed(start, 1 + n / 10, 0, 0))
    await turn()
    expect(s.asked).toHaveLength(1)
    await s.answer(0)
    expect(s.asked).toHaveLength(2)
    expect(s.asked[1]!.view.worldPerPx).toBeCloseTo(100 / 1.4, 6)
  })
  it('takes away a picture in the colours of the other theme, and keeps out one that comes late', async () => {
    const s = sheet()
    s.made.show(start)
    await turn()
    await s.answer(0)
    s.made.refresh('A', false)
    await turn()
    s.made.show({ ...start, night: true })
    expect(s.element.seen).toBeUndefined()
    await s.answer(1)
    expect(s.element.seen).toBeUndefined()
    await s.answer(2)
    expect(s.element.seen).toBeDefined()
    expect(s.asked[2]!.view.night).toBe(true)
  })
  it('moves the last picture with the view, and asks for another only when it rests inside the margin', async () => {
    const s = sheet()
    s.made.show(start)
    await turn()
    await s.answer(0)
    expect(s.element.seen!.style.transform).toBe('translate(-50px, -50px) scale(1)')
    s.made.show(panned(start, 30, 10))
    await turn()
    expect(s.element.seen!.style.transform).toBe('translate(-20px, -40px) scale(1)')
    expect(s.asked).toHaveLength(1)
    await vi.advanceTimersByTimeAsync(200)
    expect(s.asked).toHaveLength(2)
    s.made.show(panned(start, 90, 10))
    await s.answer(1)
    expect(s.asked).toHaveLength(3)
  })
  it('takes a picture of another kin away, dims a stale one, and fades only a changed content', async () => {
    const s = sheet()
    s.made.refresh('A', true)
    s.made.show(start)
    await turn()
    await s.answer(0)
    expect(s.element.seen!.fades).toBe(1)
    s.made.refresh('A', false)
    await turn()
    await s.answer(1, false)
    expect(s.element.classes.has('stale')).toBe(true)
    expect(s.element.seen).toBeDefined()
    s.made.refresh('A', false)
    await turn()
    await s.answer(2)
    expect(s.element.classes.has('stale')).toBe(false)
    const fades = s.element.children.reduce((n, c) => n + c.fades, 0)
    s.made.refresh('B', true)
    await turn()
    await s.answer(3, false)
    expect(s.element.seen).toBeUndefined()
    expect(s.element.children.reduce((n, c) => n + c.fades, 0)).toBe(fades)
  })
  it('goes on after a failure, and says it', async () => {
    const s = sheet()
    s.made.show(start)
    await turn()
    s.asked[0]!.fail(new Error('no picture'))
    await turn()
    expect(s.errors).toHaveLength(1)
    s.made.refresh('A', false)
    await turn()
    expect(s.asked).toHaveLength(2)
  })
})
