import { describe, expect, it } from 'vitest'
import { type KeyHandlers, takeKey } from '../../app/map/input/keys.ts'
import type { View } from '../../core/paint/index.ts'

const start: View = { width: 800, height: 600, worldX: 0, worldY: 0, worldPerPx: 100, night: false }
function hands(nudging: string | null = null) {
  const done: string[] = []
  let view = start
  const h: KeyHandlers = {
    view: () => view,
    setView: (v) => {
      view = v
    },
    fit: () => done.push('fit'),
    take: () => done.push('take'),
    escape: () => done.push('escape'),
    nudge: (id, dx, dy) => done.push(`nudge ${id} ${dx} ${dy}`),
    nudgeEnd: (id, kept) => done.push(`${kept ? 'set' : 'back'} ${id}`),
    tapCandidate: (id) => done.push(`tap ${id}`),
    nudging: (id) => id === nudging,
  }
  return { h, done, view: () => view }
}
const key = (k: string, shiftKey = false) => ({ key: k, shiftKey, ctrlKey: false, metaKey: false, altKey: false })

describe('keys on the map', () => {
  it('pan, zoom about the middle, fit and take', () => {
    const { h, done, view } = hands()
    expect(takeKey(key('ArrowRight'), null, h)).toBe(true)
    expect(view().worldX).toBeCloseTo(6400, 6)
    takeKey(key('+'), null, h)
    expect(view().worldPerPx).toBeCloseTo(100 / 1.5, 9)
    takeKey(key('Home'), null, h)
    takeKey(key('Enter'), null, h)
    takeKey(key('Escape'), null, h)
    expect(done).toEqual(['fit', 'take', 'escape'])
  })
  it('move a candidate that has the focus, set it or put it back', () => {
    const { h, done, view } = hands('B')
    takeKey(key('ArrowUp'), 'B', h)
    takeKey(key('ArrowLeft', true), 'B', h)
    takeKey(key('Enter'), 'B', h)
    takeKey(key('Escape'), 'B', h)
    takeKey(key('Enter'), 'C', h)
    expect(done).toEqual(['nudge B 0 -8', 'nudge B -1 0', 'set B', 'back B', 'tap C'])
    expect(view()).toBe(start)
  })
  it('leave to the page what is not theirs', () => {
    const { h } = hands()
    expect(takeKey(key('z'), null, h)).toBe(false)
    expect(takeKey({ ...key('ArrowUp'), ctrlKey: true }, null, h)).toBe(false)
  })
})
