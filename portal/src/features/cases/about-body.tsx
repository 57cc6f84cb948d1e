import { Sketch } from '../../figure/sketch.tsx'
import { Formula } from './formula.tsx'
import type { Case } from './queries.ts'

/** Sketch, formula and notes. */
export function AboutBody({ description: c }: { description: Case }) {
  return (
    <div className="min-w-0">
      <h2 className="mb-4">The body</h2>
      <Sketch sketch={c.sketch} label={`${c.title}: ${c.summary}`} />
      <div className="equations" role="region" aria-label="Formula" tabIndex={0}>
        {c.formula.map((tex) => (
          <Formula key={tex} tex={tex} />
        ))}
      </div>
      <p className="prose">{c.notes}</p>
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
