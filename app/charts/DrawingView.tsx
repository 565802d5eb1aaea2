import type { ReactNode, Ref, SVGProps } from 'react'
import type { Drawing, Item, Paint } from './drawing.ts'

const paintOf = (paint: Paint | undefined): string => (paint === undefined ? 'none' : paint.startsWith('#') ? paint : `var(--${paint})`)

/** Prints one mark of a drawing in the colours of the page's theme. */
function Mark({ item }: { item: Item }): ReactNode {
  if (item.kind === 'text') {
    const halo = item.halo ? { stroke: 'var(--sheet)', strokeWidth: 3, strokeLinejoin: 'round' as const, paintOrder: 'stroke' } : {}
    return (
      <text
        x={item.x}
        y={item.y}
        fontSize={item.size}
        textAnchor={item.anchor}
        fontWeight={item.strong ? 600 : undefined}
        transform={item.turn === undefined ? undefined : `rotate(${item.turn} ${item.x} ${item.y})`}
        style={{ fill: paintOf(item.ink), ...halo }}
      >
        {item.text}
      </text>
    )
  }
  const common: SVGProps<SVGPathElement & SVGCircleElement> = {
    strokeWidth: item.stroke === undefined ? undefined : (item.width ?? 1),
    strokeLinejoin: 'round',
    strokeDasharray: item.dash?.join(' '),
    opacity: item.opacity,
    style: { fill: paintOf(item.fill), stroke: paintOf(item.stroke) },
  }
  return item.kind === 'path' ? <path d={item.d} {...common} /> : <circle cx={item.x} cy={item.y} r={item.r} {...common} />
}

/** A drawing as inline SVG of its own size; children (cursors, focus marks) come on top. */
export function DrawingView({
  drawing,
  svgRef,
  children,
  ...rest
}: { drawing: Drawing; svgRef?: Ref<SVGSVGElement>; children?: ReactNode } & Omit<SVGProps<SVGSVGElement>, 'ref'>) {
  return (
    <svg
      ref={svgRef}
      width={drawing.width}
      height={drawing.height}
      viewBox={`0 0 ${drawing.width} ${drawing.height}`}
      role="img"
      aria-label={drawing.title}
      {...rest}
    >
      {drawing.items.map((item, i) => (
        // Marks have no identity beyond their place in the drawing.
        // biome-ignore lint/suspicious/noArrayIndexKey: see above
        <Mark key={i} item={item} />
      ))}
      {children}
    </svg>
  )
}
