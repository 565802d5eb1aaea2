import type { GroundCode, TerrainName } from './types.ts'

type Row = readonly [terrain: TerrainName, coverHeightM: number]

// Terrain and cover height of the classes of three open legends: our own engineering choice, editable in the study, listed in the memo.
const FOREST: Row = ['forest', 15]
const SHRUB: Row = ['rural', 2]
const OPEN: Row = ['open', 0]
const FARMLAND: Row = ['farmland', 0]
const TOWN: Row = ['urban', 8]
const WATER: Row = ['water', 0]

/** ESA WorldCover 2020/2021 (product user manual v2.0): 10 tree cover … 100 moss and lichen. */
const WORLDCOVER: Readonly<Record<number, Row>> = {
  10: FOREST,
  20: SHRUB,
  30: OPEN,
  40: FARMLAND,
  50: TOWN,
  60: OPEN,
  70: OPEN,
  80: WATER,
  90: OPEN,
  95: FOREST,
  100: OPEN,
}

/** National Land Cover Database (MRLC legend): 11 open water … 95 emergent wetlands. */
function nlcd(c: number): Row | null {
  if (c === 11) return WATER
  if (c === 21) return SHRUB
  if (c >= 22 && c <= 24) return TOWN
  if ((c >= 41 && c <= 43) || c === 90) return FOREST
  if (c === 51 || c === 52) return SHRUB
  if (c === 81 || c === 82) return FARMLAND
  return c === 12 || c === 31 || (c >= 71 && c <= 74) || c === 95 ? OPEN : null
}

/** CORINE Land Cover, three-digit codes (EEA nomenclature). */
function corine(c: number): Row | null {
  if (c === 141 || c === 142) return ['rural', 4]
  if (c === 244) return ['forest', 8]
  if (c === 324) return SHRUB
  if (c >= 111 && c <= 142) return TOWN
  if (c >= 211 && c <= 243) return FARMLAND
  if (c >= 311 && c <= 313) return FOREST
  if ((c >= 321 && c <= 335) || (c >= 411 && c <= 423)) return OPEN
  return c >= 511 && c <= 523 ? WATER : null
}
/** The 44 CORINE codes in order: rasters often hold the position in this list, 1 to 44. */
const CORINE_CODES = [
  111, 112, 121, 122, 123, 124, 131, 132, 133, 141, 142, 211, 212, 213, 221, 222, 223, 231, 241, 242, 243, 244, 311, 312, 313, 321, 322,
  323, 324, 331, 332, 333, 334, 335, 411, 412, 421, 422, 423, 511, 512, 521, 522, 523,
]

/** What a study says about its class raster. */
export interface Legend {
  readonly legend: 'worldcover' | 'nlcd' | 'corine' | 'custom'
  readonly classes?: Readonly<Record<string, { readonly terrain: TerrainName; readonly coverHeightM: number }>>
}

/** Where nothing is known: rural, bare of cover, marked default. */
const unknown = (sourceClass: number | null): GroundCode => ({ terrain: 'rural', coverHeightM: 0, sourceClass, mark: 'default' })

/**
 * Ground code of every class seen: the study's own classes first, else the legend's, else rural marked default. Heights m above ground.
 * CORINE rasters with values 1 to 44 are read by position in the nomenclature.
 */
export function legendCodes(legend: Legend, classes: readonly number[]): GroundCode[] {
  const byPosition = legend.legend === 'corine' && classes.every((c) => c < 100)
  const builtIn = (c: number): Row | null => {
    switch (legend.legend) {
      case 'worldcover':
        return WORLDCOVER[c] ?? null
      case 'nlcd':
        return nlcd(c)
      case 'corine':
        return corine(byPosition ? (CORINE_CODES[c - 1] ?? 0) : c)
      case 'custom':
        return null
    }
  }
  return classes.map((c) => {
    const stated = legend.classes?.[String(c)]
    if (stated) return { terrain: stated.terrain, coverHeightM: stated.coverHeightM, sourceClass: c, mark: null }
    const row = builtIn(c)
    return row ? { terrain: row[0], coverHeightM: row[1], sourceClass: c, mark: null } : unknown(c)
  })
}

/** The code of uniform terrain: no cover. `mark` is 'default' where the study did not state it. */
export const uniformCode = (terrain: TerrainName, mark: 'default' | null): GroundCode => ({
  terrain,
  coverHeightM: 0,
  sourceClass: null,
  mark,
})

/**
 * Ground codes of a class raster on the ground grid, one byte per cell. Cells the raster does not know (255) take `outside`, the study's uniform terrain.
 * The byte array is the raster's own, changed in place.
 */
export function groundCodes(
  raster: { readonly codes: Uint8Array; readonly classes: readonly number[] },
  legend: Legend,
  outside: GroundCode,
): { code: Uint8Array; codes: GroundCode[] } {
  const codes = legendCodes(legend, raster.classes)
  const code = raster.codes
  const last = codes.length
  let used = false
  for (let i = 0; i < code.length; i++)
    if (code[i] >= last) {
      code[i] = last
      used = true
    }
  if (used || last === 0) codes.push(outside)
  return { code, codes }
}
