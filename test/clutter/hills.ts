import { crsFromEpsg } from '../../core/geodesy/index.ts'
import type { GroundCode, TerrainName } from '../../core/landcover/index.ts'
import { gridPosition } from '../../core/raster/index.ts'
import { buildGround, type Ground, type Site } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'

const cover = (terrain: TerrainName, coverHeightM: number): GroundCode => ({ terrain, coverHeightM, sourceClass: null, mark: null })
export const HILL_CODES: readonly GroundCode[] = [
  cover('rural', 2),
  cover('forest', 15),
  cover('farmland', 0),
  cover('urban', 8),
  cover('water', 0),
]

/** Deterministic numbers 0…1. */
export function randomNumbers(first: number): () => number {
  let s = first >>> 0
  return () => {
    s = (Math.imul(s, 1_664_525) + 1_013_904_223) >>> 0
    return s / 2 ** 32
  }
}

/** Invented hills, 36 km square at 60 m posting in UTM 33N, with patches of land cover and one lake of voids; the site stands in the middle. */
export async function hills(masts: readonly { col: number; row: number; rcsM2: number }[] = []): Promise<{ ground: Ground; site: Site }> {
  const width = 600
  const height = 600
  const crs = await crsFromEpsg(32633)
  const shape = { width, height, crs, x0: 482_000, y0: 5_460_000, colX: 60, colY: 0, rowX: 0, rowY: -60 }
  const random = randomNumbers(7)
  const waves = Array.from({ length: 40 }, (_, k) => {
    const lengthM = 400 * 1.12 ** k
    const angle = random() * 2 * Math.PI
    return { x: Math.cos(angle) / lengthM, y: Math.sin(angle) / lengthM, phase: random() * 7, heightM: lengthM * 0.008 }
  })
  const heightM = new Float32Array(width * height)
  const code = new Uint8Array(width * height)
  for (let row = 0; row < height; row++)
    for (let col = 0; col < width; col++) {
      const at = row * width + col
      const [x, y] = [col * 60, row * 60]
      let z = 300
      for (const w of waves) z += w.heightM * Math.sin(2 * Math.PI * (x * w.x + y * w.y) + w.phase)
      heightM[at] = (col - 420) ** 2 + (row - 200) ** 2 < 400 ? Number.NaN : z
      code[at] = (Math.floor(col / 17) + Math.floor(row / 23) * 3) % HILL_CODES.length
    }
  const place = gridPosition(shape)
  const obstacles = masts.map(({ col, row, rcsM2 }, n) => {
    const [lon, lat] = place.toLonLat(col, row)
    return { name: `mast ${n + 1}`, path: [{ lon, lat }], heightM: 60, topM: null, widthM: 30, rcsM2, verticalErrorM: null }
  })
  const ground = finish(buildGround({ serial: 1, shape, heightM, code, codes: HILL_CODES, obstacles, verticalErrorM: 10 }))
  const [lon, lat] = place.toLonLat(300, 300)
  return { ground, site: { lon, lat, groundHeightM: null, clearingRadiusM: 50 } }
}
