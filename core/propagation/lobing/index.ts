export * from './reflectingRay.ts'
export * from './reflectingSurface.ts'
export * from './twoRaySum.ts'
