import { lazy, Suspense, useMemo, useState } from 'react'
import { differenceInfo, type LonLat, ladderValuesOf, type OptionRef } from '../../../core/index.ts'
import {
  addCandidate,
  hasStartingRadar,
  moveCandidate,
  optionKey,
  sameOption,
  setMastHeights,
  settleOption,
  studyOptions,
} from '../../document/index.ts'
import { createChannel, createMapHub } from '../../map/hub.ts'
import type { LinkedView, MapCandidate, MapHub, MapNeed, MapRejected, MapShow } from '../../map/index.ts'
import { EMPTY_WORDS } from '../../words/index.ts'
import { useDoc, useGround, useResults, useSession, useView } from '../session/index.ts'
import { cellUnder, settledOf } from '../settled.ts'
import { useRoadLines } from './useRoadLines.ts'

const LowerPanel = lazy(() => import('./LowerPanel.tsx').then((m) => ({ default: m.LowerPanel })))
const MapPane = lazy(() => import('../../map/index.ts').then((m) => ({ default: m.MapPane })))
const Ruler = lazy(() => import('../../map/index.ts').then((m) => ({ default: m.Ruler })))

const NO_CORNERS: readonly LonLat[] = []
/** Under this width the form lies over the map, px. */
const NARROW_PX = 1200
const NO_MARKS: never[] = []

/** Candidates as the map draws them. */
function useMapCandidates(): readonly MapCandidate[] {
  const candidates = useDoc((d) => d.candidates)
  const ownTiltDeg = useDoc((d) => d.radar.antenna.tiltDeg ?? 0)
  return useMemo(
    () =>
      candidates
        .filter((c) => c.rejected === undefined)
        .map((c) => ({
          id: c.id,
          name: c.name ?? c.id,
          lon: c.lon,
          lat: c.lat,
          mastHeightsM: c.mastHeightsM,
          tiltsDeg: c.tiltsDeg && c.tiltsDeg.length > 0 ? c.tiltsDeg : [ownTiltDeg],
        })),
    [candidates, ownTiltDeg],
  )
}
/** Rejected candidates as the map draws them. */
function useMapRejected(): readonly MapRejected[] {
  const candidates = useDoc((d) => d.candidates)
  return useMemo(
    () => candidates.filter((c) => c.rejected !== undefined).map((c) => ({ id: c.id, name: c.name ?? c.id, lon: c.lon, lat: c.lat })),
    [candidates],
  )
}
function useMapNeeds(maxRangeM: number): readonly MapNeed[] {
  const needs = useDoc((d) => d.needs)
  return useMemo(
    () =>
      (needs ?? [])
        .filter((n) => n.kind === 'layer' || n.kind === 'polygon')
        .map((n) => ({
          id: n.id,
          name: n.name ?? n.id,
          fromRangeM: n.fromRangeM ?? 0,
          toRangeM: n.toRangeM ?? maxRangeM,
          sectorDeg: n.sectorDeg ?? [0, 360],
          ring: n.kind === 'layer',
        })),
    [needs, maxRangeM],
  )
}

/** The map with what it needs of the session. */
export function MapSlot({ hub }: { hub: MapHub }) {
  const session = useSession()
  const { study, view, client } = session
  const set = view.getState().set
  const { step, option, layer, need, beside, units, theme, placing, cell, chart, profileAzimuthDeg } = useView((v) => v)
  const ground = useGround((g) => g.ground)
  const obstacles = useGround((g) => g.obstacles)
  const roads = useGround((g) => g.roads)
  const roadLines = useRoadLines(option)
  const marks = useResults((r) => (option ? r.byOption.get(optionKey(option))?.figures.marks : undefined)) ?? NO_MARKS
  const losses = useResults((r) => {
    const figures = option ? r.byOption.get(optionKey(option))?.figures.needs : undefined
    const areas = figures?.filter((n) => n.measure === 'area' && n.notAssessed === null)
    return (areas?.find((n) => n.needId === need) ?? areas?.[0])?.losses ?? null
  })
  const maxRangeM = useDoc((d) => settledOf(d)?.run.maxRangeM ?? d.radar.instrumentedRangeM ?? 60_000)
  const candidates = useMapCandidates()
  const rejected = useMapRejected()
  const needs = useMapNeeds(maxRangeM)
  // a whole-sheet step lies over the map and explains figures itself
  const sheet = step === 'compare' || step === 'memo'
  const starting = useDoc(hasStartingRadar)
  const shownMarks = useMemo(() => (starting ? [...marks, { mark: 'default', about: 'radar: starting values' }] : marks), [marks, starting])
  const select = (id: string) => {
    const { doc } = study.getState()
    const c = doc.candidates.find((x) => x.id === id)
    if (c)
      set({ option: settleOption(doc, { candidate: id, heightM: option?.heightM ?? c.mastHeightsM[0], tiltDeg: option?.tiltDeg ?? 0 }) })
  }
  const against = useAgainst()
  const twin = against !== null && (beside === 'maps' || differenceInfo(layer) === null)
  const [link] = useState(() => createChannel<LinkedView | null>(null))
  const [secondHub] = useState(createMapHub)
  const shared = {
    client,
    groundSerial: ground?.serial ?? null,
    corners: ground?.corners ?? NO_CORNERS,
    candidates,
    rejected,
    needs,
    obstacles,
    roads,
    maxRangeM,
    // two maps need the room of the form where it lies over the map
    onShow: (part: Partial<MapShow>) => set(part.beside === 'maps' && window.innerWidth < NARROW_PX ? { ...part, formOpen: false } : part),
    units,
    night: theme === 'night',
    marks: shownMarks,
    losses,
    onSelect: select,
    onMove: (id: string, at: LonLat) => moveCandidate(study, id, at),
    onPlacingEnd: () => set({ placing: false }),
    onLowerClose: () => set({ chart: null, cell: null }),
    progress: null,
    onStop: session.stop,
  }
  const first = (
    <Suspense fallback={null}>
      <MapPane
        {...shared}
        hub={hub}
        roadLines={roadLines}
        link={link}
        show={{ option, layer, need, against, beside: twin ? 'maps' : 'difference' }}
        placing={placing}
        onPlace={(at) => {
          const id = addCandidate(study, at)
          set({ placing: false })
          select(id)
        }}
        onCell={(at) => set({ cell: option ? cellUnder(study.getState().doc, option.candidate, at) : at, chart: 'ledger' })}
        cell={chart === 'ledger' ? cell : null}
        onProfile={(azimuthDeg) =>
          set({ chart: chart === 'vertical' ? 'vertical' : 'profile', profileAzimuthDeg: Math.round(10 * azimuthDeg) / 10 })
        }
        profileAzimuthDeg={chart === 'profile' || chart === 'vertical' ? (profileAzimuthDeg ?? 0) : null}
        lower={
          chart && option && !sheet ? (
            <Suspense fallback={null}>
              <LowerPanel hub={hub} />
            </Suspense>
          ) : null
        }
        empty={<NoGround />}
      />
    </Suspense>
  )
  return (
    <div className={twin ? 'maps twin' : 'maps'}>
      {first}
      {twin ? (
        <Suspense fallback={null}>
          <MapPane
            {...shared}
            hub={secondHub}
            link={link}
            pane="second"
            show={{ option: against, layer, need }}
            roadLines={null}
            placing={false}
            onPlace={() => {}}
            onCell={(at) =>
              set({ option: against, against: option, cell: cellUnder(study.getState().doc, against.candidate, at), chart: 'ledger' })
            }
            cell={null}
            onProfile={() => {}}
            profileAzimuthDeg={null}
            lower={null}
          />
        </Suspense>
      ) : null}
    </div>
  )
}

/** The second option of the map, while the study has it and it is not the one on show. */
function useAgainst(): OptionRef | null {
  const wished = useView((v) => v.against)
  const option = useView((v) => v.option)
  const there = useDoc((d) => wished !== null && studyOptions(d).some((o) => sameOption(o, wished)))
  return wished && option && there && !sameOption(wished, option) ? wished : null
}

function NoGround() {
  const state = useGround((g) => g.state)
  const missing = useGround((g) => g.missing)
  const named = useDoc((d) => d.terrain.length > 0)
  if (state === 'reading') return <p className="ink-2">Reading terrain</p>
  if (state === 'failed')
    return (
      <>
        <h3>The ground could not be read</h3>
        <p className="ink-2">The Ground step says why and what to do</p>
      </>
    )
  if (named && missing.length > 0)
    return (
      <>
        <h3>Terrain is missing</h3>
        <p className="ink-2">Drop {missing[0]} here: the study names it</p>
      </>
    )
  return (
    <>
      <h3>{EMPTY_WORDS.ground.title}</h3>
      <p className="ink-2">{EMPTY_WORDS.ground.action}</p>
    </>
  )
}

export function RulerSlot({ hub }: { hub: MapHub }) {
  const { study, view, client } = useSession()
  const option = useView((v) => v.option)
  const units = useView((v) => v.units)
  const doc = useDoc((d) => d)
  const groundSerial = useGround((g) => g.ground?.serial)
  // biome-ignore lint/correctness/useExhaustiveDependencies: another object for each of these
  const basis = useMemo(() => ({}), [doc, groundSerial, option?.tiltDeg])
  const candidate = useMapCandidates().find((c) => c.id === option?.candidate) ?? null
  const stated = useDoc((d) => d.candidates.find((c) => c.id === option?.candidate)?.groundHeightM)
  const raster = useGround((g) => (option ? g.candidateM.get(option.candidate) : undefined))
  const result = useResults((r) => (option ? r.byOption.get(optionKey(option)) : undefined))
  const own = useMemo(() => (result ? ladderValuesOf(result.figures) : null), [result])
  const show = (heightM: number) => option && view.getState().set({ option: { ...option, heightM } })
  return (
    <Suspense fallback={null}>
      <Ruler
        client={client}
        hub={hub}
        candidate={candidate}
        option={option}
        groundM={stated ?? raster ?? null}
        basis={basis}
        asked={(doc.needs?.length ?? 0) > 0}
        units={units}
        own={own}
        onTilt={(tiltDeg) => option && view.getState().set({ option: { ...option, tiltDeg } })}
        onHeight={show}
        onAddHeight={(heightM) => {
          if (!candidate) return
          setMastHeights(study, candidate.id, [...candidate.mastHeightsM, heightM])
          show(heightM)
        }}
      />
    </Suspense>
  )
}
