export * from './model/index.ts'
export type { Paper } from './pdf/definition.ts'
export { makePdf, type PdfFonts } from './pdf/makePdf.ts'
export { pngDataUrl } from './pdf/png.ts'
