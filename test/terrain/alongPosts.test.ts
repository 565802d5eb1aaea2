import { describe, expect, it } from 'vitest'
import { groundAt, makeTracer } from '../../core/terrain/index.ts'
import { groundOn, seeded, siteAt, utmShape } from './grounds.ts'

describe('a ray that runs exactly along a line of posts', () => {
  it('meets every crossing once and has the ground of the posts, along columns and rows, from on a post and between', async () => {
    const noise = seeded(21)
    const g = groundOn(await utmShape(401, 401, 30), () => 200 * noise())
    let compared = 0
    for (const [col, row] of [
      [200, 200],
      [200, 187.4],
      [212.6, 200],
    ] as const) {
      const site = siteAt(g, col, row)
      const t = makeTracer(g, site, 4000)
      for (const azimuthDeg of [0, 90, 180, 270]) {
        t.traceTo(azimuthDeg, 4000)
        const { ground, count } = t.track
        let before = -1
        for (let k = 0; k < count; k++) {
          const s = ground[3 * k]
          expect(s, `azimuth ${azimuthDeg}: entry ${k} of ${count}`).toBeGreaterThanOrEqual(before)
          expect(s - Math.max(0, before), `azimuth ${azimuthDeg}: a crossing is missing at ${before} m`).toBeLessThan(30.1)
          before = s
          const at = t.place(s, azimuthDeg)
          expect(Math.abs(ground[3 * k + 1] - groundAt(g, at.lon, at.lat)), `azimuth ${azimuthDeg} at ${s} m`).toBeLessThan(0.05)
          compared++
        }
      }
    }
    expect(compared).toBeGreaterThan(1500)
  })
})
