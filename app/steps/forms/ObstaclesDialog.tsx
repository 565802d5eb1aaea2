import { useEffect, useState } from 'react'
import { isInputError, type Limit } from '../../../core/index.ts'
import { freshName, type ObstacleRow, obstacleRows, obstacleText } from '../../files/index.ts'
import { Button, Dialog, EditTable, fieldText, type RowRead, readNumber } from '../../ui/index.ts'
import { METRES, PLACE_TABLE_WORDS } from '../../words/index.ts'
import { sentenceOf, useDoc, useSession } from '../session/index.ts'
import { degreesText, readPlace } from './placeCells.ts'

const SQUARE_METRES = { unit: 'm²', size: 1 }
const limit = (what: string, unit: string, low: number, high: number): Limit => ({ what, unit, low, high })
const NUMBERS = [
  { key: 'heightM', head: 'Above ground', face: METRES, limit: limit('height', 'm', 0, 5000) },
  { key: 'topM', head: 'Top above sea', face: METRES, limit: limit('top', 'm', -500, 15_000) },
  { key: 'widthM', head: 'Width', face: METRES, limit: limit('width', 'm', 0, 10_000) },
  { key: 'rcsM2', head: 'RCS', face: SQUARE_METRES, limit: limit('radar cross-section', 'm²', 0, 1e9) },
] as const
const COLUMNS = [
  { head: 'Name', width: 1.4 },
  { head: 'Latitude', unit: '°', numeric: true, width: 1.4 },
  { head: 'Longitude', unit: '°', numeric: true, width: 1.3 },
  ...NUMBERS.map((n) => ({ head: n.head, unit: n.face.unit, numeric: true })),
]
type Others = ReturnType<typeof obstacleRows>['others']

/** Point obstacles as a table; saved as a file of the study, beside the one of before. */
export function ObstaclesDialog() {
  const { study, files, view } = useSession()
  const file = useDoc((d) => d.obstacles?.file)
  const [sheet, setSheet] = useState<{ rows: readonly ObstacleRow[]; others: Others } | null>(file ? null : { rows: [], others: [] })
  const [trouble, setTrouble] = useState('')
  const close = () => view.getState().set({ dialog: null })
  useEffect(() => {
    if (!file) return
    const blob = files.getState().files.get(file)?.blob
    if (!blob) setTrouble(`${file} is not here; drop it on the page`)
    else
      void blob
        .text()
        .then((text) => setSheet(obstacleRows(text, file)))
        .catch((error) => setTrouble(sentenceOf(error)))
  }, [file, files])
  // a row keeps the feature it came from by its place in this list, in a cell that is not shown
  const [known] = useState<ObstacleRow['feature'][]>([])
  const placeOf = (feature: ObstacleRow['feature']): string => {
    if (feature === null) return ''
    const at = known.indexOf(feature)
    return String(at >= 0 ? at : known.push(feature) - 1)
  }
  const read = (cells: readonly string[]): RowRead<ObstacleRow> => {
    const at = readPlace(cells[1] ?? '', cells[2] ?? '', 1)
    if (!at.ok) return at
    const row: Record<string, number | null> = {}
    for (const [i, n] of NUMBERS.entries()) {
      const got = readNumber(cells[3 + i] ?? '', n.face, n.limit)
      if (!got.ok) return { ok: false, column: 3 + i, why: got.why }
      row[n.key] = got.value ?? null
    }
    if ((row.heightM === null) === (row.topM === null))
      return { ok: false, column: 3, why: 'give the height above ground or the top above sea, one of them' }
    const kept = cells[COLUMNS.length]
    return {
      ok: true,
      value: { name: (cells[0] ?? '').trim(), at: at.value, ...row, feature: kept ? known[Number(kept)] : null } as ObstacleRow,
    }
  }
  const save = () => {
    if (!sheet) return
    const name = freshName(file ?? 'obstacles.geojson', files.getState().files)
    try {
      const text = obstacleText(sheet.rows, sheet.others, name)
      files.getState().give([{ name, blob: new Blob([text], { type: 'application/geo+json' }) }])
      study.getState().edit(file ? 'changed the obstacles' : 'entered obstacles', (d) => ({ ...d, obstacles: { file: name } }))
      close()
    } catch (error) {
      if (!isInputError(error)) throw error
      setTrouble(error.message)
    }
  }
  return (
    <Dialog
      title={PLACE_TABLE_WORDS.obstacles}
      open
      wide
      onClose={close}
      actions={
        <>
          <Button onPress={close}>Cancel</Button>
          <Button look="primary" disabled={!sheet || sheet.rows.length + sheet.others.length === 0} onPress={save}>
            Use these obstacles
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
            label={PLACE_TABLE_WORDS.obstacles}
            columns={COLUMNS}
            rows={sheet.rows}
            write={(r) => [
              r.name,
              r.at ? degreesText(r.at.lat) : '',
              r.at ? degreesText(r.at.lon) : '',
              ...NUMBERS.map((n) => fieldText(r[n.key], n.face)),
              placeOf(r.feature),
            ]}
            read={read}
            onChange={(rows) => {
              setTrouble('')
              setSheet({ ...sheet, rows })
            }}
            addWords="Add an obstacle"
            help={PLACE_TABLE_WORDS.paste}
          />
        ) : null}
        {sheet && sheet.others.length > 0 ? <p className="small ink-3">{PLACE_TABLE_WORDS.keep}</p> : null}
      </div>
    </Dialog>
  )
}
