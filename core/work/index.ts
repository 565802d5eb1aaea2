export * from './work.ts'
