/** One key, or several parted by "or", and what it does there. */
export interface KeyWords {
  readonly keys: string
  readonly does: string
}
export interface KeyGroup {
  readonly where: string
  readonly keys: readonly KeyWords[]
}
const k = (keys: string, does: string): KeyWords => ({ keys, does })

/** Every key of the page, by the place that has to have the focus. */
export const KEY_GROUPS: readonly KeyGroup[] = [
  {
    where: 'Anywhere',
    keys: [
      k('Ctrl K', 'find a command or a step'),
      k('Ctrl /', 'this list'),
      k('Ctrl S', 'save the study'),
      k('Ctrl Z', 'undo'),
      k('Ctrl Shift Z or Ctrl Y', 'redo'),
      k('Esc', 'close what is open'),
    ],
  },
  {
    where: 'Map',
    keys: [
      k('Arrows', 'move the view; with Shift less'),
      k('+ or −', 'nearer, farther'),
      k('Home', 'everything in view'),
      k('Enter', 'what a click on the middle does'),
    ],
  },
  {
    where: 'Candidate on the map',
    keys: [k('Arrows', 'move it; with Shift less'), k('Enter', 'choose it, or set it down'), k('Esc', 'put it back')],
  },
  {
    where: 'Mast',
    keys: [
      k('Arrows', 'next stated height; with Shift half a metre'),
      k('Page up or Page down', 'five metres'),
      k('Home or End', 'lowest, highest stated height'),
      k('Enter', 'add the height in hand'),
      k('Esc', 'put it back'),
    ],
  },
  {
    where: 'Charts',
    keys: [k('← or →', 'move the reading'), k('+ or −', 'nearer, farther'), k('0', 'the whole chart')],
  },
  {
    where: 'Fields and tables',
    keys: [
      k('Enter', 'apply; in a table go down'),
      k('Esc', 'give up what was typed'),
      k('↑ or ↓', 'row above, row below'),
      k('Ctrl V', 'paste cells of a spreadsheet from here on'),
    ],
  },
]

export const COMMAND_WORDS = {
  title: 'Find a command',
  field: 'Command, step, quantity or candidate',
  none: 'Nothing by these words',
  keysTitle: 'Keys',
} as const
