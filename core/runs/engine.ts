import { type ClutterCells, clutterMarks, clutterToNoise, type LandTable } from '../clutter/index.ts'
import { isInputError } from '../errors/index.ts'
import type { Earth } from '../geodesy/index.ts'
import { type SightCells, type SiteCells, sweep } from '../masking/index.ts'
import { type OptionCells, optionFigures } from '../merit/index.ts'
import { polarShape } from '../polar/index.ts'
import { type SettledCandidate, type SettledNeed, type SettledStudy, type StudyDoc, settle } from '../study/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { share, type Work } from '../work/index.ts'
import { keysOf, optionId, optionsOfStudy } from './keys.ts'
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
  study: SettledStudy | null = null
  shown: Shown = { option: null, layer: 'clutter-to-noise' }
  hold = false
  private readonly cache: PolarCache
  private readonly results = new Map<string, OptionResult>()
  private readonly failed = new Set<string>()

  constructor(cacheBytes?: number) {
    this.cache = new PolarCache(cacheBytes)
  }

  setGround(ground: Ground, landTable: LandTable | null): void {
    this.ground = ground
    this.landTable = landTable
    this.cache.clear()
    this.results.clear()
    this.failed.clear()
  }

  /** Takes the whole document; returns what the user should be told. A document that cannot be settled leaves no options. */
  setStudy(doc: StudyDoc, shown: Shown, hold: boolean): Tell[] {
    this.shown = shown
    this.hold = hold
    this.failed.clear()
    try {
      this.study = settle(doc)
    } catch (error) {
      if (!isInputError(error)) throw error
      this.study = null
      this.results.clear()
      return [{ kind: 'warnings', warnings: [error.message] }, this.figures()]
    }
    const wanted = new Set<string>()
    for (const ref of optionsOfStudy(this.study)) {
      const id = optionId(ref)
      const old = this.results.get(id)
      if (old && old.keys.needs === this.keys(ref)?.needs) wanted.add(id)
    }
    for (const id of [...this.results.keys()]) if (!wanted.has(id)) this.results.delete(id)
    return [this.figures()]
  }

  figures(): Tell {
    const results = (this.study ? optionsOfStudy(this.study) : []).flatMap((ref) => {
      const found = this.results.get(optionId(ref))
      return found ? [{ ...found, held: this.cache.has(found.keys.clutter) }] : []
    })
    return { kind: 'figures', results }
  }

  result(ref: OptionRef): OptionResult | null {
    return this.results.get(optionId(ref)) ?? null
  }

  /** Options whose figures are there, and all options. */
  progress(): { done: number; total: number } {
    return { done: this.results.size, total: this.study ? optionsOfStudy(this.study).length : 0 }
  }

  /** The next piece of work that is missing, or null. Ends with what to tell the page. */
  next(): Work<Tell[]> | null {
    if (!this.ground || !this.study || this.hold) return null
    const all = optionsOfStudy(this.study)
    const shown = this.shown.option && all.find((r) => optionId(r) === optionId(this.shown.option as OptionRef))
    const first = shown && (!this.result(shown) || !this.cells(shown)) && !this.failed.has(optionId(shown)) ? shown : null
    const sameCandidate = (r: OptionRef) => (shown && r.candidate === shown.candidate ? 0 : 1)
    const rest = all.filter((r) => !this.result(r) && !this.failed.has(optionId(r))).sort((a, b) => sameCandidate(a) - sameCandidate(b))
    const ref = first ?? rest[0]
    return ref ? this.workOn(ref) : null
  }

  private *workOn(ref: OptionRef): Work<Tell[]> {
    const study = this.study as SettledStudy
    try {
      const cells = yield* this.compute(ref)
      const keys = this.keys(ref)
      if (this.study !== study || !keys) return []
      const figures = optionFigures(cells, study.needs, clutterMarks(cells.ground.codes, study.radar, this.landTable !== null))
      this.results.set(optionId(ref), { ref, keys, figures, held: true })
      const isShown = this.shown.option !== null && optionId(this.shown.option) === optionId(ref)
      return isShown ? [this.figures(), { kind: 'dirty' }] : [this.figures()]
    } catch (error) {
      if (!isInputError(error)) throw error
      this.failed.add(optionId(ref))
      const { code, message, place, remedy } = error
      return [{ kind: 'failure', id: null, error: { code, message, remedy, ...(place === undefined ? {} : { place }) } }]
    }
  }

  /** Polar grids of an option, from the cache or worked out now; masks of all heights of the candidate come from one sampling. */
  *compute(ref: OptionRef): Work<OptionCells> {
    const { ground, study } = this.ready()
    const candidate = candidateOf(study, ref.candidate)
    const keys = keysOf(ground.serial, study, candidate, ref)
    const place = siteOf(candidate)
    const earth = earthOf(study)
    const keep = new Set([keys.site, keys.mask, keys.clutter])
    if (this.shown.option && this.shown.option.candidate === ref.candidate) {
      const k = this.keys(this.shown.option)
      if (k) for (const key of [k.mask, k.clutter]) keep.add(key)
    }
    let site = this.cache.get<SiteCells>(keys.site)
    let mask = this.cache.get<SightCells>(keys.mask)
    if (!site || !mask) {
      const missing = new Set([ref.heightM])
      for (const heightM of candidate.mastHeightsM)
        if (!this.cache.has(keysOf(ground.serial, study, candidate, { ...ref, heightM }).mask)) missing.add(heightM)
      const heights = [...missing].sort((a, b) => a - b)
      const swept = yield* share(sweep(ground, place, heights, polarShape(study.run), earth), 0, 0.6, 1)
      site = swept.site
      this.cache.put(keys.site, site, keep)
      swept.masks.forEach((m) => {
        this.cache.put(keysOf(ground.serial, study, candidate, { ...ref, heightM: m.heightM }).mask, m, keep)
        if (m.heightM === ref.heightM) mask = m
      })
    }
    if (!mask) throw new Error('a sweep left out a height')
    let clutter = this.cache.get<ClutterCells>(keys.clutter)
    if (!clutter) {
      clutter = yield* share(
        clutterToNoise(site, mask, ground.codes, place, ref.heightM, earth, study.radar, ref.tiltDeg, landOption(this.landTable)),
        0.6,
        1,
        1,
      )
      this.cache.put(keys.clutter, clutter, keep)
    }
    return {
      ground,
      place,
      earth,
      radar: study.radar,
      landTable: this.landTable,
      heightM: ref.heightM,
      tiltDeg: ref.tiltDeg,
      site,
      mask,
      clutter,
    }
  }

  /** Cells of an option if all of them are still held. */
  cells(ref: OptionRef): OptionCells | null {
    if (!this.ground || !this.study) return null
    const candidate = this.study.candidates.find((c) => c.id === ref.candidate)
    const keys = this.keys(ref)
    if (!candidate || !keys) return null
    const site = this.cache.get<SiteCells>(keys.site)
    const mask = this.cache.get<SightCells>(keys.mask)
    const clutter = this.cache.get<ClutterCells>(keys.clutter)
    if (!site || !mask || !clutter) return null
    const { heightM, tiltDeg } = ref
    return {
      ground: this.ground,
      place: siteOf(candidate),
      earth: earthOf(this.study),
      radar: this.study.radar,
      landTable: this.landTable,
      heightM,
      tiltDeg,
      site,
      mask,
      clutter,
    }
  }

  /** The need a layer is drawn for: the one named, else the first layer need. */
  needOnShow(id: string | undefined): SettledNeed | null {
    const layers = (this.study?.needs ?? []).filter((n) => n.kind === 'layer')
    return layers.find((n) => n.id === id) ?? layers[0] ?? null
  }

  ready(): { ground: Ground; study: SettledStudy } {
    if (!this.ground || !this.study) throw new Error('no ground or no study yet')
    return { ground: this.ground, study: this.study }
  }

  private keys(ref: OptionRef): OptionResult['keys'] | null {
    const candidate = this.study?.candidates.find((c) => c.id === ref.candidate)
    return this.ground && this.study && candidate ? keysOf(this.ground.serial, this.study, candidate, ref) : null
  }
}

export const siteOf = (c: SettledCandidate): Site => ({
  lon: c.lon,
  lat: c.lat,
  groundHeightM: c.groundHeightM,
  clearingRadiusM: c.clearingRadiusM,
})
export const earthOf = (study: SettledStudy): Earth => ({
  effectiveEarthFactor: study.atmosphere.effectiveEarthFactor,
  earthRadiusM: study.atmosphere.earthRadiusM,
})
export function candidateOf(study: SettledStudy, id: string): SettledCandidate {
  const found = study.candidates.find((c) => c.id === id)
  if (!found) throw new Error(`no candidate ${id}`)
  return found
}

export const landOption = (landTable: LandTable | null): { landTable?: LandTable } => (landTable ? { landTable } : {})
