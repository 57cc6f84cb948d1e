import type { FormWords } from '../../api/form-words.ts'
import { unitText } from '../../components/formats.ts'
import { type Field, fieldsInside, unitsOf } from './fields.ts'
import type { FormValues } from './form-values.ts'
import { isSent } from './solid-ways.ts'

/** The labels and units of the fields that stand in the form. */
export function wordsOf(fields: readonly Field[], values: FormValues): FormWords {
  const sent = fields.filter(({ name }) => isSent(fields, name, values.solid))
  const inside = sent.flatMap((field) => {
    const own = values.fields[field.name]
    return fieldsInside(field, (own as FormValues | undefined)?.kind ?? '')
  })
  const labels = (list: readonly Field[]) => Object.fromEntries(list.map(({ name, title }) => [name, title ?? name]))
  const codes = [...sent, ...inside].flatMap((field) => [...(field.unit ? [field.unit] : []), ...unitsOf(field)])
  return {
    labels: labels(sent),
    inside: labels(inside),
    units: Object.fromEntries(codes.map((code) => [code, unitText(code)])),
  }
}
