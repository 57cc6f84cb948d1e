import { useId } from 'react'
import { withMinus } from '../../api/form-words.ts'
import type { Body } from '../../solving/body.ts'
import { FieldList, type ListProps } from './field-list.tsx'
import { type Field, fieldsInside, kindTitle } from './fields.ts'
import type { FormValues } from './form-values.ts'
import { refusalAt } from './refusals.ts'

type Props = Omit<ListProps, 'fields' | 'shown'> & { field: Field }

/** Fields that belong together, under their name; where they depend on a kind, the choice of it comes first. */
export function FieldGroup({ field, values, example, refusals, path, box, register }: Props) {
  const id = useId()
  const own = values.fields[field.name] as FormValues
  const inside = fieldsInside(field, own.kind)
  const at = `${path}${field.name}`
  const error = refusalAt(refusals, at, [...inside.map(({ name }) => `${at}/${name}`)])
  const described = [field.hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined
  return (
    <fieldset className={error ? 'group bad' : 'group'} data-field={at} aria-describedby={described}>
      <legend>{field.title ?? field.name}</legend>
      {field.hint && (
        <p id={`${id}-hint`} className="hint">
          {withMinus(field.hint)}
        </p>
      )}
      {field.kinds && (
        <Kinds
          kinds={field.kinds}
          optional={!field.required}
          error={error ? `${id}-error` : undefined}
          register={register(`${box}fields.${field.name}.kind`)}
        />
      )}
      {error && (
        <p id={`${id}-error`} className="err">
          {error}
        </p>
      )}
      <FieldList
        fields={inside}
        values={own}
        example={(example[field.name] ?? {}) as Body}
        refusals={refusals}
        path={`${at}/`}
        box={`${box}fields.${field.name}.`}
        register={register}
      />
    </fieldset>
  )
}

interface KindsProps {
  kinds: NonNullable<Field['kinds']>
  optional: boolean
  error: string | undefined
  register: ReturnType<ListProps['register']>
}

function Kinds({ kinds, optional, error, register }: KindsProps) {
  const options = [...(optional ? [{ kind: '', title: 'Not given' }] : []), ...kinds]
  return (
    <div className="seg my-2" role="radiogroup" aria-label="Kind" data-choice>
      {options.map((one) => (
        <label key={one.kind}>
          <input
            type="radio"
            value={one.kind}
            aria-invalid={error ? true : undefined}
            aria-describedby={error}
            {...register}
          />
          {kindTitle(one)}
        </label>
      ))}
    </div>
  )
}
