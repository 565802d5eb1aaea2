import { type ClutterCells, clutterMarks, clutterToNoise, type FoldedCells, foldedClutter, type LandTable } from '../clutter/index.ts'
import type { SuppressionBy } from '../doppler/index.ts'
import { isInputError } from '../errors/index.ts'
import { type SightCells, type SiteCells, type SweepHelpers, sweep } from '../masking/index.ts'
import {
  hasHighK,
  isAreaNeed,
  isLowK,
  type LowKCells,
  type NeedPlaces,
  type OptionCells,
  optionFigures,
  seeRoads,
  withHighK,
} from '../merit/index.ts'
import { polarShape } from '../polar/index.ts'
import { type SettledNeed, type SettledStudy, type StudyDoc, settle } from '../study/index.ts'
import type { Ground } from '../terrain/index.ts'
import { share, type Work } from '../work/index.ts'
import { HighK } from './highK.ts'
import { keysOf, optionId, optionsOfStudy } from './keys.ts'
import { candidateOf, clutterOptions, earthOf, lowEarthOf, lowKOf, mayFold, siteOf, suppressionOf, surveyPart } from './optionParts.ts'
import { PolarCache } from './polarCache.ts'
import type { LayerId, OptionRef, OptionResult, Tell } from './types.ts'

export interface Shown {
  readonly option: OptionRef | null
  readonly layer: LayerId
  readonly need?: string
}

/**
 * Holds one ground and one study and works out what is missing, the option on show first. No threads, no clock: the driver runs the
 * pieces `next` hands out and may stop between slices. A new study replaces the old one; results whose keys still hold are kept.
 */
export class Engine {
  ground: Ground | null = null
  /** The study's own land table; null for the built-in one. */
  landTable: LandTable | null = null
  /** What the files of needs hold. */
  needPlaces: readonly NeedPlaces[] = []
  study: SettledStudy | null = null
  shown: Shown = { option: null, layer: 'clutter-to-noise' }
  hold = false
  private readonly cache: PolarCache
  private readonly highK = new HighK()
  private filesSerial = 0
  private suppression: { readonly study: SettledStudy; readonly by: SuppressionBy } | null = null
  private readonly found = new Map<string, OptionResult>()
  private made = 0
  /** Serials of the results the page has. */
  private told = new Set<number>()
  private readonly failed = new Set<string>()

  /** `helpers`: threads that take a share of sweeps. */
  constructor(
    cacheBytes?: number,
    readonly helpers: SweepHelpers | null = null,
  ) {
    this.cache = new PolarCache(cacheBytes)
  }

  setGround(ground: Ground, landTable: LandTable | null, needPlaces: readonly NeedPlaces[] = []): void {
    this.ground = ground
    this.landTable = landTable
    this.needPlaces = needPlaces
    this.filesSerial++
    this.suppression = null
    this.cache.clear()
    this.highK.drop()
    this.found.clear()
    this.failed.clear()
  }

  /**
   * Takes the whole document; returns what the user should be told. A document that cannot be settled leaves no options. `have`: serials of the
   * results the page has.
   */
  setStudy(doc: StudyDoc, shown: Shown, hold: boolean, have: readonly number[] = []): Tell[] {
    this.told = new Set(have)
    this.shown = shown
    this.hold = hold
    this.failed.clear()
    try {
      this.study = settle(doc)
    } catch (error) {
      if (!isInputError(error)) throw error
      this.study = null
      this.found.clear()
      return [{ kind: 'warnings', warnings: [error.message] }, this.figures()]
    }
    const wanted = new Set<string>()
    for (const ref of optionsOfStudy(this.study)) {
      const id = optionId(ref)
      const old = this.found.get(id)
      if (old && old.keys.needs === this.keys(ref)?.needs) wanted.add(id)
    }
    for (const id of [...this.found.keys()]) if (!wanted.has(id)) this.found.delete(id)
    return [this.figures()]
  }

  /** Results that hold, in the study's order. */
  results(): OptionResult[] {
    return (this.study ? optionsOfStudy(this.study) : []).flatMap((ref) => this.result(ref) ?? [])
  }

  figures(): Tell {
    const all = this.results()
    const results = all.filter((r) => !this.told.has(r.serial))
    for (const { serial } of results) this.told.add(serial)
    return { kind: 'figures', results, holds: all.map((r) => r.serial) }
  }

  result(ref: OptionRef): OptionResult | null {
    return this.found.get(optionId(ref)) ?? null
  }

  /** Options whose figures are there, and all options. */
  progress(): { done: number; total: number } {
    return { done: this.found.size, total: this.study ? optionsOfStudy(this.study).length : 0 }
  }

  /** The next piece of work that is missing, or null. Ends with what to tell the page. */
  next(): Work<Tell[]> | null {
    if (!this.ground || !this.study || this.hold) return null
    const all = optionsOfStudy(this.study)
    const shown = this.shown.option && all.find((r) => optionId(r) === optionId(this.shown.option as OptionRef))
    if (shown && !this.failed.has(optionId(shown))) {
      // the picture first: figures take another sweep at the smaller k
      if (!this.cells(shown)) return this.guarded(shown, this.makeCells(shown))
      if (!this.result(shown)) return this.guarded(shown, this.makeFigures(shown))
    }
    const sameCandidate = (r: OptionRef) => (shown && r.candidate === shown.candidate ? 0 : 1)
    const rest = all.filter((r) => !this.result(r) && !this.failed.has(optionId(r))).sort((a, b) => sameCandidate(a) - sameCandidate(b))
    if (rest[0]) return this.guarded(rest[0], this.makeFigures(rest[0]))
    const late = all.filter((r) => this.lacksHighK(r)).sort((a, b) => sameCandidate(a) - sameCandidate(b))
    if (late[0]) return this.guarded(late[0], this.makeHighK(late[0]))
    this.highK.drop()
    return null
  }

  /** Bad input of one option is told and leaves the others alone. */
  private *guarded(ref: OptionRef, work: Work<Tell[]>): Work<Tell[]> {
    try {
      return yield* work
    } catch (error) {
      if (!isInputError(error)) throw error
      this.failed.add(optionId(ref))
      const { code, message, place, remedy } = error
      return [{ kind: 'failure', id: null, error: { code, message, remedy, ...(place === undefined ? {} : { place }) } }]
    }
  }

  private *makeCells(ref: OptionRef): Work<Tell[]> {
    yield* this.compute(ref)
    return [{ kind: 'dirty' }]
  }

  private *makeFigures(ref: OptionRef): Work<Tell[]> {
    const study = this.study as SettledStudy
    const cells = yield* share(this.compute(ref), 0, 0.4, 1)
    const lowK = yield* share(this.computeLowK(ref), 0.4, 0.5, 1)
    const folded = yield* share(this.computeFolded(ref, cells), 0.5, 0.6, 1)
    yield* share(seeRoads(cells), 0.6, 0.7, 1)
    const keys = this.keys(ref)
    if (this.study !== study || !keys) return []
    const marks = clutterMarks(cells.ground.codes, study.radar, this.landTable !== null, study.atmosphere)
    const figures = yield* share(optionFigures({ ...cells, lowK, folded }, study.needs, marks), 0.7, 1, 1)
    if (this.study !== study) return []
    this.found.set(optionId(ref), { ref, keys, figures, serial: ++this.made })
    const isShown = this.shown.option !== null && optionId(this.shown.option) === optionId(ref)
    return isShown ? [this.figures(), { kind: 'dirty' }] : [this.figures()]
  }

  private lacksHighK(ref: OptionRef): boolean {
    const found = this.result(ref)
    return found !== null && found.figures.atHighK === null && !this.failed.has(optionId(ref)) && hasHighK(earthOf(this.ready().study))
  }

  private *makeHighK(ref: OptionRef): Work<Tell[]> {
    yield* this.addHighK(ref)
    return [this.figures()]
  }

  /** Result of an option with its clutter at k = 2.75 beside it; as it is where that is not worked out. */
  *addHighK(ref: OptionRef): Work<OptionResult | null> {
    if (!this.lacksHighK(ref)) return this.result(ref)
    const { study } = this.ready()
    const cells = yield* share(this.compute(ref), 0, 0.1, 1)
    const figure = yield* share(this.highK.figure(study, ref, cells), 0.1, 1, 1)
    const found = this.result(ref)
    if (!found || this.study !== study) return found
    const result = { ...found, figures: withHighK(found.figures, figure), serial: ++this.made }
    this.found.set(optionId(ref), result)
    return result
  }

  /** Polar grids of an option, from the cache or worked out now; masks of all heights of the candidate come from one sampling. */
  *compute(ref: OptionRef): Work<OptionCells> {
    const { ground, study } = this.ready()
    const candidate = candidateOf(study, ref.candidate)
    const keysAt = (heightM: number) => keysOf(ground.serial, this.filesSerial, study, candidate, { ...ref, heightM })
    const keys = keysAt(ref.heightM)
    const place = siteOf(candidate)
    const earth = earthOf(study)
    const keep = this.keepWhile(ref)
    let site = this.cache.get<SiteCells>(keys.site)
    let mask = this.cache.get<SightCells>(keys.mask)
    if (!site || !mask) {
      const heights = this.missingHeights(candidate.mastHeightsM, ref.heightM, (h) => keysAt(h).mask)
      const swept = yield* share(
        sweep(ground, place, heights, polarShape(study.run), earth, { heightToSee: false, helpers: this.helpers }),
        0,
        0.6,
        1,
      )
      site = swept.site
      this.cache.put(keys.site, site, keep)
      for (const m of swept.masks) {
        this.cache.put(keysAt(m.heightM).mask, m, keep)
        if (m.heightM === ref.heightM) mask = m
      }
    }
    if (!mask) throw new Error('a sweep left out a height')
    let clutter = this.cache.get<ClutterCells>(keys.clutter)
    if (!clutter) {
      const options = clutterOptions(study, ground, this.landTable, place, ref.heightM)
      const work = clutterToNoise(site, mask, ground.codes, place, ref.heightM, earth, study.radar, ref.tiltDeg, options)
      clutter = yield* share(work, 0.6, 1, 1)
      this.cache.put(keys.clutter, clutter, keep)
    }
    return this.option(ref, site, mask, clutter)
  }

  /** Cover of an option at the smaller k; null where the study's own k is no larger than that. */
  private *computeLowK(ref: OptionRef): Work<LowKCells | null> {
    const { ground, study } = this.ready()
    if (isLowK(study.atmosphere.effectiveEarthFactor)) return null
    const candidate = candidateOf(study, ref.candidate)
    const keyAt = (heightM: number) => keysOf(ground.serial, this.filesSerial, study, candidate, { ...ref, heightM }).lowK
    let cover = this.cache.get<LowKCells>(keyAt(ref.heightM))
    if (cover) return cover
    const keep = this.keepWhile(ref)
    const heights = this.missingHeights(candidate.mastHeightsM, ref.heightM, keyAt)
    const earth = lowEarthOf(study)
    const { site, masks } = yield* sweep(ground, siteOf(candidate), heights, polarShape(study.run), earth, {
      sightOnly: true,
      helpers: this.helpers,
    })
    for (const m of masks) {
      const own = lowKOf(site, m, earth, keyAt(m.heightM))
      this.cache.put(own.key, own, keep)
      if (m.heightM === ref.heightM) cover = own
      yield { done: 1, total: 1 }
    }
    if (!cover) throw new Error('a sweep left out a height')
    return cover
  }

  /** Clutter from beyond the unambiguous range of an option; null where no ground lies there. */
  private *computeFolded(ref: OptionRef, o: OptionCells): Work<FoldedCells | null> {
    const { ground, study } = this.ready()
    const keys = this.keys(ref)
    if (!keys || !mayFold(study, ground, o.place)) return null
    const held = this.cache.get<FoldedCells>(keys.folded)
    if (held) return held
    const options = { ...clutterOptions(study, ground, this.landTable, o.place, ref.heightM), key: keys.folded }
    const folded = yield* foldedClutter(ground, o.place, ref.heightM, o.earth, o.radar, ref.tiltDeg, o.site, study.foldRangeM, options)
    this.cache.put(keys.folded, folded, this.keepWhile(ref))
    return folded
  }

  /** Cells of an option if all of them are still held; cover at the smaller k and folded clutter only if they are there. */
  cells(ref: OptionRef): OptionCells | null {
    const keys = this.keys(ref)
    if (!keys) return null
    const site = this.cache.get<SiteCells>(keys.site)
    const mask = this.cache.get<SightCells>(keys.mask)
    const clutter = this.cache.get<ClutterCells>(keys.clutter)
    return site && mask && clutter ? this.option(ref, site, mask, clutter) : null
  }

  private option(ref: OptionRef, site: SiteCells, mask: SightCells, clutter: ClutterCells): OptionCells {
    const { ground, study } = this.ready()
    const keys = this.keys(ref)
    if (this.suppression?.study !== study) this.suppression = { study, by: suppressionOf(study, ground) }
    return {
      ground,
      place: siteOf(candidateOf(study, ref.candidate)),
      earth: earthOf(study),
      radar: study.radar,
      atmosphere: study.atmosphere,
      landTable: this.landTable,
      heightM: ref.heightM,
      tiltDeg: ref.tiltDeg,
      site,
      mask,
      clutter,
      suppression: this.suppression.by,
      folded: (keys && this.cache.get<FoldedCells>(keys.folded)) ?? null,
      lowK: (keys && this.cache.get<LowKCells>(keys.lowK)) ?? null,
      places: this.needPlaces,
      vehicleRcsM2: study.vehicleRcsM2,
      ...surveyPart(candidateOf(study, ref.candidate)),
    }
  }

  /** Heights of a candidate that are not in the cache, with the one asked for, rising. */
  private missingHeights(heightsM: readonly number[], heightM: number, keyAt: (heightM: number) => string): number[] {
    return [...new Set([heightM, ...heightsM.filter((h) => !this.cache.has(keyAt(h)))])].sort((a, b) => a - b)
  }

  /** Grids that must stay while an option is worked out: its own and those of the option on show of the same candidate. */
  private keepWhile(ref: OptionRef): ReadonlySet<string> {
    const shown = this.shown.option?.candidate === ref.candidate ? this.shown.option : null
    return new Set(
      [ref, ...(shown ? [shown] : [])].flatMap((r) => {
        const k = this.keys(r)
        return k ? [k.site, k.mask, k.lowK, k.clutter, k.folded] : []
      }),
    )
  }

  /** The need a layer is drawn for: the one named, else the first layer need. */
  needOnShow(id: string | undefined): SettledNeed | null {
    const layers = (this.study?.needs ?? []).filter(isAreaNeed)
    return layers.find((n) => n.id === id) ?? layers[0] ?? null
  }

  ready(): { ground: Ground; study: SettledStudy } {
    if (!this.ground || !this.study) throw new Error('no ground or no study yet')
    return { ground: this.ground, study: this.study }
  }

  private keys(ref: OptionRef): OptionResult['keys'] | null {
    const candidate = this.study?.candidates.find((c) => c.id === ref.candidate)
    return this.ground && this.study && candidate ? keysOf(this.ground.serial, this.filesSerial, this.study, candidate, ref) : null
  }
}
