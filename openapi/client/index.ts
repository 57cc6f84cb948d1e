export type { paths } from '../openapi.d.ts'
export { type BatchAnswer, type BatchLine, type BatchSummary, CutError, type Problem, ProblemError } from './batch.ts'
export { createClient, type Options, pages, type Soakstone } from './client.ts'
export type { Patience } from './retry.ts'
