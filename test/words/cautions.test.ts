import { describe, expect, it } from 'vitest'
import * as w from '../../app/words/index.ts'
import { LAYER_IDS } from '../../core/index.ts'

describe('cautions', () => {
  it('every layer has words and at least one caution', () => {
    for (const id of LAYER_IDS) {
      expect(w.LAYER_WORDS[id].title.length).toBeGreaterThan(3)
      expect(w.cautionsForLayer(id).length).toBeGreaterThan(0)
    }
  })
  it('layers that read the land table say that it is from memory', () => {
    for (const id of ['clutter-strength', 'clutter-to-noise', 'suppression-needed'] as const) {
      expect(w.cautionsForLayer(id)).toContain(w.CAUTIONS.landTable)
      expect(w.LAYER_WORDS[id].note).toContain('from memory')
    }
  })
  it('each is one line of plain words', () => {
    for (const text of Object.values(w.CAUTIONS)) {
      expect(text).not.toMatch(/\n/)
      expect(text.length).toBeLessThanOrEqual(190)
    }
  })
})
