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
function fileOf(bytes: Uint8Array): string {
  const path = join(mkdtempSync(join(tmpdir(), 'memo-')), 'memo.pdf')
  writeFileSync(path, bytes)
  return path
}
function textOf(bytes: Uint8Array): string {
  const { stdout } = spawnSync('pdftotext', ['-layout', fileOf(bytes), '-'], { encoding: 'utf8' })
  return stdout.replaceAll('\u202f', ' ').replace(/ +/g, ' ')
}
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
  it.skipIf(!hasPoppler)(
    'loses nothing where names are long and needs many (skipped without pdftotext)',
    async () => {
      const long = 'a rather long name that somebody gave to this thing in a hurry'
      const needs = Array.from({ length: 9 }, (_, i) => ({ ...input.study.needs[0], id: `n${i}`, name: `Need ${i}, ${long}` }))
      const results = input.results.slice(0, 3).map((r) => {
        const own = needs.map((n, i) => ({ ...r.figures.needs[i % 2], needId: n.id, name: n.name }))
        return { ...r, figures: { ...r.figures, needs: own, obstaclesInSight: [long, long] } }
      })
      const files = Array.from({ length: 30 }, (_, i) => ({ ...input.files[0], name: `terrain-${i}.tif`, describe: long.repeat(3) }))
      const warnings = Array.from({ length: 8 }, (_, i) => `warning ${i}: ${long}`)
      const study = { ...input.study, needs }
      const text = textOf(await makePdf(buildMemo({ ...input, study, results, files, warnings }), fonts))
      for (const f of files) expect(text).toContain(f.name)
      for (const w of warnings) expect(text).toContain(w.slice(0, 12))
      for (const [title, times] of [
        ['Causes of loss', 1],
        ['Suppression needed against available', 1],
        ['Coverage floor', 1],
        ['Elevation of the horizon', 3],
        ['Ground by ring', 1],
      ] as const)
        expect(text.split(title).length - 1, title).toBeGreaterThanOrEqual(times)
      for (let i = 0; i < 9; i++) expect(text.split(`Need ${i}`).length - 1).toBeGreaterThanOrEqual(7)
    },
    120_000,
  )
  it.skipIf(!hasPoppler)('gives the first option three pages at most and every other one a page (skipped without pdftotext)', () => {
    const pages = textOf(pdf).split('\f')
    const plain = (s: string): string => s.replaceAll('\u202f', ' ')
    const options = model.sections.filter((s) => s.option)
    const starts = options.map((s) => pages.findIndex((p) => p.includes(`${s.number} ${plain(s.title)}\n`)))
    const confirmed = pages.findIndex((p) => p.includes('Confirmed by survey and trial\n'))
    expect(Math.min(...starts)).toBeGreaterThan(0)
    const taken = starts.map((at, i) => (starts[i + 1] ?? confirmed) - at)
    expect(taken[0]).toBeLessThanOrEqual(3)
    expect(taken.slice(1)).toEqual(taken.slice(1).map(() => 1))
  })
  it.skipIf(!hasPoppler)('holds every title, heading and page number as text (read with pdftotext; skipped without it)', () => {
    const path = fileOf(pdf)
    const text = textOf(pdf)
    for (const s of model.sections) expect(text).toContain(s.title.replaceAll('\u202f', ' '))
    for (const title of [
      'Causes of loss',
      'Suppression needed against available',
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
