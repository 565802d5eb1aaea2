import { type ExposureFigure, exposureOf, type OptionRef } from '../../../core/index.ts'
import {
  cautionsFor,
  formatExposure,
  formatMargin,
  formatNumber,
  formatPower,
  formatSetting,
  textOf,
  withMetric,
} from '../../words/index.ts'
import { NO_HEADS, optionName, value } from './cells.ts'
import { hasTilts } from './summarySection.ts'
import type { Block, Cell, MemoInput } from './types.ts'

export const EXPOSURE_NOT = 'not given: the aperture of the antenna is not stated'
/** Keep-clear distances of an option's radar. */
export const exposureFor = (input: MemoInput, ref: OptionRef): ExposureFigure | null =>
  exposureOf(input.study.radar, ref.tiltDeg, ref.heightM)
/** Headline value, antenna stopped, with the limit's basis as its mark. */
export function exposureCell(input: MemoInput, ref: OptionRef): Cell {
  const x = exposureFor(input, ref)
  if (!x) return { text: EXPOSURE_NOT, light: true }
  return value(formatExposure(x.stoppedM), x.limit.basis === 'read' ? {} : { mark: x.limit.basis })
}

/** RF exposure: what must be kept clear with the antenna stopped, and the height of the beam there. */
export function exposureBlocks(input: MemoInput): Block[] {
  const caution: Block = { kind: 'caution', texts: cautionsFor('exposure') }
  const refs = input.results.map((r) => r.ref)
  const first = refs[0] ?? { candidate: '', heightM: 0, tiltDeg: input.study.radar.antenna.tiltDeg }
  const x = exposureFor(input, first)
  if (!x)
    return [
      {
        kind: 'paragraph',
        text: 'No keep-clear distance is given: the width and height of the aperture are not stated, and the near field cannot be judged without them.',
      },
      caution,
    ]
  const distance = textOf(formatExposure(x.stoppedM))
  const basis = x.limit.basis === 'read' ? {} : { mark: x.limit.basis }
  const rows: Cell[][] = [
    ['Keep clear, antenna stopped, main beam', value(formatExposure(x.stoppedM), basis)],
    [
      'Antenna turning, averaged over a turn',
      x.rotatingM === null ? { text: `not given: ${x.rotatingNot}`, light: true } : value(formatExposure(x.rotatingM), basis),
    ],
    ['Limit', { text: `${textOf(formatSetting(x.limit.limitWm2, 'W/m²'))}, ${x.limit.name}`, ...basis }],
    ['Source of the limit', x.limit.source],
    ['Average power, highest duty', { text: `${textOf(formatPower(x.averagePowerW))}, duty ${formatNumber(100 * x.duty, 2)}\u202f%` }],
    ['Reflection factor, in power', formatNumber(x.reflectionFactor)],
    ['Larger of far and near field', x.by],
    ['0.6 D²/λ', value(formatExposure(x.transitionM))],
    ['Pulse-peak limits', { text: 'not assessed', light: true }],
  ]
  const blocks: Block[] = [
    {
      kind: 'paragraph',
      role: 'lead',
      text: `With the antenna stopped the main beam is to be kept clear to ${distance}.`,
    },
    { kind: 'table', id: 'exposure', dense: true, columns: NO_HEADS, rows },
  ]
  const seen = new Set<string>()
  const own = refs.filter(({ heightM, tiltDeg }) => {
    const key = `${heightM}|${tiltDeg}`
    return seen.has(key) ? false : seen.add(key)
  })
  const edges = own.map(({ heightM, tiltDeg }) => {
    const edge = exposureFor(input, { candidate: '', heightM, tiltDeg })?.lowerEdgeAboveGroundM ?? null
    const mast = optionName({ candidate: '', heightM, tiltDeg }, hasTilts(input)).replace(/^\s*at /, 'from a mast of ')
    if (edge === null) return `no such edge ${mast}`
    return edge <= 0 ? `it has met level ground before ${mast}` : `${withMetric((s) => formatMargin(edge, s), input.system)} ${mast}`
  })
  if (edges.length > 0)
    blocks.push({
      kind: 'paragraph',
      role: 'small',
      text: `Lower half-power edge of the beam at ${distance}, above level ground at the foot of the mast: ${edges.join('; ')}. Rising ground comes nearer to it.`,
    })
  blocks.push(caution)
  return blocks
}
