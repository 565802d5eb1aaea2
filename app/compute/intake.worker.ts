/// <reference lib="webworker" />
import { isInputError, readGround } from '../../core/index.ts'
import { doorOf, type IntakeAsk, type IntakeTell } from './intakeMessages.ts'

const scope = self as unknown as DedicatedWorkerGlobalScope
const post = (tell: IntakeTell, transfer: Transferable[] = []) => scope.postMessage(tell, transfer)

/** Reads the ground once, hands it over and is ended by the page. */
scope.onmessage = async ({ data }: MessageEvent<IntakeAsk>) => {
  try {
    const tell = (doing: string, done: number, total: number) => post({ kind: 'progress', doing, done, total })
    const read = await readGround(data.request, doorOf(data.files), tell, scope.crossOriginIsolated)
    const buffers = [read.heightM.buffer, ...(read.code ? [read.code.buffer] : [])]
    post(
      { kind: 'read', read },
      buffers.filter((b): b is ArrayBuffer => b instanceof ArrayBuffer),
    )
  } catch (error) {
    if (isInputError(error)) {
      const { code, file, place, found, remedy } = error
      post({
        kind: 'refused',
        complaint: { code, found, remedy, ...(file === undefined ? {} : { file }), ...(place === undefined ? {} : { place }) },
      })
    } else post({ kind: 'fault', message: error instanceof Error ? error.message : String(error) })
  }
}
