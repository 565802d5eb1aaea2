import type { ReactNode } from 'react'
import { Button as AriaButton } from 'react-aria-components'

export interface ButtonProps {
  readonly children: ReactNode
  readonly onPress?: () => void
  /** `primary`: the one next action of a step. `quiet`: no frame until pointed at. */
  readonly look?: 'plain' | 'primary' | 'quiet'
  readonly small?: boolean
  /** A choice that is on. */
  readonly active?: boolean
  readonly disabled?: boolean
  /** Where the words on the button do not say enough by themselves. */
  readonly label?: string
  readonly className?: string
}
export function Button({ children, onPress, look = 'plain', small, active, disabled, label, className }: ButtonProps) {
  const classes = ['button', look, small && 'small', active && 'active', className].filter(Boolean).join(' ')
  return (
    <AriaButton className={classes} onPress={onPress} isDisabled={disabled} aria-label={label} aria-pressed={active}>
      {children}
    </AriaButton>
  )
}

/** A number that explains itself when pressed. */
export function FigureButton({ children, onPress, label }: { children: ReactNode; onPress: () => void; label: string }) {
  return (
    <AriaButton className="figure-button" onPress={onPress} aria-label={label}>
      {children}
    </AriaButton>
  )
}
