import { z } from 'zod'
import { type Case, outputNamesOf, outputOf, placeFields, shapeOf } from '../case.ts'
import { clockTimes, depths, pointsOf, radii, signedDepths, times } from '../statement/fields.ts'
import type { OutputName, Shape } from '../outputs.ts'
import { accuracyScope, boundSchema, compactOf, detailField, headOf, tail } from './envelope.ts'

/* What a solve takes and answers, made from the description of a case. */

/** The fields in which a case takes its places, all optional: outputs without places need none. */
export function placeSchemas(c: Case): Partial<Record<'depths' | 'radii' | 'points', z.ZodType>> {
  const schemas = {
    depths: (c.signedDepths ? signedDepths : depths).optional(),
    radii: radii.optional(),
    points: pointsOf(c.pointAxes ?? [], c.optionalAxes).optional(),
  }
  return Object.fromEntries(placeFields[c.places].map((name) => [name, schemas[name]]))
}

function inputSchema(c: Case) {
  const names = outputNamesOf(c)
  const outputs = z
    .array(z.enum(names))
    .min(1)
    .max(names.length)
    .default(['temperature'])
    .meta({
      title: 'Outputs',
      description: `Outputs: some of ${names.join(', ')}. Default temperature.`,
      'x-accepted': names.join(', '),
    })
  return z.strictObject({
    ...c.fields,
    ...placeSchemas(c),
    times: c.clock ? clockTimes : times,
    outputs,
    detail: detailField,
  })
}

const valuesSchema: Record<Shape, z.ZodType> = {
  grid: z.array(z.array(z.number())),
  grids: z.record(z.string(), z.array(z.array(z.number()))),
  times: z.array(z.number()),
  places: z.array(z.number()),
  single: z.number(),
}

const pointSchema = (c: Case) =>
  z.strictObject(
    Object.fromEntries(
      (c.pointAxes ?? []).map((axis) => [axis, c.optionalAxes?.includes(axis) ? z.number().optional() : z.number()]),
    ),
  )

/** Cases without places answer a grid output as one row over the times. */
export function answeredShape(c: Case, name: OutputName): Shape {
  const shape = shapeOf(c, name)
  if (c.places !== 'none') return shape
  return shape === 'grid' ? 'times' : shape === 'places' ? 'single' : shape
}

export function answerSchema(c: Case) {
  const names = outputNamesOf(c)
  const perOutput = (schemaOf: (name: OutputName) => z.ZodType) =>
    z.strictObject(Object.fromEntries(names.map((name) => [name, schemaOf(name).optional()])))
  const result = perOutput((name) => {
    const o = outputOf(c, name)
    const shape = answeredShape(c, name)
    const schema =
      shape === 'grids' && c.places === 'none' ? z.record(z.string(), valuesSchema.times) : valuesSchema[shape]
    return schema.meta({
      title: o.label,
      description: `${o.text} Unit ${o.unit}.`,
      'x-ucum': o.unit,
    })
  })
  const series = z.array(z.number())
  return z.strictObject({
    ...headOf(c, 'solve'),
    axes: z.strictObject({
      times: series,
      ...Object.fromEntries(
        placeFields[c.places].map((name) => [name, (name === 'points' ? z.array(pointSchema(c)) : series).optional()]),
      ),
    }),
    units: z.record(z.string(), z.string()).meta({ description: 'UCUM code of each output and axis.' }),
    result,
    accuracy: z.strictObject({
      method: z.array(z.string()),
      terms: z.number(),
      scale: z.number().meta({ description: 'The temperature scale of the case, K.' }),
      bound: perOutput(() => boundSchema),
      ...accuracyScope,
    }),
    ...tail,
  })
}

export const compactSchema = (c: Case) => compactOf(answerSchema(c))

const inputs = new Map<string, ReturnType<typeof inputSchema>>()
/** Built once a case, since building a schema costs more than a solve. */
export function inputOf(c: Case) {
  const known = inputs.get(c.id)
  if (known) return known
  const schema = inputSchema(c)
  inputs.set(c.id, schema)
  return schema
}
