export * from './levelsChart.ts'
export * from './levelsCsv.ts'
export * from './suppressionChart.ts'
