import type { UseFormRegisterReturn } from 'react-hook-form'
import { Symbol } from '../../components/symbol.tsx'
import type { Body } from '../../solving/body.ts'
import type { Field } from './fields.ts'
import { wayName, waysOf } from './solid-ways.ts'

interface Props {
  fields: readonly Field[]
  example: Body
  register: UseFormRegisterReturn
}

/** How a solid states its heat capacity, or all of itself by a material: exactly one way is sent. */
export function SolidChoice({ fields, example, register }: Props) {
  const fieldOf = (name: string) => fields.find((field) => field.name === name)
  const ways = waysOf(fields)
  const given = ways.flat().some((name) => name in example)
  const legend = ways.flat().includes('material') ? 'Solid by' : 'Heat capacity by'
  return (
    <fieldset className="field" data-choice>
      <legend className="sr-only">{legend}</legend>
      <span aria-hidden="true" />
      <span className="label" aria-hidden="true">
        {legend}
        <span className="hint">exactly one way is sent</span>
      </span>
      <span className="control seg justify-self-start">
        {[...ways, ...(given ? [] : [[]])].map((way) => (
          <label key={wayName(way)}>
            <input type="radio" value={wayName(way)} {...register} />
            {way.length === 0 ? (
              'none'
            ) : (
              <>
                <Signs of={way.map((name) => fieldOf(name)?.symbol ?? name)} />
                <span className="sr-only">
                  {way.map((name) => fieldOf(name)?.title?.toLowerCase() ?? name).join(' and ')}
                </span>
              </>
            )}
          </label>
        ))}
      </span>
    </fieldset>
  )
}

/** Symbols slanted, a plain name upright. */
function Signs({ of }: { of: readonly string[] }) {
  const word = of.length === 1 && of[0]!.length > 3
  if (word) return <span aria-hidden="true">{of[0]}</span>
  return (
    <i aria-hidden="true">
      <Symbol of={of.join(', ')} />
    </i>
  )
}
