import { Fragment } from 'react'
import type { UseFormRegisterReturn } from 'react-hook-form'
import type { Refusal } from '../../api/refusal.ts'
import type { Body } from '../../solving/body.ts'
import { CaseField } from './case-field.tsx'
import { FieldGroup } from './field-group.tsx'
import type { Field } from './fields.ts'
import type { FormValues } from './form-values.ts'
import { refusalAt } from './refusals.ts'
import { SolidChoice } from './solid-choice.tsx'
import { isSent, waysOf } from './solid-ways.ts'

export interface ListProps {
  /** All fields of the form, or of one group of it. */
  fields: readonly Field[]
  /** Those of them that stand here. */
  shown?: readonly Field[]
  values: FormValues
  example: Body
  refusals: readonly Refusal[]
  /** Where the fields stand in the body: "" or "left/". */
  path: string
  /** Where their boxes stand in the values of the form: "" or "fields.left.". */
  box: string
  register(box: string): UseFormRegisterReturn
}

/** The fields that are sent, with the choice of how a solid is stated before the first that depends on it. */
export function FieldList({ fields, shown = fields, ...list }: ListProps) {
  const { values, example, refusals, path, box, register } = list
  const ways = waysOf(fields).flat()
  const firstWay = fields.find(({ name }) => ways.includes(name))
  return shown.map((field) => (
    <Fragment key={field.name}>
      {field === firstWay && <SolidChoice fields={fields} example={example} register={register(`${box}solid`)} />}
      {isSent(fields, field.name, values.solid) &&
        ((field.fields && !('items' in field.schema)) || field.kinds ? (
          <FieldGroup field={field} {...list} />
        ) : (
          <CaseField
            field={field}
            path={path + field.name}
            error={refusalAt(refusals, path + field.name)}
            register={register(`${box}fields.${field.name}`)}
            registerUnit={register(`${box}units.${field.name}`)}
          />
        ))}
    </Fragment>
  ))
}
