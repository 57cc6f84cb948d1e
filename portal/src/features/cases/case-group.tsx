import { Link } from 'react-router-dom'
import { counted } from '../../components/formats.ts'
import { Sketch } from '../../figure/sketch/sketch.tsx'
import type { CaseList, CaseSummary } from './described.ts'

interface Props {
  family: CaseList['families'][number]
  cases: readonly CaseSummary[]
}

/** The cases of one family: cells of one ruled table. */
export function CaseGroup({ family: { title, text }, cases }: Props) {
  return (
    <section className="case-group" aria-label={title}>
      <header>
        <h2>{title}</h2>
        <p className="mt-1 text-ink-2">{text}</p>
        <p className="lab mt-2">{counted(cases.length, 'case')}</p>
      </header>
      <ul>
        {cases.map(({ id, title: name, summary, sketch }) => (
          <li key={id}>
            <Sketch sketch={sketch} />
            <Link to={`/cases/${id}`}>{name}</Link>
            <span className="lab">{id}</span>
            <span className="text-ink-2">{summary}</span>
          </li>
        ))}
      </ul>
    </section>
  )
}
