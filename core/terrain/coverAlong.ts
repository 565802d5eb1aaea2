import type { WalkedPatches } from './patches.ts'

/** Cover heights at posts of one ground as seen from one site: none inside the clearing radius. */
export interface CoverPosts {
  /** Index into `coverM` per post; null: 0 everywhere. */
  readonly code: Uint8Array | null
  /** Cover height per code, m. */
  readonly coverM: Float64Array
  readonly width: number
  readonly clearing: Clearing
}
/** Posts within radiusM of the site carry no cover. Steps of a column and a row at the site in metres east and north. */
export interface Clearing {
  readonly radiusM: number
  /** No post nearer than this to a place at that distance along a ray can be inside, m. */
  readonly reachM: number
  readonly siteCol: number
  readonly siteRow: number
  readonly colEastM: number
  readonly colNorthM: number
  readonly rowEastM: number
  readonly rowNorthM: number
}

/** Surface of a walked ray: ground and the bilinear cover on it. */
export function coverAlong(p: CoverPosts, count: number, patches: WalkedPatches, ground: Float64Array, surface: Float64Array): void {
  const { width, code, coverM } = p
  const cleared = p.clearing.reachM
  for (let k = 0; k < count; k++) {
    const at = patches.post[k]
    const u = patches.u[k]
    const v = patches.v[k]
    let c00: number
    let c01: number
    let c10: number
    let c11: number
    if (ground[3 * k] > cleared) {
      c00 = coverM[code ? code[at] : 0]
      c01 = coverM[code ? code[at + 1] : 0]
      c10 = coverM[code ? code[at + width] : 0]
      c11 = coverM[code ? code[at + width + 1] : 0]
    } else {
      c00 = coverNear(p, at)
      c01 = coverNear(p, at + 1)
      c10 = coverNear(p, at + width)
      c11 = coverNear(p, at + width + 1)
    }
    surface[3 * k] = ground[3 * k]
    surface[3 * k + 1] = ground[3 * k + 1] + (c00 * (1 - u) + c01 * u) * (1 - v) + (c10 * (1 - u) + c11 * u) * v
    surface[3 * k + 2] = ground[3 * k + 2] + (c00 - c01 - c10 + c11) * patches.bendPerTwist[k]
  }
}

/** Cover of one post with the clearing applied, m. */
function coverNear(p: CoverPosts, post: number): number {
  const { clearing: c, width } = p
  const dc = (post % width) - c.siteCol
  const dr = Math.floor(post / width) - c.siteRow
  const eastM = dc * c.colEastM + dr * c.rowEastM
  const northM = dc * c.colNorthM + dr * c.rowNorthM
  if (eastM * eastM + northM * northM <= c.radiusM * c.radiusM) return 0
  return p.coverM[p.code ? p.code[post] : 0]
}
