export { RADAR_TEMPLATES, radarOfTemplate } from './radarTemplates.ts'
export { needsOfSet, STARTING_SETS } from './startingSets.ts'
export { type Basis, basisOf, type NeedTemplate, originWords, type RadarTemplate, type StartingSet, type TemplateValue } from './types.ts'
