import { geodesicDirect, groundPerPx, type LonLat, pixelAtLonLat, rampHex, type SettledCandidate, type View } from '../../../core/index.ts'
import { boxPath, type Drawing, type Item, lineOf, type Paint, type Point, pathOf, textWidth } from '../../charts/index.ts'
import { LAYER_WORDS, legendStops, ringStep, ringText, scaleBar, type UnitSystem } from '../../words/index.ts'
import { type MemoMap, SMALL_PT } from './types.ts'

export interface MapFigureInput {
  readonly map: MemoMap
  readonly candidates: readonly SettledCandidate[]
  readonly maxRangeM: number
  readonly system: UnitSystem
  readonly widthPt: number
}
const SIZE = SMALL_PT - 1

/** What is drawn over the painted map: range rings, every candidate, legend, scale bar and north, in points. */
export function mapDrawing(input: MapFigureInput): Drawing {
  const { map, widthPt, system } = input
  const { view } = map
  const scale = widthPt / view.width
  const height = view.height * scale
  const place = (at: LonLat): Point => {
    const [x, y] = pixelAtLonLat(view, at)
    return [x * scale, y * scale]
  }
  const own = input.candidates.find((c) => c.id === map.ref.candidate)
  const items: Item[] = []
  if (own) items.push(...rings(own, input.maxRangeM, place, widthPt, height, system))
  for (const c of input.candidates) items.push(...candidateMark(c.id, place(c), c === own, widthPt, height))
  items.push(...legend(map, system, height), ...scaleAndNorth(view, scale, system, widthPt, height))
  items.push({ kind: 'path', d: boxPath(0, 0, widthPt, height), stroke: 'line', width: 0.6 })
  return { width: widthPt, height, title: `Map of ${LAYER_WORDS[map.layer].title} from ${map.ref.candidate}`, items }
}

/** Rings as geodesic circles, named on their north side; what leaves the map is left out. */
function rings(at: LonLat, maxRangeM: number, place: (p: LonLat) => Point, width: number, height: number, system: UnitSystem): Item[] {
  const step = ringStep(maxRangeM, system, 5)
  const items: Item[] = []
  for (let n = 1; n * step <= maxRangeM * 1.0001; n++) {
    const circle: Point[] = []
    for (let az = 0; az <= 360; az += 4) {
      const point = place(geodesicDirect(at, az % 360, n * step))
      const inside = point[0] >= 0 && point[0] <= width && point[1] >= 0 && point[1] <= height
      circle.push(inside ? point : [Number.NaN, 0])
    }
    items.push({ kind: 'path', d: pathOf(circle), stroke: 'ink', width: 0.5, opacity: 0.55 })
    const [x, y] = place(geodesicDirect(at, 0, n * step))
    if (y > 2 * SIZE && y < height && x > 0 && x < width)
      items.push({
        kind: 'text',
        x,
        y: y - 0.3 * SIZE,
        text: ringText(n * step, system),
        size: SIZE,
        ink: 'ink',
        anchor: 'middle',
        halo: true,
      })
  }
  return items
}

function candidateMark(id: string, [x, y]: Point, own: boolean, width: number, height: number): Item[] {
  if (x < 0 || x > width || y < 0 || y > height) return []
  const paint: Paint = own ? 'accent' : 'ink'
  return [
    { kind: 'circle', x, y, r: own ? 4.6 : 3.6, fill: 'sheet', stroke: paint, width: own ? 1.6 : 1 },
    { kind: 'circle', x, y, r: 1.2, fill: paint },
    { kind: 'text', x: x + 6.4, y: y + 0.35 * SMALL_PT, text: id, size: SMALL_PT, ink: 'ink', halo: true, strong: own },
  ]
}

/** Widest line of the note under the ramp, pt. */
const NOTE_PT = 138
/** The parts of a note, as many to a line as fit. */
function noteRows(note: string): string[] {
  const rows: string[] = []
  for (const part of note.split(' · ')) {
    const joined = rows.length === 0 ? part : `${rows[rows.length - 1]} · ${part}`
    if (rows.length > 0 && textWidth(joined, SIZE) <= NOTE_PT) rows[rows.length - 1] = joined
    else rows.push(part)
  }
  return rows
}

function legend(map: MemoMap, system: UnitSystem, height: number): Item[] {
  const words = LAYER_WORDS[map.layer]
  const { labels, unit } = legendStops(map.layer, map.ramp.stops, system)
  const rows = noteRows(words.note)
  const bar = 118
  const pad = 5
  const title = words.title
  const of = `${words.of}${unit === '' ? '' : `, ${unit}`}`
  const width = Math.max(bar, textWidth(title, SIZE) + 4 + textWidth(of, SIZE), ...rows.map((r) => textWidth(r, SIZE))) + 2 * pad
  const tall = pad + SIZE + 4 + 7 + 1.2 * SIZE + rows.length * 1.25 * SIZE + pad
  const left = 6
  const top = height - 6 - tall
  const items: Item[] = [{ kind: 'path', d: boxPath(left, top, left + width, top + tall), fill: 'sheet', opacity: 0.9 }]
  const x0 = left + pad
  let y = top + pad + 0.85 * SIZE
  items.push({ kind: 'text', x: x0, y, text: title, size: SIZE, ink: 'ink', strong: true })
  items.push({ kind: 'text', x: x0 + 1.06 * textWidth(title, SIZE) + 4, y, text: of, size: SIZE, ink: 'ink-3' })
  y += 4
  const cells = 28
  for (let n = 0; n < cells; n++) {
    const hex = rampHex(map.ramp, map.ramp.low + ((n + 0.5) / cells) * (map.ramp.high - map.ramp.low), false)
    if (hex)
      items.push({ kind: 'path', d: boxPath(x0 + (n * bar) / cells, y, x0 + ((n + 1) * bar) / cells + 0.2, y + 7), fill: hex as Paint })
  }
  y += 7 + SIZE
  labels.forEach((l, i) => {
    const anchor = i === 0 ? 'start' : i === labels.length - 1 ? 'end' : 'middle'
    items.push({ kind: 'text', x: x0 + l.at * bar, y, text: l.text, size: SIZE, ink: 'ink-2', anchor })
  })
  y += 0.2 * SIZE
  for (const row of rows) {
    y += 1.25 * SIZE
    items.push({ kind: 'text', x: x0, y, text: row, size: SIZE, ink: 'ink-2' })
  }
  return items
}

function scaleAndNorth(view: View, scale: number, system: UnitSystem, width: number, height: number): Item[] {
  const { px, text } = scaleBar(groundPerPx(view) / scale, width * 0.2, system)
  const right = width - 8
  const y = height - 9
  const bar: Item[] = [
    {
      kind: 'path',
      d: boxPath(right - Math.max(px, textWidth(text, SIZE)) - 5, y - 6 - SIZE, width - 4, height - 4),
      fill: 'sheet',
      opacity: 0.85,
    },
    {
      kind: 'path',
      d: pathOf([
        [right - px, y - 3],
        [right - px, y],
        [right, y],
        [right, y - 3],
      ]),
      stroke: 'ink',
      width: 0.9,
    },
    { kind: 'text', x: right, y: y - 5, text, size: SIZE, ink: 'ink', anchor: 'end' },
  ]
  const nx = width - 14
  const north: Item[] = [
    { kind: 'circle', x: nx, y: 16, r: 10.5, fill: 'sheet', opacity: 0.85 },
    { kind: 'path', d: lineOf(nx, 24, nx, 9), stroke: 'ink', width: 0.9 },
    {
      kind: 'path',
      d: pathOf(
        [
          [nx - 2.6, 12.4],
          [nx, 7.4],
          [nx + 2.6, 12.4],
        ],
        true,
      ),
      fill: 'ink',
    },
    { kind: 'text', x: nx + 3.4, y: 19, text: 'N', size: SIZE - 0.5, ink: 'ink' },
  ]
  return [...bar, ...north]
}
