export * from './measuredFigure.ts'
