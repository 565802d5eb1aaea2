import { LAYER_IDS, type LayerId, NEED_LAYERS, type OptionRef, optionsOfStudy, type StudyDoc } from '../../../core/index.ts'
import { numberOption, usageError } from '../arguments.ts'
import { candidateNamed, type LoadedStudy } from '../loadStudy.ts'

/** Rasters that every run writes, by file name without ending. */
const STANDARD = ['in-sight', 'coverage-floor', 'clutter-to-noise'] as const
/** Rasters written on request; they hang on the mast height only, or on the tilt as well. */
export const EXTRA_LAYERS: Readonly<Partial<Record<LayerId, 'height' | 'tilt'>>> = {
  'height-to-see': 'height',
  depression: 'height',
  'clutter-strength': 'height',
  'suppression-needed': 'tilt',
  usable: 'tilt',
  'probability-of-detection': 'tilt',
  'signal-margin': 'tilt',
  'cause-of-loss': 'tilt',
}
/** Written for every need of a layer or polygon. */
export const ofNeed = (id: LayerId): boolean => (NEED_LAYERS as readonly LayerId[]).includes(id)

interface Picks {
  readonly candidate?: string
  readonly height?: string
  readonly tilt?: string
}

/** Options of the study that the command line picks, in the study's order. @throws InputError where none is left */
export function chooseOptions(loaded: LoadedStudy, picks: Picks): OptionRef[] {
  const all = optionsOfStudy(loaded.study)
  const candidate = picks.candidate === undefined ? null : candidateNamed(loaded, picks.candidate).id
  const height = picks.height === undefined ? null : numberOption('height', picks.height, 0, 1000, 'mast height', true)
  const tilt = picks.tilt === undefined ? null : numberOption('tilt', picks.tilt, -90, 90, 'tilt')
  const ofCandidate = all.filter((o) => candidate === null || o.candidate === candidate)
  const ofHeight = ofCandidate.filter((o) => height === null || o.heightM === height)
  if (ofHeight.length === 0)
    throw pickError(
      'height',
      `${height} m`,
      ofCandidate.map((o) => o.heightM),
    )
  const chosen = ofHeight.filter((o) => tilt === null || o.tiltDeg === tilt)
  if (chosen.length === 0)
    throw pickError(
      'tilt',
      `${tilt} deg`,
      ofHeight.map((o) => o.tiltDeg),
    )
  return chosen
}
const pickError = (name: string, asked: string, there: readonly number[]) =>
  usageError(
    `--${name}`,
    `the study has no ${name} ${asked} here`,
    `use one of ${[...new Set(there)].slice(0, 12).join(', ')}, or leave it out`,
  )

/** The document with the options that were picked and no others; rejected candidates stay in it, they are listed only. */
export function narrowed(doc: StudyDoc, chosen: readonly OptionRef[]): StudyDoc {
  const candidates = doc.candidates.flatMap((c) => {
    if (c.rejected !== undefined) return [c]
    const own = chosen.filter((o) => o.candidate === c.id)
    const tiltsDeg = [...new Set(own.map((o) => o.tiltDeg))]
    return own.length === 0 ? [] : [{ ...c, mastHeightsM: [...new Set(own.map((o) => o.heightM))], tiltsDeg }]
  })
  return { ...doc, candidates }
}

/** `--layers`. @throws InputError for a name that is none */
export function chooseLayers(text: string | undefined): LayerId[] {
  const extra = LAYER_IDS.filter((id) => EXTRA_LAYERS[id] !== undefined)
  if (text === undefined) return []
  if (text === 'all') return extra
  const asked = text.split(',').map((name) => name.trim())
  for (const name of asked)
    if (!(extra as string[]).includes(name) && !(STANDARD as readonly string[]).includes(name))
      throw usageError('--layers', `there is no layer "${name.slice(0, 40)}"`, `use all, or names from ${extra.join(', ')}`)
  return extra.filter((id) => asked.includes(id))
}
