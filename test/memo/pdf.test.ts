import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { beforeAll, describe, expect, it, vi } from 'vitest'
import { buildMemo, makePdf, type PdfFonts } from '../../app/memo/index.ts'
import { sampleMemo } from './sampleMemo.ts'

const font = (name: string): Uint8Array =>
  new Uint8Array(readFileSync(join(import.meta.dirname, '../../node_modules/@expo-google-fonts/source-sans-3', name)))
const fonts: PdfFonts = {
  regular: font('400Regular/SourceSans3_400Regular.ttf'),
  semibold: font('600SemiBold/SourceSans3_600SemiBold.ttf'),
}
const hasPoppler = spawnSync('pdftotext', ['-v']).error === undefined
const input = sampleMemo('nautical', 60)
const model = buildMemo(input)
let pdf: Uint8Array
const said: unknown[] = []
beforeAll(async () => {
  const listen = (...args: unknown[]): void => void said.push(args)
  for (const how of ['log', 'warn', 'error'] as const) vi.spyOn(console, how).mockImplementation(listen)
  pdf = await makePdf(model, fonts)
  vi.restoreAllMocks()
}, 120_000)

describe('the PDF', () => {
  it('is a PDF, and the printer had nothing to complain of', () => {
    expect(new TextDecoder('latin1').decode(pdf.subarray(0, 8))).toBe('%PDF-1.7')
    expect(said).toEqual([])
  })
  it('is the same, byte for byte, when printed again', async () => {
    const again = await makePdf(buildMemo(sampleMemo('nautical', 60)), fonts)
    expect(again.length).toBe(pdf.length)
    expect(again.every((b, i) => b === pdf[i])).toBe(true)
  }, 120_000)
  it.skipIf(!hasPoppler)('holds every title, heading and page number as text (read with pdftotext; skipped without it)', () => {
    const dir = mkdtempSync(join(tmpdir(), 'memo-'))
    const path = join(dir, 'memo.pdf')
    writeFileSync(path, pdf)
    const text = spawnSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' }).stdout.replaceAll('\u202f', ' ').replace(/ +/g, ' ')
    for (const s of model.sections) expect(text).toContain(s.title.replaceAll('\u202f', ' '))
    for (const title of [
      'Needs, line of sight',
      'Needs, suppression',
      'Coverage floor',
      'Annex: horizon by azimuth',
      'Files',
      'Defaults used',
    ])
      expect(text).toContain(title)
    const pages = text.split('\f').filter((p) => p.trim() !== '')
    for (const [i, page] of pages.entries()) expect(page).toContain(`page ${i + 1} of ${pages.length}`)
    const lines = pages.map((p) => p.split('\n').filter((l) => l.trim() !== '').length)
    expect(Math.min(...lines)).toBeGreaterThan(8)
    const info = spawnSync('pdfinfo', [path], { encoding: 'utf8' }).stdout
    expect(info).toMatch(/Title:\s+Ostrel Bank: siting memo/)
    expect(info).toMatch(/Tagged:\s+no/)
    expect(info).toMatch(/Page size:.*\(A4\)/)
  })
})
