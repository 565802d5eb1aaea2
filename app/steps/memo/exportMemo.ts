import regularUrl from '@expo-google-fonts/source-sans-3/400Regular/SourceSans3_400Regular.ttf?url'
import semiboldUrl from '@expo-google-fonts/source-sans-3/600SemiBold/SourceSans3_600SemiBold.ttf?url'
import { fileStem } from '../../document/index.ts'
import { download } from '../../files/index.ts'
import type { Session } from '../session/index.ts'
import { memoFiles, memoInput, memoMaps } from './memoInput.ts'

const bytesOf = async (url: string): Promise<Uint8Array> => new Uint8Array(await (await fetch(url)).arrayBuffer())

/** Paints one map per option, writes the memo as a PDF and hands it to the browser's own saving. */
export async function exportMemo(session: Session, date: string, onProgress: (done: number, total: number) => void): Promise<void> {
  const [{ buildMemo }, { makePdf }, { pngDataUrl }, regular, semibold, files] = await Promise.all([
    import('../../memo/model/index.ts'),
    import('../../memo/pdf/makePdf.ts'),
    import('../../memo/pdf/png.ts'),
    bytesOf(regularUrl),
    bytesOf(semiboldUrl),
    memoFiles(session, true),
  ])
  const draft = memoInput(session, files, [], date)
  if (!draft) return
  const refs = draft.results.map((r) => r.ref)
  const maps = await memoMaps(session.client, draft.study, refs, pngDataUrl, (done) => onProgress(done, refs.length + 1))
  const pdf = await makePdf(buildMemo({ ...draft, maps }), { regular, semibold })
  onProgress(refs.length + 1, refs.length + 1)
  download(new Blob([pdf as BlobPart], { type: 'application/pdf' }), `${fileStem(draft.doc)}-memo.pdf`)
}
