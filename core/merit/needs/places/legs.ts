import { geodesicDirect, geodesicInverse, type LonLat } from '../../../geodesy/index.ts'

/** Points of a line and between them, so that no two neighbours are further apart than `longestM`. */
export function splitLegs(path: readonly LonLat[], longestM: number): LonLat[] {
  const out: LonLat[] = []
  path.forEach((p, n) => {
    out.push(p)
    const next = path[n + 1]
    if (!next) return
    const { distanceM, azimuthDeg } = geodesicInverse(p, next)
    const pieces = Math.ceil(distanceM / longestM)
    for (let k = 1; k < pieces; k++) {
      const { lon, lat } = geodesicDirect(p, azimuthDeg, (distanceM * k) / pieces)
      out.push({ lon, lat })
    }
  })
  return out
}
