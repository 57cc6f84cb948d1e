import { CodeBlock } from '../../components/code-block.tsx'
import { JsonCode } from '../../components/json-code.tsx'
import { jsonText } from '../../components/json-text.ts'
import { ButtonLink } from '../../components/button.tsx'
import { isFull } from '../../solving/solve.ts'
import { SnippetTabs } from './snippet-tabs.tsx'
import type { Case } from './described.ts'
import { type Stale, StaleFrame } from './stale-frame.tsx'
import type { Solved } from './use-solve.ts'

interface Props {
  description: Case
  solved: Solved
  stale: Stale | undefined
}

/** Exactly the call that was solved, in every language, and its answer. */
export function CallView({ description: c, solved: { body, answer }, stale }: Props) {
  const copy = stale ? 'Copy the last solve' : 'Copy'
  const path = c.operations.find(({ id }) => id === 'solve')!.path
  const json = jsonText(answer)
  return (
    <div className="min-w-0">
      <h2 className="mb-3">{stale ? 'The call of the last solve' : 'The call'}</h2>
      <StaleFrame stale={stale}>
        <SnippetTabs path={path} body={body} caption={stale ? 'of the last solve' : 'with your numbers'} copy={copy} />
        <p className="prose mt-3">
          It reads the key from <code>SOAK_KEY</code>.
        </p>
        <div className="btnrow mt-3 mb-6">
          <ButtonLink to="/keys">Get a key</ButtonLink>
        </div>
        <CodeBlock
          caption={`Answer · 200${isFull(answer) ? '' : ' · compact'}${stale ? ' · of the last solve' : ''}`}
          text={json}
          label="Answer as JSON"
          copy={copy}
          tall
        >
          <JsonCode text={json} />
        </CodeBlock>
      </StaleFrame>
    </div>
  )
}
