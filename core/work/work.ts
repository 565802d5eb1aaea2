/** Long work: yields its progress every few milliseconds of work and returns its result. The driver may simply stop asking. */
export type Work<T> = Generator<{ done: number; total: number }, T, void>

/** Runs a piece of work to its end. */
export function finish<T>(work: Work<T>): T {
  for (;;) {
    const step = work.next()
    if (step.done) return step.value
  }
}

/** A piece of work as one share of a larger one: progress moves from `from` to `to` out of `total`. */
export function* share<T>(work: Work<T>, from: number, to: number, total: number): Work<T> {
  for (;;) {
    const step = work.next()
    if (step.done) return step.value
    const { done, total: all } = step.value
    yield { done: from + ((to - from) * done) / Math.max(1, all), total }
  }
}
