import { withMinus } from '../../api/form-words.ts'
import { plain } from '../../figure/measures.ts'
import type { Answer } from '../../solving/solve.ts'

/** A tick or a cross, the sentence, and the figures that were compared. */
export function Checks({ checks }: { checks: Answer['checks'] }) {
  return (
    <ul className="checks">
      {checks.map(({ id, holds, value, limit, text }) => (
        <li key={id}>
          <svg className="tick" viewBox="0 0 14 14" role="img" aria-label={holds ? 'Holds' : 'Does not hold'}>
            <path
              d={holds ? 'M1 7.5L5.5 12L13 2' : 'M2 2L12 12M12 2L2 12'}
              fill="none"
              stroke={holds ? 'currentColor' : 'var(--clay)'}
              strokeWidth={holds ? 2 : 2.5}
            />
          </svg>
          <span>{withMinus(text)}</span>
          <span className="fig">
            {plain(value)} · limit {plain(limit)}
          </span>
        </li>
      ))}
    </ul>
  )
}
