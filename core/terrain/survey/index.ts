export { readSurvey } from './readSurvey.ts'
export { type SurveyLine, type SurveyPoint, surveyedTopM, surveyLine } from './surveyLine.ts'
export * from './types.ts'
