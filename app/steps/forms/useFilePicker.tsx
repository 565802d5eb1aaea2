import { useRef } from 'react'
import type { FileRole } from '../../files/index.ts'
import { useSession } from '../session/index.ts'

/** A hidden file input and the function that opens it. `as` says what the picked files are. */
export function useFilePicker(as?: FileRole, accept?: string) {
  const session = useSession()
  const ref = useRef<HTMLInputElement>(null)
  const input = (
    <input
      ref={ref}
      type="file"
      multiple
      hidden
      accept={accept}
      data-role={as ?? 'any'}
      onChange={(e) => {
        void session.take([...(e.target.files ?? [])], as)
        e.target.value = ''
      }}
    />
  )
  return { input, open: () => ref.current?.click() }
}
