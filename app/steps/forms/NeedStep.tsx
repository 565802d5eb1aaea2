import { limitOf, type NeedDoc } from '../../../core/index.ts'
import { addNeed, removeNeed, setField } from '../../document/index.ts'
import { Button, Caution, Check, CommitField, Mark, NumberField, Select } from '../../ui/index.ts'
import { CAUTIONS, DB, DEG, EMPTY_WORDS, formatSetting, PLAIN, SWERLING_CASES, textOf } from '../../words/index.ts'
import { useDoc, useSession, useView } from '../session/index.ts'
import { settledOf } from '../settled.ts'
import { faceOf } from './fields.tsx'
import { Problems } from './Problems.tsx'
import { Remarks } from './Remarks.tsx'

const HEIGHT_ABOVE = [
  { id: 'sea', words: 'above sea level' },
  { id: 'ground', words: 'above ground' },
] as const

/** What must be detected, and where. */
export function NeedStep() {
  const { study } = useSession()
  const needs = useDoc((d) => d.needs ?? NONE)
  return (
    <>
      {needs.length === 0 ? (
        <div className="empty">
          <h3>{EMPTY_WORDS.need.title}</h3>
          <p className="ink-2">{EMPTY_WORDS.need.reason}</p>
        </div>
      ) : null}
      {needs.map((need, i) => (
        <Need key={need.id} need={need} at={i} />
      ))}
      <Remarks about={['needs']} />
      <div className="row">
        <Button onPress={() => addNeed(study)}>Add a layer need</Button>
      </div>
    </>
  )
}
const NONE: NeedDoc[] = []

function Need({ need, at }: { need: NeedDoc; at: number }) {
  const { study } = useSession()
  const system = useView((v) => v.units)
  const maxRangeM = useDoc((d) => settledOf(d)?.run.maxRangeM)
  const path = `needs[${at}]`
  const title = need.name ?? need.id
  const set = (key: string, value: unknown) => setField(study, `${path}.${key}`, value, `changed ${title}`)
  const limit = (key: string) => limitOf(`${path}.${key}`)
  const height = faceOf('height', system)
  const range = faceOf('range', system)
  const heights = Array.isArray(need.heightM) ? need.heightM : [need.heightM, undefined]
  const sector = need.sectorDeg ?? [0, 360]
  const setHeights = (low: number | undefined, high: number | undefined) =>
    set('heightM', low !== undefined && high !== undefined ? [Math.min(low, high), Math.max(low, high)] : (low ?? high))
  return (
    <section className="card need">
      <div className="head">
        <div className="need-name">
          <CommitField
            label="Name"
            hideLabel
            ariaLabel={`Name of ${title}`}
            text={title}
            shape="wide"
            onCommit={(text) => {
              set('name', text.trim() || undefined)
              return null
            }}
          />
        </div>
        <Button small look="quiet" label={`Remove ${title}`} onPress={() => removeNeed(study, need.id)}>
          remove
        </Button>
      </div>
      <Problems where={(p) => p.startsWith(path)} />
      <Check value={need.must ?? true} onChange={(v) => set('must', v)}>
        Must be met
      </Check>
      <NumberField
        label="Height"
        value={heights[0]}
        required
        face={height}
        limit={limit('heightM')}
        onCommit={(v) => setHeights(v, heights[1])}
      />
      <NumberField
        label="up to height"
        value={heights[1]}
        fallbackWords="one height"
        face={height}
        limit={limit('heightM')}
        onCommit={(v) => setHeights(heights[0], v)}
      />
      <Select label="Heights are" value={need.heightAbove ?? 'sea'} choices={HEIGHT_ABOVE} onChange={(v) => set('heightAbove', v)} />
      <NumberField
        label="From range"
        value={need.fromRangeM}
        fallback={0}
        face={range}
        limit={limit('fromRangeM')}
        onCommit={(v) => set('fromRangeM', v)}
      />
      <NumberField
        label="To range"
        value={need.toRangeM}
        fallback={maxRangeM}
        face={range}
        limit={limit('toRangeM')}
        onCommit={(v) => set('toRangeM', v)}
      />
      <NumberField
        label="Sector from"
        value={need.sectorDeg?.[0]}
        fallback={0}
        face={DEG}
        limit={limit('sectorDeg[0]')}
        onCommit={(v) => set('sectorDeg', v === undefined ? undefined : [v, sector[1]])}
      />
      <NumberField
        label="Sector to"
        value={need.sectorDeg?.[1]}
        fallback={360}
        face={DEG}
        limit={limit('sectorDeg[1]')}
        onCommit={(v) => set('sectorDeg', v === undefined ? undefined : [sector[0], v])}
      />
      <NumberField
        label="Share to be met"
        value={need.requiredPct}
        fallback={100}
        face={{ unit: '%', size: 1 }}
        limit={limit('requiredPct')}
        onCommit={(v) => set('requiredPct', v)}
      />
      <NumberField
        label={
          <>RCS{need.rcsM2 ? <span className="ink-3 small"> {textOf(formatSetting(10 * Math.log10(need.rcsM2), 'dBsm'))}</span> : null}</>
        }
        value={need.rcsM2}
        fallback={1}
        face={{ unit: 'm²', size: 1 }}
        limit={limit('rcsM2')}
        onCommit={(v) => set('rcsM2', v)}
      />
      <Select
        label="Fluctuation"
        value={String(need.swerling ?? 1) as '1'}
        choices={SWERLING_CASES}
        marks={need.swerling === undefined ? <Mark>default</Mark> : null}
        onChange={(v) => set('swerling', Number(v))}
      />
      <NumberField label="Pd" value={need.pd} fallback={0.8} face={PLAIN} limit={limit('pd')} onCommit={(v) => set('pd', v)} />
      <NumberField
        label="Required ratio"
        value={need.requiredRatioDb}
        fallback={13}
        face={DB}
        limit={limit('requiredRatioDb')}
        onCommit={(v) => set('requiredRatioDb', v)}
      />
      {need.requiredRatioDb === undefined || need.requiredRatioDb === null ? <Caution>{CAUTIONS.requiredRatio}</Caution> : null}
    </section>
  )
}
