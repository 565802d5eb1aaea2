import { fileStem } from '../../document/index.ts'
import { download } from '../../files/index.ts'
import type { Session } from '../session/index.ts'
import { memoFilesWithDigests, memoInput, memoMaps } from './memoInput.ts'

/** Paints one map per option, writes the memo as a PDF and hands it to the browser's own saving. */
export async function exportMemo(session: Session, date: string, onProgress: (done: number, total: number) => void): Promise<void> {
  const [{ writeMemo }, { pngDataUrl }, files] = await Promise.all([
    import('../../memo/browserMemo.ts'),
    import('../../memo/pdf/png.ts'),
    memoFilesWithDigests(session),
  ])
  const input = memoInput(session, files, [], date)
  if (!input) return
  const total = input.results.length + 1
  const maps = await memoMaps(session.client, input.study, input.results, pngDataUrl, (done) => onProgress(done, total))
  const pdf = await writeMemo({ ...input, maps })
  onProgress(total, total)
  download(new Blob([pdf as BlobPart], { type: 'application/pdf' }), `${fileStem(input.doc)}-memo.pdf`)
}
