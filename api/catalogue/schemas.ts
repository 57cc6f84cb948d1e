import { z } from 'zod'
import { cautions } from '../../solvers/cautions.ts'
import { outputNames } from '../../solvers/outputs.ts'

const text = z.string()
const shape = z.enum(['grid', 'grids', 'times', 'places', 'single'])

const caseOperationSchema = z.strictObject({
  id: text,
  title: text,
  summary: text,
  method: z.literal('POST'),
  path: text.meta({ description: 'Path of the operation under the address of the service.' }),
})

const summaryShape = {
  id: text,
  title: text,
  summary: text,
  family: text,
  sketch: z.strictObject({ body: text, boundary: text }),
  facets: z
    .record(text, z.array(text))
    .meta({ description: 'By what the case is found: values of each facet of the list.' }),
  operations: z.array(caseOperationSchema),
  weight: z.number().meta({ description: 'Priced points per number of the answer.' }),
  setUp: z.number().meta({ description: 'Priced points once per call.' }),
  leastCharge: z.number().meta({ description: 'Points that a call costs at least.' }),
}

export const caseSummarySchema = z.strictObject(summaryShape).meta({ id: 'CaseSummary' })

const facetSchema = z
  .strictObject({
    id: text,
    title: text,
    match: z.enum(['any', 'all']).meta({ description: 'Of several values, whether a case must have any or all.' }),
    values: z.array(z.strictObject({ id: text, title: text })).meta({ description: 'Those that some case has.' }),
  })
  .meta({ id: 'CaseFacet' })

export const caseListSchema = z
  .strictObject({
    cases: z.array(caseSummarySchema),
    families: z
      .array(z.strictObject({ id: text, title: text, text }))
      .meta({ description: 'Groups of the cases, in the order to show them.' }),
    facets: z.array(facetSchema).meta({ description: 'By what the list can be narrowed.' }),
  })
  .meta({ id: 'CaseList' })

const fieldShape = {
  name: text,
  required: z.boolean(),
  title: text.optional(),
  symbol: text.optional(),
  unit: text.optional().meta({ description: 'UCUM code of a plain number.' }),
  hint: text.optional(),
  accepted: text.optional(),
  typical: z.array(z.number()).optional().meta({ description: 'Lowest and highest value met in practice.' }),
  schema: z.record(text, z.unknown()).meta({ description: 'JSON Schema of the field.' }),
}

const subFieldSchema = z.strictObject(fieldShape).meta({ id: 'CaseSubField' })

const kindSchema = z
  .strictObject({ kind: text, title: text.optional(), hint: text.optional(), fields: z.array(subFieldSchema) })
  .meta({ id: 'CaseFieldKind' })

const fieldSchema = z
  .strictObject({
    ...fieldShape,
    fields: z
      .array(subFieldSchema)
      .optional()
      .meta({ description: 'What an object holds; of a list, what each of its objects holds.' }),
    kinds: z
      .array(kindSchema)
      .optional()
      .meta({ description: 'The kinds that an object may be of, each with what it holds beside its kind.' }),
  })
  .meta({ id: 'CaseField' })

const outputSchema = z
  .strictObject({
    name: z.enum(outputNames),
    label: text,
    symbol: text,
    unit: text,
    shape,
    text,
    cost: z.number().optional().meta({ description: 'How many values of others one of these is priced as.' }),
  })
  .meta({ id: 'CaseOutput' })

const exampleSchema = z.record(text, z.unknown())

export const caseSchema = z
  .strictObject({
    ...summaryShape,
    operations: z.array(
      caseOperationSchema.extend({ example: exampleSchema.meta({ description: 'A body that it answers.' }) }),
    ),
    notes: text,
    formula: z.array(text).meta({ description: 'The formula in TeX, one entry a line.' }),
    sources: z.array(text),
    places: z
      .enum(['depths', 'radii', 'depths-or-radii', 'points', 'none'])
      .meta({ description: 'The fields in which places are given.' }),
    pointAxes: z.array(text).meta({ description: 'The coordinates of a point; empty where places are no points.' }),
    depthsEndAt: text
      .nullable()
      .meta({ description: 'The field that says where the body ends; null where it has no end.' }),
    drive: text.nullable().meta({ description: 'The field with the temperature that the body is driven to.' }),
    fields: z.array(fieldSchema),
    outputs: z.array(outputSchema),
    absentOutputs: z.array(z.strictObject({ name: z.enum(outputNames), reason: text })),
    cautions: z.array(z.strictObject({ id: z.enum(Object.keys(cautions)), version: z.number(), text })),
    warnings: z.array(z.strictObject({ code: text, title: text, text })),
    example: exampleSchema,
    variants: z
      .array(z.strictObject({ title: text, input: exampleSchema }))
      .meta({ description: 'Other ways to state the case, each a whole input.' }),
    solver: text.meta({ description: 'Version of the numbers.' }),
  })
  .meta({ id: 'Case' })
