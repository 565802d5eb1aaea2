import type { Work } from '../../core/index.ts'

/** Says on stderr how far things are: one line rewritten on a terminal, a few lines elsewhere once the input is known to be good. */
export class Progress {
  #last = performance.now()
  #shown = ''
  #lasting = false
  readonly #terminal = process.stderr.isTTY === true
  readonly #started = performance.now()

  /** From here on progress is also written where stderr is no terminal. */
  inputIsGood(): void {
    this.#lasting = true
  }
  say(doing: string, done: number, total: number): void {
    const now = performance.now()
    const every = this.#terminal ? 100 : 5000
    if (now - this.#last < every || (!this.#terminal && !this.#lasting)) return
    this.#last = now
    const share = total > 0 ? `: ${Math.floor((100 * done) / total)} %` : ''
    const text = `${doing}${share}, ${Math.round((now - this.#started) / 1000)} s`
    if (this.#terminal) {
      process.stderr.write(`\r${text.padEnd(this.#shown.length)}`)
      this.#shown = text
    } else process.stderr.write(`${text}\n`)
  }
  /** Takes the progress line off the terminal. */
  clear(): void {
    if (this.#shown !== '') process.stderr.write(`\r${' '.repeat(this.#shown.length)}\r`)
    this.#shown = ''
  }
}

/** Milliseconds of work between two turns of the event loop, so that an interrupt is heard. */
const SLICE_MS = 50

/** Gives the event loop a turn now and then; call it often. */
export function makeTurns(progress: Progress, doing: string): (done: number, total: number) => Promise<void> | undefined {
  let last = performance.now()
  return (done, total) => {
    if (performance.now() - last < SLICE_MS) return undefined
    progress.say(doing, done, total)
    return new Promise<void>((resume) =>
      setImmediate(() => {
        last = performance.now()
        resume()
      }),
    )
  }
}

/** Runs a piece of work to its end, with progress and turns for signals. */
export async function drive<T>(work: Work<T>, progress: Progress, doing: string): Promise<T> {
  const turn = makeTurns(progress, doing)
  for (;;) {
    const step = work.next()
    if (step.done) return step.value
    await turn(step.value.done, step.value.total)
  }
}
