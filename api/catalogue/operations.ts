import { z } from 'zod'
import { cases } from '../../solvers/cases/index.ts'
import { operation } from '../operation.ts'
import { Problem } from '../problems.ts'
import { publicDocument } from './document.ts'
import { caseList, describedCase } from './describe.ts'
import { caseListSchema, caseSchema } from './schemas.ts'

const listCases = operation({
  id: 'listCases',
  document: 'openapi',
  method: 'get',
  path: '/v1/cases',
  tag: 'Catalogue',
  summary: 'List the cases',
  description: 'Every analytical case in short, with its operations and its price.',
  access: 'public',
  status: 200,
  answer: caseListSchema,
  handle: () => ({ body: caseList() }),
})

const readCase = operation({
  id: 'readCase',
  document: 'openapi',
  method: 'get',
  path: '/v1/cases/{caseId}',
  tag: 'Catalogue',
  summary: 'Describe one case',
  description: 'All that is known of a case: fields, outputs, formula, sources, cautions, example and price.',
  access: 'public',
  params: z.strictObject({ caseId: z.string().meta({ description: 'Id of a case, as listed.' }) }),
  status: 200,
  answer: caseSchema,
  example: { params: { caseId: cases[0]?.id ?? '' } },
  handle({ params }) {
    const body = describedCase(params.caseId)
    if (!body) throw new Problem('not-found', `There is no case "${params.caseId.slice(0, 60)}".`)
    return { body }
  },
})

const readContract = operation({
  id: 'readContract',
  document: 'openapi',
  method: 'get',
  path: '/v1/openapi.json',
  tag: 'Catalogue',
  summary: 'Read this contract',
  description: 'The OpenAPI 3.1 document of the public API.',
  access: 'public',
  status: 200,
  answer: z.record(z.string(), z.unknown()).meta({ id: 'Contract' }),
  handle: () => publicDocument(),
})

export const catalogueOperations = [listCases, readCase, readContract]
