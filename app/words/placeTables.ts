/** Words of the tables of candidates, fixes and obstacles. */
export const PLACE_TABLE_WORDS = {
  candidates: 'Candidates',
  fixes: 'Fixes',
  track: 'Track',
  obstacles: 'Obstacles',
  paste: 'Paste cells from a spreadsheet, with or without their heads; latitude takes any written position',
  keep: 'Lines and outlines of the file stay as they are',
} as const
/** Columns of a new table of fixes. */
export const FIX_COLUMNS = ['name', 'lat', 'lon', 'alt_ft_msl'] as const
