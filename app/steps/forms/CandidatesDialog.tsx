import { type CandidateDoc, limitOf } from '../../../core/index.ts'
import { setCandidates } from '../../document/index.ts'
import { Button, Dialog, EditTable, type RowRead, readNumber, readNumbers } from '../../ui/index.ts'
import { DEG, METRES, PLACE_TABLE_WORDS } from '../../words/index.ts'
import { useDoc, useSession } from '../session/index.ts'
import { degreesText, readPlace } from './placeCells.ts'

const COLUMNS = [
  { head: 'Id', width: 0.6, placeholder: 'next' },
  { head: 'Name', width: 1.6 },
  { head: 'Latitude', unit: '°', numeric: true, width: 1.5 },
  { head: 'Longitude', unit: '°', numeric: true, width: 1.3 },
  { head: 'Mast heights', unit: 'm', numeric: true, width: 1.3 },
  { head: 'Tilts', unit: '°', numeric: true, placeholder: 'antenna' },
  { head: 'Ground', unit: 'm', numeric: true, placeholder: 'raster' },
]
const ID = /^[A-Za-z0-9_-]{1,32}$/

/** Every candidate of the study in one table. */
export function CandidatesDialog() {
  const { study, view } = useSession()
  const candidates = useDoc((d) => d.candidates)
  const close = () => view.getState().set({ dialog: null })
  const read = (cells: readonly string[]): RowRead<CandidateDoc> => {
    const [id, name, lat, lon, masts, tilts, ground] = COLUMNS.map((_c, i) => (cells[i] ?? '').trim())
    if (id !== '' && !ID.test(id)) return { ok: false, column: 0, why: 'use 1 to 32 of the characters A-Z a-z 0-9 _ -' }
    const place = readPlace(lat, lon, 2)
    if (!place.ok) return place
    const mastHeightsM = readNumbers(masts, METRES, limitOf('candidates[0].mastHeightsM[0]'))
    if (!mastHeightsM.ok) return { ok: false, column: 4, why: mastHeightsM.why }
    const tiltsDeg = readNumbers(tilts, DEG, limitOf('candidates[0].tiltsDeg[0]'))
    if (!tiltsDeg.ok) return { ok: false, column: 5, why: tiltsDeg.why }
    const groundHeightM = readNumber(ground, METRES, limitOf('candidates[0].groundHeightM'))
    if (!groundHeightM.ok) return { ok: false, column: 6, why: groundHeightM.why }
    const { tiltsDeg: _t, groundHeightM: _g, ...before } = candidates.find((c) => c.id === id) ?? ({} as CandidateDoc)
    return {
      ok: true,
      value: {
        ...before,
        id,
        ...(name === '' ? {} : { name }),
        ...place.value,
        mastHeightsM: [...new Set(mastHeightsM.values)].sort((a, b) => a - b),
        ...(tiltsDeg.values.length > 0 ? { tiltsDeg: tiltsDeg.values } : {}),
        ...(groundHeightM.value === undefined ? {} : { groundHeightM: groundHeightM.value }),
      },
    }
  }
  return (
    <Dialog title={PLACE_TABLE_WORDS.candidates} open wide onClose={close} actions={<Button onPress={close}>Close</Button>}>
      <div className="tables">
        <EditTable
          label={PLACE_TABLE_WORDS.candidates}
          columns={COLUMNS}
          rows={candidates}
          write={(c) => [
            c.id,
            c.name ?? '',
            degreesText(c.lat),
            degreesText(c.lon),
            c.mastHeightsM.join(' '),
            (c.tiltsDeg ?? []).join(' '),
            c.groundHeightM == null ? '' : String(c.groundHeightM),
          ]}
          read={read}
          onChange={(rows) => setCandidates(study, rows)}
          addWords="Add a candidate"
          help={PLACE_TABLE_WORDS.paste}
        />
      </div>
    </Dialog>
  )
}
