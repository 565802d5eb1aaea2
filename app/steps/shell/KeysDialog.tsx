import { Button, Dialog } from '../../ui/index.ts'
import { COMMAND_WORDS, KEY_GROUPS } from '../../words/index.ts'
import { useSession } from '../session/index.ts'

/** Every key, by the place that has the focus. */
export function KeysDialog() {
  const { view } = useSession()
  const close = () => view.getState().set({ dialog: null })
  return (
    <Dialog title={COMMAND_WORDS.keysTitle} open wide onClose={close} actions={<Button onPress={close}>Close</Button>}>
      <div className="key-groups">
        {KEY_GROUPS.map((g) => (
          <section key={g.where}>
            <h3>{g.where}</h3>
            <dl>
              {g.keys.map((k) => (
                <div key={k.keys}>
                  <dt>{k.keys}</dt>
                  <dd>{k.does}</dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
      </div>
    </Dialog>
  )
}
