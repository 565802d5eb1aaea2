// An invented bank of islands, an invented radar and invented results: shapes for charts and memo, no physics in them.
import {
  type Figures,
  type HorizonRow,
  type NeedFigure,
  type OptionResult,
  type Profile,
  profileRay,
  type SettledStudy,
  type StudyDoc,
  settle,
  suppressionBy,
  uniformCode,
} from '../../core/index.ts'

export const sampleDoc: StudyDoc = {
  format: 'sightfell-study',
  version: 1,
  name: 'Ostrel Bank',
  terrain: [{ file: 'ostrel-30m.tif', heights: 'orthometric', verticalErrorM: 6 }],
  landCover: { file: 'ostrel-cover.tif', legend: 'custom', classes: { 3: { terrain: 'forest', coverHeightM: 12 } } },
  obstacles: { file: 'ostrel-masts.geojson' },
  radar: {
    name: 'Invented S-band set',
    frequencyHz: 2.91e9,
    peakPowerW: 14_000,
    pulseWidthS: 1.5e-6,
    prfHz: [840],
    rotationRpm: 13,
    antenna: { gainDbi: 32.4, azimuthBeamwidthDeg: 1.7, elevationBeamwidthDeg: 5.5, elevationPattern: 'cosecant-squared', tiltDeg: 1.5 },
    suppression: { kind: 'stated', statedDb: 38 },
    instrumentedRangeM: 74_080,
  },
  needs: [
    { id: 'n1', name: 'Ferry approach', kind: 'layer', heightM: 250, heightAbove: 'sea', toRangeM: 40_000, rcsM2: 2, requiredPct: 95 },
    {
      id: 'n2',
      name: 'Low flyers, east',
      must: false,
      kind: 'layer',
      heightM: 120,
      heightAbove: 'ground',
      toRangeM: 25_000,
      sectorDeg: [40, 150],
    },
    { id: 'n3', name: 'Harbour fixes', kind: 'fixes', file: 'fixes.csv' },
  ],
  candidates: [
    { id: 'A', name: 'Lantern Hill', lon: -121.3312, lat: -38.4127, mastHeightsM: [12, 24], notes: 'Track to the top, no power.' },
    { id: 'B', name: "Cutter's Down", lon: -121.2108, lat: -38.4519, groundHeightM: 148.2, mastHeightsM: [12, 24] },
    { id: 'C', name: 'Harbour mole', lon: -121.2755, lat: -38.5003, mastHeightsM: [24] },
  ],
  run: { maxRangeM: 60_000 },
}
export const sampleStudy: SettledStudy = settle(sampleDoc)

const bump = (azimuthDeg: number, at: number, width: number): number => {
  const d = Math.abs(((azimuthDeg - at + 540) % 360) - 180)
  return Math.exp(-((d / width) ** 2))
}
/** A horizon with a near ridge, a mast, a plain and a sector where the terrain ends. */
export function sampleRows(screen: number, stepDeg: number): HorizonRow[] {
  const rows: HorizonRow[] = []
  for (let azimuthDeg = 0; azimuthDeg < 360; azimuthDeg += stepDeg) {
    const mast = Math.abs(azimuthDeg - 200) < 0.75 * stepDeg
    const edge = azimuthDeg > 252 && azimuthDeg < 290
    const ridge = screen * bump(azimuthDeg, 104, 16)
    const elevationDeg =
      -0.12 +
      ridge +
      0.3 * bump(azimuthDeg, 318, 9) +
      0.02 * Math.sin(azimuthDeg / 3.1) +
      0.015 * Math.cos(azimuthDeg / 1.3) +
      (mast ? 0.35 : 0)
    const obstacle = mast ? 'Grey mast' : edge ? 'at least: edge of terrain' : ridge > 0.2 ? 'cover' : 'terrain'
    const rangeM = ridge > 0.2 ? 7_400 : mast ? 3_300 : edge ? 22_000 : 16_500
    rows.push({ azimuthDeg, elevationDeg, rangeM, heightM: 210, lon: -121.2, lat: -38.4, obstacle })
  }
  return rows
}

/** What detection adds to a need of which `pct` is in sight. */
function physics(pct: number): Omit<NeedFigure, 'needId' | 'name' | 'must' | 'requiredPct' | 'inSightPct' | 'suppression' | 'notAssessed'> {
  const usablePct = Math.max(0, pct - 9)
  return {
    exponential: null,
    measure: 'area',
    amount: 0,
    areaKm2: 0,
    detectablePct: Math.max(0, pct - 2),
    usablePct,
    inSightKm2: 0,
    detectableKm2: 0,
    usableKm2: 0,
    atLowK: { k: 1, inSightPct: Math.max(0, pct - 1), detectablePct: Math.max(0, pct - 3), usablePct: Math.max(0, pct - 11) },
    met: false,
    passes: false,
    required: sampleStudy.needs[0].required,
    marginalKm2: 0,
    unknownKm2: 0,
    groundAboveKm2: 0,
    worstMarginM: null,
    tenthMarginM: null,
    worst: null,
    signal: { worstDb: -14.2, tenthDb: 0.6, worst: { lon: -121.2, lat: -38.4, azimuthDeg: 61, rangeM: 12_300, obstacle: 'terrain' } },
    losses: [
      { cause: 'masked', pct: 100 - pct, amount: 48.7 * (100 - pct) },
      { cause: 'clutter', pct: pct - usablePct, amount: 48.7 * (pct - usablePct) },
    ],
    coneOfSilence: [{ levelM: 250, radiusM: 410 }],
    fixes: null,
    track: null,
  }
}

function sampleFigures(siteGroundM: number, heightM: number, screen: number, seen: number): Figures {
  const rows = sampleRows(screen, 2)
  const rings = Array.from({ length: 6 }, (_, i) => {
    const groundKm2 = Math.PI * (2 * i + 1) * 100
    const share = Math.max(0.02, seen * Math.exp(-i / 2.4))
    const inSightKm2 = groundKm2 * share
    const cnrMeanDb = i === 5 ? null : 58.2 - 9.3 * i + heightM / 9
    return {
      fromM: i * 10_000,
      toM: (i + 1) * 10_000,
      groundKm2,
      inSightKm2,
      unknownKm2: i > 3 ? 120 : 0,
      cnrMeanDb,
      cnrMaxDb: cnrMeanDb === null ? null : cnrMeanDb + 9,
    }
  })
  const sight = rings.reduce((s, r) => s + r.inSightKm2, 0)
  const all = rings.reduce((s, r) => s + r.groundKm2, 0)
  const highest = rows.reduce((h, r) => (r.elevationDeg > h.elevationDeg ? r : h))
  const pct = Math.min(99.96, 78 + 40 * seen - 16 * screen)
  const suppression = {
    p50Db: 12.4,
    p90Db: 33.1 + heightM / 5,
    p99Db: 44.7 + heightM / 5,
    availableDb: 38,
    shortKm2: 41 + 6 * heightM,
    shortP90Db: 0,
    shortP99Db: 6.7 + heightM / 5,
    maskedPct: 100 - pct,
    tooWeakPct: 3.2,
  }
  const worst = { lon: -121.05, lat: -38.43, azimuthDeg: 104, rangeM: 38_600, obstacle: 'cover' }
  const figures: Omit<Figures, 'flat'> = {
    siteGroundM,
    antennaM: siteGroundM + heightM,
    groundInSightKm2: sight,
    maskedKm2: all - sight - 240,
    unknownKm2: 240,
    horizon: { medianDeg: -0.098, p90Deg: 0.214, highest, rows },
    lowK: null,
    floorsLowK: null,
    suppressionBy: suppressionBy(sampleStudy.radar, sampleStudy.atmosphere, [uniformCode('forest', null)]),
    floors: [5, 10, 20, 40, 60].map((nm) => ({
      rangeM: nm * 1852,
      bestM: nm === 60 ? null : 20 + 1.2 * nm * nm,
      medianM: nm === 60 ? null : 40 + 1.3 * nm * nm + nm,
      worstM: nm === 60 ? null : 90 + 1.4 * nm * nm + 30 * nm * screen,
      worstAzimuthDeg: nm === 60 ? null : 104,
      worstBandM: nm === 60 ? null : 4 + 1.7 * nm,
    })),
    rings,
    ringWidthM: 10_000,
    clutterOverKm2: { over0: sight * 0.94, over20: sight * 0.71, over40: sight * 0.27 + heightM, over60: sight * 0.03 },
    cnrPeakDb: 71.3,
    secondTimeAround: { km2: null, notEvaluatedBeyondM: 81_000 },
    clutterLevels: {
      whole: { knownKm2: all - 240, over40Pct: 8.1, meanDb: 47.2, p90Db: 22.4, p99Db: 55.8 },
      rings: [],
      octants: [],
      sectors: [],
      peak: null,
    },
    needs: [
      {
        ...physics(pct),
        needId: 'n1',
        name: 'Ferry approach',
        must: true,
        areaKm2: 4_870,
        requiredPct: 95,
        inSightPct: pct,
        inSightKm2: 48.7 * pct,
        detectableKm2: 48.7 * (pct - 2),
        usableKm2: 48.7 * (pct - 9),
        marginalKm2: 64,
        unknownKm2: 0,
        groundAboveKm2: 12,
        worstMarginM: -162.5,
        tenthMarginM: 12.4,
        worst,
        suppression,
        notAssessed: null,
      },
      {
        ...physics(pct - 22),
        needId: 'n2',
        name: 'Low flyers, east',
        must: false,
        areaKm2: 590,
        requiredPct: 100,
        inSightPct: pct - 22,
        inSightKm2: 5.9 * (pct - 22),
        detectableKm2: 5.9 * (pct - 24),
        usableKm2: 5.9 * (pct - 31),
        marginalKm2: 21,
        unknownKm2: 4,
        groundAboveKm2: 0,
        worstMarginM: -74.2,
        tenthMarginM: -31.8,
        worst: { ...worst, rangeM: 24_100, obstacle: 'terrain' },
        suppression: { ...suppression, p50Db: 21.3, shortKm2: 88 },
        notAssessed: null,
      },
      {
        ...physics(0),
        needId: 'n3',
        name: 'Harbour fixes',
        must: true,
        areaKm2: 0,
        requiredPct: 100,
        inSightPct: 0,
        inSightKm2: 0,
        marginalKm2: 0,
        unknownKm2: 0,
        groundAboveKm2: 0,
        worstMarginM: null,
        tenthMarginM: null,
        worst: null,
        suppression: { ...suppression, p50Db: null, p90Db: null, p99Db: null, shortKm2: 0 },
        notAssessed: 'its file has not been read',
      },
    ],
    atHighK: null,
    roads: null,
    trialPlan: [],
    measuredHorizon: null,
    obstaclesInSight: ['Grey mast', 'Silo at Wend'],
    marks: [
      { mark: 'from memory', about: 'low-angle land table' },
      { mark: 'outside model', about: 'depression over 8°, last band held' },
    ],
  }
  return { ...figures, flat: { ground_in_sight_km2: sight } }
}

const result = (candidate: string, heightM: number, groundM: number, screen: number, seen: number): OptionResult => ({
  ref: { candidate, heightM, tiltDeg: 1.5 },
  keys: { site: candidate, mask: `${candidate}${heightM}`, lowK: '', clutter: `${candidate}${heightM}`, folded: '', needs: 'n' },
  figures: sampleFigures(groundM, heightM, screen, seen),
  serial: 1,
})
export const sampleResults: readonly OptionResult[] = [
  result('A', 12, 214.6, 0.42, 0.34),
  result('A', 24, 214.6, 0.36, 0.43),
  result('B', 12, 148.2, 0.78, 0.27),
  result('B', 24, 148.2, 0.64, 0.36),
  result('C', 24, 4.1, 0.95, 0.16),
]

/** One azimuth over a ridge, sampled every 300 m. */
export function sampleProfile(): Profile {
  const n = 161
  const effectiveRadiusM = 8_494_667
  const antennaM = 172
  const make = (f: (r: number, i: number) => number): Float64Array => Float64Array.from({ length: n }, (_, i) => f(i * 300, i))
  const ground = (r: number): number =>
    30 +
    118 * Math.exp(-((r / 2_500) ** 2)) +
    190 * Math.exp(-(((r - 11_000) / 2_600) ** 2)) +
    70 * Math.exp(-(((r - 30_000) / 5_000) ** 2))
  const cover = (r: number): number => (r > 8_000 && r < 13_000 ? 12 : 0)
  const sight = new Uint8Array(n)
  let steepest = Number.NEGATIVE_INFINITY
  const floorM = make((r) => {
    if (r === 0) return ground(0)
    const drop = (r * r) / (2 * effectiveRadiusM)
    const slope = (ground(r) + cover(r) - antennaM - drop) / r
    if (slope >= steepest) {
      sight[Math.round(r / 300)] = 1
      steepest = slope
    }
    return antennaM + steepest * r + drop
  })
  sight.fill(2, 150)
  const along = {
    azimuthDeg: 104,
    option: { candidate: 'B', heightM: 24, tiltDeg: 1.5 },
    antennaM,
    effectiveRadiusM,
    distM: make((r) => r),
    groundM: make(ground),
    surfaceM: make((r) => ground(r) + cover(r)),
    floorM: floorM.map((v, i) => (i >= 150 ? Number.NaN : v)),
    floorBandM: make((r) => 6 + r / 1_200),
    inSight: sight,
  }
  return { ...along, ray: profileRay(along, 0.107, null) }
}
