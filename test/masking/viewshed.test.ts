import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { sightPoint } from '../../core/masking/index.ts'
import { gridPosition } from '../../core/raster/index.ts'
import { buildGround } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'
import { hasShared, sharedNote, sharedPath } from '../helpers/sharedData.ts'
import { FARMLAND } from '../terrain/grounds.ts'
import { readBands, readDem } from '../terrain/readDem.ts'

// Against GDAL's viewshed utility, curvature coefficient 0.75 = 4/3 of 6 378 137 m. It carries a plane outward from the inner neighbours instead of looking
// along the line, so masts under 20 m are left out: there the first ring decides all beyond.
const hasGdal = spawnSync('gdal_viewshed', ['--help']).error === undefined
const note = hasGdal ? sharedNote : ' (skipped: gdal_viewshed is not here)'
const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: 6_378_137 }

describe.skipIf(!hasGdal || !hasShared)(`against GDAL's viewshed utility${note}`, () => {
  it('masts of 20 and 50 m: at least 99 % of posts off its boundary equal', async () => {
    const path = sharedPath('dem/jacksboro90.tif')
    const dem = await readDem(path)
    const g = finish(buildGround({ serial: 1, ...dem, code: null, codes: [FARMLAND], obstacles: [], verticalErrorM: 10 }))
    const { width, height, x0, y0, colX, rowY } = g.shape
    const position = gridPosition(g.shape)
    const dir = mkdtempSync(join(tmpdir(), 'viewshed-'))
    const cases: { dem: string; site: string; col: number; row: number }[] = JSON.parse(
      readFileSync(sharedPath('checks.json'), 'utf8'),
    ).cases
    for (const { site: name, col, row } of cases.filter((c) => c.dem === 'jacksboro90'))
      for (const heightM of [20, 50]) {
        const out = join(dir, `${name}-${heightM}.tif`)
        const observer = ['-ox', x0 + col * colX, '-oy', y0 + row * rowY, '-oz', heightM].map(String)
        const run = spawnSync('gdal_viewshed', ['-q', ...observer, '-md', '0', '-cc', '0.75', '-ov', '0', path, out], { encoding: 'utf8' })
        expect(run.status, run.stderr).toBe(0)
        const [band] = await readBands(out)
        const [lon, lat] = position.toLonLat(col, row)
        const site = { lon, lat, groundHeightM: null, clearingRadiusM: 0 }
        let count = 0
        let equal = 0
        for (let i = width + 1; i < width * (height - 1) - 1; i += 29) {
          const [c, r] = [i % width, Math.floor(i / width)]
          if (c === 0 || c === width - 1 || (c === col && r === row)) continue
          const visible = band[i] > 0
          let boundary = false
          for (const down of [-width, 0, width]) for (const right of [-1, 0, 1]) boundary ||= band[i + down + right] > 0 !== visible
          if (boundary) continue
          const [tLon, tLat] = position.toLonLat(c, r)
          count++
          if (sightPoint(g, site, heightM, EARTH, { lon: tLon, lat: tLat }).inSight === visible) equal++
        }
        console.log(`    ${name} ${heightM} m: ${((100 * equal) / count).toFixed(2)} % of ${count} posts equal`)
        expect(equal / count).toBeGreaterThan(0.99)
      }
    rmSync(dir, { recursive: true })
  })
})
