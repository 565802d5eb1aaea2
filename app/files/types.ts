/** What a file is to the study. */
export type FileRole =
  | 'terrain'
  | 'landCover'
  | 'obstacles'
  | 'roads'
  | 'facades'
  | 'landTable'
  | 'fixes'
  | 'track'
  | 'polygon'
  | 'study'
  | 'package'
  | 'unknown'
