import { createStore } from 'zustand/vanilla'
import { isInputError } from '../../../core/index.ts'

export interface NoticeWords {
  readonly id: number
  readonly tone: 'warn' | 'bad'
  /** One sentence: what, where, what to do. */
  readonly text: string
}
export interface NoticeState {
  readonly shown: readonly NoticeWords[]
  say(text: string, tone?: 'warn' | 'bad'): void
  close(id: number): void
  /** The user goes on to something else: what was said is over. */
  clear(): void
}
const MOST = 4

/** Notices over the map; the newest last, equal ones once. */
export function createNoticeStore() {
  let next = 1
  return createStore<NoticeState>()((set, get) => ({
    shown: [],
    say: (text, tone = 'warn') => {
      const others = get().shown.filter((n) => n.text !== text)
      set({ shown: [...others, { id: next++, tone, text }].slice(-MOST) })
    },
    clear: () => set({ shown: [] }),
    close: (id) => set({ shown: get().shown.filter((n) => n.id !== id) }),
  }))
}
export type NoticeStore = ReturnType<typeof createNoticeStore>

/** An error as one sentence for a notice. Bad input says what to do; anything else is our fault and says so. */
export function sentenceOf(error: unknown): string {
  if (isInputError(error)) return error.message
  return `This should not have happened: ${error instanceof Error ? error.message : String(error)}. The study is kept; save it and reload.`
}
