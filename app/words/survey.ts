/** Words of surveyed horizons. */
export const SURVEY_WORDS = {
  file: 'Surveyed horizon',
  take: 'Take the higher of surveyed and computed',
  open: 'From a file',
  change: 'Another file',
  remove: 'Remove',
  columns: 'CSV: azimuth_deg, elevation_deg, range_m, instrument_height_m, method',
  used: 'Taken as the higher of both: its obstacles stand in sight, floors and horizon of this option.',
  notUsed: 'Beside the computed horizon only: no figure of this option rests on it.',
} as const
