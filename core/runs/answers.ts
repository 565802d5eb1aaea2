import { clutterToNoise, foldedClutter } from '../clutter/index.ts'
import { sightAlong, sweep } from '../masking/index.ts'
import { isLowK, ladderHeightsM, ladderOf, type OptionCells, type Rung, roadLines, rung, seeRoads, verticalCut } from '../merit/index.ts'
import { polarShape, previewShape } from '../polar/index.ts'
import { buildGround, groundAt } from '../terrain/index.ts'
import { wavelengthM } from '../units/index.ts'
import { share, type Work } from '../work/index.ts'
import { changeOf } from './change.ts'
import { paintOptionsDifference } from './difference.ts'
import type { Engine } from './engine.ts'
import { horizonLines } from './horizonLines.ts'
import { heightToSee } from './layers.ts'
import { cellLedger } from './ledger/cellLedger.ts'
import { candidateOf, clutterOptions, earthOf, lowEarthOf, lowKOf, mayFold, siteOf, suppressionOf } from './optionParts.ts'
import { paintGround, paintOption, paintSheet } from './pictures.ts'
import { differenceOf, type ProbeCache, probeAt } from './probe.ts'
import { profileRay } from './profileRay.ts'
import type { Answer, Ask, Profile, Tell } from './types.ts'

/** What the port turns into an ImageBitmap. */
export interface Painted {
  readonly pixels: Uint32Array
  readonly view: Ask['paint']['view']
}
/** Answers as the engine gives them: pictures are pixels here, bitmaps on the page's side. */
export interface EngineAnswer extends Omit<Answer, 'paint' | 'base'> {
  paint: Painted | null
  base: Painted | null
}
/** Heights of the ladder swept together: a bound on memory, the sampling is shared among them. */
const LADDER_BATCH = 6
let serial = 0

/** Answers one ask of the page. One per engine. */
export class Answers {
  private preview: OptionCells | null = null
  private readonly probe: ProbeCache = { key: '', values: new Float32Array(0), words: null }
  /** The same of a second option beside it, or in a second map. */
  private readonly probeSecond: ProbeCache = { key: '', values: new Float32Array(0), words: null }
  /** What to tell the page besides the reply. */
  readonly tells: Tell[] = []

  constructor(private readonly engine: Engine) {}

  private readonly handlers: { [K in keyof Ask]: (body: Ask[K]) => Work<EngineAnswer[K]> } = {
    ground: (body) => this.takeGround(body),
    study: (body) => this.takeStudy(body),
    preview: (body) => this.previewOf(body),
    paint: (body) => this.paint(body),
    base: (body) => this.base(body),
    map: (body) => this.map(body),
    probe: (body) => this.probeAt(body),
    profile: (body) => this.profile(body),
    vertical: (body) => this.vertical(body),
    horizons: (body) => this.horizons(body),
    ledger: (body) => this.ledger(body),
    roads: (body) => this.roads(body),
    ladder: (body) => this.ladder(body),
    change: (body) => changeOf(this.engine, body),
    groundAt: (body) => this.groundAt(body),
  }

  ask<K extends keyof Ask>(kind: K, body: Ask[K]): Work<EngineAnswer[K]> {
    return this.handlers[kind](body)
  }

  private *takeGround(body: Ask['ground']): Work<EngineAnswer['ground']> {
    const { landTable, needPlaces, ...parts } = body
    const ground = yield* buildGround({ serial: ++serial, ...parts })
    this.engine.setGround(ground, landTable ?? null, needPlaces)
    this.preview = null
    let min = Number.POSITIVE_INFINITY
    let max = Number.NEGATIVE_INFINITY
    let voids = 0
    for (const h of ground.heightM) {
      if (Number.isNaN(h)) voids++
      else {
        if (h < min) min = h
        if (h > max) max = h
      }
    }
    this.tells.push(this.engine.figures(), { kind: 'dirty' })
    return { serial: ground.serial, minM: min, maxM: max, voidPct: (100 * voids) / ground.heightM.length, corners: [] }
  }

  // biome-ignore lint/correctness/useYield: an answer that needs no slices
  private *takeStudy(body: Ask['study']): Work<null> {
    this.tells.push(...this.engine.setStudy(body.doc, body.show, body.hold, body.have), { kind: 'dirty' })
    return null
  }

  private *previewOf(body: Ask['preview']): Work<EngineAnswer['preview']> {
    const { ground, study } = this.engine.ready()
    const candidate = candidateOf(study, body.candidate)
    const place = { ...siteOf(candidate), lon: body.lon, lat: body.lat }
    const moved = body.lon !== candidate.lon || body.lat !== candidate.lat
    const site = moved ? { ...place, groundHeightM: null, survey: undefined } : place
    const earth = earthOf(study)
    const grid = previewShape(polarShape(study.run), body.still)
    const swept = yield* sweep(ground, site, [body.heightM], grid, earth, { heightToSee: false })
    const [mask] = swept.masks
    const tiltDeg = this.engine.shown.option?.tiltDeg ?? candidate.tiltsDeg[0]
    const { landTable } = this.engine
    const clutter = yield* clutterToNoise(
      swept.site,
      mask,
      ground.codes,
      site,
      body.heightM,
      earth,
      study.radar,
      tiltDeg,
      clutterOptions(study, ground, landTable, site, body.heightM),
    )
    this.preview = {
      ground,
      place: site,
      earth,
      radar: study.radar,
      atmosphere: study.atmosphere,
      landTable,
      heightM: body.heightM,
      tiltDeg,
      site: swept.site,
      mask,
      clutter,
      suppression: suppressionOf(study, ground),
      folded: null,
      lowK: null,
      places: this.engine.needPlaces,
    }
    const siteGroundM = swept.site.siteGroundM
    return {
      siteGroundM: Number.isFinite(siteGroundM) ? siteGroundM : null,
      horizon: mask.horizon.map(({ azimuthDeg, elevationDeg }) => ({ azimuthDeg, elevationDeg })),
      groundInSightPct: null,
    }
  }

  private *paint(body: Ask['paint']): Work<EngineAnswer['paint']> {
    const o = body.option === 'preview' ? this.preview : this.engine.cells(body.option)
    if (!o) return null
    const need = this.engine.needOnShow(this.engine.shown.need)
    if (body.difference) {
      const other = yield* this.engine.compute(body.difference)
      if (body.layer === 'height-to-see') for (const each of [o, other]) yield* heightToSee(each)
      const pixels = paintOptionsDifference(o, other, body.layer, need, body.view)
      return pixels && { pixels, view: body.view }
    }
    if (body.layer === 'height-to-see') yield* heightToSee(o)
    return { pixels: paintOption(o, body.layer, need, body.view, body.opacity), view: body.view }
  }

  // biome-ignore lint/correctness/useYield: an answer that needs no slices
  private *base(body: Ask['base']): Work<EngineAnswer['base']> {
    return this.engine.ground ? { pixels: paintGround(this.engine.ground, body.view), view: body.view } : null
  }

  private *map(body: Ask['map']): Work<EngineAnswer['map']> {
    const o = yield* this.engine.compute(body.option)
    if (body.layer === 'height-to-see') yield* heightToSee(o)
    const pixels = paintSheet(o, body.layer, this.engine.needOnShow(this.engine.shown.need), body.view)
    return { rgba: new Uint8ClampedArray(pixels.buffer), view: body.view }
  }

  // biome-ignore lint/correctness/useYield: an answer that needs no slices
  private *probeAt(body: Ask['probe']): Work<EngineAnswer['probe']> {
    const { layer, need } = this.engine.shown
    const option = body.option ?? this.engine.shown.option
    const o = option ? this.engine.cells(option) : null
    const on = this.engine.needOnShow(need)
    if (o) {
      const own = probeAt(o, layer, on, body.at, body.pane ? this.probeSecond : this.probe)
      const other = body.difference ? this.engine.cells(body.difference) : null
      return other ? differenceOf(own, probeAt(other, layer, on, body.at, this.probeSecond)) : own
    }
    if (!this.engine.ground) return null
    const ground = groundAt(this.engine.ground, body.at.lon, body.at.lat)
    const known = Number.isFinite(ground)
    return {
      ...body.at,
      azimuthDeg: null,
      rangeM: null,
      groundM: known ? ground : null,
      layer,
      value: null,
      word: known ? null : 'unknown',
    }
  }

  // biome-ignore lint/correctness/useYield: an answer that needs no slices
  private *profile(body: Ask['profile']): Work<Profile> {
    const { ground, study } = this.engine.ready()
    const site = siteOf(candidateOf(study, body.option.candidate))
    const along = sightAlong(ground, site, body.option.heightM, earthOf(study), body.azimuthDeg, study.run.maxRangeM)
    return { option: body.option, ...along, ray: profileRay(along, wavelengthM(study.radar.frequencyHz), body.target ?? null) }
  }

  private *horizons(body: Ask['horizons']): Work<EngineAnswer['horizons']> {
    const { ground, study } = this.engine.ready()
    const earth = earthOf(study)
    const earths = isLowK(earth.effectiveEarthFactor) ? [earth] : [earth, lowEarthOf(study)]
    const site = siteOf(candidateOf(study, body.option.candidate))
    return yield* horizonLines(ground, site, body.option.heightM, earths, study.run.maxRangeM)
  }

  private *vertical(body: Ask['vertical']): Work<EngineAnswer['vertical']> {
    const { study } = this.engine.ready()
    const need = study.needs.find((n) => n.id === body.need) ?? study.needs[0]
    if (!need) return null
    return yield* verticalCut(yield* this.engine.compute(body.option), need, body.window)
  }

  // biome-ignore lint/correctness/useYield: an answer that needs no slices
  private *ledger(body: Ask['ledger']): Work<EngineAnswer['ledger']> {
    const { ground, study } = this.engine.ready()
    const place = siteOf(candidateOf(study, body.option.candidate))
    const held = this.engine.cells(body.option)
    const sideLobes = held ? { sideLobeCnrDb: held.clutter.sideLobeCnrDb, sideLobeResidueDb: held.clutter.sideLobeResidueDb } : {}
    const folded = held?.folded ? { folded: held.folded } : {}
    const options = { ...clutterOptions(study, ground, this.engine.landTable, place, body.option.heightM), ...sideLobes, ...folded }
    return cellLedger(ground, study, body.option, body.at, options)
  }

  private *roads(body: Ask['roads']): Work<EngineAnswer['roads']> {
    const o = this.engine.cells(body.option)
    if (!o) return null
    yield* seeRoads(o)
    return roadLines(o)
  }

  private *ladder(body: Ask['ladder']): Work<EngineAnswer['ladder']> {
    const { ground, study } = this.engine.ready()
    const candidate = candidateOf(study, body.candidate)
    const place = siteOf(candidate)
    const earth = earthOf(study)
    const tiltDeg = this.engine.shown.option?.tiltDeg ?? candidate.tiltsDeg[0]
    const heights = ladderHeightsM(candidate.mastHeightsM)
    const { landTable, needPlaces: places } = this.engine
    const { radar, atmosphere } = study
    const suppression = suppressionOf(study, ground)
    const grid = polarShape(study.run)
    const lowEarth = isLowK(earth.effectiveEarthFactor) ? null : lowEarthOf(study)
    const folds = mayFold(study, ground, place)
    const rungs: Rung[] = []
    for (let n = 0; n < heights.length; n += LADDER_BATCH) {
      const batch = heights.slice(n, n + LADDER_BATCH)
      const { site, masks } = yield* share(
        sweep(ground, place, batch, grid, earth, { heightToSee: false, helpers: this.engine.helpers }),
        n,
        n + batch.length / 3,
        heights.length,
      )
      const low =
        lowEarth &&
        (yield* share(
          sweep(ground, place, batch, grid, lowEarth, { sightOnly: true, helpers: this.engine.helpers }),
          n + batch.length / 3,
          n + batch.length / 2,
          heights.length,
        ))
      for (const [h, mask] of masks.entries()) {
        const { heightM } = mask
        const options = clutterOptions(study, ground, landTable, place, heightM)
        const clutter = yield* silently(clutterToNoise(site, mask, ground.codes, place, heightM, earth, radar, tiltDeg, options))
        const lowK = low && lowEarth && lowKOf(low.site, low.masks[h], lowEarth, '')
        const folded = folds
          ? yield* silently(foldedClutter(ground, place, heightM, earth, radar, tiltDeg, site, study.foldRangeM, options))
          : null
        const cells = {
          ground,
          place,
          earth,
          radar,
          atmosphere,
          landTable,
          heightM,
          tiltDeg,
          site,
          mask,
          clutter,
          suppression,
          folded,
          lowK,
          places,
        }
        rungs.push(yield* silently(rung(cells, study.needs)))
        yield { done: rungs.length, total: heights.length }
      }
    }
    return ladderOf(rungs)
  }

  private *groundAt(body: Ask['groundAt']): Work<EngineAnswer['groundAt']> {
    const { ground } = this.engine
    return body.at.map((p) => {
      const h = ground ? groundAt(ground, p.lon, p.lat) : Number.NaN
      return Number.isFinite(h) ? h : null
    })
  }
}

/** The slices of a piece of work without its progress. */
function* silently<T>(work: Work<T>): Work<T> {
  for (;;) {
    const step = work.next()
    if (step.done) return step.value
    yield { done: 0, total: 0 }
  }
}
