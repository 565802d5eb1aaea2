/** What a file is to the study. */
export type FileRole = 'terrain' | 'landCover' | 'obstacles' | 'roads' | 'facades' | 'landTable' | 'study' | 'package' | 'unknown'
