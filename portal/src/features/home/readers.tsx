import { scientific, whole } from '../../components/formats.ts'
import { Band } from '../../components/sheet.tsx'
import type { Answer } from '../../solving/solve.ts'

/** One call seen by three people, told with the answer above. */
export function Readers({ answer }: { answer: Answer | undefined }) {
  const bound = answer?.accuracy.bound.temperature?.absolute
  const readers = [
    {
      name: 'Integrator',
      text: 'Finds the case, tries it with own numbers, copies the call, and shows the answer with its source.',
      see: answer && [
        `200  ${answer.case}/solve`,
        `4 temperatures · bound ${scientific(bound ?? 0)} K`,
        `${answer.checks.filter(({ holds }) => holds).length} checks hold · ${answer.cautions.length} cautions`,
      ],
    },
    {
      name: 'Account owner',
      text: 'Creates, limits and revokes keys, and sees each call as one row of the ledger.',
      see: answer && ['charge', `${whole(Math.max(10, answer.points))} points`, 'by day, key and case'],
    },
    {
      name: 'Support',
      text: 'Opens a call by its id with a recorded reason, sees what was refused and explains it.',
      see: answer && [
        'the call, its status, its ledger rows',
        'never a key, never a mail address',
        'the look is on record',
      ],
    },
  ]
  return (
    <Band label="One call, three readers">
      <h2>One call, three readers</h2>
      <p className="prose mt-1 mb-6">
        Every call has one id. Three people can cut through it, each at their own place.
      </p>
      <ol className="readers">
        {readers.map(({ name, text, see }, i) => {
          const letter = 'ABC'[i]
          return (
            <li key={name}>
              <span className="cutmark">
                {letter}–{letter}
              </span>
              <h3>{name}</h3>
              <p className="prose">{text}</p>
              {see && <div className="see">{see.join('\n')}</div>}
            </li>
          )
        })}
      </ol>
    </Band>
  )
}
