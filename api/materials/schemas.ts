import { z } from 'zod'
import { solid } from '../../solvers/statement/fields.ts'
import { genericMaterials } from '../../solvers/materials/generic.ts'
import { type Material, confidences, derivedOf, states, uncertaintyOf } from '../../solvers/materials/material.ts'
import { materialIdField } from '../ids.ts'
import { instantSchema, storedText } from '../texts.ts'

/** Of an account's own materials that are in no group of their own. */
const OWN_GROUP = 'own'

const oneOf = (names: readonly string[]) => names.join(', ')
const stateField = z.enum(states).meta({
  title: 'State',
  description: `State: what the figures hold for, one of ${oneOf(states)}. design is a design table, at the moisture usual in use; unspecified makes each answer warn.`,
  'x-accepted': oneOf(states),
})
const confidenceField = z.enum(confidences).meta({
  title: 'Confidence',
  description: `Confidence: ${oneOf(confidences)}. low makes each answer warn.`,
  'x-accepted': oneOf(confidences),
})

export const newMaterialSchema = z
  .strictObject({
    name: storedText('Name', 120),
    group: storedText('Group', 40).default(OWN_GROUP),
    conductivity: solid.conductivity.unwrap(),
    density: solid.density.unwrap(),
    specificHeat: solid.specificHeat.unwrap(),
    state: stateField,
    source: storedText('Source', 300),
    confidence: confidenceField,
  })
  .meta({ id: 'NewMaterial' })
export type NewMaterial = z.output<typeof newMaterialSchema>

const figure = (description: string, unit: string) =>
  z.number().meta({ description: `${description}, ${unit}.`, 'x-ucum': unit })

export const materialSchema = z
  .strictObject({
    id: z.string().meta({ description: 'What a solve names as `material`.' }),
    of: z.enum(['catalogue', 'account']).meta({ description: 'Whose it is.' }),
    name: z.string(),
    group: z.string(),
    conductivity: figure('Conductivity', 'W/(m.K)'),
    density: figure('Density', 'kg/m3'),
    specificHeat: figure('Specific heat', 'J/(kg.K)'),
    volumetricHeatCapacity: figure('Volumetric heat capacity', 'J/(m3.K)'),
    diffusivity: figure('Diffusivity', 'm2/s'),
    effusivity: figure('Effusivity', 'W.s0.5/(m2.K)'),
    relativeUncertainty: z
      .strictObject({ conductivity: z.number(), volumetricHeatCapacity: z.number() })
      .meta({ description: 'Relative standard uncertainties to start from, by confidence.' }),
    state: z.enum(states),
    source: z.string(),
    confidence: z.enum(confidences),
    updatedAt: instantSchema.nullable().meta({ description: 'Last change of an own material; null in the catalogue.' }),
  })
  .meta({ id: 'Material' })

/** A material as clients see it. */
export function shownMaterial(material: Material & { updatedAt?: Date }) {
  const { updatedAt, id, name, group, conductivity, density, specificHeat, state, source, confidence } = material
  return {
    id,
    of: updatedAt ? ('account' as const) : ('catalogue' as const),
    name,
    group,
    conductivity,
    density,
    specificHeat,
    ...derivedOf(material),
    relativeUncertainty: uncertaintyOf[confidence],
    state,
    source,
    confidence,
    updatedAt: updatedAt?.toISOString() ?? null,
  }
}

export const materialListSchema = z
  .strictObject({
    materials: z.array(materialSchema),
    next: z.string().nullable().meta({ description: 'Cursor of the next page, or null on the last.' }),
  })
  .meta({ id: 'MaterialList' })

const groups = [...new Set(genericMaterials.map(({ group }) => group))]

export const MOST_LISTED = 200

/* No text of the database has what is refused here. */
const searched = (max: number) =>
  z
    .string()
    .min(1)
    .max(max)
    .regex(/^[^\p{Cc}\p{Cs}]*$/u)

export const materialListQuery = z.strictObject({
  q: searched(100).optional().meta({
    description: 'Words that stand in the id or name, in any order; capitals do not matter.',
    'x-accepted': '1 to 100 characters',
  }),
  group: searched(40)
    .optional()
    .meta({
      description: `One group: ${groups.join(', ')}, or one of the account.`,
      'x-accepted': 'the name of a group',
    }),
  of: z.enum(['catalogue', 'account']).optional().meta({
    description: 'The catalogue alone, or the materials of the account alone.',
    'x-accepted': 'catalogue or account',
  }),
  limit: z
    .string()
    .regex(/^[1-9]\d{0,5}$/)
    .default('50')
    .meta({
      description: `Entries of a page, 50 unless given; more than ${MOST_LISTED} are cut to that.`,
      'x-accepted': 'a whole number from 1 on',
    }),
  cursor: z.string().max(600).optional().meta({ description: 'From `next` of the page before.' }),
})

export const importQuery = z.strictObject({
  dryRun: z.enum(['true', 'false']).default('false').meta({
    description: 'true: every row is examined and none kept.',
    'x-accepted': 'true or false',
  }),
})

const rowIssueSchema = z.strictObject({
  column: z.string(),
  code: z.string(),
  detail: z.string(),
  accepted: z.string().optional(),
})

export const importReportSchema = z
  .strictObject({
    dryRun: z.boolean(),
    accepted: z.number().int().meta({ description: 'Rows that were kept or, in a dry run, would be.' }),
    refused: z.number().int(),
    rows: z.array(
      z.strictObject({
        row: z.number().int().meta({ description: 'From 1, the line of names not counted.' }),
        status: z.enum(['accepted', 'refused']),
        id: z.string().optional().meta({ description: 'Of the material that was made.' }),
        errors: z.array(rowIssueSchema).optional(),
      }),
    ),
  })
  .meta({ id: 'MaterialImport' })

export const materialParams = z.strictObject({
  materialId: z.string().max(60).meta({ description: 'Id of a material, as listed.' }),
})
export const ownMaterialParams = z.strictObject({
  materialId: materialIdField.meta({ description: 'Id of a material of the account.' }),
})
