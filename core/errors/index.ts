export * from './inputError.ts'
