/** Land cover of the island in WorldCover class numbers: sea, beach and pine belt, fields with shelter belts, marsh, woods on the slopes, bare tops, towns. */
import { type Island, NORTH_KM, POSTING_M, type Point, WEST_KM } from './island.ts'
import { chance, fbm, noise, smoothstep } from './noise.ts'
import { CANDIDATES, TOWNS } from './places.ts'

export const COVER = { tree: 10, shrub: 20, grass: 30, crop: 40, built: 50, bare: 60, water: 80, marsh: 90, moss: 100 } as const

const away = (x: number, y: number, [px, py]: Point): number => Math.sqrt((x - px) ** 2 + (y - py) ** 2)

/** A field of the plain: crop or pasture by the lot, a belt of trees along some of its northern and western sides. */
function field(x: number, y: number): number {
  const u = (0.96 * x + 0.28 * y + 0.12 * noise(x / 1.7, y / 1.7, 601)) / 0.62
  const v = (0.96 * y - 0.28 * x + 0.12 * noise(x / 1.7, y / 1.7, 602)) / 0.44
  const iu = Math.floor(u)
  const iv = Math.floor(v)
  const lot = chance(iu, iv, 603)
  const belt = (u - iu) * 0.62 < 0.06 ? chance(iu, iv, 604) < 0.1 : (v - iv) * 0.44 < 0.06 && chance(iu, iv, 605) < 0.16
  if (belt) return COVER.tree
  if (lot < 0.62) return COVER.crop
  if (lot < 0.965) return COVER.grass
  return lot < 0.985 ? COVER.tree : COVER.shrub
}

function upland(x: number, y: number, heightM: number, slope: number): number {
  const patch = fbm(x / 1.4, y / 1.4, 4, 606)
  if (heightM > 760 + 160 * patch) return slope > 0.35 ? COVER.bare : COVER.moss
  if (heightM > 520 + 130 * patch) return patch > 0.12 ? COVER.shrub : COVER.grass
  if (slope > 0.75) return COVER.bare
  const wooded = 0.45 * smoothstep(0.05, 0.22, slope) + 0.9 * patch - 0.12 * smoothstep(300, 520, heightM)
  if (wooded > 0.12) return COVER.tree
  return wooded > 0.02 ? COVER.shrub : COVER.grass
}

/** Class number per cell of the island's grid, row by row. */
export function coverIsland(island: Island): Uint8Array {
  const { land, drainage, inlandKm } = island
  const { width, heightM, isLand } = land
  const cover = new Uint8Array(width * width).fill(COVER.water)
  for (let cell = 0; cell < cover.length; cell++) {
    if (!isLand[cell]) continue
    const row = Math.floor(cell / width)
    const col = cell - row * width
    const x = WEST_KM + ((col + 0.5) * POSTING_M) / 1000
    const y = NORTH_KM - ((row + 0.5) * POSTING_M) / 1000
    const h = heightM[cell]
    const dx = (heightM[cell + 1] - heightM[cell - 1]) / (2 * POSTING_M)
    const dy = (heightM[cell + width] - heightM[cell - width]) / (2 * POSTING_M)
    cover[cell] = classAt(x, y, h, Math.sqrt(dx * dx + dy * dy), inlandKm[cell], drainage.areaM2[cell])
  }
  return cover
}

function classAt(x: number, y: number, h: number, slope: number, inland: number, catchmentM2: number): number {
  if (catchmentM2 > 14e6) return COVER.water
  for (const town of TOWNS) {
    const edge = town.reachKm * (1 + 0.9 * fbm(x / 0.8, y / 0.8, 3, 607))
    const d = away(x, y, town.at)
    if (d < edge && slope < 0.16)
      return d > 0.55 * edge && chance(Math.floor(x / 0.15), Math.floor(y / 0.15), 608) < 0.35 ? COVER.grass : COVER.built
  }
  for (const { at, id } of CANDIDATES) {
    const open = (id === 'A' ? 1.05 : 0.45) * (1 + 0.3 * noise(x / 0.6, y / 0.6, 609))
    if (away(x, y, at) < open) return COVER.grass
  }
  // Runway of the airfield.
  if (Math.abs(x + 11.9 + 0.35 * (y + 2.4)) < 0.04 && Math.abs(y + 2.4) < 0.95) return COVER.bare
  const ragged = y + 0.9 * fbm(x / 0.7, y / 0.7, 3, 616)
  const west = smoothstep(-12.5, -14, x) * smoothstep(8.5, 6.5, ragged) * smoothstep(-10, -8.5, ragged)
  if (west > 0.5) {
    if (inland < 0.09) return COVER.bare
    if (inland < 0.4 + 0.1 * noise(x, y / 0.8, 610)) return noise(x / 0.3, y / 0.3, 611) > 0.1 ? COVER.shrub : COVER.grass
    const pines = 1.15 + 0.35 * noise(x / 1.5, y / 1.5, 612)
    if (inland < pines) return fbm(x / 0.7, y / 1.1, 3, 613) > -0.28 ? COVER.tree : COVER.grass
  }
  const low = smoothstep(9, 3, h)
  if (low * (0.6 + fbm(x / 1.1, y / 1.1, 3, 614)) > 0.5) return COVER.marsh
  if (slope < 0.075 + 0.03 * noise(x / 0.9, y / 0.9, 615) && h < 170) return field(x, y)
  return upland(x, y, h, slope)
}
