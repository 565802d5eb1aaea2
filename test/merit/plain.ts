import {
  Answers,
  type Ask,
  BUILT_IN_LAND_TABLE,
  type CandidateDoc,
  crsFromEpsg,
  Engine,
  fillLayer,
  finish,
  type GroundCode,
  geodesicDirect,
  type LandTable,
  type LayerId,
  type LonLat,
  type NeedDoc,
  type NeedPlaces,
  type OptionCells,
  type OptionRef,
  type OptionResult,
  type RadarDoc,
  type StudyDoc,
} from '../../core/index.ts'

/** Where the radar of these studies stands: the middle of an invented plain in UTM 33N. */
export const PLACE: LonLat = { lon: 15, lat: 49.5 }
/** A place from the radar. */
export const from = (azimuthDeg: number, rangeM: number): LonLat => {
  const { lon, lat } = geodesicDirect(PLACE, azimuthDeg, rangeM)
  return { lon, lat }
}

/** A plain at 100 m with posts 100 m apart, `halfM` to each side; `rise` adds height by metres east and north of the radar. */
export async function plainGround(
  halfM: number,
  rise: (eastM: number, northM: number) => number = () => 0,
  terrain: GroundCode['terrain'] = 'farmland',
): Promise<Ask['ground']> {
  const postingM = 100
  const n = 2 * Math.ceil(halfM / postingM) + 1
  const crs = await crsFromEpsg(32633)
  const middle = (n - 1) / 2
  // the radar's own easting and northing: on the central meridian of the zone
  const x0 = 500_000 - middle * postingM
  const y0 = 5_483_041 + middle * postingM
  const heightM = new Float32Array(n * n)
  for (let row = 0; row < n; row++)
    for (let col = 0; col < n; col++) heightM[row * n + col] = 100 + rise((col - middle) * postingM, (middle - row) * postingM)
  return {
    shape: { width: n, height: n, crs, x0, y0, colX: postingM, colY: 0, rowX: 0, rowY: -postingM },
    heightM,
    code: null,
    codes: [{ terrain, coverHeightM: 0, sourceClass: null, mark: null }],
    obstacles: [],
    verticalErrorM: 1,
  }
}

/** The built-in table with one strength everywhere. */
export function uniformLand(meanDb: number): LandTable {
  const rows = Object.entries(BUILT_IN_LAND_TABLE.rows).map(([name, bands]) => [
    name,
    bands.map((b) => ({ ...b, meanDb: b.meanDb.map(() => meanDb) })),
  ])
  return { ...BUILT_IN_LAND_TABLE, rows: Object.fromEntries(rows) }
}

/** S band, 1.3 MW, 33.5 dBi, 1.03 µs, 1.3°, noise figure 4 dB, losses 6 dB, flat elevation pattern, no side lobes to speak of. */
export const S_BAND: RadarDoc = {
  frequencyHz: 2.8e9,
  peakPowerW: 1.3e6,
  pulseWidthS: 1.03e-6,
  prfHz: [1000],
  coherentTransmitter: true,
  rotationRpm: 12,
  noiseFigureDb: 4,
  systemLossDb: 6,
  antenna: {
    gainDbi: 33.5,
    azimuthBeamwidthDeg: 1.3,
    elevationPattern: 'table',
    elevationTable: [
      [-90, 0],
      [90, 0],
    ],
    sidelobeDb: -200,
    tiltDeg: 0,
  },
  instrumentedRangeM: 110_000,
}

export interface Parts {
  readonly needs: NeedDoc[]
  readonly radar?: Partial<RadarDoc>
  readonly candidate?: Partial<CandidateDoc>
  readonly atmosphere?: StudyDoc['atmosphere']
  readonly run?: StudyDoc['run']
  readonly places?: readonly NeedPlaces[]
  readonly landTable?: LandTable
}
export const studyOf = (p: Parts): StudyDoc => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Plain',
  terrain: [{ file: 'plain.tif', verticalErrorM: 1 }],
  uniformTerrain: 'farmland',
  atmosphere: { earthRadiusM: 6_371_000, ...p.atmosphere },
  radar: { ...S_BAND, ...p.radar },
  needs: p.needs,
  candidates: [{ id: 'A', ...PLACE, mastHeightsM: [50], clearingRadiusM: 0, ...p.candidate }],
  run: { maxRangeM: 25_000, rangeStepM: 150, azimuthStepDeg: 0.325, ...p.run },
})

/** One option of a study worked out on a ground. */
export interface Worked {
  readonly engine: Engine
  readonly answers: Answers
  readonly results: readonly OptionResult[]
  readonly ref: OptionRef
  readonly result: OptionResult
  readonly cells: OptionCells
  /** Value of a layer of the first need at a place. */
  layerAt(id: LayerId, azimuthDeg: number, rangeM: number): number
}
export function work(ground: Ask['ground'], parts: Parts): Worked {
  const engine = new Engine()
  const answers = new Answers(engine)
  finish(
    answers.ask('ground', {
      ...ground,
      heightM: ground.heightM.slice(),
      landTable: parts.landTable ?? null,
      ...(parts.places ? { needPlaces: parts.places } : {}),
    }),
  )
  const doc = studyOf(parts)
  const [candidate] = doc.candidates
  const ref = {
    candidate: candidate.id,
    heightM: candidate.mastHeightsM[0],
    tiltDeg: candidate.tiltsDeg?.[0] ?? doc.radar.antenna.tiltDeg ?? 0,
  }
  finish(answers.ask('study', { doc, show: { option: ref, layer: 'clutter-to-noise' }, hold: false, have: [] }))
  for (const tell of answers.tells) if (tell.kind === 'warnings') throw new Error(tell.warnings.join())
  for (let next = engine.next(); next; next = engine.next())
    for (const tell of finish(next)) if (tell.kind === 'failure') throw new Error(tell.error.message)
  const results = engine.results()
  const [result] = results
  const cells = engine.cells(ref)
  if (!result || !cells) throw new Error('nothing was worked out')
  const layerAt = (id: LayerId, azimuthDeg: number, rangeM: number): number => {
    const { grid } = cells.site
    const values = new Float32Array(cells.site.groundM.length)
    fillLayer(id, cells, engine.needOnShow(undefined), values)
    const i = Math.round(azimuthDeg / grid.azimuthStepDeg) % grid.azimuths
    return values[i * grid.ranges + Math.floor(rangeM / grid.rangeStepM)]
  }
  return { engine, answers, results, ref, result, cells, layerAt }
}

export const layerNeed = (over: Partial<NeedDoc> = {}): NeedDoc => ({
  id: 'n',
  kind: 'layer',
  heightM: 300,
  heightAbove: 'ground',
  fromRangeM: 1000,
  toRangeM: 24_000,
  rcsM2: 1,
  ...over,
})
