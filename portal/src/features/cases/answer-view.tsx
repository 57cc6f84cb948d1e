import type { ReactNode } from 'react'
import { Link } from 'react-router-dom'
import { type FormWords, inFormWords, withMinus } from '../../api/form-words.ts'
import { CopyButton } from '../../components/copy-button.tsx'
import { counted, whole } from '../../components/formats.ts'
import { jsonText } from '../../components/json-text.ts'
import { Note } from '../../components/note.tsx'
import { plain } from '../../figure/measures.ts'
import { type Answer, isFull } from '../../solving/solve.ts'
import { Checks } from './checks.tsx'
import { wordsOf } from './form-labels.ts'
import { valuesOf } from './form-values.ts'
import { OutputValues } from './output-values.tsx'
import type { Case } from './described.ts'
import { type Stale, StaleFrame } from './stale-frame.tsx'
import type { Solved } from './use-solve.ts'

interface Props {
  description: Case
  solved: Solved
  stale: Stale | undefined
}

/** The answer in words: numbers with their error limits, checks, warnings, cautions, sources. */
export function AnswerView({ description: c, solved: { body, answer }, stale }: Props) {
  return (
    <div className="min-w-0" aria-live="polite">
      <h2 className="mb-3">{stale ? 'The answer of the last solve' : 'The answer'}</h2>
      <StaleFrame stale={stale}>
        <OutputValues description={c} answer={answer} />
        {isFull(answer) ? (
          <Whole description={c} answer={answer} words={wordsOf(c.fields, valuesOf(c.fields, body))} />
        ) : (
          <>
            <h3 className="mt-5">Warnings</h3>
            <p className="prose">{answer.warnings.join(', ') || 'None.'}</p>
          </>
        )}
        <div className="btnrow mt-5">
          <CopyButton text={jsonText(answer)}>
            {stale ? 'Copy the answer of the last solve' : 'Copy the answer'}
          </CopyButton>
        </div>
      </StaleFrame>
    </div>
  )
}

function Whole({ description: c, answer, words }: { description: Case; answer: Answer; words: FormWords }) {
  const { accuracy, numbers } = answer
  return (
    <>
      <dl className="dl my-5 border-y-[1.5px] border-ink">
        {Object.entries(numbers).map(([name, value]) => (
          <Row
            key={name}
            name={spoken(name)}
            value={(Array.isArray(value) ? value : [value]).map((v) => plain(v as number, 6)).join(', ')}
          />
        ))}
        {answer.errs && (
          <Row
            name="the model errs"
            value={`${answer.errs}: it reaches a temperature ${answer.errs === 'early' ? 'before' : 'after'} the body that was stated`}
          />
        )}
        <Row
          name="method"
          value={`${accuracy.method.join(', ')}${accuracy.terms ? `, ${accuracy.terms} terms` : ''}`}
        />
        <Row name="temperature scale" value={`${plain(accuracy.scale, 6)} K`} />
        <Row name="price" value={<Price points={answer.points} least={c.leastCharge} />} />
      </dl>
      <p className="prose">{withMinus(accuracy.note)}</p>
      {answer.checks.length > 0 && <h3 className="mt-5">Checks</h3>}
      <Checks checks={answer.checks} />
      {answer.warnings.length > 0 && <h3 className="mt-5">Warnings</h3>}
      {answer.warnings.map(({ code, text }) => (
        <Note key={code} kind="warning">
          <Link to={`/problems/${code}`}>
            <code>{code}</code>
          </Link>
          <br />
          {inFormWords(text, words)}
        </Note>
      ))}
      {answer.cautions.length > 0 && <h3 className="mt-5">Cautions</h3>}
      <div className="grid gap-3 mt-2">
        {answer.cautions.map(({ id, text }) => (
          <Note key={id} kind="caution">
            {withMinus(text)}
          </Note>
        ))}
      </div>
      <h3 className="mt-5">Sources</h3>
      {answer.sources.map((source) => (
        <p key={source} className="prose">
          {source}
        </p>
      ))}
    </>
  )
}

function Row({ name, value }: { name: string; value: ReactNode }) {
  return (
    <>
      <dt>{name}</dt>
      <dd>{value}</dd>
    </>
  )
}

function Price({ points, least }: { points: number; least: number }) {
  return (
    <>
      {counted(points, 'point')}; charged <span data-charged>{whole(Math.max(points, least))}</span>
      {points < least ? ', the least a call costs' : ''}
    </>
  )
}

const units: readonly (readonly [RegExp, string])[] = [
  [/(depth|length)$/, 'm'],
  [/(time constant|time|lag|f value|valid from|valid until)$/, 's'],
  [/drift rate$/, 'K/s'],
]

/** "penetrationDepth" as "penetration depth, m"; numbers with a name of their own by their letters. */
function spoken(name: string): string {
  if (name === 'fourier') return 'Fo'
  if (name === 'biot') return 'Bi'
  const words = name.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`)
  const unit = units.find(([end]) => end.test(words))?.[1]
  return unit ? `${words}, ${unit}` : words
}
