import { limitOf, type NeedDoc } from '../../../core/index.ts'
import { Caution, Mark, NumberField, Select } from '../../ui/index.ts'
import { CAUTIONS, DB, DEG, formatSetting, PLAIN, SWERLING_CASES, textOf } from '../../words/index.ts'
import { useDoc, useView } from '../session/index.ts'
import { settledOf } from '../settled.ts'
import { faceOf, OriginMark } from './fields.tsx'

export type SetPart = (key: string, value: unknown) => void
interface PartProps {
  readonly need: NeedDoc
  /** Key path of the need, and its index. */
  readonly path: string
  readonly at: number
  readonly set: SetPart
}
const PERCENT = { unit: '%', size: 1 }
const SQUARE_METRES = { unit: 'm²', size: 1 }
const HECTOPASCAL = { unit: 'hPa', size: 1 }
const HEIGHT_ABOVE = [
  { id: 'sea', words: 'above sea level' },
  { id: 'ground', words: 'above ground' },
] as const

/** Height of the layer: one, or floor and ceiling. */
export function Heights({ need, path, set }: PartProps) {
  const system = useView((v) => v.units)
  const height = faceOf('height', system)
  const limit = limitOf(`${path}.heightM`)
  const [low, high] = Array.isArray(need.heightM) ? need.heightM : [need.heightM, undefined]
  const setHeights = (a: number | undefined, b: number | undefined) =>
    set('heightM', a !== undefined && b !== undefined ? [Math.min(a, b), Math.max(a, b)] : (a ?? b))
  return (
    <>
      <NumberField
        label="Height"
        marks={<OriginMark path={`${path}.heightM`} />}
        value={low}
        required
        face={height}
        limit={limit}
        onCommit={(v) => setHeights(v, high)}
      />
      <NumberField
        label="Up to height"
        value={high}
        fallbackWords="one height"
        face={height}
        limit={limit}
        onCommit={(v) => setHeights(low, v)}
      />
      <Select
        label="Heights are"
        value={need.heightAbove ?? 'sea'}
        choices={HEIGHT_ABOVE}
        marks={<OriginMark path={`${path}.heightAbove`} />}
        onChange={(v) => set('heightAbove', v)}
      />
    </>
  )
}

/** Ranges and sector of a layer. */
export function Reach({ need, path, at, set }: PartProps) {
  const system = useView((v) => v.units)
  const range = faceOf('range', system)
  const toRangeM = useDoc((d) => settledOf(d)?.needs[at]?.toRangeM)
  const limit = (key: string) => limitOf(`${path}.${key}`)
  const sector = need.sectorDeg ?? [0, 360]
  return (
    <>
      <NumberField
        label="From range"
        marks={<OriginMark path={`${path}.fromRangeM`} />}
        value={need.fromRangeM}
        fallback={0}
        face={range}
        limit={limit('fromRangeM')}
        onCommit={(v) => set('fromRangeM', v)}
      />
      <NumberField
        label="To range"
        marks={<OriginMark path={`${path}.toRangeM`} />}
        value={need.toRangeM}
        fallback={toRangeM}
        face={range}
        limit={limit('toRangeM')}
        onCommit={(v) => set('toRangeM', v)}
      />
      <NumberField
        label="Sector from"
        marks={<OriginMark path={`${path}.sectorDeg`} />}
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
    </>
  )
}

/** How the points of a file are flown. */
export function Flight({ need, path, set }: PartProps) {
  const system = useView((v) => v.units)
  return (
    <>
      {need.kind === 'track' ? (
        <NumberField
          label="Speed"
          value={need.speedMs}
          fallbackWords="not stated"
          face={faceOf('speed', system)}
          limit={limitOf(`${path}.speedMs`)}
          onCommit={(v) => set('speedMs', v)}
        />
      ) : null}
      <NumberField
        label="QNH"
        value={need.qnhHpa}
        fallbackWords="not stated"
        face={HECTOPASCAL}
        limit={limitOf(`${path}.qnhHpa`)}
        onCommit={(v) => set('qnhHpa', v)}
      />
    </>
  )
}

/** What must be detected, how surely, and over which share. */
export function Target({ need, path, at, set }: PartProps) {
  const settled = useDoc((d) => settledOf(d)?.needs[at])
  const limit = (key: string) => limitOf(`${path}.${key}`)
  const rcsM2 = need.rcsM2 ?? settled?.rcsM2
  const ratio = settled ? Math.ceil(settled.requiredRatioDb * 10) / 10 : undefined
  const ratioStated = need.requiredRatioDb !== undefined && need.requiredRatioDb !== null
  return (
    <>
      <NumberField
        label="Share to be met"
        marks={<OriginMark path={`${path}.requiredPct`} />}
        value={need.requiredPct}
        fallback={settled?.requiredPct}
        face={PERCENT}
        limit={limit('requiredPct')}
        onCommit={(v) => set('requiredPct', v)}
      />
      <NumberField
        label={
          <>
            RCS <span className="ink-3 small">{rcsM2 ? textOf(formatSetting(10 * Math.log10(rcsM2), 'dBsm')) : ''}</span>
          </>
        }
        value={need.rcsM2}
        marks={<OriginMark path={`${path}.rcsM2`} />}
        fallback={settled?.rcsM2}
        face={SQUARE_METRES}
        limit={limit('rcsM2')}
        onCommit={(v) => set('rcsM2', v)}
      />
      <Select
        label="Fluctuation"
        value={String(need.swerling ?? settled?.swerling ?? 1) as '1'}
        choices={SWERLING_CASES}
        marks={need.swerling === undefined ? <Mark>default</Mark> : <OriginMark path={`${path}.swerling`} />}
        onChange={(v) => set('swerling', Number(v))}
      />
      <NumberField
        label="Pd"
        marks={<OriginMark path={`${path}.pd`} />}
        value={need.pd}
        fallback={settled?.pd}
        face={PLAIN}
        limit={limit('pd')}
        onCommit={(v) => set('pd', v)}
      />
      <NumberField
        label="Required ratio"
        value={need.requiredRatioDb}
        fallback={ratio}
        mark="worked out"
        face={DB}
        limit={limit('requiredRatioDb')}
        onCommit={(v) => set('requiredRatioDb', v)}
      />
      {ratioStated ? null : <Caution>{CAUTIONS.requiredRatio}</Caution>}
    </>
  )
}
