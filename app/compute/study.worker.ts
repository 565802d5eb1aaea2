/// <reference lib="webworker" />
import { type Ask, loadCrs, type Painted, type Tell } from '../../core/index.ts'
import type { Envelope } from './messages.ts'
import { Scheduler } from './scheduler.ts'
import { startSweepHelpers } from './sweepHelpers.ts'

const scope = self as unknown as DedicatedWorkerGlobalScope
const turn = new MessageChannel()
let waiting = false

/** Pictures leave as bitmaps, everything else as it is. */
async function finish(kind: keyof Ask, body: unknown): Promise<{ body: unknown; transfer: Transferable[] }> {
  if (body === null || (kind !== 'paint' && kind !== 'base')) return { body, transfer: [] }
  const { pixels, view } = body as Painted
  const image = new ImageData(new Uint8ClampedArray(pixels.buffer as ArrayBuffer), view.width, view.height)
  const bitmap = await createImageBitmap(image)
  return { body: { bitmap, view }, transfer: [bitmap] }
}
const scheduler = new Scheduler(
  (tell, transfer) => scope.postMessage(tell, transfer ?? []),
  finish,
  () => performance.now(),
  startSweepHelpers(),
)

function wake(): void {
  if (waiting) return
  waiting = true
  turn.port2.postMessage(null)
}
turn.port1.onmessage = () => {
  waiting = false
  if (scheduler.slice()) wake()
}
/** Asks are taken in order; a ground waits until its coordinate system can be used on this thread. */
let turnOf: Promise<void> = Promise.resolve()
scope.onmessage = ({ data }: MessageEvent<Envelope>) => {
  turnOf = turnOf.then(async () => {
    try {
      if (data.kind === 'ground') await loadCrs((data.body as Ask['ground']).shape.crs)
    } catch (error) {
      const message = error instanceof Error ? error.message : String(error)
      return scope.postMessage({ kind: 'failure', id: data.id, error: { code: 'fault', message } } satisfies Tell)
    }
    scheduler.take(data)
    wake()
  })
}
