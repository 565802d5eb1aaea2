import type { ReactNode } from 'react'
import { DrawingView } from '../../charts/DrawingView.tsx'
import type { Block, Cell, Column, MemoModel, TableBlock } from '../../memo/model/index.ts'
import { Caution, Mark } from '../../ui/index.ts'

/** The whole memo as it will be printed, but for page breaks and the painted maps. */
export function MemoPages({ model }: { model: MemoModel }) {
  return (
    <article className="memo-pages">
      <p className="draft">{model.draft}</p>
      <h2>{model.title}</h2>
      <dl className="meta">
        {model.meta.map(([label, text]) => (
          <div key={label}>
            <dt>{label}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
      {model.sections.map((s) => (
        <section key={s.id}>
          <h3 className="section-head">
            {s.number} {s.title}
          </h3>
          <Blocks blocks={s.blocks} />
        </section>
      ))}
    </article>
  )
}

/** Blocks of the memo in order. */
export const Blocks = ({ blocks }: { blocks: readonly Block[] }): ReactNode =>
  blocks.map((block, i) => (
    // biome-ignore lint/suspicious/noArrayIndexKey: a block is known by its place in the memo alone
    <BlockView key={i} block={block} />
  ))

function BlockView({ block }: { block: Block }): ReactNode {
  switch (block.kind) {
    case 'paragraph':
      return <p className={block.role === 'lead' ? 'lead' : block.role === 'small' ? 'ink-2 small' : undefined}>{block.text}</p>
    case 'heading':
      return <h4>{block.text}</h4>
    case 'list':
      return (
        <ul className={block.role === 'small' ? 'small' : undefined}>
          {block.items.map((item) => (
            <li key={item}>{item}</li>
          ))}
        </ul>
      )
    case 'caution':
      return block.texts.map((text) => <Caution key={text}>{text}</Caution>)
    case 'figure':
      return (
        <figure>
          <DrawingView drawing={block.drawing} />
          <figcaption>
            Figure {block.number}. {block.caption}
          </figcaption>
        </figure>
      )
    case 'beside':
      return (
        <>
          <Blocks blocks={block.left} />
          <Blocks blocks={block.right} />
        </>
      )
    case 'table':
      return <TableView table={block} />
  }
}

function TableView({ table }: { table: TableBlock }) {
  const heads = table.columns.some((c) => c.head !== '')
  const align = (i: number) =>
    [table.columns[i]?.align === 'right' ? '' : 'text', table.columns[i]?.keep ? 'keep' : ''].filter(Boolean).join(' ') || undefined
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a wide table is scrolled by keys
    // biome-ignore lint/a11y/useSemanticElements: a group of cells, no part of a form
    <div className="memo-table-view" role="group" aria-label={table.title ?? 'Table'} tabIndex={0}>
      {table.title ? <h4>{table.title}</h4> : null}
      <table className="table">
        {heads ? (
          <thead>
            <GroupRow columns={table.columns} />
            <tr>
              {table.columns.map((c, i) => {
                const Head = c.head === '' ? 'td' : 'th'
                return (
                  // biome-ignore lint/suspicious/noArrayIndexKey: columns have no names of their own
                  <Head key={i} scope={c.head === '' ? undefined : 'col'} className={align(i)}>
                    {c.head}
                    {c.unit ? <span className="unit"> {c.unit}</span> : null}
                  </Head>
                )
              })}
            </tr>
          </thead>
        ) : null}
        <tbody>
          {table.rows.map((row, r) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: rows have no names of their own
            <tr key={r}>
              {row.map((cell, i) => (
                // biome-ignore lint/suspicious/noArrayIndexKey: see above
                <td key={i} className={align(i)} colSpan={spanOf(cell)}>
                  <CellView cell={cell} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  )
}
/** Heads over neighbouring columns of one group; nothing where there are none. */
function GroupRow({ columns }: { columns: readonly Column[] }) {
  if (columns.every((c) => c.group === undefined)) return null
  const groups: { group: string | undefined; at: number; span: number }[] = []
  columns.forEach(({ group }, at) => {
    const last = groups.at(-1)
    if (last && group !== undefined && last.group === group) last.span++
    else groups.push({ group, at, span: 1 })
  })
  return (
    <tr className="groups">
      {groups.map(({ group, at, span }) =>
        group === undefined ? (
          <td key={at} />
        ) : (
          <th key={at} colSpan={span} scope="colgroup">
            {group}
          </th>
        ),
      )}
    </tr>
  )
}
const spanOf = (cell: Cell): number | undefined => (typeof cell === 'string' ? undefined : cell.span)

function CellView({ cell }: { cell: Cell }) {
  if (typeof cell === 'string') return cell
  return (
    <>
      <span className={cell.light ? 'ink-3' : undefined}>{cell.text}</span>
      {cell.unit ? <span className="unit">{`\u202f${cell.unit}`}</span> : null}
      {cell.also ? <span className="unit"> ({cell.also})</span> : null}
      {cell.mark ? (
        <>
          {' '}
          <Mark>{cell.mark}</Mark>
        </>
      ) : null}
    </>
  )
}
