/** Words of what was measured on site or in trial. */
export const CONFIRMED_WORDS = {
  title: 'Confirmed by survey and trial',
  none: 'Nothing is entered as confirmed: every figure of this memo is a prediction.',
  rule: 'Confirmed stands only for what was measured, with who, when, method, altitude and result; it is never computed, and it says nothing of other places, heights or options.',
  parts: { what: 'What', option: 'Option', altitude: 'Altitude', who: 'Who', when: 'When', method: 'Method', result: 'Result' },
  hints: {
    place: 'fix, radial or place',
    when: '2026-05-31',
    method: 'flight trial, theodolite, …',
    result: 'seen on 9 of 10 scans',
  },
  add: 'Enter a measurement',
  keep: 'Enter it',
  remove: 'Remove',
} as const
