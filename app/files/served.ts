import { InputError } from '../../core/index.ts'
import { filesOf, type GivenFile, type OpenedStudy, openStudyText } from '../document/index.ts'

/** Fetches a study served beside the app, and every file it names. Throws InputError when it is not there. */
export async function openServed(folder: string, fetcher: typeof fetch = fetch): Promise<OpenedStudy> {
  const bytes = async (name: string): Promise<Blob | null> => {
    const answer = await fetcher(folder + name)
    // a server that answers every path with the page itself does not have the file
    return answer.ok && !(answer.headers.get('content-type') ?? '').includes('text/html') ? answer.blob() : null
  }
  const text = await (await bytes('study.json'))?.text()
  if (text === undefined)
    throw new InputError({
      code: 'no-demo',
      file: 'study.json',
      found: 'the demo study is not served here',
      remedy: 'drop a GeoTIFF or a study instead',
    })
  const names = filesOf(openStudyText(text, 'study.json', []).doc)
  const blobs = await Promise.all(names.map(bytes))
  const loose: GivenFile[] = []
  names.forEach((name, i) => {
    const blob = blobs[i]
    if (blob) loose.push({ name, blob })
  })
  return openStudyText(text, 'study.json', loose)
}

/** Hands a file to the browser's own saving. */
export function download(blob: Blob, name: string): void {
  const url = URL.createObjectURL(blob)
  const link = document.createElement('a')
  link.href = url
  link.download = name
  link.click()
  setTimeout(() => URL.revokeObjectURL(url), 60_000)
}
