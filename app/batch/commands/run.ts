import { createHash } from 'node:crypto'
import { createReadStream, mkdirSync, writeFileSync } from 'node:fs'
import { join, resolve } from 'node:path'
import {
  Engine,
  fillLayer,
  type GridShape,
  isAreaNeed,
  type LayerId,
  LOSS_CAUSES,
  layerInfo,
  type OptionCells,
  type OptionRef,
  type OptionResult,
  type SettledStudy,
  type StudyDoc,
  settle,
} from '../../../core/index.ts'
import type { MemoMap } from '../../memo/index.ts'
import type { CommandLine } from '../arguments.ts'
import { encodeGeoTiff } from '../geoTiffWriter.ts'
import { SightThread } from '../helpers/sightThread.ts'
import { sweepHelpers } from '../helpers/sweepHelpers.ts'
import { loadGround } from '../loadGround.ts'
import { loadStudy, sayWarnings } from '../loadStudy.ts'
import { openOutFolder, SUMMARY_FORMAT } from '../outFolder.ts'
import { drive, type Progress } from '../progress.ts'
import { mapLattice } from '../rasters/mapLattice.ts'
import { polarCells, polarRaster } from '../rasters/polarRaster.ts'
import { NO_PERCENT } from '../rasters/sightRaster.ts'
import { chooseLayers, chooseOptions, EXTRA_LAYERS, narrowed, ofNeed } from './chooseOptions.ts'
import { horizonCsv } from './horizon.ts'
import { roadsSummary, writeHeightFiles, writeOptionFiles } from './optionFiles.ts'
import { optionsTogether } from './rankingSummary.ts'

/** `run`: every option picked, one after the other, into a folder that appears whole at the end. */
export async function run(line: CommandLine, progress: Progress): Promise<void> {
  const { options } = line
  const loaded = await loadStudy(line.study)
  const chosen = chooseOptions(loaded, options)
  const layers = chooseLayers(options.layers)
  const out = openOutFolder(options.out as string)
  const doc = narrowed(loaded.doc, chosen)
  const study = settle(doc, loaded.name)
  const { ground, read, warnings } = await loadGround(
    loaded,
    loaded.study.candidates.filter((c) => study.candidates.some((s) => s.id === c.id)),
    progress,
    true,
  )
  const files = await filesOf(loaded.dir, study, read.files)
  progress.inputIsGood()

  const helpers = sweepHelpers()
  const sight = new SightThread(ground, progress)
  const engine = new Engine(undefined, helpers.crew)
  engine.setGround(ground, read.landTable, read.needPlaces)
  const lattice = mapLattice(ground.shape, study.run.rangeStepM)
  const results: OptionResult[] = []
  const maps: MemoMap[] = []
  const wantsMemo = options['no-memo'] === undefined
  const writer = new RunWriter(out.workDir, study, lattice, layers, sight)
  for (const ref of chosen) {
    const name = `${ref.candidate} at ${ref.heightM} m (${results.length + 1} of ${chosen.length})`
    const { cells, result } = await workOut(engine, doc, ref, progress, name)
    results.push(result)
    await writer.write(cells, result, name)
    if (wantsMemo) maps.push(await (await import('./memo.ts')).memoMap(cells, result, study))
  }
  await writer.finish()
  await Promise.all([helpers.close(), sight.close()])
  const remarks = [...loaded.warnings, ...warnings]
  writeFileSync(join(out.workDir, 'summary.json'), summary(study, results, files))
  if (wantsMemo) {
    progress.say('Memo', 0, 0)
    const { memoPdf } = await import('./memo.ts')
    writeFileSync(join(out.workDir, 'memo.pdf'), await memoPdf({ study, doc, results, files, maps, warnings: remarks }))
  }
  out.finish()
  sayWarnings(remarks)
}

/** Figures and cells of one option. @throws InputError of the kernels, with its own place */
async function workOut(
  engine: Engine,
  doc: StudyDoc,
  ref: OptionRef,
  progress: Progress,
  name: string,
): Promise<{ cells: OptionCells; result: OptionResult }> {
  engine.setStudy(doc, { option: ref, layer: 'clutter-to-noise' }, false)
  const cells = await drive(engine.compute(ref), progress, name)
  while (!engine.result(ref)) {
    const work = engine.next()
    if (!work) throw new Error(`no figures for ${name}`)
    await drive(work, progress, name)
  }
  const result = await drive(engine.addHighK(ref), progress, `${name}, k = 2.75`)
  return { cells, result: result as OptionResult }
}

/** Writes the folders of candidates, heights and tilts as options come. */
class RunWriter {
  /** Polar cell under each raster cell, of the candidate written last. */
  #under: { candidate: string; cells: Int32Array } | null = null
  readonly #heightsDone = new Set<string>()
  #sightUnderWay: (() => Promise<void>) | null = null
  constructor(
    private readonly dir: string,
    private readonly study: SettledStudy,
    private readonly lattice: GridShape,
    private readonly layers: readonly LayerId[],
    private readonly sight: SightThread,
  ) {}

  async write(cells: OptionCells, { ref, figures }: OptionResult, name: string): Promise<void> {
    const heightDir = join(this.dir, ref.candidate, `${ref.heightM}m`)
    const tiltDir = join(heightDir, `${ref.tiltDeg}deg`)
    mkdirSync(tiltDir, { recursive: true })
    if (!this.#heightsDone.has(heightDir)) {
      this.#heightsDone.add(heightDir)
      await this.finish()
      await this.#writeHeight(heightDir, cells, ref, name)
      writeHeightFiles(heightDir, figures)
    }
    await this.#raster(tiltDir, ref, 'clutter-to-noise', 'dB', this.#onLattice(cells, ref, cells.clutter.cnrDb))
    writeOptionFiles(tiltDir, cells, figures)
    for (const id of this.layers) if (EXTRA_LAYERS[id] === 'tilt') await this.#layer(tiltDir, ref, cells, id)
  }

  async #writeHeight(dir: string, cells: OptionCells, ref: OptionRef, name: string): Promise<void> {
    writeFileSync(join(dir, 'horizon.csv'), horizonCsv(cells.mask.horizon))
    const { maxRangeM } = this.study.run
    const { place: site, earth } = cells
    const raster = this.sight.start({ site, heightM: ref.heightM, earth, maxRangeM, lattice: this.lattice }, `${name}, sight`)
    this.#sightUnderWay = async () => {
      const { inSightPct, floorM } = await raster()
      await this.#raster(dir, ref, 'in-sight', '%', inSightPct)
      await this.#raster(dir, ref, 'coverage-floor', 'm', floorM)
    }
    for (const id of this.layers) if (EXTRA_LAYERS[id] === 'height') await this.#layer(dir, ref, cells, id)
  }

  /** Waits for the sight rasters that are made beside the options, and writes them. */
  async finish(): Promise<void> {
    const underWay = this.#sightUnderWay
    this.#sightUnderWay = null
    await underWay?.()
  }

  /** A layer on request; one that asks for a need is written for each need of a layer or polygon. */
  async #layer(dir: string, ref: OptionRef, cells: OptionCells, id: LayerId): Promise<void> {
    const values = new Float32Array(cells.site.groundM.length)
    const { unit } = layerInfo(id)
    if (!ofNeed(id)) {
      fillLayer(id, cells, null, values)
      return this.#raster(dir, ref, id, unit, this.#onLattice(cells, ref, values))
    }
    for (const need of this.study.needs.filter(isAreaNeed)) {
      fillLayer(id, cells, need, values)
      await this.#raster(dir, ref, `${id}-${need.id}`, unit, this.#onLattice(cells, ref, values))
    }
  }

  #onLattice(cells: OptionCells, ref: OptionRef, values: Float32Array): Float32Array {
    if (this.#under?.candidate !== ref.candidate)
      this.#under = { candidate: ref.candidate, cells: polarCells(this.lattice, cells.place, cells.site.grid) }
    return polarRaster(this.#under.cells, values)
  }

  async #raster(dir: string, ref: OptionRef, name: string, unit: string, samples: Float32Array | Uint8Array): Promise<void> {
    const metadata = {
      STUDY: this.study.name,
      OPTION: `candidate ${ref.candidate}, mast ${ref.heightM} m, tilt ${ref.tiltDeg} deg`,
      ...(unit === 'm' ? { VERTICAL_DATUM: name === 'height-to-see' ? 'ground at the mast' : 'mean sea level' } : {}),
      ...(name.startsWith('cause-of-loss') ? { CLASSES: LOSS_CAUSES.map((cause, i) => `${i + 1} ${cause}`).join(', ') } : {}),
      ...(name.startsWith('usable') ? { CLASSES: '1 in sight, 2 detectable, 3 usable' } : {}),
      CAUTION: 'Prediction from a raster and models, to be confirmed by survey and trial. Not for navigation or operational use.',
    }
    const nodata = samples instanceof Uint8Array ? NO_PERCENT : Number.NaN
    const bytes = await encodeGeoTiff({ shape: this.lattice, samples, nodata, description: name, unit, metadata })
    writeFileSync(join(dir, `${name}.tif`), bytes)
  }
}

/** Names, digests and descriptions of the files that were read. */
async function filesOf(dir: string, study: SettledStudy, read: readonly { name: string; describe: string }[]) {
  const needs = study.needs.filter((n) => n.kind !== 'layer').map((n) => n.file)
  const named = [
    ...study.terrain.map((t) => t.file),
    study.landCover?.file,
    study.obstacles,
    study.roads,
    study.lowAngleLandTable,
    ...needs,
    ...study.candidates.map((c) => c.measuredHorizon?.file),
  ]
    .filter((n) => typeof n === 'string')
    .map((name, i) => ({ name, describe: read[i]?.describe ?? '' }))
  return Promise.all(
    named
      .filter(({ name }, i) => named.findIndex((n) => n.name === name) === i)
      .map(async ({ name, describe }) => {
        const hash = createHash('sha256')
        for await (const chunk of createReadStream(resolve(dir, name))) hash.update(chunk as Buffer)
        return { name, sha256: hash.digest('hex'), describe }
      }),
  )
}

/** summary.json; `key` is a digest of everything that went into an option. */
function summary(study: SettledStudy, results: readonly OptionResult[], files: readonly { name: string; sha256: string }[]): string {
  const inputs = files.map((f) => f.sha256).join()
  const options = results.map(({ ref, keys, figures }) => ({
    ...ref,
    key: createHash('sha256').update(`${inputs}|${keys.needs}`).digest('hex').slice(0, 32),
    figures: figures.flat,
    ...(figures.roads ? { roads: roadsSummary(figures.roads) } : {}),
  }))
  const whole = { format: SUMMARY_FORMAT, version: 1, study: study.name, files, options, ...optionsTogether(study, results) }
  return `${JSON.stringify(whole, null, 2)}\n`
}
