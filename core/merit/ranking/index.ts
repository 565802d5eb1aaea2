export { coverageOf, type GainAndCost, nonDominated } from './nonDominated.ts'
export { MAST_FIGURE, mustNeedsPass, type OptionKey, type Rated, rankOptions, utility, WEIGHT_FACTORS } from './ranking.ts'
export type * from './types.ts'
