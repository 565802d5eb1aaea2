import { memo, useCallback, useState } from 'react'
import { Button as AriaButton } from 'react-aria-components'
import { type CandidateDoc, limitOf, offTerrain } from '../../../core/index.ts'
import {
  addCandidate,
  moveCandidate,
  rejectCandidate,
  removeCandidate,
  renameCandidate,
  sameOption,
  setCandidateField,
  setMastHeights,
  takeBackCandidate,
} from '../../document/index.ts'
import { Button, Caution, CommitField, Notice, NumberField, PositionField, readNumbers } from '../../ui/index.ts'
import { CAUTIONS, DEG, EMPTY_WORDS, formatHeight, formatPosition, METRES, textOf } from '../../words/index.ts'
import { useDoc, useGround, useSession, useView } from '../session/index.ts'
import { settledOf } from '../settled.ts'
import { Problems } from './Problems.tsx'
import { SurveyField } from './SurveyField.tsx'
import { useFilePicker } from './useFilePicker.tsx'

/** Places where the radar could stand, with their mast heights. */
export function CandidatesStep() {
  const { study, view } = useSession()
  const candidates = useDoc((d) => d.candidates)
  const placing = useView((v) => v.placing)
  const hasGround = useGround((g) => g.state === 'ready')
  const [typing, setTyping] = useState(false)
  const picker = useFilePicker('candidates', '.csv,.geojson,.json')
  const select = useCallback(
    (id: string) => {
      const { doc } = study.getState()
      const c = doc.candidates.find((x) => x.id === id)
      if (c) view.getState().set({ option: { candidate: id, heightM: c.mastHeightsM[0], tiltDeg: doc.radar.antenna.tiltDeg ?? 0 } })
    },
    [study, view],
  )
  return (
    <>
      {candidates.length === 0 ? (
        <div className="empty">
          <h3>{EMPTY_WORDS.candidates.title}</h3>
          <p className="ink-2">
            {hasGround ? 'Place one on the map or enter its position' : 'Terrain comes first: the Ground step takes it'}.{' '}
            {EMPTY_WORDS.candidates.reason}.
          </p>
        </div>
      ) : null}
      {candidates.length > 0 ? (
        <div className={candidates.length > MANY ? 'stack many' : 'stack'}>
          {candidates.map((c) =>
            c.rejected === undefined ? <Card key={c.id} candidate={c} onSelect={select} /> : <RejectedCard key={c.id} candidate={c} />,
          )}
        </div>
      ) : null}
      {placing ? <Notice>Click the map where the candidate stands; Escape ends it</Notice> : null}
      <div className="row">
        <Button active={placing} disabled={!hasGround} onPress={() => view.getState().set({ placing: !placing })}>
          Place on map
        </Button>
        <Button active={typing} onPress={() => setTyping(!typing)}>
          Enter position
        </Button>
        <Button onPress={picker.open}>From a file</Button>
        {candidates.length > 0 ? <Button onPress={() => view.getState().set({ dialog: 'candidates' })}>Edit as a table</Button> : null}
        {picker.input}
      </div>
      {typing ? (
        <PositionField
          label="Position"
          value={null}
          help="Decimal degrees, degrees minutes seconds, DDMMSS, UTM such as 33N 500000 5400000, or MGRS such as 33UXP 01234 56789"
          onCommit={(at) => {
            const id = addCandidate(study, at)
            select(id)
            setTyping(false)
          }}
        />
      ) : null}
      {candidates.length > 0 ? <Caution>{CAUTIONS.nearMast}</Caution> : null}
    </>
  )
}

/** More cards than this are drawn only where they are seen. */
const MANY = 12
/** A ground of this size may be a window of its file, read around the candidates there were. */
const WINDOWED_POSTS = 30e6

/** Letter ring as the map draws it. */
export const Ring = ({ crossed }: { crossed?: boolean }) => (
  <svg className="ring" width="18" height="18" viewBox="0 0 18 18" aria-hidden>
    <circle cx="9" cy="9" r="7" />
    {crossed ? <path d="M4 14L14 4" /> : <circle cx="9" cy="9" r="2" />}
  </svg>
)

const Card = memo(function Card({ candidate: c, onSelect }: { candidate: CandidateDoc; onSelect: (id: string) => void }) {
  const session = useSession()
  const { view } = session
  const [editing, setEditing] = useState(false)
  const option = useView((v) => v.option)
  const system = useView((v) => v.units)
  const groundM = useGround((g) => g.candidateM.get(c.id))
  const hasGround = useGround((g) => g.state === 'ready')
  const windowed = useGround((g) => g.posts > WINDOWED_POSTS)
  const tilts = useDoc((d) => settledOf(d)?.candidates.find((x) => x.id === c.id)?.tiltsDeg)
  const at = useDoc((d) => d.candidates.findIndex((x) => x.id === c.id))
  const on = option?.candidate === c.id
  const heightM = c.groundHeightM ?? groundM
  const away = offTerrain(c)
  const choose = (mastM: number, tiltDeg = on ? option.tiltDeg : (tilts?.[0] ?? 0)) =>
    view.getState().set({ option: { candidate: c.id, heightM: mastM, tiltDeg } })
  return (
    <section className={on ? 'card on' : 'card'} aria-label={`Candidate ${c.id}`}>
      <AriaButton className="card-head" aria-pressed={on} onPress={() => onSelect(c.id)}>
        <Ring />
        <b>{c.id}</b>
        <span className="card-name">{c.name === c.id ? '' : c.name}</span>
        <span className="ink-3">{heightM === null || heightM === undefined ? '' : textOf(formatHeight(heightM, system))}</span>
      </AriaButton>
      <div className="card-line">
        <span className="small ink-3">{formatPosition(c)}</span>
        {on ? (
          <Button small look="quiet" label={editing ? `Close ${c.id}` : `Edit ${c.id}`} onPress={() => setEditing(!editing)}>
            {editing ? 'close' : 'edit'}
          </Button>
        ) : null}
      </div>
      <Problems where={(path) => path.startsWith(`candidates[${at}]`)} />
      {hasGround && groundM === null ? (
        <div className="row">
          <span className="help bad" role="alert">
            {`${away.found}; ${away.remedy}`}
          </span>
          {windowed ? (
            <Button small onPress={session.readAgain}>
              Read the ground here
            </Button>
          ) : null}
        </div>
      ) : null}
      <fieldset className="chips" aria-label={`Mast heights of ${c.id}`}>
        {[...c.mastHeightsM]
          .sort((a, b) => a - b)
          .map((m, i, all) => (
            <AriaButton
              key={m}
              className={on && option.heightM === m ? 'chip on' : 'chip'}
              aria-pressed={on && option.heightM === m}
              onPress={() => choose(m)}
            >
              {m}
              {i === all.length - 1 ? ' m' : ''}
            </AriaButton>
          ))}
      </fieldset>
      {tilts && tilts.length > 1 ? (
        <fieldset className="chips" aria-label={`Tilts of ${c.id}`}>
          <span className="small ink-3">tilt</span>
          {tilts.map((t) => {
            const chosen = on && sameOption(option, { candidate: c.id, heightM: option.heightM, tiltDeg: t })
            return (
              <AriaButton
                key={t}
                className={chosen ? 'chip on' : 'chip'}
                aria-pressed={chosen}
                onPress={() => choose(on ? option.heightM : c.mastHeightsM[0], t)}
              >
                {t}°
              </AriaButton>
            )
          })}
        </fieldset>
      ) : null}
      {on && editing ? <Details candidate={c} /> : null}
    </section>
  )
})

/** A candidate given up: where it was and why, and the way back. */
function RejectedCard({ candidate: c }: { candidate: CandidateDoc }) {
  const { study } = useSession()
  return (
    <section className="card out" aria-label={`Candidate ${c.id}`}>
      <div className="card-head">
        <Ring crossed />
        <b>{c.id}</b>
        <span className="card-name">{c.name === c.id ? '' : c.name}</span>
        <Button small look="quiet" label={`Take back ${c.id}`} onPress={() => takeBackCandidate(study, c.id)}>
          take back
        </Button>
      </div>
      <CommitField
        label="Rejected"
        text={c.rejected ?? ''}
        shape="wide"
        onCommit={(text) => {
          if (text.trim() === '') return 'say why, or take it back'
          rejectCandidate(study, c.id, text)
          return null
        }}
      />
    </section>
  )
}

function Details({ candidate: c }: { candidate: CandidateDoc }) {
  const { study } = useSession()
  const at = useDoc((d) => d.candidates.findIndex((x) => x.id === c.id))
  const kept = useDoc((d) => d.candidates.filter((x) => x.rejected === undefined).length)
  const ownTiltDeg = useDoc((d) => d.radar.antenna.tiltDeg ?? 0)
  const limit = (key: string) => limitOf(`candidates[${at}].${key}`)
  return (
    <div className="details">
      <CommitField
        label="Name"
        text={c.name ?? ''}
        shape="long"
        onCommit={(text) => {
          renameCandidate(study, c.id, text.trim())
          return null
        }}
      />
      <PositionField label="Position" value={c} onCommit={(to) => moveCandidate(study, c.id, to)} />
      <CommitField
        label="Mast heights"
        text={c.mastHeightsM.join(', ')}
        unit="m"
        numeric
        onCommit={(text) => {
          const read = readNumbers(text, METRES, limit('mastHeightsM[0]'))
          if (!read.ok) return read.why
          if (read.values.length === 0) return 'give at least one height'
          setMastHeights(study, c.id, read.values)
          return null
        }}
      />
      <CommitField
        label="Tilts"
        text={(c.tiltsDeg ?? []).join(', ')}
        placeholder={String(ownTiltDeg)}
        unit="°"
        numeric
        onCommit={(text) => {
          const read = readNumbers(text, DEG, limit('tiltsDeg[0]'))
          if (!read.ok) return read.why
          setCandidateField(study, c.id, 'tiltsDeg', read.values.length > 0 ? read.values : undefined)
          return null
        }}
      />
      <NumberField
        label="Ground"
        value={c.groundHeightM}
        fallbackWords="raster"
        face={METRES}
        limit={limit('groundHeightM')}
        onCommit={(v) => setCandidateField(study, c.id, 'groundHeightM', v)}
      />
      <NumberField
        label="Clearing radius"
        value={c.clearingRadiusM}
        fallback={50}
        face={METRES}
        limit={limit('clearingRadiusM')}
        onCommit={(v) => setCandidateField(study, c.id, 'clearingRadiusM', v)}
      />
      <SurveyField candidate={c} />
      <CommitField
        label="Notes"
        text={c.notes ?? ''}
        shape="wide"
        rows={2}
        onCommit={(text) => {
          setCandidateField(study, c.id, 'notes', text.trim() || undefined)
          return null
        }}
      />
      {kept > 1 ? (
        <CommitField
          label="Reject"
          text=""
          shape="wide"
          placeholder="why it is out; Enter rejects it"
          onCommit={(text) => {
            rejectCandidate(study, c.id, text)
            return null
          }}
        />
      ) : null}
      <div className="row end">
        <Button small look="quiet" label={`Delete candidate ${c.id}`} onPress={() => removeCandidate(study, c.id)}>
          Delete {c.id}
        </Button>
      </div>
    </div>
  )
}
