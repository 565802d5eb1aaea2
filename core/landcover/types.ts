export const TERRAIN_NAMES = ['rural', 'forest', 'farmland', 'open', 'urban', 'water'] as const
export type TerrainName = (typeof TERRAIN_NAMES)[number]
/** What a code byte of the ground stands for. */
export interface GroundCode {
  readonly terrain: TerrainName
  readonly coverHeightM: number
  /** Class number of the source raster, null for uniform terrain or the default. */
  readonly sourceClass: number | null
  /** 'default' where nobody stated it. */
  readonly mark: 'default' | null
}
