// The order of the house: a room of core/ may import only from rooms named before it, and only through their index.ts.
// core never imports app; in app the order below holds too. Run by `npm run lint`.
import { readdirSync, readFileSync, statSync } from 'node:fs'
import { dirname, join, relative, resolve, sep } from 'node:path'

const CORE_ROOMS = [
  ['units', 'errors', 'work'],
  ['geodesy'],
  ['raster'],
  ['polar'],
  ['paint'],
  ['intake'],
  ['landcover', 'obstacles'],
  ['terrain'],
  ['atmosphere', 'antenna', 'radar'],
  ['masking', 'propagation', 'clutter', 'doppler', 'detection'],
  ['study'],
  ['merit'],
  ['runs'],
].flat()
const APP_ROOMS = ['words', 'charts', 'memo', 'batch', 'document', 'files', 'compute', 'map', 'ui', 'steps']
/** Packages that only one room may import. */
const ONE_DOOR = {
  proj4: 'geodesy',
  'geographiclib-geodesic': 'geodesy',
  'geotiff-geokeys-to-proj4': 'geodesy',
  geotiff: 'intake',
  zod: 'study',
}
/** Rooms of app that stay free of React but for files ending in .tsx. */
const PLAIN_APP_ROOMS = new Set(['words', 'charts', 'memo', 'batch', 'document'])

const root = resolve(dirname(new URL(import.meta.url).pathname), '..')
const faults = []
const files = (dir) =>
  readdirSync(dir).flatMap((name) => {
    const path = join(dir, name)
    if (statSync(path).isDirectory()) return files(path)
    return /\.(ts|tsx)$/.test(name) && !name.endsWith('.d.ts') ? [path] : []
  })
const importsOf = (text) =>
  [
    ...text.matchAll(
      /(?:^|\n)\s*(?:import|export)\b[^'"]*?from\s*['"]([^'"]+)['"]|\bimport\(\s*['"]([^'"]+)['"]\s*\)|\bimport\s+['"]([^'"]+)['"]/g,
    ),
  ].map((m) => m[1] ?? m[2] ?? m[3])

function check(side, rooms) {
  const base = join(root, side)
  for (const path of files(base)) {
    const here = relative(base, path).split(sep)
    const room = here.length > 1 ? here[0] : null
    if (room && !rooms.includes(room)) faults.push(`${side}/${here.join('/')}: room "${room}" is not in the order of scripts/rooms.mjs`)
    for (const spec of importsOf(readFileSync(path, 'utf8'))) {
      const say = (why) => faults.push(`${side}/${here.join('/')}: imports '${spec}': ${why}`)
      if (!spec.startsWith('.')) {
        if (spec.startsWith('node:') && (side === 'core' || !['batch'].includes(room))) say('Node is for app/batch only')
        if (side === 'core' && ['react', 'maplibre-gl', 'zustand'].some((p) => spec === p || spec.startsWith(`${p}/`)))
          say('core is free of the page')
        const owner = ONE_DOOR[spec]
        if (owner && side === 'core' && room !== owner) say(`only core/${owner} may import it`)
        if (owner && side === 'app') say(`only core/${owner} may import it`)
        if (side === 'app' && PLAIN_APP_ROOMS.has(room) && /^react/.test(spec) && !path.endsWith('.tsx'))
          say('React only in .tsx printers of this room')
        continue
      }
      const target = relative(root, resolve(dirname(path), spec.replace(/\?.*$/, ''))).split(sep)
      if (target[0] === 'core') {
        if (side === 'app') {
          if (target[1] !== 'index.ts') say('app uses core/index.ts and nothing else of core')
          continue
        }
        const other = target.length > 2 ? target[1] : null
        if (!other || other === room || room === null) continue
        if (rooms.indexOf(other) > rooms.indexOf(room)) say(`room "${other}" comes after "${room}"`)
        else if (target[2] !== 'index.ts') say(`come in by the door: core/${other}/index.ts`)
      } else if (target[0] === 'app') {
        if (side === 'core') say('core never imports app')
        const other = target.length > 2 ? target[1] : null
        if (other && room && other !== room && rooms.indexOf(other) > rooms.indexOf(room)) say(`room "${other}" comes after "${room}"`)
      }
    }
  }
}
check('core', CORE_ROOMS)
check('app', APP_ROOMS)
if (faults.length > 0) {
  console.error(faults.join('\n'))
  console.error(`\n${faults.length} import(s) against the order of the house.`)
  process.exit(1)
}
console.log('rooms: every import follows the order of the house')
