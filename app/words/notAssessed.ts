/** What this version does not assess, said on the memo's first page and in full in its own section. Shorten as it gets built. */
export interface NotAssessed {
  readonly what: string
  /** What that means for the figures given. */
  readonly so: string
}
export const NOT_ASSESSED: readonly NotAssessed[] = [
  { what: 'Sea clutter', so: 'water returns nothing here; a coastal radar will see more than the maps show' },
  { what: 'Rain clutter and rain loss', so: 'no level of rain is in any figure' },
  { what: 'Gas loss', so: 'echo and clutter are both without it' },
  { what: 'Propagation factor', so: 'targets are taken in free space: no lobing, no diffraction' },
  { what: 'Other refraction', so: 'one effective-earth factor; no ducting' },
  { what: 'Second-time-around clutter', so: 'ground beyond the unambiguous range is not folded in' },
  { what: 'Doppler processing and blind speeds', so: 'suppression is taken as stated, not computed' },
  { what: 'Detection by place', so: 'the required ratio follows from Pd and Pfa; which places are detectable or usable is not stated' },
  { what: 'Discrete echoes and building returns', so: 'masts, turbines and walls mask but return nothing' },
  { what: 'Roads and moving vehicles', so: 'roads are drawn, vehicles are not counted' },
  { what: 'Reflections and false targets', so: 'no facade is traced' },
  { what: 'Wind turbines', so: 'neither blades nor shadow sectors' },
  { what: 'Beam blockage', so: 'an obstacle masks or does not; no partial loss of the beam' },
  { what: 'RF exposure', so: 'no keep-clear distance is given' },
  { what: 'Fixes, tracks and polygons as needs', so: 'only layer needs are checked' },
  { what: 'Cost, access, power, link and land', so: 'left to the site visit' },
]
