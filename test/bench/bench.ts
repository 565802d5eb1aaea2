// Speed of the kernels in this process, each over 15 runs; one JSON line on stdout.
//   npm run --silent bench -- --json --ground G.tif --col C --row R --range M [--helpers N]
// Sweeps are shared with N helper threads (one per further core when it is not said; 0 = one thread) and leave out height to see until that layer is
// shown, as app and batch command do; `heightToSee` is the time of that by itself. Everything else runs on one thread. "threads" says how many swept.
// Without --ground: flat, ridged, rough and all-void grounds of 1 000 x 1 000 posts made here, one line each, and the budgets of the demo: 24 options after a
// change of need, full physics of one option over masking and clutter alone (processor time).
import { closeSync, fstatSync, openSync, readSync } from 'node:fs'
import { availableParallelism } from 'node:os'
import { basename } from 'node:path'
import { sweepHelpers } from '../../app/batch/helpers/sweepHelpers.ts'
import { clutterToNoise } from '../../core/clutter/index.ts'
import { loadCrs, WGS84 } from '../../core/geodesy/index.ts'
import { type ByteSource, openTerrain } from '../../core/intake/index.ts'
import type { GroundCode } from '../../core/landcover/index.ts'
import { heightToSeeCells, sweep } from '../../core/masking/index.ts'
import { makeRamp, paintPolar } from '../../core/paint/index.ts'
import { type PolarShape, previewShape } from '../../core/polar/index.ts'
import type { RadarInput } from '../../core/radar/index.ts'
import { type GridShape, gridPosition } from '../../core/raster/index.ts'
import { buildGround, type Ground, makeTracer, type Site } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'
import { demoBudget } from './demoBudget.ts'

const RUNS = 15
const AZIMUTHS = 1440
const RANGE_STEP_M = 75
const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: 6_378_137 }
const FARMLAND: GroundCode = { terrain: 'farmland', coverHeightM: 0, sourceClass: null, mark: null }
const RADAR: RadarInput = {
  name: 'bench',
  frequencyHz: 2.75e9,
  peakPowerW: 20_000,
  pulseWidthS: 1.2e-6,
  compressedPulseWidthS: 1.2e-6,
  noiseBandwidthHz: 1 / 1.2e-6,
  prfHz: [900],
  prfMode: 'single',
  coherentTransmitter: true,
  polarisation: 'V',
  rotationRpm: 10,
  noiseFigureDb: 4,
  systemLossDb: 6,
  pfa: 1e-6,
  antenna: {
    gainDbi: 33,
    azimuthBeamwidthDeg: 1.6,
    elevationBeamwidthDeg: 5,
    elevationPattern: 'table',
    cosecantLimitDeg: 30,
    elevationTable: [
      [-90, 0],
      [90, 0],
    ],
    sidelobeDb: -200,
    elevationSidelobeDb: -30,
    tiltDeg: 0,
    apertureWidthM: null,
    apertureHeightM: null,
  },
  suppression: { kind: 'none', statedDb: 0, pulses: 0, stabilityLimitDb: null, bits: null },
  stc: { kind: 'none', curve: [], cornerM: 0, maxDb: 0 },
  instrumentedRangeM: 60_000,
}

interface Times {
  readonly firstMs: number
  readonly medianMs: number
  readonly bestMs: number
}
function time(run: () => void): Times {
  const t: number[] = []
  for (let i = 0; i < RUNS; i++) {
    const from = performance.now()
    run()
    t.push(performance.now() - from)
  }
  const sorted = [...t].sort((a, b) => a - b)
  const ms = (x: number): number => Math.round(x * 10) / 10
  return { firstMs: ms(t[0]), medianMs: ms(sorted[RUNS >> 1]), bestMs: ms(sorted[0]) }
}

function fileSource(path: string): ByteSource & { close(): void } {
  const fd = openSync(path, 'r')
  return {
    name: basename(path),
    size: fstatSync(fd).size,
    async read(offset, length) {
      const out = new Uint8Array(length)
      return out.buffer.slice(0, readSync(fd, out, 0, length, offset))
    },
    close: () => closeSync(fd),
  }
}
async function readGround(path: string): Promise<Ground> {
  const source = fileSource(path)
  const head = await openTerrain(source, {})
  const heightM = sharedHeights(head.shape.width * head.shape.height)
  await head.readInto({ shape: head.shape, samples: heightM })
  source.close()
  return groundOf(head.shape, heightM)
}
const sharedHeights = (posts: number): Float32Array => new Float32Array(new SharedArrayBuffer(4 * posts))
const groundOf = (shape: GridShape, heightM: Float32Array): Ground =>
  finish(buildGround({ serial: 1, shape, heightM, code: null, codes: [FARMLAND], obstacles: [], verticalErrorM: 10 }))

/** All runs of one ground from the post at (col, row). */
async function measure(g: Ground, col: number, row: number, rangeM: number, helpers: number): Promise<Record<string, unknown>> {
  const [lon, lat] = gridPosition(g.shape).toLonLat(col, row)
  const site: Site = { lon, lat, groundHeightM: null, clearingRadiusM: 50 }
  const grid: PolarShape = {
    azimuths: AZIMUTHS,
    ranges: Math.ceil(rangeM / RANGE_STEP_M),
    azimuthStepDeg: 360 / AZIMUTHS,
    rangeStepM: RANGE_STEP_M,
  }
  const tracer = makeTracer(g, site, rangeM, { fanStepDeg: grid.azimuthStepDeg })
  let visits = 0
  for (let i = 0; i < AZIMUTHS; i++) {
    tracer.trace(i * grid.azimuthStepDeg)
    visits += tracer.track.count
  }
  const { crew, close } = sweepHelpers(helpers)
  const options = { heightToSee: false, helpers: crew }
  const run = (heightsM: readonly number[]) => finish(sweep(g, site, heightsM, grid, EARTH, options))
  const oneHeight = time(() => void run([20]))
  const eightHeights = time(() => void run([5, 10, 15, 20, 25, 30, 35, 40]))
  const option = time(() => {
    const { site: cells, masks } = run([20])
    finish(clutterToNoise(cells, masks[0], g.codes, site, 20, EARTH, RADAR, 0))
  })
  const heightToSee = time(() => void finish(heightToSeeCells(g, site, grid, EARTH)))
  const coarse = previewShape(grid, false)
  const preview = time(() => void finish(sweep(g, site, [20], coarse, EARTH, options)))
  const { site: cells, masks } = run([20])
  const clutter = finish(clutterToNoise(cells, masks[0], g.codes, site, 20, EARTH, RADAR, 0))
  const out = new Uint32Array(1440 * 900)
  const mercatorM = (2 * rangeM) / Math.cos((lat * Math.PI) / 180)
  const x = (lon * Math.PI * 6_378_137) / 180
  const y = 6_378_137 * Math.asinh(Math.tan((lat * Math.PI) / 180))
  const worldPerPx = mercatorM / 900
  const view = { width: 1440, height: 900, worldX: x - 720 * worldPerPx, worldY: y + 450 * worldPerPx, worldPerPx, night: false }
  const ramp = makeRamp('warm', [0, 20, 40, 60], 'bare')
  const paint = time(() => paintPolar(grid, site, clutter.cnrDb, masks[0].state, ramp, view, out))
  await close()
  return { visits, threads: 1 + helpers, previewAzimuths: coarse.azimuths, oneHeight, eightHeights, option, preview, paint, heightToSee }
}

/** Small grounds that show the extremes. */
function madeGround(height: (col: number, row: number) => number): Ground {
  const size = 1000
  const step = 30 / 111_320
  const shape: GridShape = {
    width: size,
    height: size,
    crs: WGS84,
    x0: 10,
    y0: 0.13,
    colX: step,
    colY: 0,
    rowX: 0,
    rowY: -step,
  }
  const heightM = sharedHeights(size * size)
  for (let i = 0; i < heightM.length; i++) heightM[i] = height(i % size, Math.floor(i / size))
  return groundOf(shape, heightM)
}

async function main(): Promise<void> {
  const value = (name: string): string | undefined => {
    const i = process.argv.indexOf(`--${name}`)
    return i < 0 ? undefined : process.argv[i + 1]
  }
  const helpers = Number(value('helpers') ?? availableParallelism() - 1)
  const path = value('ground')
  if (path) {
    const g = await readGround(path)
    await loadCrs(g.shape.crs)
    const row = await measure(g, Number(value('col')), Number(value('row')), Number(value('range')), helpers)
    process.stdout.write(`${JSON.stringify(row)}\n`)
    return
  }
  const grounds: Record<string, (col: number, row: number) => number> = {
    flat: () => 100,
    ridged: (col) => 300 * Math.abs(((col / 40) % 2) - 1),
    rough: (col, row) => 200 * Math.abs((Math.sin(col * 12.9898 + row * 78.233) * 43_758.5453) % 1),
    void: () => Number.NaN,
  }
  for (const [name, height] of Object.entries(grounds)) {
    const row = await measure(madeGround(height), 500, 500, 14_000, helpers)
    process.stdout.write(`${JSON.stringify({ ground: name, ...row })}\n`)
  }
  process.stdout.write(`${JSON.stringify({ demo: await demoBudget() })}\n`)
}
await main()
