import { InputError, type LonLat, readFeatures, readObstacles } from '../../core/index.ts'

/** RFC 4180 text of a table. */
export function csvText(columns: readonly string[], rows: readonly (readonly string[])[]): string {
  const cell = (s: string) => (/[",\n\r]/.test(s) ? `"${s.replaceAll('"', '""')}"` : s)
  return [columns, ...rows].map((r) => `${r.map(cell).join(',')}\r\n`).join('')
}

/** A name that no file has yet: `fixes.csv`, then `fixes-2.csv`, … The file of before stays, so that undo finds it. */
export function freshName(name: string, taken: ReadonlyMap<string, unknown>): string {
  const [, stem, end] = /^(.*?)(?:-\d+)?(\.[^.]+)$/.exec(name) ?? [null, name, '']
  let n = 2
  let next = taken.has(name) ? `${stem}-${n}${end}` : name
  while (taken.has(next)) next = `${stem}-${++n}${end}`
  return next
}

/** An obstacle that is one point, as a table shows it; texts as typed, empty where not stated. */
export interface ObstacleRow {
  readonly name: string
  readonly at: LonLat | null
  readonly heightM: number | null
  readonly topM: number | null
  readonly widthM: number | null
  readonly rcsM2: number | null
  /** The feature it came from, with whatever else that holds; null for a new row. */
  readonly feature: Feature | null
}
interface Feature {
  readonly type: 'Feature'
  readonly geometry: { readonly type: string; readonly coordinates: unknown } | null
  readonly properties: Readonly<Record<string, unknown>> | null
}
/** Points of an obstacle file as rows; lines, outlines and the rest of the file stay as they are. Throws InputError for text that is no obstacle file. */
export function obstacleRows(text: string, fileName: string): { rows: ObstacleRow[]; others: Feature[] } {
  readObstacles(readFeatures(text, fileName), fileName)
  const root = JSON.parse(text.replace(/^\uFEFF/, '')) as { type: string; features?: Feature[] }
  const features = root.type === 'Feature' ? [root as unknown as Feature] : (root.features ?? [])
  const points = features.filter((f) => f.geometry?.type === 'Point')
  const number = (v: unknown): number | null => (v === undefined || v === null || v === '' ? null : Number(v))
  return {
    rows: points.map((feature) => {
      const p = feature.properties ?? {}
      const [lon, lat] = (feature.geometry as { coordinates: [number, number] }).coordinates
      return {
        name: typeof p.name === 'string' || typeof p.name === 'number' ? String(p.name) : '',
        at: { lon, lat },
        heightM: number(p.heightM),
        topM: number(p.topM),
        widthM: number(p.widthM),
        rcsM2: number(p.rcsM2),
        feature,
      }
    }),
    others: features.filter((f) => f.geometry?.type !== 'Point'),
  }
}

/** The obstacle file of rows and of the features that are no points. Throws InputError where the file could not be read again. */
export function obstacleText(rows: readonly ObstacleRow[], others: readonly Feature[], fileName: string): string {
  const features = rows.map((r, i): Feature => {
    if (!r.at)
      throw new InputError({ code: 'obstacle-place', file: fileName, place: `row ${i + 1}`, found: 'no position', remedy: 'give one' })
    const { name: _n, heightM: _h, topM: _t, widthM: _w, rcsM2: _r, ...rest } = r.feature?.properties ?? {}
    const stated = Object.entries({ name: r.name || null, heightM: r.heightM, topM: r.topM, widthM: r.widthM, rcsM2: r.rcsM2 })
    return {
      ...(r.feature ?? { type: 'Feature' as const }),
      geometry: { type: 'Point', coordinates: [r.at.lon, r.at.lat] },
      properties: { ...Object.fromEntries(stated.filter(([, v]) => v !== null)), ...rest },
    }
  })
  const text = `${JSON.stringify({ type: 'FeatureCollection', features: [...features, ...others] }, null, 1)}\n`
  readObstacles(readFeatures(text, fileName), fileName)
  return text
}
