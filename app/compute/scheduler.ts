import { Answers, type Ask, Engine, isInputError, type SweepHelpers, type Tell, type Work } from '../../core/index.ts'
import { BACKGROUND_RANK, type Envelope, type Post, RANK, STALE_AFTER_STUDY, SUPERSEDING } from './messages.ts'

const SLICE_MS = 8
const STATUS_EVERY_MS = 100

interface Task {
  readonly id: number
  readonly kind: keyof Ask
  readonly work: Work<unknown>
  /** Which of two maps asks; undefined for the first and for all else. */
  readonly pane: string | undefined
}
/**
 * Runs one engine in slices of a few milliseconds: the most urgent ask first, then what the study still lacks. No threads and no timers
 * of its own: `slice` does one slice and says whether there is more. A new study drops the work under way; that is the only cancel.
 */
export class Scheduler {
  private readonly engine: Engine
  private readonly answers: Answers
  private tasks: Task[] = []
  private background: Work<Tell[]> | null = null
  private share = 0
  private startedAt: number | null = null
  private startedDone = 0
  private toldAt = 0
  private idle = true

  constructor(
    private readonly post: Post,
    private readonly finishReply: (
      kind: keyof Ask,
      body: unknown,
    ) => { body: unknown; transfer: Transferable[] } | Promise<{ body: unknown; transfer: Transferable[] }>,
    private readonly now: () => number,
    helpers: SweepHelpers | null = null,
  ) {
    this.engine = new Engine(undefined, helpers)
    this.answers = new Answers(this.engine)
  }

  take({ id, kind, body }: Envelope): void {
    if (kind === 'ground' || kind === 'study') {
      this.background = null
      this.startedAt = null
      this.idle = false
      this.drop((t) => STALE_AFTER_STUDY.has(t.kind))
    }
    const { pane } = body as { pane?: string }
    if (SUPERSEDING.has(kind)) this.drop((t) => t.kind === kind && t.pane === pane)
    try {
      this.tasks.push({ id, kind, work: this.answers.ask(kind, body as never), pane })
    } catch (error) {
      this.fail(id, error)
    }
    this.tasks.sort((a, b) => RANK[a.kind] - RANK[b.kind])
  }

  /** One slice of the most urgent work. Returns whether there is more to do. */
  slice(): boolean {
    const task = this.tasks[0]
    if (task && RANK[task.kind] < BACKGROUND_RANK) this.runTask(task)
    else if (!this.runBackground() && task) this.runTask(task)
    for (const tell of this.answers.tells.splice(0)) this.post(tell)
    return this.tasks.length > 0 || this.background !== null || this.moreWork()
  }

  private moreWork(): boolean {
    if (this.background) return true
    this.background = this.engine.next()
    if (this.background) return true
    if (!this.idle) {
      this.idle = true
      this.startedAt = null
      this.status(true)
    }
    return false
  }

  private runTask(task: Task): void {
    try {
      const result = this.run(task.work)
      if (!result.done) return
      this.tasks = this.tasks.filter((t) => t !== task)
      void this.reply(task.id, task.kind, result.value)
    } catch (error) {
      this.tasks = this.tasks.filter((t) => t !== task)
      this.fail(task.id, error)
    }
  }

  private async reply(id: number, kind: keyof Ask, value: unknown): Promise<void> {
    try {
      const { body, transfer } = await this.finishReply(kind, value)
      this.post({ kind: 'reply', id, body }, transfer)
    } catch (error) {
      this.fail(id, error)
    }
  }

  private runBackground(): boolean {
    if (!this.moreWork() || !this.background) return false
    if (this.startedAt === null) {
      this.startedAt = this.now()
      this.startedDone = this.engine.progress().done
      this.idle = false
    }
    try {
      const result = this.run(this.background)
      if (result.done) {
        this.background = null
        this.share = 0
        for (const tell of result.value) this.post(tell)
      }
    } catch (error) {
      this.background = null
      this.engine.hold = true
      this.fail(null, error)
    }
    this.status(false)
    return true
  }

  private run<T>(work: Work<T>): { done: true; value: T } | { done: false } {
    const until = this.now() + SLICE_MS
    for (;;) {
      const step = work.next()
      if (step.done) return { done: true, value: step.value }
      if (work === (this.background as unknown)) this.share = step.value.done / Math.max(1, step.value.total)
      if (this.now() >= until) return { done: false }
    }
  }

  private status(force: boolean): void {
    const now = this.now()
    if (!force && now - this.toldAt < STATUS_EVERY_MS) return
    this.toldAt = now
    const { done, total } = this.engine.progress()
    const reached = Math.min(total, done + (this.background ? this.share : 0))
    const made = reached - this.startedDone
    const secondsLeft = this.startedAt !== null && made > 0.3 ? ((now - this.startedAt) / 1000 / made) * (total - reached) : null
    this.post({ kind: 'status', done: reached, total, secondsLeft, doing: reached < total ? 'masking and clutter' : '' })
  }

  private drop(which: (task: Task) => boolean): void {
    for (const task of this.tasks) if (which(task)) this.post({ kind: 'reply', id: task.id, body: null })
    this.tasks = this.tasks.filter((t) => !which(t))
  }

  private fail(id: number | null, error: unknown): void {
    const e = error instanceof Error ? error : new Error(String(error))
    const known = isInputError(e)
    this.post({
      kind: 'failure',
      id,
      error: {
        code: known ? e.code : 'fault',
        message: e.message,
        ...(known && e.place !== undefined ? { place: e.place } : {}),
        ...(known ? { remedy: e.remedy } : {}),
        ...(e.stack === undefined || known ? {} : { stack: e.stack }),
      },
    })
  }
}
