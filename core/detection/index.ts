export * from './approximations.ts'
export * from './cfar.ts'
export * from './exactPd.ts'
export { gammaQ, lnGamma } from './gamma.ts'
