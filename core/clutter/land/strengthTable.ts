import type { GroundCode } from '../../landcover/index.ts'
import { RELIEF } from '../../terrain/index.ts'
import { DEG_PER_RAD, fromDb, RAD_PER_DEG, toDb } from '../../units/index.ts'
import { SEA_LIMITS } from '../sea/seaNrl.ts'
import { type SeaInput, type SeaTable, seaAssessed, seaSigma, seaTable } from '../sea/seaTable.ts'
import type { ModelNote } from '../types.ts'
import { GAMMA_LIMITS, gammaDbOf, steepStrengthDb } from './constantGamma.ts'
import { chooseRow, landTableNotes } from './landRow.ts'
import type { LandBand, LandTable } from './landTable.ts'
import { BUILT_IN_LAND_TABLE } from './landTableData.ts'

/** Strength of every ground code, relief and band of depression at one frequency, so that a loop over cells only looks it up. */
export interface StrengthTable {
  readonly codes: readonly GroundCode[]
  /** Rising band edges of depression, rad; first −Infinity, last +Infinity. */
  readonly edgesRad: Float64Array
  readonly bands: number
  /**
   * Mean σ°F⁴, ratio, at ((code × 4 + relief) × bands + band); 0 where no model is assessed, −1 where the cell itself decides (`ownSigma`).
   * Relief: low, high, mountains, unknown.
   */
  readonly sigma: Float64Array
  /** Strength of those entries for a cell without any context, and of urban ground over open ground, ratio. */
  readonly plain: Float64Array
  readonly overOpen: Float64Array
  /** Band whose spread each entry takes; null where nothing is assessed. */
  readonly spreads: readonly (LandBand | null)[]
  /** Bit i set = notes[i] holds for that entry. */
  readonly noteBits: Uint32Array
  readonly notes: readonly ModelNote[]
  /** Notes that hold for every entry. */
  readonly always: readonly ModelNote[]
  readonly sea: SeaTable | null
  /** First band of steep ground. */
  readonly steepBand: number
  /** Per ground code: kinds of terrain, bits of CODE_KIND. */
  readonly kinds: Uint8Array
}
export const CODE_KIND = { urban: 1, open: 2, water: 4 } as const
const RELIEF_SLOTS = [RELIEF.low, RELIEF.high, RELIEF.mountains, RELIEF.unknown] as const
const STEEP_RAD = GAMMA_LIMITS.tableToDepressionDeg * RAD_PER_DEG
/** Urban ground counts as seen over open ground where that lies nearest toward the radar within this range, m. */
export const OVER_OPEN_WITHIN_M = 5_000

/** Slot of a relief value in the table. */
export const reliefSlot = (relief: number): number => Math.min(relief, 3)

interface Made {
  readonly frequencyHz: number
  readonly table: LandTable
  readonly sea: SeaInput | null
  readonly made: StrengthTable
}
const lastMade = new WeakMap<readonly GroundCode[], Made>()
/** The table for the codes of a ground; the last one made for them is kept. Throws InputError for a frequency outside 30 MHz to 40 GHz. */
export function strengthTable(
  codes: readonly GroundCode[],
  frequencyHz: number,
  table: LandTable = BUILT_IN_LAND_TABLE,
  sea: SeaInput | null = null,
): StrengthTable {
  const last = lastMade.get(codes)
  const sameSea = last?.sea?.seaState === sea?.seaState && last?.sea?.polarisation === sea?.polarisation
  if (last && last.frequencyHz === frequencyHz && last.table === table && sameSea) return last.made
  const made = makeTable(codes, frequencyHz, table, sea)
  lastMade.set(codes, { frequencyHz, table, sea, made })
  return made
}

function makeTable(codes: readonly GroundCode[], frequencyHz: number, table: LandTable, sea: SeaInput | null): StrengthTable {
  const inner = bandEdgesDeg(table)
  const edgesRad = Float64Array.from([Number.NEGATIVE_INFINITY, ...inner.map((d) => d * RAD_PER_DEG), Number.POSITIVE_INFINITY])
  const bands = edgesRad.length - 1
  const size = codes.length * 4 * bands
  const sigma = new Float64Array(size)
  const plain = new Float64Array(size)
  const overOpen = new Float64Array(size)
  const noteBits = new Uint32Array(size)
  const spreads = new Array<LandBand | null>(size).fill(null)
  const notes: ModelNote[] = []
  const context = sea ? { sea } : {}
  const water = sea && seaAssessed(frequencyHz) && codes.some((c) => c.terrain === 'water')
  codes.forEach(({ terrain }, c) => {
    RELIEF_SLOTS.forEach((relief, slot) => {
      for (let b = 0; b < bands; b++) {
        const middle = middleDeg(edgesRad, b)
        const choice = chooseRow(terrain, relief, middle, frequencyHz, context, table)
        const over =
          terrain === 'urban' ? chooseRow(terrain, relief, middle, frequencyHz, { ...context, urbanOverOpen: true }, table) : choice
        const at = (c * 4 + slot) * bands + b
        plain[at] = choice.meanDb === null ? 0 : fromDb(choice.meanDb)
        overOpen[at] = over.meanDb === null ? 0 : fromDb(over.meanDb)
        spreads[at] = choice.band
        const own = terrain === 'water' ? water : edgesRad[b] >= STEEP_RAD || overOpen[at] !== plain[at]
        sigma[at] = own ? -1 : plain[at]
        for (const note of choice.notes) {
          if (!notes.includes(note)) notes.push(note)
          noteBits[at] |= 1 << notes.indexOf(note)
        }
      }
    })
  })
  const kinds = Uint8Array.from(codes, ({ terrain: t }) =>
    t === 'urban'
      ? CODE_KIND.urban
      : t === 'water'
        ? CODE_KIND.water | CODE_KIND.open
        : t === 'open' || t === 'farmland'
          ? CODE_KIND.open
          : 0,
  )
  return {
    codes,
    edgesRad,
    bands,
    sigma,
    plain,
    overOpen,
    spreads,
    noteBits,
    notes,
    always: landTableNotes(frequencyHz, table),
    sea: water ? seaTable(frequencyHz, sea) : null,
    steepBand: edgesRad.indexOf(STEEP_RAD),
    kinds,
  }
}

/** Every angle at which a row or a note changes, degrees. */
function bandEdgesDeg(table: LandTable): number[] {
  const { grazingDeg } = SEA_LIMITS
  const edges = new Set<number>([0, grazingDeg.low, grazingDeg.high, GAMMA_LIMITS.tableToDepressionDeg, GAMMA_LIMITS.grazingDeg.high])
  for (const bands of Object.values(table.rows))
    for (const { fromDeg, toDeg } of bands) for (const edge of [fromDeg, toDeg]) if (edge !== null) edges.add(edge)
  return [...edges].sort((a, b) => a - b)
}

function middleDeg(edgesRad: Float64Array, band: number): number {
  const lo = edgesRad[band] * DEG_PER_RAD
  const hi = edgesRad[band + 1] * DEG_PER_RAD
  return lo === Number.NEGATIVE_INFINITY ? hi - 1 : hi === Number.POSITIVE_INFINITY ? lo + 1 : (lo + hi) / 2
}

/** Band of a depression, rad; starting from a guess (neighbouring cells mostly share it). */
export function bandOf(edgesRad: Float64Array, depressionRad: number, guess: number): number {
  let b = guess
  while (depressionRad >= edgesRad[b + 1]) b++
  while (depressionRad < edgesRad[b]) b--
  return b
}

/** What `ownSigma` reads of the cells of one ray: cells of equal depth outward, index from `from`. */
export interface OwnCells {
  readonly code: Uint8Array
  readonly relief: Uint8Array
  readonly slopePermille: Int16Array
  readonly centresM: Float64Array
}

/** Strength of cell j of the ray that starts at index `from`, where the table says −1: water, steep ground, urban ground near grazing. */
export function ownSigma(t: StrengthTable, cells: OwnCells, from: number, j: number, entry: number, depressionRad: number): number {
  const at = from + j
  const code = cells.code[at]
  if (t.kinds[code] & CODE_KIND.water) return t.sea ? seaSigma(t.sea, depressionRad) : 0
  if (depressionRad < STEEP_RAD) return isOverOpen(t, cells, from, j) ? t.overOpen[entry] : t.plain[entry]
  const relief = RELIEF_SLOTS[reliefSlot(cells.relief[at])]
  const tableDb = toDb(t.plain[entry - (entry % t.bands) + t.steepBand - 1])
  const gammaDb = gammaDbOf(t.codes[code].terrain, relief)
  const depressionDeg = depressionRad * DEG_PER_RAD
  return fromDb(steepStrengthDb(tableDb, gammaDb, depressionDeg, grazingDegOf(depressionDeg, cells.slopePermille[at] / 1000)))
}

/** Grazing angle on the local slope along the ray (ratio, rising away from the radar positive), degrees. */
export const grazingDegOf = (depressionDeg: number, slope: number): number => depressionDeg + Math.atan(slope) * DEG_PER_RAD

/** Is the nearest ground toward the radar that is not urban low-relief farmland, open ground or water, and within 5 km? */
export function isOverOpen(t: StrengthTable, cells: OwnCells, from: number, j: number): boolean {
  const { code, relief, centresM } = cells
  for (let k = j - 1; k >= 0 && centresM[j] - centresM[k] <= OVER_OPEN_WITHIN_M; k--) {
    const at = from + k
    if (code[at] === 255) return false
    const kind = t.kinds[code[at]]
    if (kind & CODE_KIND.urban) continue
    return (kind & CODE_KIND.open) !== 0 && (relief[at] === RELIEF.low || relief[at] === RELIEF.unknown)
  }
  return false
}

/** The notes that always hold, then those of the entries in use, each with its share of the ground in sight. */
export function notesInUse(t: StrengthTable, use: Float64Array): ModelNote[] {
  const all = use.reduce((sum, u) => sum + u, 0)
  const some = t.notes.flatMap((note, n) => {
    const share = use.reduce((sum, u, entry) => sum + ((t.noteBits[entry] >>> n) & 1 ? u : 0), 0) / all
    return share > 0 ? [{ ...note, share }] : []
  })
  return [...t.always, ...some]
}

/**
 * Mean σ°F⁴, dB, by ground code, relief and depression in degrees; NaN where nothing is assessed (water without `sea`) or the code is unknown.
 * Knows nothing of the cells around: urban ground takes its own row, steep ground its depression as grazing angle. Throws InputError for a
 * frequency outside 30 MHz to 40 GHz.
 */
export function strengthByCode(
  codes: readonly GroundCode[],
  frequencyHz: number,
  table: LandTable = BUILT_IN_LAND_TABLE,
  sea: SeaInput | null = null,
): (code: number, relief: number, depressionDeg: number) => number {
  const t = strengthTable(codes, frequencyHz, table, sea)
  const db = Float64Array.from(t.sigma, (v) => (v > 0 ? toDb(v) : Number.NaN))
  let band = t.bands >> 1
  return (code, relief, depressionDeg) => {
    if (code >= codes.length || !Number.isFinite(depressionDeg)) return Number.NaN
    band = bandOf(t.edgesRad, depressionDeg * RAD_PER_DEG, band)
    const entry = (code * 4 + reliefSlot(relief)) * t.bands + band
    if (t.sigma[entry] !== -1) return db[entry]
    return chooseRow(codes[code].terrain, relief, depressionDeg, frequencyHz, sea ? { sea } : {}, table).meanDb ?? Number.NaN
  }
}
