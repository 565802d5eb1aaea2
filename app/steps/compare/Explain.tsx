import type { OptionResult } from '../../../core/index.ts'
import { optionKey } from '../../document/index.ts'
import { Button, Value } from '../../ui/index.ts'
import { figureWords, formatAzimuth, formatMast, formatPlaceRange, needKey, textOf } from '../../words/index.ts'
import { useResults, useSession, useView } from '../session/index.ts'

/** What a figure is, what sets it, and the way to where it comes from. */
export function Explain() {
  const { view } = useSession()
  const option = useView((v) => v.option)
  const key = useView((v) => v.figure)
  const system = useView((v) => v.units)
  const step = useView((v) => v.step)
  const result = useResults((r) => (option ? r.byOption.get(optionKey(option)) : undefined))
  const words = key === null ? undefined : figureWords(key)
  if (!option || !key || !words || !result) return <p className="ink-3">Not computed yet</p>
  const set = view.getState().set
  const need = needKey(key)
  const name = need ? result.figures.needs.find((n) => n.needId === need.needId)?.name : undefined
  const from = causeOf(result, key)
  const onMap = step !== 'compare' && step !== 'memo'
  const toMap = onMap ? {} : { step: 'candidates' as const, formOpen: false }
  return (
    <section className="explain" aria-live="polite">
      <h3>
        {words.label}
        {name ? `, ${name}` : ''}, {option.candidate} at {textOf(formatMast(option.heightM))}:{' '}
        <Value of={words.format(result.figures.flat[key] ?? null, system)} />
      </h3>
      <p className="ink-2">{words.meaning}</p>
      {from ? (
        <p className="ink-2">
          Set by {from.obstacle || 'terrain'} toward azimuth {textOf(formatAzimuth(from.azimuthDeg))}
          {from.rangeM === null ? '' : `, ${textOf(formatPlaceRange(from.rangeM, system))}`}
        </p>
      ) : null}
      <div className="row">
        <Button
          small
          onPress={() => set({ ...toMap, layer: words.layer, ...(need ? { need: need.needId } : {}), ...(onMap ? {} : { chart: null }) })}
        >
          Show on the map
        </Button>
        {from ? (
          <Button small onPress={() => set({ ...toMap, layer: words.layer, chart: 'profile', profileAzimuthDeg: from.azimuthDeg })}>
            Terrain profile there
          </Button>
        ) : null}
        {from?.at ? (
          <Button small onPress={() => set({ ...toMap, layer: words.layer, chart: 'ledger', cell: from.at })}>
            Ledger of the place
          </Button>
        ) : null}
      </div>
    </section>
  )
}

interface Cause {
  readonly azimuthDeg: number
  readonly rangeM: number | null
  readonly obstacle: string
  readonly at: { readonly lon: number; readonly lat: number } | null
}
/** The place that sets a figure, where one place does. */
function causeOf(result: OptionResult, key: string): Cause | null {
  const { figures } = result
  const need = needKey(key)
  if (need && /margin/.test(need.of)) {
    const figure = figures.needs.find((n) => n.needId === need.needId)
    const worst = need.of === 'worst_margin_m' ? figure?.worst : need.of === 'worst_signal_margin_db' ? figure?.signal.worst : null
    return worst ? { ...worst, at: { lon: worst.lon, lat: worst.lat } } : null
  }
  if (key === 'horizon_highest_deg' && figures.horizon.highest) {
    const { azimuthDeg, rangeM, obstacle } = figures.horizon.highest
    return { azimuthDeg, rangeM, obstacle, at: null }
  }
  const floor = /^floor_(\d+)nm_worst_m$/.exec(key)
  const worst = floor && figures.floors.find((f) => Math.round(f.rangeM / 1852) === Number(floor[1]))
  if (!worst || worst.worstAzimuthDeg === null) return null
  const { worstAzimuthDeg } = worst
  const row = figures.horizon.rows.reduce(
    (best, r) => (off(r.azimuthDeg, worstAzimuthDeg) < off(best.azimuthDeg, worstAzimuthDeg) ? r : best),
    figures.horizon.rows[0],
  )
  return { azimuthDeg: worstAzimuthDeg, rangeM: worst.rangeM, obstacle: row?.obstacle ?? '', at: null }
}
const off = (a: number, b: number): number => Math.abs(((a - b + 540) % 360) - 180)
