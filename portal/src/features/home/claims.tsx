import { Band } from '../../components/sheet.tsx'

const claims = [
  {
    figure: '≤ 10⁻¹²',
    text: 'of the driving difference, plus the rounding of the number itself: the largest error of a temperature. Each answer states its own limit.',
  },
  { figure: '0 bytes', text: 'differ when the same input meets the same solver version again. The ETag says so.' },
  {
    figure: '0 points',
    text: 'are charged for a call that was refused or failed. The least charge for an answer is 10.',
  },
  { figure: '0 points', text: 'can be spent past your quota. It is taken in one step, before the work.' },
  { figure: 'SHA-256', text: 'is all we keep of a key. The key itself is shown once and cannot be read again.' },
  { figure: '200\u202f000 points', text: 'fit in one call. A larger one is refused before any work.' },
]

export function Claims() {
  return (
    <Band label="True by construction">
      <h2 className="mb-5">True by construction</h2>
      <dl className="law">
        {claims.map(({ figure, text }) => (
          <div key={text}>
            <dt>{text}</dt>
            <dd>{figure}</dd>
          </div>
        ))}
      </dl>
    </Band>
  )
}
