import type { ReactNode } from 'react'
import { Checkbox } from 'react-aria-components'

export function Check({ children, value, onChange }: { children: ReactNode; value: boolean; onChange: (value: boolean) => void }) {
  return (
    <Checkbox className="check" isSelected={value} onChange={onChange}>
      {({ isSelected }) => (
        <>
          <span className="box" aria-hidden>
            {isSelected ? (
              <svg viewBox="0 0 14 14" width="14" height="14" role="presentation">
                <path d="M3 7.5 6 10.5 11 4" />
              </svg>
            ) : null}
          </span>
          {children}
        </>
      )}
    </Checkbox>
  )
}
