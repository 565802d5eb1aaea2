import { useEffect, useState } from 'react'
import { isInputError, readPlaces, readTable } from '../../../core/index.ts'
import { freeNeedId } from '../../document/index.ts'
import { csvText, freshName } from '../../files/index.ts'
import { Button, Dialog, EditTable, type RowRead } from '../../ui/index.ts'
import { FIX_COLUMNS, FIX_HEADS, PLACE_TABLE_WORDS } from '../../words/index.ts'
import { sentenceOf, useDoc, useSession, useView } from '../session/index.ts'
import { degreesText, readPlace } from './placeCells.ts'

interface Sheet {
  readonly columns: readonly string[]
  readonly rows: readonly string[][]
}
const NEW: Sheet = { columns: [...FIX_COLUMNS], rows: [] }

/** Fixes or a track as a table: of a need's own file, or new ones. Saved as a file of the study, beside the one of before. */
export function FixesDialog() {
  const session = useSession()
  const { study, files, view } = session
  const about = useView((v) => v.dialogFor)
  const need = useDoc((d) => d.needs?.find((n) => n.id === about))
  const kind = need?.kind === 'track' || about === 'track' ? 'track' : 'fixes'
  const [sheet, setSheet] = useState<Sheet | null>(need?.file ? null : NEW)
  const [trouble, setTrouble] = useState('')
  const close = () => view.getState().set({ dialog: null, dialogFor: null })
  const file = need?.file
  useEffect(() => {
    if (!file) return
    const blob = files.getState().files.get(file)?.blob
    if (!blob) {
      setTrouble(`${file} is not here; drop it on the page`)
      return
    }
    void blob
      .text()
      .then((text) => readTable(text, file))
      .then((t) => setSheet({ columns: t.columns, rows: t.rows.map((r) => [...r]) }))
      .catch((error) => setTrouble(sentenceOf(error)))
  }, [file, files])
  const save = () => {
    if (!sheet) return
    const { doc, edit } = study.getState()
    const name = freshName(file ?? `${kind}.csv`, files.getState().files)
    const text = csvText(sheet.columns, sheet.rows)
    try {
      const [heightM] = [need?.heightM ?? null].flat()
      readPlaces(text, {
        id: about ?? '',
        kind,
        file: name,
        heightM,
        heightAbove: need?.heightAbove ?? 'sea',
        qnhHpa: need?.qnhHpa ?? null,
      })
    } catch (error) {
      if (!isInputError(error)) throw error
      setTrouble(error.message)
      return
    }
    files.getState().give([{ name, blob: new Blob([text], { type: 'text/csv' }) }])
    if (need)
      edit(`changed the ${kind} of ${need.name ?? need.id}`, (d) => ({
        ...d,
        needs: d.needs?.map((n) => (n.id === need.id ? { ...n, file: name } : n)),
      }))
    else {
      const id = freeNeedId(doc.needs ?? [])
      const words = kind === 'track' ? 'Track' : 'Fixes'
      edit(`entered ${kind}`, (d) => ({ ...d, needs: [...(d.needs ?? []), { id, name: words, must: true, kind, file: name }] }))
    }
    close()
  }
  return (
    <Dialog
      title={need?.name ?? PLACE_TABLE_WORDS[kind]}
      open
      wide
      onClose={close}
      actions={
        <>
          <Button onPress={close}>Cancel</Button>
          <Button look="primary" disabled={!sheet || sheet.rows.length === 0} onPress={save}>
            {kind === 'track' ? 'Use this track' : 'Use these fixes'}
          </Button>
        </>
      }
    >
      <div className="tables">
        {trouble ? (
          <p className="problem" role="alert">
            {trouble}
          </p>
        ) : null}
        {sheet ? (
          <EditTable
            label={PLACE_TABLE_WORDS[kind]}
            columns={sheet.columns.map((key) => ({ key, head: key, ...FIX_HEADS[key.toLowerCase()], numeric: key !== 'name' }))}
            rows={sheet.rows}
            write={(row) => [...row]}
            read={(cells) => readFix(cells, sheet.columns)}
            onChange={(rows) => {
              setTrouble('')
              setSheet({ ...sheet, rows })
            }}
            addWords={kind === 'track' ? 'Add a corner' : 'Add a fix'}
            help={PLACE_TABLE_WORDS.paste}
          />
        ) : null}
      </div>
    </Dialog>
  )
}

/** A row with its position in decimal degrees, however it was written. */
function readFix(cells: readonly string[], columns: readonly string[]): RowRead<string[]> {
  const at = (name: string) => columns.findIndex((c) => c.toLowerCase() === name)
  const [lat, lon] = [at('lat'), at('lon')]
  const row = columns.map((_c, i) => (cells[i] ?? '').trim().replace('−', '-'))
  if (lat < 0 || lon < 0) return { ok: true, value: row }
  const plain = [row[lat], row[lon]].every((t) => t !== '' && Number.isFinite(Number(t)))
  if (!plain) {
    const place = readPlace(row[lat], row[lon], lat)
    if (!place.ok) return place
    row[lat] = degreesText(place.value.lat).replace('−', '-')
    row[lon] = degreesText(place.value.lon).replace('−', '-')
  }
  for (const [i, head] of columns.entries())
    if (/^(alt_|flight_level)/i.test(head) && (row[i] === '' || !Number.isFinite(Number(row[i]))))
      return { ok: false, column: i, why: row[i] === '' ? 'needed' : `“${row[i]}” is no number` }
  return { ok: true, value: row }
}
