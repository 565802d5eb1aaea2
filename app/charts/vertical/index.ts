export * from './contours.ts'
export * from './frame.ts'
export * from './verticalChart.ts'
export * from './verticalCsv.ts'
