import { readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { beforeAll, describe, expect, it } from 'vitest'
import { batchLater, type Ran, rowsOf, tinyDoc, tinyStudy } from './tinyStudy.ts'

// Flat ground at 100 m, a ridge of 160 m 2 km east of the radar; a road in the open west, one in the lee of the ridge, one in a tunnel.
const line = (highway: string, coordinates: number[][], more = {}) => ({
  type: 'Feature',
  properties: { highway, ...more },
  geometry: { type: 'LineString', coordinates },
})
const ROADS = {
  type: 'FeatureCollection',
  features: [
    line('motorway', [[14.98, 48.745], [14.98, 48.758]]), // biome-ignore format: one line
    line('tertiary', [[15.03, 48.748], [15.03, 48.755]]), // biome-ignore format: one line
    line('primary', [[14.99, 48.752], [14.995, 48.752]], { tunnel: 'yes' }), // biome-ignore format: one line
  ],
}

/** A tree line 1° over an instrument of 2 m, 1 km to the south. */
const SURVEY =
  'azimuth_deg,elevation_deg,range_m,instrument_height_m,method\n178,1,1000,2,theodolite\n180,1,1000,2,theodolite\n182,1,1000,2,theodolite\n'

describe('files of an option beside its rasters', () => {
  let out = ''
  let ran: Ran
  let option: { figures: Record<string, number>; roads: Record<string, unknown> }
  beforeAll(async () => {
    const [candidate] = tinyDoc().candidates
    const { dir, path } = await tinyStudy(
      tinyDoc({
        roads: { file: 'roads.geojson' },
        candidates: [{ ...candidate!, mastHeightsM: [10], measuredHorizon: { file: 'survey.csv' }, useMeasuredHorizon: true }],
      }),
    )
    writeFileSync(join(dir, 'roads.geojson'), JSON.stringify(ROADS))
    writeFileSync(join(dir, 'survey.csv'), SURVEY)
    out = join(dir, 'results')
    ran = await batchLater('run', path, '--out', out, '--no-memo')
    option = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8')).options[0]
  }, 120_000)

  it('roads in summary.json: the open motorway alone, by class and ring', () => {
    expect(ran).toMatchObject({ code: 0, out: '' })
    expect(option.figures.roads_seen_km).toBeGreaterThan(1.44)
    expect(option.figures.roads_seen_km).toBeLessThan(1.45)
    expect(option.figures).toMatchObject({ roads_seen_other_km: 0, roads_seen_primary_km: 0 })
    expect(option.roads).toMatchObject({
      vehicle_rcs_m2: 30,
      seen_km: option.figures.roads_seen_km,
      blind_zone_km: null,
      at_k: { k: 2.75, seen_km: option.figures.roads_seen_k2_75_km },
    })
    const rings = option.roads.rings as { seen_km: number; seen_by_class_km: Record<string, number> }[]
    expect(rings).toHaveLength(1)
    expect(rings[0]!.seen_by_class_km).toMatchObject({ motorway: option.figures.roads_seen_km, other: 0 })
    expect((option.roads.in_tunnel_km as number) > 0.36 && (option.roads.in_tunnel_km as number) < 0.37).toBe(true)
  })
  it('horizon-difference.csv: surveyed, from the mast, and computed; used, it is the horizon', () => {
    const rows = rowsOf(readFileSync(join(out, 'A/10m/horizon-difference.csv'), 'utf8'))
    expect(rows.map((r) => r.azimuth_deg)).toEqual(['178.0000', '180.0000', '182.0000'])
    // the top stands at 102 + 17.5 m: 0.54° from 110 m at 1 km
    for (const r of rows) {
      expect(Number(r.corrected_deg)).toBeCloseTo((Math.atan(9.5 / 1000) * 180) / Math.PI, 2)
      expect(Number(r.difference_deg)).toBeCloseTo(Number(r.corrected_deg) - Number(r.computed_deg), 4)
      expect(r).toMatchObject({ measured_deg: '1.00000', method: 'theodolite', used: '1' })
    }
    const horizon = rowsOf(readFileSync(join(out, 'A/10m/horizon.csv'), 'utf8'))
    const south = horizon.find((h) => Number(h.azimuth_deg) === 180)!
    expect(south.obstacle).toBe('surveyed')
    expect(Number(south.elevation_deg)).toBeCloseTo(Number(rows[1]!.corrected_deg), 3)
    const summary = JSON.parse(readFileSync(join(out, 'summary.json'), 'utf8'))
    expect(summary.files.map((f: { name: string }) => f.name)).toContain('survey.csv')
    expect(option.figures.measured_horizon_mean_deg).toBeGreaterThan(0.5)
  })
  it('a survey that cannot be read ends with one sentence and its line', async () => {
    const bad = await tinyStudy(tinyDoc({ candidates: [{ ...tinyDoc().candidates[0]!, measuredHorizon: { file: 'survey.csv' } }] }))
    writeFileSync(join(bad.dir, 'survey.csv'), SURVEY.replace('180,1,', '180,tall,'))
    const { code, err } = await batchLater('run', bad.path, '--out', join(bad.dir, 'out'), '--no-memo')
    expect(code).toBe(2)
    expect(err.trim().split('\n').at(-1)).toMatch(/survey\.csv.*line 3, elevation_deg: elevation is "tall"; give -45 to 89/)
  })
  it('roads-seen.geojson: lines, seen or not', () => {
    const { features } = JSON.parse(readFileSync(join(out, 'A/10m/0deg/roads-seen.geojson'), 'utf8'))
    expect(features.map((f: { properties: { seen: boolean } }) => f.properties.seen)).toEqual([true, false, false])
    expect(features[0].geometry.coordinates[0]).toEqual([14.98, 48.745])
  })
  it('trial-plan.csv: the radial through the worst margin first, the ridge to survey last', () => {
    const rows = rowsOf(readFileSync(join(out, 'A/10m/0deg/trial-plan.csv'), 'utf8'))
    expect(rows[0]).toMatchObject({ row: '1', kind: 'radial', need: 'n1', altitude_m_msl: '300.000', to_range_m: '3000.000' })
    // the ridge runs north and south: the worst azimuth is near east
    expect(Math.abs(Number(rows[0]!.azimuth_deg) - 90)).toBeLessThan(50)
    const survey = rows.find((r) => r.kind === 'survey')!
    expect(Number(survey.altitude_m_msl)).toBeGreaterThan(155)
    expect(survey.confirms).toBe('the height of the obstacle that the floor rests on')
    expect(rows.every((r) => r.confirms !== '')).toBe(true)
  })
})
