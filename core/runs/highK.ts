import { clutterToNoise, foldedClutter } from '../clutter/index.ts'
import { type SightCells, type SiteCells, sweep } from '../masking/index.ts'
import { HIGH_K, type HighKFigure, highKFigure, type OptionCells } from '../merit/index.ts'
import { polarShape } from '../polar/index.ts'
import { canonicalJson, type SettledStudy } from '../study/index.ts'
import { share, type Work } from '../work/index.ts'
import { candidateOf, clutterOptions, earthOf, mayFold } from './optionParts.ts'
import type { OptionRef } from './types.ts'

/**
 * Clutter at k = 2.75, option by option. One sampling serves all mast heights of a candidate and is held until another one is asked for or `drop` is
 * called; nothing of it goes into the cache, where it would push out what the map shows.
 */
export class HighK {
  private swept: { readonly key: string; readonly site: SiteCells; readonly masks: readonly SightCells[] } | null = null

  drop(): void {
    this.swept = null
  }

  /** Figures of one option, whose cells at the study's own k are `o`. */
  *figure(study: SettledStudy, ref: OptionRef, o: OptionCells): Work<HighKFigure> {
    const { ground, place, landTable, radar } = o
    const earth = { ...earthOf(study), effectiveEarthFactor: HIGH_K }
    const grid = polarShape(study.run)
    const { mastHeightsM } = candidateOf(study, ref.candidate)
    const key = canonicalJson([ground.serial, place, mastHeightsM, earth, study.run])
    if (this.swept?.key !== key) {
      this.swept = null
      const { site, masks } = yield* share(sweep(ground, place, mastHeightsM, grid, earth, { heightToSee: false }), 0, 0.6, 1)
      this.swept = { key, site, masks }
    }
    const { site, masks } = this.swept
    const mask = masks.find((m) => m.heightM === ref.heightM)
    if (!mask) throw new Error('a sweep left out a height')
    const options = clutterOptions(study, ground, landTable, place, ref.heightM)
    const work = clutterToNoise(site, mask, ground.codes, place, ref.heightM, earth, radar, ref.tiltDeg, options)
    const clutter = yield* share(work, 0.6, 0.8, 1)
    const folded = mayFold(study, ground, place)
      ? yield* share(foldedClutter(ground, place, ref.heightM, earth, radar, ref.tiltDeg, site, study.foldRangeM, options), 0.8, 1, 1)
      : null
    return yield* highKFigure({ ...o, earth, site, mask, clutter, folded, lowK: null }, study.needs)
  }
}
