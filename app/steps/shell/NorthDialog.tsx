import { useState } from 'react'
import { DECLINATION_DATES, declinationAt, limitOf } from '../../../core/index.ts'
import { setField } from '../../document/index.ts'
import { Button, CommitField, Dialog, NumberField, Select } from '../../ui/index.ts'
import { DEG, NORTH_WORDS } from '../../words/index.ts'
import { sentenceOf, useDoc, useSession, useView } from '../session/index.ts'

const today = () => {
  const day = new Date().toISOString().slice(0, 10)
  return day > DECLINATION_DATES.last ? DECLINATION_DATES.last : day
}
const BY_HAND = 'by hand'

/** What azimuths at the face are counted from; the declination by the field model for a day, or stated by hand. */
export function NorthDialog() {
  const { study, view } = useSession()
  const north = useView((v) => v.north)
  const option = useView((v) => v.option)
  const stated = useDoc((d) => d.declination)
  const site = useDoc((d) => d.candidates.find((c) => c.id === option?.candidate) ?? d.candidates[0])
  const [date, setDate] = useState(stated?.date ?? today())
  const [trouble, setTrouble] = useState('')
  const close = () => view.getState().set({ dialog: null })
  const state = (valueDeg: number, day: string, model: string) =>
    setField(study, 'declination', { valueDeg: Number(valueDeg.toFixed(2)), date: day, model }, 'stated the declination')
  const workOut = () => {
    if (!site) return
    declinationAt(site, date)
      .then((d) => {
        setTrouble('')
        state(d.valueDeg, d.date, d.model)
        view.getState().set({ north: 'magnetic' })
      })
      .catch((error) => setTrouble(sentenceOf(error)))
  }
  return (
    <Dialog title={NORTH_WORDS.title} open onClose={close} actions={<Button onPress={close}>Close</Button>}>
      <Select
        label="Azimuths from"
        value={stated ? north : 'true'}
        choices={NORTH_WORDS.kinds}
        onChange={(to) => {
          if (to === 'magnetic' && !stated) setTrouble('state a declination first, or work it out')
          else view.getState().set({ north: to })
        }}
      />
      <CommitField
        label="Day"
        text={date}
        shape="long"
        onCommit={(text) => {
          if (!/^\d{4}-\d{2}-\d{2}$/.test(text.trim())) return 'give a day as 2026-12-01'
          setDate(text.trim())
          return null
        }}
      />
      <NumberField
        label="Declination, east positive"
        value={stated?.valueDeg}
        fallbackWords="not stated"
        face={DEG}
        limit={limitOf('declination.valueDeg')}
        marks={<span className="ink-3 small">{stated?.model}</span>}
        onCommit={(v) => {
          setTrouble('')
          if (v !== undefined) state(v, date, BY_HAND)
          else {
            setField(study, 'declination', undefined, 'took out the declination')
            view.getState().set({ north: 'true' })
          }
        }}
      />
      <div className="row add">
        <Button small disabled={!site} onPress={workOut}>
          {site ? `Work out at ${site.id}` : 'Work out: place a candidate first'}
        </Button>
        <span className="small ink-3">{NORTH_WORDS.files}</span>
      </div>
      {trouble ? (
        <p className="problem" role="alert">
          {trouble}
        </p>
      ) : null}
    </Dialog>
  )
}
