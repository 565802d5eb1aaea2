/** What this version does not assess, said on the memo's first page and in full in its own section. Shorten as it gets built. */
export interface NotAssessed {
  readonly what: string
  /** What that means for the figures given. */
  readonly so: string
}
export const NOT_ASSESSED: readonly NotAssessed[] = [
  {
    what: 'Diffracted echoes behind a mask',
    so: 'a masked target counts as lost, whatever comes over the edge; the range-height diagram alone draws it',
  },
  {
    what: 'Lobing off other ground',
    so: 'rays come off water and low-relief open ground only; farmland, forest and built-up ground send none back up',
  },
  { what: 'Ducting and other refraction', so: 'the k of the study, k = 1 for cover and k = 2.75 for clutter; no ducts, no layers' },
  { what: 'Spiky clutter', so: 'every decision is for the mean of the cell; the spread is not in the shares' },
  { what: 'Traffic on roads', so: 'roads seen are counted by length and speed; how many vehicles, and false tracks from them, are not' },
  { what: 'Reflections and false targets', so: 'no facade is traced' },
  { what: 'Wind turbines', so: 'neither turning blades nor shadow sectors' },
  { what: 'Beam blockage', so: 'an obstacle masks or does not; no partial loss of the beam' },
  { what: 'Results of trials', so: 'what was measured is listed as entered; no figure is changed by it' },
  { what: 'Pulse-peak exposure', so: 'keep-clear distances are for average power' },
  { what: 'Cost, access, power, link and land', so: 'left to the site visit' },
]
