import type { TDocumentDefinitions } from 'pdfmake/interfaces'
import type { MemoModel } from '../model/index.ts'
import { FONT, type Paper, pdfDefinition } from './definition.ts'

/** Bytes of the two faces the memo is set in (TTF). */
export interface PdfFonts {
  readonly regular: Uint8Array
  readonly semibold: Uint8Array
}
/** What of the PDF printer is used; the same object in the browser and in Node. */
interface Printer {
  readonly virtualfs: { writeFileSync(name: string, bytes: Uint8Array): void }
  setUrlAccessPolicy(allow: (url: string) => boolean): void
  setLocalAccessPolicy?(allow: (path: string) => boolean): void
  setFonts(fonts: Record<string, Record<string, string>>): void
  createPdf(definition: TDocumentDefinitions): { getBuffer(): Promise<Uint8Array> }
}
/** The faces' PostScript names: under these the drawings' texts find the faces that the running text has opened. */
const REGULAR = 'SourceSans3-Regular'
const SEMIBOLD = 'SourceSans3-SemiBold'

/**
 * The memo as a PDF: same model, fonts and paper give the same bytes. Runs in the browser and in Node; the printer is
 * loaded on first use and may open neither addresses nor files.
 */
export async function makePdf(model: MemoModel, fonts: PdfFonts, paper: Paper = 'A4'): Promise<Uint8Array> {
  const loaded = (await import('pdfmake')) as unknown as { default?: Printer } & Printer
  const printer = loaded.default ?? loaded
  printer.virtualfs.writeFileSync(REGULAR, fonts.regular)
  printer.virtualfs.writeFileSync(SEMIBOLD, fonts.semibold)
  printer.setFonts({ [FONT]: { normal: REGULAR, bold: SEMIBOLD } })
  printer.setUrlAccessPolicy(() => false)
  printer.setLocalAccessPolicy?.(() => false)
  const buffer = await printer.createPdf(pdfDefinition(model, paper)).getBuffer()
  return new Uint8Array(buffer)
}
