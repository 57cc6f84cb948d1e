import type { components } from '../../../../openapi/openapi.d.ts'

/* What the service tells of its cases. */

export type CaseSummary = components['schemas']['CaseSummary']
export type Case = components['schemas']['Case']
export type CaseList = components['schemas']['CaseList']
