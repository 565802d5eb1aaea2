import type { ReactNode } from 'react'
import { Dialog as AriaDialog, Heading, Modal, ModalOverlay } from 'react-aria-components'

export interface DialogProps {
  readonly title: string
  readonly open: boolean
  readonly onClose: () => void
  readonly children: ReactNode
  readonly actions?: ReactNode
  /** Two columns side by side. */
  readonly wide?: boolean
}
export function Dialog({ title, open, onClose, children, actions, wide }: DialogProps) {
  return (
    <ModalOverlay className="veil" isOpen={open} onOpenChange={(now) => !now && onClose()} isDismissable>
      <Modal className={wide ? 'dialog-frame wide' : 'dialog-frame'}>
        <AriaDialog className="dialog">
          <Heading slot="title" level={2}>
            {title}
          </Heading>
          {children}
          {actions ? <div className="actions">{actions}</div> : null}
        </AriaDialog>
      </Modal>
    </ModalOverlay>
  )
}
