import type { ReactNode } from 'react'
import { MAGNETIC, type Quantity } from '../words/index.ts'
import { Button } from './Button.tsx'

/** A word beside a value: *default*, *outside model*, *by hand*, *from memory*. */
export const Mark = ({ children }: { children: ReactNode }) => <span className="mark">{children}</span>

/** Stands directly under the number it concerns; never folded, never dismissed. */
export const Caution = ({ children }: { children: ReactNode }) => <p className="caution">{children}</p>

const ATTACHED = new Set(['°', '″', '′', '', MAGNETIC])

/** A number with its unit in lighter ink. */
export function Value({ of }: { of: Quantity }) {
  return (
    <>
      {of.value}
      {of.unit ? <span className="unit">{(ATTACHED.has(of.unit) ? '' : '\u202f') + of.unit}</span> : null}
    </>
  )
}

export interface NoticeProps {
  readonly children: ReactNode
  /** `bad`: something did not work. */
  readonly tone?: 'warn' | 'bad'
  readonly title?: string
  readonly onClose?: () => void
  readonly action?: { readonly words: string; readonly run: () => void }
}
/** What happened, where, what to do. */
export function Notice({ children, tone = 'warn', title, onClose, action }: NoticeProps) {
  return (
    <div className={`notice ${tone}`} role={tone === 'bad' ? 'alert' : 'status'}>
      <div className="text">
        {title ? <b>{title}</b> : null}
        {children}
      </div>
      {action ? (
        <Button small onPress={action.run}>
          {action.words}
        </Button>
      ) : null}
      {onClose ? (
        <Button small look="quiet" onPress={onClose}>
          Close
        </Button>
      ) : null}
    </div>
  )
}
