import { Link } from 'react-router-dom'
import { counted } from '../../components/formats.ts'
import { Sketch } from '../../figure/sketch.tsx'
import type { CaseSummary } from './queries.ts'

const titleOf = (family: string) => family.charAt(0).toUpperCase() + family.slice(1).replaceAll('-', ' ')

/** The cases of one family: cells of one ruled table. */
export function CaseGroup({ family, cases }: { family: string; cases: readonly CaseSummary[] }) {
  return (
    <section className="case-group" aria-label={titleOf(family)}>
      <header>
        <h2>{titleOf(family)}</h2>
        <p className="lab mt-2">{counted(cases.length, 'case')}</p>
      </header>
      <ul>
        {cases.map(({ id, title, summary, sketch }) => (
          <li key={id}>
            <Sketch sketch={sketch} />
            <Link to={`/cases/${id}`}>{title}</Link>
            <span className="lab">{id}</span>
            <span className="text-ink-2">{summary}</span>
          </li>
        ))}
      </ul>
    </section>
  )
}
