import type { ReactNode } from 'react'
import type {
  Answer,
  HorizonLine,
  HorizonRow,
  LayerId,
  LonLat,
  LossCause,
  ModelMark,
  Obstacle,
  OptionRef,
  PaneId,
  Road,
  RoadLines,
  View,
} from '../../core/index.ts'
import type { Drawing, LadderValues } from '../charts/index.ts'
import type { StudyClient } from '../compute/client.ts'
import type { UnitSystem } from '../words/index.ts'

/** A candidate as the map draws it. */
export interface MapCandidate {
  readonly id: string
  readonly name: string
  readonly lon: number
  readonly lat: number
  readonly mastHeightsM: readonly number[]
  /** Never empty: the antenna's own tilt when none are stated. */
  readonly tiltsDeg: readonly number[]
}
/** A rejected candidate as the map draws it. */
export interface MapRejected {
  readonly id: string
  readonly name: string
  readonly lon: number
  readonly lat: number
}
/** A need as the map draws it: the ring piece it asks for around the candidate on show; a polygon has none and is seen in its layers. */
export interface MapNeed {
  readonly id: string
  readonly name: string
  readonly fromRangeM: number
  readonly toRangeM: number
  readonly sectorDeg: readonly [number, number]
  readonly ring: boolean
}
/** What the sentence says. */
export interface MapShow {
  readonly option: OptionRef | null
  readonly layer: LayerId
  /** Id of the need the layer is about, where it is about one. */
  readonly need: string | null
  /** A second option the layer is shown against; null or absent: none. */
  readonly against?: OptionRef | null
  readonly beside?: 'difference' | 'maps'
}
export interface RunProgress {
  readonly doing: string
  readonly done: number
  readonly total: number
  readonly secondsLeft: number | null
}
/** Where the pointer is, on whichever chart. Written to listeners, never by render. */
export interface PointerPlace {
  readonly from: 'map' | 'horizon' | 'profile'
  /** null when the chart knows only a direction. */
  readonly at: LonLat | null
  readonly azimuthDeg: number | null
  readonly rangeM: number | null
}
/** A place or a mast height that is being tried and is not (yet) in the study. */
export interface Trial {
  readonly candidate: string
  readonly lon: number
  readonly lat: number
  readonly heightM: number
  /** The place is being dragged (map), or the mast (ruler). */
  readonly moving: 'place' | 'mast'
  /** Nothing is held down any more: the trial stays on show until it is taken or put back. */
  readonly resting: boolean
}
/** A value with listeners; `set` to the same value says nothing. */
export interface Channel<T> {
  get(): T
  set(value: T): void
  listen(listener: (value: T) => void): () => void
}
/** What map, ruler, horizon strip and charts tell each other. One per page, made by `createMapHub`. */
export interface MapHub {
  readonly pointer: Channel<PointerPlace | null>
  readonly trial: Channel<Trial | null>
  /** Answer to the newest trial. */
  readonly trialAnswer: Channel<Answer['preview'] | null>
}

export interface MapPaneProps {
  readonly client: StudyClient
  readonly hub: MapHub
  /** Changes when the study worker holds another ground; null while it holds none. */
  readonly groundSerial: number | null
  /** Outer corners of the ground, for "fit"; empty while there is none. */
  readonly corners: readonly LonLat[]
  readonly candidates: readonly MapCandidate[]
  readonly rejected: readonly MapRejected[]
  readonly needs: readonly MapNeed[]
  readonly obstacles: readonly Obstacle[]
  readonly roads: readonly Road[]
  /** Roads whose vehicles the option on show sees, apart from the others; null while not worked out. */
  readonly roadLines: RoadLines | null
  /** Range of the polar grids: the outermost ring. */
  readonly maxRangeM: number
  readonly show: MapShow
  readonly onShow: (part: Partial<MapShow>) => void
  readonly units: UnitSystem
  readonly night: boolean
  /** Words that belong beside the legend, such as `from memory`. */
  readonly marks: readonly { readonly mark: ModelMark | string; readonly about: string }[]
  /** What keeps the need on show from being usable, largest first, %; null while not worked out. For the legend of the causes. */
  readonly losses: readonly { readonly cause: LossCause; readonly pct: number }[] | null
  /** The next click on the map places a candidate. */
  readonly placing: boolean
  readonly onPlace: (at: LonLat) => void
  readonly onPlacingEnd: () => void
  readonly onSelect: (candidate: string) => void
  /** A candidate was let go, or set by keys: one undo step. */
  readonly onMove: (candidate: string, at: LonLat) => void
  /** A cell was clicked: its ledger. */
  readonly onCell: (at: LonLat) => void
  /** The cell whose ledger is open, marked on the map. */
  readonly cell: LonLat | null
  /** The terrain profile along an azimuth is asked for. */
  readonly onProfile: (azimuthDeg: number) => void
  /** Azimuth of the profile that is open, drawn as a ray. */
  readonly profileAzimuthDeg: number | null
  readonly progress: RunProgress | null
  readonly onStop: () => void
  /** A chart over the lower half of the map; null = closed. */
  readonly lower: ReactNode
  readonly onLowerClose: () => void
  /** What to show where there is no ground yet: a reason and the next action. */
  readonly empty?: ReactNode
  /** Set for the second of two maps side by side: it has no tools and asks beside the first. */
  readonly pane?: PaneId
  /** Two maps with the same link show the same middle and scale. */
  readonly link?: Channel<LinkedView | null>
}
/** A view on its way from one of two maps to the other. */
export interface LinkedView {
  readonly from: PaneId | undefined
  readonly view: View
}

export interface RulerProps {
  readonly client: StudyClient
  readonly hub: MapHub
  readonly candidate: MapCandidate | null
  readonly option: OptionRef | null
  /** Ground at the candidate, m MSL; null off the terrain. */
  readonly groundM: number | null
  /** Another object when the ladder has to be asked for again: study, ground or tilt are others. */
  readonly basis: object
  /** The study states a need: the strips are about it, else about the ground. */
  readonly asked: boolean
  readonly units: UnitSystem
  /** Figures of the option on show, there before the ladder is; null while not worked out. */
  readonly own: LadderValues | null
  /** A stated tilt was chosen. */
  readonly onTilt: (tiltDeg: number) => void
  /** A stated height was chosen. */
  readonly onHeight: (heightM: number) => void
  /** The height between that is on trial shall join the study. */
  readonly onAddHeight: (heightM: number) => void
}

export interface HorizonStripProps {
  readonly hub: MapHub
  /** Rows of the option on show; empty while not computed. */
  readonly rows: readonly HorizonRow[]
  /** Other horizons of the same antenna, shown in the stretched strip; empty until asked for. */
  readonly lines: readonly HorizonLine[]
  /** Surveyed elevations from this antenna, and the widest gap that is joined, deg; null where there is no survey. */
  readonly measured: {
    readonly points: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[]
    readonly gapDeg: number
  } | null
  readonly units: UnitSystem
  /** Azimuth picked: opens a chart there. */
  readonly onPick: (azimuthDeg: number) => void
  /** The strip was stretched or folded back. */
  readonly onStretched: (stretched: boolean) => void
  /** The charts over the lower half of the map are asked for. */
  readonly onCharts: () => void
  /** Copy buttons for a drawing and a table. */
  readonly copy: (drawing: () => Drawing | null, csv: () => string | null) => ReactNode
}
