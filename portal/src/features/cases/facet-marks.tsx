import { FacetDrawing } from './facet-drawing.tsx'
import { type Narrowing, countWith } from './narrowing.ts'
import type { CaseList } from './described.ts'

interface Props {
  list: CaseList
  narrowing: Narrowing
  onMark(facet: string, value: string, on: boolean): void
}

/** The values of each facet, drawn, with how many cases each would show. */
export function FacetMarks({ list, narrowing, onMark }: Props) {
  return list.facets.map((facet) => (
    <fieldset key={facet.id} className="leg">
      <legend className="sr-only">{facet.title}</legend>
      <span className="leg-name" aria-hidden="true">
        {facet.title}
      </span>
      <div className="opts">
        {facet.values.map(({ id, title }) => {
          const count = countWith(list, narrowing, facet, id)
          return (
            <label key={id} className={count === 0 ? 'pick none' : 'pick'}>
              <input
                type="checkbox"
                checked={narrowing.marks[facet.id]?.includes(id) ?? false}
                onChange={(event) => onMark(facet.id, id, event.target.checked)}
              />
              <FacetDrawing facet={facet.id} value={id} />
              <span>
                {title}{' '}
                <span className="lab">
                  {count}
                  <span className="sr-only">{count === 1 ? ' case' : ' cases'}</span>
                </span>
              </span>
            </label>
          )
        })}
      </div>
    </fieldset>
  ))
}
