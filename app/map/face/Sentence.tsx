import { LAYER_IDS, type LayerId, type LayerInfo, layerInfo, NEED_LAYERS } from '../../../core/index.ts'
import { FAMILY_WORDS, formatAngle, formatMast, LAYER_WORDS, MAP_WORDS, textOf } from '../../words/index.ts'
import type { MapCandidate, MapNeed, MapShow, Trial } from '../types.ts'
import { AgainstWords } from './AgainstWords.tsx'
import { Word } from './Word.tsx'

const FAMILIES: readonly LayerInfo['family'][] = ['hidden', 'seen', 'echo', 'lost', 'takes']
const layersOf = (family: LayerInfo['family']): LayerId[] => LAYER_IDS.filter((id) => layerInfo(id).family === family)
/** C/N is what most come for: it stands for its family. */
const firstOf = (family: LayerInfo['family']): LayerId => (family === 'echo' ? 'clutter-to-noise' : layersOf(family)[0]!)

export interface SentenceProps {
  readonly show: MapShow
  readonly candidates: readonly MapCandidate[]
  readonly needs: readonly MapNeed[]
  readonly trial: Trial | null
  readonly onShow: (part: Partial<MapShow>) => void
  readonly onSelect: (candidate: string) => void
}
/** The map answers a sentence: "Show what comes back as C/N for B at 24 m". */
export function Sentence({ show, candidates, needs, trial, onShow, onSelect }: SentenceProps) {
  const { option, layer } = show
  const family = layerInfo(layer).family
  const candidate = candidates.find((c) => c.id === option?.candidate)
  const need = needs.find((n) => n.id === show.need) ?? needs[0]
  const s = MAP_WORDS.sentence
  const choose = MAP_WORDS.choose
  const heights = [...new Set(candidate?.mastHeightsM ?? [])].sort((a, b) => a - b)
  const mast = trial?.moving === 'mast' && trial.candidate === candidate?.id ? trial.heightM : (option?.heightM ?? 0)
  return (
    <p className="map-card sentence">
      {s.show}{' '}
      <Word
        label={choose.family}
        word={FAMILY_WORDS[family]}
        value={family}
        choices={FAMILIES.map((f) => ({
          id: f,
          words: FAMILY_WORDS[f],
          hint: layersOf(f)
            .map((l) => LAYER_WORDS[l].short)
            .join(', '),
        }))}
        onChoose={(f) => f !== family && onShow({ layer: firstOf(f as LayerInfo['family']) })}
      />{' '}
      {s.as}{' '}
      <Word
        label={choose.layer}
        word={LAYER_WORDS[layer].short}
        value={layer}
        choices={layersOf(family).map((l) => ({ id: l, words: LAYER_WORDS[l].short, hint: LAYER_WORDS[l].meaning }))}
        onChoose={(l) => onShow({ layer: l as LayerId })}
      />
      {NEED_LAYERS.includes(layer) && need ? (
        <>
          {' '}
          {s.against}{' '}
          <Word
            label={choose.need}
            word={need.name || need.id}
            value={need.id}
            choices={needs.map((n) => ({ id: n.id, words: n.name || n.id }))}
            onChoose={(id) => onShow({ need: id })}
          />
        </>
      ) : null}{' '}
      {s.for}{' '}
      {candidate && option ? (
        <>
          <Word
            label={choose.candidate}
            word={candidate.id}
            value={candidate.id}
            choices={candidates.map((c) => ({ id: c.id, words: `${c.id} ${c.name}`.trim() }))}
            onChoose={onSelect}
          />{' '}
          {s.at}{' '}
          <Word
            label={choose.height}
            word={textOf(formatMast(mast))}
            value={String(option.heightM)}
            choices={heights.map((h) => ({ id: String(h), words: textOf(formatMast(h)) }))}
            onChoose={(h) => onShow({ option: { ...option, heightM: Number(h) } })}
          />
          {candidate.tiltsDeg.length > 1 ? (
            <>
              {' '}
              {s.tilted}{' '}
              <Word
                label={choose.tilt}
                word={textOf(formatAngle(option.tiltDeg, 0.1))}
                value={String(option.tiltDeg)}
                choices={candidate.tiltsDeg.map((t) => ({ id: String(t), words: textOf(formatAngle(t, 0.1)) }))}
                onChoose={(t) => onShow({ option: { ...option, tiltDeg: Number(t) } })}
              />
            </>
          ) : null}
          <AgainstWords show={show} candidates={candidates} onShow={onShow} />
          {trial && trial.candidate === candidate.id ? <span className="mark"> {s.trial}</span> : null}
        </>
      ) : (
        <span className="ink-3">{MAP_WORDS.noCandidate}</span>
      )}
    </p>
  )
}
