import { Button, Dialog } from '../../ui/index.ts'
import { BEAM_COLUMNS, BEAM_SWITCH_COLUMNS, PULSE_COLUMNS, TABLE_WORDS } from '../../words/index.ts'
import { useSession } from '../session/index.ts'
import { DocTable } from './DocTable.tsx'
import { Group } from './fields.tsx'
import { Problems } from './Problems.tsx'

/** Pulses by range, stacked beams and which beam is used where. */
export function PulsesDialog() {
  const { view } = useSession()
  const close = () => view.getState().set({ dialog: null })
  return (
    <Dialog title={TABLE_WORDS.pulsesTitle} open wide onClose={close} actions={<Button onPress={close}>Close</Button>}>
      <div className="tables">
        <Problems where={(path) => /^radar\.(pulses|beams|beamSwitch)\b/.test(path)} />
        <Group title={TABLE_WORDS.pulses}>
          <DocTable path="radar.pulses" label={TABLE_WORDS.pulses} columns={PULSE_COLUMNS} addWords="Add a pulse" />
        </Group>
        <Group title={TABLE_WORDS.beams}>
          <DocTable
            path="radar.beams"
            label={TABLE_WORDS.beams}
            columns={BEAM_COLUMNS}
            addWords="Add a beam"
            goesOn={(row, before) => {
              const same = before.find((b) => b.name === row.name)
              return same?.elevationTable ? { elevationTable: same.elevationTable } : undefined
            }}
          />
        </Group>
        <Group title={TABLE_WORDS.beamSwitch}>
          <DocTable path="radar.beamSwitch" label={TABLE_WORDS.beamSwitch} columns={BEAM_SWITCH_COLUMNS} addWords="Add a range" />
        </Group>
      </div>
    </Dialog>
  )
}
