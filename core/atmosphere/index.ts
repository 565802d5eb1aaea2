export * from './gasLoss.ts'
export * from './rainLoss.ts'
export * from './refractivity.ts'
