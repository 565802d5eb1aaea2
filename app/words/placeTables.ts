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
/** What stands over the columns a table of fixes can have; any other stands as the file names it. */
export const FIX_HEADS: Readonly<Record<string, { readonly head: string; readonly unit?: string } | undefined>> = {
  name: { head: 'Name' },
  lat: { head: 'Latitude', unit: '°' },
  lon: { head: 'Longitude', unit: '°' },
  alt_ft_msl: { head: 'Altitude above sea', unit: 'ft' },
  alt_m_msl: { head: 'Altitude above sea', unit: 'm' },
  alt_ft_agl: { head: 'Height above ground', unit: 'ft' },
  alt_m_agl: { head: 'Height above ground', unit: 'm' },
  flight_level: { head: 'Flight level' },
}
