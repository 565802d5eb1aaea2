import type { ReactNode } from 'react'
import type { OptionRef } from '../../core/index.ts'
import { textOf } from '../words/index.ts'
import './memoColumn.css'
import type { Block, Cell, Column, MemoModel, Section, TableBlock } from './model/index.ts'

interface ColumnProps {
  readonly model: MemoModel
  /** The option on show; null or not computed yet: the summary stands alone. */
  readonly option: OptionRef | null
  /** A number was clicked: key of the figure (`Figures.flat`) and the words beside it. */
  readonly onExplain?: (key: string, label: string) => void
}
/** Tables with more columns than this are set as label and number, row by row. */
const MOST_COLUMNS = 2

/** The memo's own words and tables for the option on show, in the order of the PDF; figures are left to the map and the horizon strip beside it. */
export function MemoColumn({ model, option, onExplain }: ColumnProps) {
  const own = option && model.sections.find((s) => s.option && sameOption(s.option, option))
  const summary = model.sections[0]
  return (
    <article className="memo-column" aria-label="Memo">
      {own ? (
        <SectionText section={own} onExplain={onExplain} />
      ) : (
        <p className="memo-small">{option ? 'This option is not computed yet.' : 'Choose an option to read its part of the memo.'}</p>
      )}
      <SectionText section={summary} onExplain={onExplain} />
      <p className="memo-small">Every line here is the memo's own. {onExplain ? 'Click a number for what is behind it.' : ''}</p>
    </article>
  )
}
const sameOption = (a: OptionRef, b: OptionRef): boolean =>
  a.candidate === b.candidate && a.heightM === b.heightM && a.tiltDeg === b.tiltDeg

function SectionText({ section, onExplain }: { section: Section; onExplain: ColumnProps['onExplain'] }) {
  return (
    <section>
      <h2 className="memo-place">
        {section.number} · {section.title}, draft
      </h2>
      <Blocks blocks={section.blocks} onExplain={onExplain} />
    </section>
  )
}

function Blocks({ blocks, onExplain }: { blocks: readonly Block[]; onExplain: ColumnProps['onExplain'] }): ReactNode {
  return blocks.map((block, i) => (
    // Blocks have no identity beyond their place in the memo.
    // biome-ignore lint/suspicious/noArrayIndexKey: see above
    <BlockText key={i} block={block} onExplain={onExplain} />
  ))
}

function BlockText({ block, onExplain }: { block: Block; onExplain: ColumnProps['onExplain'] }): ReactNode {
  switch (block.kind) {
    case 'paragraph':
      return <p className={block.role === 'lead' ? 'memo-lead' : block.role === 'small' ? 'memo-small' : undefined}>{block.text}</p>
    case 'heading':
      return <h3>{block.text}</h3>
    case 'list':
      return (
        <ul className={block.role === 'small' ? 'memo-small' : undefined}>
          {block.items.map((item) => (
            <li key={item}>{item}</li>
          ))}
        </ul>
      )
    case 'caution':
      return (
        <div className="caution" role="note">
          {block.texts.map((text) => (
            <p key={text}>{text}</p>
          ))}
        </div>
      )
    case 'figure':
      return null
    case 'beside':
      return (
        <>
          <Blocks blocks={block.left} onExplain={onExplain} />
          <Blocks blocks={block.right} onExplain={onExplain} />
        </>
      )
    case 'table':
      return <Table table={block} onExplain={onExplain} />
  }
}

function Table({ table, onExplain }: { table: TableBlock; onExplain: ColumnProps['onExplain'] }) {
  const pairs = table.columns.length <= MOST_COLUMNS
  return (
    <div className="memo-table">
      {table.title !== undefined && <h3>{table.title}</h3>}
      {pairs ? (
        <Pairs rows={table.rows.map(pairOf)} onExplain={onExplain} />
      ) : (
        table.rows.map((row, i) => (
          // A table may name the same thing in several rows.
          // biome-ignore lint/suspicious/noArrayIndexKey: see above
          <div key={i}>
            <p className="memo-row">
              {wordsOf(row[0])}
              {typeof row[0] !== 'string' && row[0].unit !== undefined ? textOf({ value: '', unit: row[0].unit }) : ''}
            </p>
            <Pairs rows={rowPairs(row, table.columns)} onExplain={onExplain} />
          </div>
        ))
      )}
    </div>
  )
}
interface Pair {
  readonly label: string
  readonly cell: Cell
}
/** A cell that spans both columns is its own label, with its mark. */
function pairOf([first, second]: readonly Cell[]): Pair {
  const mark = typeof first === 'string' ? undefined : first.mark
  return { label: wordsOf(first), cell: second ?? { text: '', ...(mark === undefined ? {} : { mark }) } }
}
const wordsOf = (cell: Cell): string => (typeof cell === 'string' ? cell : cell.text)
/** One row of a wide table as label and number; a cell that spans the rest stands alone. */
function rowPairs(row: readonly Cell[], columns: readonly Column[]): Pair[] {
  const [, second] = row
  if (typeof second !== 'string' && second?.span !== undefined) return [{ label: wordsOf(second), cell: '' }]
  return row.slice(1).map((cell, i) => ({ label: headOf(columns[i + 1]), cell }))
}
const headOf = ({ head, unit, group }: Column): string => {
  const own = [head, unit].filter(Boolean).join(', ')
  return group === undefined ? own : `${group}: ${own}`
}

function Pairs({ rows, onExplain }: { rows: readonly Pair[]; onExplain: ColumnProps['onExplain'] }) {
  return (
    <dl>
      {rows.map(({ label, cell }, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: two columns may share a head
        <div key={i}>
          <dt>{label}</dt>
          <dd>
            <CellText cell={cell} label={label} onExplain={onExplain} />
          </dd>
        </div>
      ))}
    </dl>
  )
}

function CellText({ cell, label, onExplain }: { cell: Cell; label: string; onExplain: ColumnProps['onExplain'] }): ReactNode {
  if (typeof cell === 'string') return cell
  const { text, unit, also, mark, explain } = cell
  const number = (
    <>
      {text}
      {unit !== undefined && <span className="unit">{textOf({ value: '', unit })}</span>}
      {also !== undefined && <span className="unit"> ({also})</span>}
    </>
  )
  return (
    <>
      {explain !== undefined && onExplain ? (
        <button type="button" className="memo-number" onClick={() => onExplain(explain, label)}>
          {number}
        </button>
      ) : (
        number
      )}
      {mark !== undefined && <span className="memo-mark"> {mark}</span>}
    </>
  )
}
