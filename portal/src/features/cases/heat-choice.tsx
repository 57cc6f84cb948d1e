import type { UseFormRegisterReturn } from 'react-hook-form'
import { Symbol } from '../../components/symbol.tsx'
import { wayName, waysOf } from './form-values.ts'
import type { Case } from './queries.ts'

/** How the solid states its heat capacity: exactly one way is sent. */
export function HeatChoice({ description: c, register }: { description: Case; register: UseFormRegisterReturn }) {
  const symbolOf = (name: string) => c.fields.find((field) => field.name === name)?.symbol ?? name
  const labelOf = (name: string) => c.fields.find((field) => field.name === name)?.title?.toLowerCase() ?? name
  const ways = waysOf(c)
  const given = ways.flat().some((name) => name in c.example)
  return (
    <fieldset className="field">
      <legend className="sr-only">Heat capacity by</legend>
      <span aria-hidden="true" />
      <span className="label" aria-hidden="true">
        Heat capacity by
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
                <i aria-hidden="true">
                  <Symbol of={way.map(symbolOf).join(', ')} />
                </i>
                <span className="sr-only">{way.map(labelOf).join(' and ')}</span>
              </>
            )}
          </label>
        ))}
      </span>
    </fieldset>
  )
}
