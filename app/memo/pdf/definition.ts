import type { Content, ContentTable, CustomTableLayout, TableCell, TDocumentDefinitions } from 'pdfmake/interfaces'
import { hexOf, svgOf } from '../../charts/index.ts'
import { textOf } from '../../words/index.ts'
import {
  type Block,
  BODY_PT,
  type Cell,
  type Column,
  type FigureBlock,
  type MemoModel,
  type Section,
  SMALL_PT,
  type TableBlock,
  TEXT_WIDTH_PT,
} from '../model/index.ts'

export const FONT = 'SourceSans'
export type Paper = 'A4' | 'Letter'
const INK = hexOf('ink')
const INK_2 = hexOf('ink-2')
const INK_3 = hexOf('ink-3')
const LINE = hexOf('line')
const WARN = hexOf('warn')
const PAGE_WIDTH: Record<Paper, number> = { A4: 595.28, Letter: 612 }
const TITLE_PT = 18
const SECTION_PT = 13

/** Hairlines between rows, a darker one under the heads, none over or between them. */
const hairlines = (heads: number, dense = false): CustomTableLayout => ({
  hLineWidth: (i, node) => (i < heads ? 0 : i === heads && heads > 0 ? 0.8 : i === 0 || i === node.table.body.length ? 0.5 : 0.4),
  vLineWidth: () => 0,
  hLineColor: (i) => (heads > 0 && i === heads ? INK_3 : LINE),
  paddingLeft: (i) => (i === 0 ? 0 : 4),
  paddingRight: (i, node) => (i === (node.table.widths?.length ?? 0) - 1 ? 0 : 4),
  paddingTop: () => (dense ? 0.4 : 2.4),
  paddingBottom: () => (dense ? 0.1 : 1.8),
})
const CAUTION_LAYOUT: CustomTableLayout = {
  hLineWidth: () => 0,
  vLineWidth: (i) => (i === 0 ? 1.4 : 0),
  vLineColor: () => WARN,
  paddingLeft: () => 7,
  paddingRight: () => 0,
  paddingTop: () => 1,
  paddingBottom: () => 1,
}

/** The whole memo as a document of the PDF printer. */
export function pdfDefinition(model: MemoModel, paper: Paper): TDocumentDefinitions {
  const side = (PAGE_WIDTH[paper] - TEXT_WIDTH_PT) / 2
  const stamp = new Date(/^\d{4}-\d{2}-\d{2}$/.test(model.date) ? `${model.date}T00:00:00Z` : model.date)
  return {
    pageSize: paper === 'A4' ? 'A4' : 'LETTER',
    pageMargins: [side, 50, side, 48],
    version: '1.7',
    language: 'en',
    displayTitle: true,
    info: {
      title: `${model.title}: siting memo`,
      subject: model.draft,
      creator: `Sightfell ${model.version}`,
      producer: 'Sightfell',
      creationDate: stamp,
      modDate: stamp,
    },
    defaultStyle: { font: FONT, fontSize: BODY_PT, color: INK, lineHeight: 1.04 },
    header: (page) =>
      page === 1 ? '' : { text: `${model.title}: siting memo`, fontSize: SMALL_PT, color: INK_3, margin: [side, 26, side, 0] },
    footer: (page, pages) => ({
      columns: [
        { text: model.footer, fontSize: SMALL_PT, color: INK_3 },
        { text: `page ${page} of ${pages}`, fontSize: SMALL_PT, color: INK_3, alignment: 'right', width: 90 },
      ],
      margin: [side, 16, side, 0],
    }),
    content: [...titleBlock(model), ...model.sections.flatMap((s) => sectionContent(s))],
  }
}

function titleBlock(model: MemoModel): Content[] {
  return [
    { text: 'Siting memo', fontSize: BODY_PT, color: INK_2, margin: [0, 0, 0, 2] },
    { text: model.title, fontSize: TITLE_PT, lineHeight: 1.05, margin: [0, 0, 0, 8] },
    {
      columns: model.meta.map(([label, text]) => ({
        width: 'auto',
        stack: [
          { text: label, fontSize: SMALL_PT, color: INK_3 },
          { text, fontSize: BODY_PT },
        ],
      })),
      columnGap: 26,
      margin: [0, 0, 0, 9],
    },
    {
      table: { widths: ['*'], body: [[{ text: model.draft, bold: true, color: WARN, fontSize: BODY_PT, alignment: 'center' }]] },
      layout: {
        hLineWidth: () => 0.8,
        vLineWidth: () => 0.8,
        hLineColor: () => WARN,
        vLineColor: () => WARN,
        paddingTop: () => 4,
        paddingBottom: () => 3,
      },
      margin: [0, 0, 0, 4],
    },
  ]
}

/** A heading never stands alone: it is kept with the block after it, unless that may itself be broken over pages. */
function sectionContent(section: Section): Content[] {
  const heading: Content = {
    text: `${section.number}  ${section.title}`,
    fontSize: SECTION_PT,
    bold: true,
    margin: [0, section.newPage ? 0 : 11, 0, 4],
    outline: true,
    outlineText: `${section.number}  ${section.title}`,
  }
  // The paragraphs that open the section, the block they lead to, and its caution.
  const opening = section.blocks.findIndex((b) => b.kind !== 'paragraph')
  const reach = opening < 0 ? section.blocks.length : isLong(section.blocks[opening], OPENING_LINES) ? opening : opening + 1
  const kept = section.blocks.slice(0, section.blocks[reach]?.kind === 'caution' ? reach + 1 : reach)
  const after = section.blocks.slice(kept.length)
  const head: Content = {
    stack: [heading, ...kept.map(blockContent)],
    unbreakable: true,
    ...(section.newPage ? { pageBreak: 'before' as const } : {}),
  }
  return [head, ...keptTogether(after)]
}
/** A caution stays with the table or figure it stands under, a list with the sentence that opens it. */
function keptTogether(blocks: readonly Block[]): Content[] {
  const out: Content[] = []
  for (let i = 0; i < blocks.length; i++) {
    const next = blocks[i + 1]
    const caution = next?.kind === 'caution' && blocks[i].kind !== 'caution' && !isLong(blocks[i])
    const opening = next?.kind === 'list' && blocks[i].kind === 'paragraph' && next.items.length < 5
    if (next && (caution || opening)) {
      out.push({ stack: [blockContent(blocks[i]), blockContent(next)], unbreakable: true })
      i++
    } else out.push(blockContent(blocks[i]))
  }
  return out
}
const isLong = (block: Block | undefined, most = KEPT_LINES): boolean =>
  block === undefined || (block.kind === 'table' && linesOf(block) > most)

function blockContent(block: Block): Content {
  switch (block.kind) {
    case 'paragraph':
      return paragraph(block)
    case 'heading':
      return { text: block.text, bold: true, margin: [0, 8, 0, 3] }
    case 'list':
      return {
        stack: block.items.map((item) => ({
          columns: [
            { width: 8, text: '–', color: INK_3 },
            { width: '*', text: words(item) },
          ],
          fontSize: block.role === 'small' ? SMALL_PT : BODY_PT,
          color: block.role === 'small' ? INK_2 : INK,
          margin: [0, 0, 0, 1.5],
        })),
        margin: [0, 3, 0, 6],
      }
    case 'caution':
      return {
        table: {
          widths: ['*'],
          body: block.texts.map((text) => [{ text: words(text), fontSize: SMALL_PT, color: INK_2 }]),
          dontBreakRows: true,
        },
        layout: CAUTION_LAYOUT,
        margin: [0, 2, 0, 8],
        unbreakable: true,
      }
    case 'table':
      return tableContent(block)
    case 'figure':
      return figureContent(block)
    case 'beside': {
      const gap = 19
      return {
        columns: [
          { width: block.leftPt, stack: block.left.map(blockContent) },
          { width: '*', stack: block.right.map(blockContent) },
        ],
        columnGap: gap,
        unbreakable: true,
      }
    }
  }
}

/** Words as runs that keep `C/N` in one piece: a slash is a place to break a line. */
function words(text: string): Content[] {
  return text
    .split(/(\(?C\/N[,.;:)]?)/)
    .filter((t) => t !== '')
    .map((t) => (t.includes('C/N') ? { text: t, noWrap: true } : { text: t }))
}
function paragraph(block: Extract<Block, { kind: 'paragraph' }>): Content {
  if (block.role === 'small')
    return { stack: [{ text: words(block.text), fontSize: SMALL_PT, color: INK_2 }], margin: [0, 2, 0, 6], unbreakable: true }
  return { stack: [{ text: words(block.text), bold: block.role === 'lead' }], margin: [0, 0, 0, 6], unbreakable: true }
}

/** Tables of up to about this many lines are never broken over pages; a longer block kept whole could not be placed at all. */
const KEPT_LINES = 14
/** The same for the table a section opens with, so that its heading does not stand alone. */
const OPENING_LINES = 24
/** Rows that stay with the head of a table that may be broken. */
const KEPT_ROWS = 4
/** Lines a table will take, estimated high: words per column from the share of the text width it is likely to get. */
function linesOf({ columns, rows }: TableBlock): number {
  const fills = columns.filter((c) => c.width === 'fill').length
  const characters = (c: Column): number => (c.width === 'fill' ? 66 / fills : 24)
  const height = (cell: Cell, c: Column): number => {
    const text = typeof cell === 'string' ? cell : cell.text + (cell.also ?? '')
    return text.split('\n').reduce((sum, line) => sum + Math.max(1, Math.ceil(line.length / characters(c))), 0)
  }
  return rows.reduce((sum, row) => sum + Math.max(...row.map((cell, i) => height(cell, columns[i]))), 0)
}
const isKept = (block: TableBlock): boolean => linesOf(block) <= KEPT_LINES
/** Words longer than this are broken even in a column that keeps its words. */
const LONGEST_KEPT = 34
function tableContent(block: TableBlock): Content {
  const { columns, rows, title } = block
  const kept = isKept(block)
  const headed = columns.some((c) => c.head !== '')
  const heads = columns.map(
    (c): TableCell => ({
      text: c.unit === undefined ? words(c.head) : [...words(c.head), { text: `${c.head === '' ? '' : ' '}${c.unit}`, color: INK_3 }],
      ...HEAD,
      alignment: c.align ?? 'left',
    }),
  )
  // The title of a table that may be broken is part of its repeated head, so that neither stands alone.
  const titleRow: TableCell[] = [
    { text: title ?? '', bold: true, fontSize: SMALL_PT, colSpan: columns.length },
    ...columns.slice(1).map(() => ''),
  ]
  const titled = title !== undefined && !kept && headed
  const grouped = columns.some((c) => c.group !== undefined)
  const heading = [...(titled ? [titleRow] : []), ...(grouped ? [groupRow(columns)] : []), ...(headed ? [heads] : [])]
  const table: ContentTable = {
    table: {
      headerRows: heading.length,
      keepWithHeaderRows: Math.min(rows.length, KEPT_ROWS),
      dontBreakRows: true,
      widths: columns.map((c) => (c.width === 'fill' ? '*' : (c.width ?? 'auto'))),
      body: [...heading, ...rows.map((row) => rowContent(row, columns))],
    },
    layout: hairlines(heading.length, block.dense),
    margin: [0, 2, 0, 8],
  }
  if (!kept) return table
  if (title === undefined) return { stack: [table], unbreakable: true }
  return { stack: [{ text: title ?? '', bold: true, fontSize: SMALL_PT, margin: [0, 4, 0, 2] }, table], unbreakable: true }
}

const HEAD = { fontSize: SMALL_PT, color: INK_2, lineHeight: 1, verticalAlignment: 'bottom' } as const
/** Heads over neighbouring columns of one group. */
function groupRow(columns: readonly Column[]): TableCell[] {
  const out: TableCell[] = []
  while (out.length < columns.length) {
    const { group } = columns[out.length]
    let span = 1
    while (group !== undefined && columns[out.length + span]?.group === group) span++
    out.push({ text: words(group ?? ''), ...HEAD, alignment: span > 1 ? 'center' : 'right', colSpan: span })
    for (let n = 1; n < span; n++) out.push('')
  }
  return out
}

/** Cells of a row; the printer wants an empty cell for each one that a spanning cell covers. */
function rowContent(row: readonly Cell[], columns: readonly Column[]): TableCell[] {
  const out: TableCell[] = []
  for (const cell of row) {
    out.push(cellContent(cell, columns[out.length]))
    const covered = typeof cell === 'string' ? 0 : (cell.span ?? 1) - 1
    for (let n = 0; n < covered; n++) out.push('')
  }
  return out
}
/** A number with its unit and what stands in brackets, or a few of them: never broken over lines. */
function isNumber(cell: Cell): boolean {
  if (typeof cell === 'string') return /^[−≥<+±\d\u202f.,/ –-]{1,24}$/.test(cell)
  const long = cell.text.length + (cell.unit?.length ?? 0) + (cell.also?.length ?? 0)
  return cell.mark === undefined && /^[−≥<+±\d][−≥<+±\d\u202f.,/ –-]*$/.test(cell.text) && long <= 24
}
function cellContent(cell: Cell, column: Column): TableCell {
  const text = typeof cell === 'string' ? cell : cell.text
  const keep = (column.keep === true && text.length <= LONGEST_KEPT) || isNumber(cell)
  const base = { fontSize: SMALL_PT, alignment: column.align ?? ('left' as const), lineHeight: 1, noWrap: keep }
  if (typeof cell === 'string') return { text: words(cell), ...base }
  const runs: Content[] = []
  if (cell.text !== '') runs.push({ text: cell.text, color: cell.light ? INK_2 : INK })
  if (cell.unit) runs.push({ text: textOf({ value: '', unit: cell.unit }), color: INK_3 })
  if (cell.also) runs.push({ text: ` (${cell.also})`, color: INK_3 })
  if (cell.mark) runs.push({ text: `${runs.length > 0 ? ' ' : ''}${cell.mark}`, color: WARN })
  return cell.span === undefined ? { text: runs, ...base } : { text: runs, ...base, colSpan: cell.span, alignment: 'left' }
}

function figureContent(block: FigureBlock): Content {
  const { drawing, png } = block
  const caption: Content = {
    text: [{ text: `Figure ${block.number}  `, color: INK_3 }, ...words(block.caption)],
    fontSize: SMALL_PT,
    color: INK_2,
    margin: [0, 3, 0, 8],
  }
  const vector = svgOf(drawing, FONT)
  const picture: Content[] =
    png === undefined
      ? [{ svg: vector, width: drawing.width }]
      : [
          { image: png, width: drawing.width, height: drawing.height },
          { svg: vector, width: drawing.width, relativePosition: { x: 0, y: -drawing.height } },
        ]
  return { stack: [...picture, caption], unbreakable: true, margin: [0, 4, 0, 0] }
}
