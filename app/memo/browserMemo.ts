import regularUrl from '@expo-google-fonts/source-sans-3/400Regular/SourceSans3_400Regular.ttf?url'
import semiboldUrl from '@expo-google-fonts/source-sans-3/600SemiBold/SourceSans3_600SemiBold.ttf?url'
import { buildMemo, type MemoInput } from './model/index.ts'
import type { Paper } from './pdf/definition.ts'
import { makePdf } from './pdf/makePdf.ts'

/** Builds and prints the memo in the browser; fonts and printer are fetched from the app's own files on first use. */
export async function writeMemo(input: MemoInput, paper: Paper = 'A4'): Promise<Uint8Array> {
  const [regular, semibold] = await Promise.all([bytesOf(regularUrl), bytesOf(semiboldUrl)])
  return makePdf(buildMemo(input), { regular, semibold }, paper)
}
async function bytesOf(url: string): Promise<Uint8Array> {
  const answer = await fetch(url)
  if (!answer.ok) throw new Error(`font ${url}: ${answer.status}`)
  return new Uint8Array(await answer.arrayBuffer())
}
