import type { UseFormRegister } from 'react-hook-form'
import { issuesByField } from '../../api/api-error.ts'
import { FormFailure } from '../../components/form-failure.tsx'
import { unitText } from '../../components/formats.ts'
import { SelectField } from '../../components/select-field.tsx'
import { TextField } from '../../components/text-field.tsx'
import type { Material, Typed } from './queries.ts'
import { confidences, labels, states, units, words } from './words.ts'

export const blank: Typed = {
  name: '',
  group: '',
  conductivity: '',
  density: '',
  specificHeat: '',
  state: '',
  source: '',
  confidence: '',
}

export const typedOf = (material: Material): Typed => ({
  ...blank,
  ...Object.fromEntries(Object.keys(blank).map((name) => [name, String(material[name as keyof Typed])])),
})

interface Props {
  register: UseFormRegister<Typed>
  error: unknown
}

const asOptions = (list: Readonly<Record<string, string>>) => [
  { value: '', text: 'choose one' },
  ...Object.entries(list).map(([value, said]) => ({ value, text: value === said ? value : `${value}: ${said}` })),
]

/** All that the contract asks of a material; what it refuses stands beside its field. */
export function MaterialFields({ register, error }: Props) {
  const errors = issuesByField(error, words)
  const text = (name: keyof Typed, hint: string) => (
    <TextField label={labels[name]} hint={hint} autoComplete="off" error={errors[name]} {...register(name)} />
  )
  return (
    <>
      {text('name', 'as your team says it')}
      {text('group', 'empty: own')}
      {text('conductivity', `in ${unitText(units.conductivity)}`)}
      {text('density', `in ${unitText(units.density)}`)}
      {text('specificHeat', `in ${unitText(units.specificHeat)}`)}
      <SelectField
        label={labels.state}
        hint="what the figures hold for"
        options={asOptions(states)}
        error={errors['state']}
        {...register('state')}
      />
      {text('source', 'a report, a data sheet, a table')}
      <SelectField
        label={labels.confidence}
        hint="how sure the figures are"
        options={asOptions(confidences)}
        error={errors['confidence']}
        {...register('confidence')}
      />
      <FormFailure error={error} words={words} />
    </>
  )
}
