import { type Drawing, type Ink, type Item, type Paint, round3 } from './drawing.ts'

/** The sheet in print: fixed hex, because PDF readers of SVG know neither CSS variables nor hsl(). */
export const PAPER: Readonly<Record<Ink, `#${string}`>> = {
  sheet: '#ffffff',
  raised: '#fffdf8',
  line: '#d9d3c5',
  ink: '#1f2428',
  'ink-2': '#4b5359',
  'ink-3': '#6b7378',
  accent: '#0f5c63',
  warn: '#9a5b00',
  'warm-3': '#efbd75',
  'warm-5': '#c97439',
  'warm-6': '#a64f33',
  'warm-7': '#7c3230',
  'cool-2': '#d3e8e4',
  'cool-4': '#81bcbf',
  'cool-6': '#357b94',
  'cool-7': '#235877',
}
export const hexOf = (paint: Paint): string => (paint.startsWith('#') ? paint : PAPER[paint as Ink])

/** The drawing as an SVG string: hex colours only, one font family (a name without spaces or digits, which SVG attributes need no quotes for), for the memo and for snapshots. */
export function svgOf(drawing: Drawing, font = 'SourceSans'): string {
  const { width, height } = drawing
  const body = drawing.items.map((item) => printItem(item, font)).join('\n')
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${round3(width)}" height="${round3(height)}" viewBox="0 0 ${round3(width)} ${round3(height)}">\n<title>${escapeXml(drawing.title)}</title>\n${body}\n</svg>`
}

function printItem(item: Item, font: string): string {
  if (item.kind === 'path') return `<path d="${item.d}"${styleOf(item)}/>`
  if (item.kind === 'circle') return `<circle cx="${round3(item.x)}" cy="${round3(item.y)}" r="${round3(item.r)}"${styleOf(item)}/>`
  const turn = item.turn === undefined ? '' : ` transform="rotate(${item.turn} ${round3(item.x)} ${round3(item.y)})"`
  const anchor = item.anchor && item.anchor !== 'start' ? ` text-anchor="${item.anchor}"` : ''
  const strong = item.strong ? ' font-weight="bold"' : ''
  const at = `x="${round3(item.x)}" y="${round3(item.y)}" font-family="${font}" font-size="${round3(item.size)}"${anchor}${strong}${turn}`
  const text = escapeXml(item.text)
  const halo = item.halo
    ? `<text ${at} fill="${PAPER.sheet}" stroke="${PAPER.sheet}" stroke-width="2.4" stroke-linejoin="round" opacity="0.85">${text}</text>\n`
    : ''
  return `${halo}<text ${at} fill="${hexOf(item.ink)}">${text}</text>`
}
function styleOf(item: Exclude<Item, { kind: 'text' }>): string {
  let style = ` fill="${item.fill === undefined ? 'none' : hexOf(item.fill)}"`
  if (item.stroke !== undefined) style += ` stroke="${hexOf(item.stroke)}" stroke-width="${item.width ?? 1}" stroke-linejoin="round"`
  if (item.dash) style += ` stroke-dasharray="${item.dash.join(' ')}"`
  if (item.opacity !== undefined) style += ` opacity="${item.opacity}"`
  return style
}
export const escapeXml = (text: string): string =>
  text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c] as string)
