import type { ConfirmationDoc } from './types.ts'

/** What makes a confirmation one; it is entered, never computed, and refused without any of these. */
export const CONFIRMATION_PARTS = ['who', 'when', 'method', 'altitudeM', 'result'] as const
const WORDS: Readonly<Record<(typeof CONFIRMATION_PARTS)[number], string>> = {
  who: 'who measured it',
  when: 'when it was measured',
  method: 'the method',
  altitudeM: 'the altitude',
  result: 'the result',
}

const isBlank = (value: unknown): boolean => value === undefined || value === null || (typeof value === 'string' && value.trim() === '')

/** A day as `2026-05-31`, maybe with a time after it, that the calendar has. */
function isDay(text: string): boolean {
  const m = /^(\d{4})-(\d{2})-(\d{2})([T ].*)?$/.exec(text.trim())
  if (!m) return false
  const [year, month, day] = [Number(m[1]), Number(m[2]), Number(m[3])]
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0
  const days = [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1]
  return days !== undefined && day >= 1 && day <= days
}

/** Refuses a confirmation that lacks who, when, method, altitude or result, names neither need nor place, or whose day is none. */
export function checkConfirmations(
  list: readonly ConfirmationDoc[],
  say: (path: string, code: string, found: string, remedy: string) => void,
): void {
  list.forEach((c, i) => {
    for (const part of CONFIRMATION_PARTS)
      if (isBlank(c[part]))
        say(
          `confirmations[${i}].${part}`,
          'missing',
          `a confirmation without ${WORDS[part]}`,
          'give who, when, method, altitudeM and result, or take it out',
        )
    if (isBlank(c.need) && isBlank(c.place))
      say(`confirmations[${i}].place`, 'missing', 'a confirmation of neither a need nor a place', 'give need (its id) or place (in words)')
    if (typeof c.when === 'string' && c.when.trim() !== '' && !isDay(c.when))
      say(`confirmations[${i}].when`, 'day', `"${c.when.slice(0, 30)}" is no day`, 'give the day as 2026-05-31')
  })
}
