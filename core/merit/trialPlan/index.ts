export { trialPlan } from './trialPlan.ts'
export * from './types.ts'
