import type { Earth } from '../geodesy/index.ts'
import { horizonAt } from '../masking/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import type { Work } from '../work/index.ts'
import type { HorizonLine } from './types.ts'

const STEP_DEG = 1
/** Azimuths between two yields. */
const BATCH = 15

/**
 * Horizons of one antenna beside the study's own, a degree apart: of the bare ground (no cover, no obstacles) at each earth given, and of the whole
 * surface at every earth after the first. Elevations in degrees at the antenna, NaN where nothing is known.
 */
export function* horizonLines(
  ground: Ground,
  site: Site,
  heightM: number,
  earths: readonly Earth[],
  maxRangeM: number,
): Work<readonly HorizonLine[]> {
  const bare: Ground = { ...ground, obstacles: [], codes: ground.codes.map((c) => ({ ...c, coverHeightM: 0 })) }
  const wanted = earths.flatMap((earth, n) => [{ earth, ground: bare, cover: false }, ...(n > 0 ? [{ earth, ground, cover: true }] : [])])
  const azimuthsDeg = Array.from({ length: 360 / STEP_DEG }, (_, i) => i * STEP_DEG)
  const out: HorizonLine[] = []
  for (const [n, w] of wanted.entries()) {
    const elevationDeg = new Float64Array(azimuthsDeg.length)
    for (let from = 0; from < azimuthsDeg.length; from += BATCH) {
      const rows = horizonAt(w.ground, site, heightM, w.earth, azimuthsDeg.slice(from, from + BATCH), maxRangeM)
      rows.forEach((r, i) => {
        elevationDeg[from + i] = r.elevationDeg
      })
      yield { done: n * azimuthsDeg.length + from + BATCH, total: wanted.length * azimuthsDeg.length }
    }
    out.push({ k: w.earth.effectiveEarthFactor, cover: w.cover, azimuthsDeg, elevationDeg })
  }
  return out
}
