import { readdirSync, statSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, test } from 'vitest'
import { geodesicDirect, geodesicInverse, groundAt, polarShape } from '../../core/index.ts'
import { DEMO_DIR, type OpenDemo, openDemo } from './openDemo.ts'

let demo: OpenDemo
beforeAll(async () => {
  demo = await openDemo()
}, 120_000)

describe('the demo study', () => {
  test('opens without a remark and takes under 4 MB', () => {
    expect(demo.warnings).toEqual([])
    expect(demo.read.warnings).toEqual([])
    const bytes = readdirSync(DEMO_DIR).reduce((sum, name) => sum + statSync(join(DEMO_DIR, name)).size, 0)
    expect(bytes).toBeLessThan(4e6)
  })

  test('keeps one candidate to at most 1.2 million cells, all on known ground', () => {
    const grid = polarShape(demo.study.run)
    expect(grid.azimuths * grid.ranges).toBeLessThanOrEqual(1.2e6)
    for (const c of demo.study.candidates) {
      expect(groundAt(demo.ground, c.lon, c.lat)).toBeGreaterThan(5)
      for (let azimuthDeg = 0; azimuthDeg < 360; azimuthDeg += 5) {
        const rim = geodesicDirect(c, azimuthDeg, demo.study.run.maxRangeM)
        expect(groundAt(demo.ground, rim.lon, rim.lat)).not.toBeNaN()
      }
    }
  })

  test('has sea at 0 m under water cover, land above it, and a mountain', () => {
    const { heightM, code, codes } = demo.read
    let high = 0
    let seaNotWater = 0
    let below = 0
    for (let k = 0; k < heightM.length; k++) {
      if (heightM[k] > high) high = heightM[k]
      if (heightM[k] < 0) below++
      if (heightM[k] === 0 && codes[code![k]].terrain !== 'water') seaNotWater++
    }
    expect(below).toBe(0)
    expect(seaNotWater).toBe(0)
    expect(high).toBeGreaterThan(900)
    expect(new Set(codes.map((c) => c.terrain))).toEqual(new Set(['rural', 'forest', 'farmland', 'open', 'urban', 'water']))
  })

  test('stands every obstacle on land', () => {
    expect(demo.read.obstacles.length).toBeGreaterThanOrEqual(12)
    for (const o of demo.read.obstacles) for (const at of o.path) expect(groundAt(demo.ground, at.lon, at.lat), o.name).toBeGreaterThan(0)
  })

  test('runs the motorway straight away from candidate A to the near ridge', () => {
    const a = demo.study.candidates.find((c) => c.id === 'A')!
    const motorway = demo.read.roads.find((r) => r.highway === 'motorway')!
    const ends = [motorway.path[0], motorway.path[motorway.path.length - 1]].map((at) => geodesicInverse(a, at))
    expect(ends[0].distanceM).toBeLessThan(1000)
    expect(ends[1].distanceM).toBeGreaterThan(8000)
    expect(Math.abs(ends[0].azimuthDeg - ends[1].azimuthDeg)).toBeLessThan(0.5)
    expect(demo.read.roads.map((r) => r.highway)).toContain('rail')
  })
})
