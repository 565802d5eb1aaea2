import { useRef } from 'react'
import { Menu } from '../../ui/index.ts'
import { useSession } from '../session/index.ts'

/** Open, save, package, new, demo. */
export function FileMenu() {
  const session = useSession()
  const picker = useRef<HTMLInputElement>(null)
  return (
    <>
      <Menu
        words="File"
        entries={[
          { id: 'open', words: 'Open…', hint: 'a study, with its files, or a package', run: () => picker.current?.click() },
          { id: 'save', words: 'Save study', hint: 'the .json alone', run: session.saveStudy },
          { id: 'package', words: 'Save package', hint: 'study and files in one .zip', run: () => void session.savePackage() },
          { id: 'studies', words: 'Studies on this machine…', run: () => session.view.getState().set({ dialog: 'studies' }) },
          { id: 'new', words: 'New study', run: () => void session.newStudy() },
          { id: 'demo', words: 'Open the demo study', run: () => void session.openDemo() },
          { id: 'commands', words: 'Find a command…', hint: 'Ctrl K', run: () => session.view.getState().set({ dialog: 'commands' }) },
          { id: 'keys', words: 'Keys…', hint: 'Ctrl /', run: () => session.view.getState().set({ dialog: 'keys' }) },
        ]}
      />
      <input
        ref={picker}
        type="file"
        multiple
        hidden
        data-testid="open-files"
        onChange={(e) => {
          void session.take([...(e.target.files ?? [])])
          e.target.value = ''
        }}
      />
    </>
  )
}
