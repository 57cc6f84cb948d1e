import { ScrollRegion } from '../../components/scroll-region.tsx'
import { withMinus } from '../../api/form-words.ts'
import { Note } from '../../components/note.tsx'
import type { Body } from '../../solving/body.ts'
import { BodyDrawing } from './body-drawing.tsx'
import { controlOf } from './fields.ts'
import { Formula } from './formula.tsx'
import type { Case } from './described.ts'

/** Sketch, formula and notes. */
export function AboutBody({ description: c, body }: { description: Case; body: Body }) {
  const without = c.fields.filter(
    (field) => field.required && controlOf(field) === 'choice' && !('default' in field.schema),
  )
  return (
    <div className="min-w-0">
      <h2 className="mb-4">The body</h2>
      <BodyDrawing description={c} body={body} />
      <ScrollRegion label="Formula" className="equations">
        {c.formula.map((tex) => (
          <Formula key={tex} tex={tex} />
        ))}
      </ScrollRegion>
      <p className="prose">{withMinus(c.notes)}</p>
      {without.map(({ name, schema }) => (
        <div key={name} className="mt-4">
          <Note kind="warning">{String(schema['description'])}</Note>
        </div>
      ))}
      {c.absentOutputs.length > 0 && (
        <details className="more mt-3">
          <summary>Outputs it cannot have, and why</summary>
          <ul className="pb-3 grid gap-1">
            {c.absentOutputs.map(({ name, reason }) => (
              <li key={name} className="prose">
                <code>{name}</code> {reason}
              </li>
            ))}
          </ul>
        </details>
      )}
    </div>
  )
}
