import { useMutation } from '@tanstack/react-query'
import { type FormEvent, useId, useState } from 'react'
import { withMinus } from '../../api/form-words.ts'
import { CodeBlock } from '../../components/code-block.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { JsonCode } from '../../components/json-code.tsx'
import { jsonText } from '../../components/json-text.ts'
import { SendButton } from '../../components/send-button.tsx'
import { tryQuestion } from '../../solving/solve.ts'
import type { Body } from '../../solving/body.ts'
import { type Operation, ownNames, ownText, questionOf } from './asking.ts'
import type { Case } from './described.ts'
import { SnippetTabs } from './snippet-tabs.tsx'

interface Props {
  description: Case
  operation: Operation
  /** The body that was last solved. */
  solved: Body
}

const units: Record<string, string> = { target: '°C', depth: 'm', radius: 'm', time: 's', until: 's', from: 's' }

/** A question with its own few fields, asked of the numbers that stand above. */
export function OperationForm({ description: c, operation, solved }: Props) {
  const id = useId()
  const names = ownNames(c, operation)
  const [typed, setTyped] = useState(() =>
    Object.fromEntries(names.map((name) => [name, ownText(c, operation.example[name])])),
  )
  const question = questionOf(c, operation, solved, typed)
  const asking = useMutation({ mutationFn: (body: Body) => tryQuestion(c.id, operation.id, body) })
  const send = (event: FormEvent) => {
    event.preventDefault()
    asking.mutate(question)
  }
  return (
    <form onSubmit={send} noValidate className="grid grid-cols-1 gap-4 pb-4" aria-label={operation.title}>
      <p className="prose">{withMinus(operation.summary)}</p>
      <div>
        {names.map((name) => (
          <div key={name} className="field plain" data-own={name}>
            <span className="label">
              <label htmlFor={`${id}-${name}`}>{labelOf(name)}</label>
              {units[name] && <span className="hint">{`in ${units[name]}`}</span>}
            </span>
            <span className="control">
              <input
                id={`${id}-${name}`}
                className="box"
                autoComplete="off"
                value={typed[name] ?? ''}
                onChange={(event) => setTyped({ ...typed, [name]: event.target.value })}
              />
            </span>
          </div>
        ))}
      </div>
      <FormFailure error={asking.error} words={{ labels: {} }} />
      <div className="btnrow">
        <SendButton small type="submit" error={asking.error}>
          {asking.isPending ? 'Asking' : 'Ask'}
        </SendButton>
      </div>
      <SnippetTabs path={operation.path} body={question} caption={operation.path} of={`${operation.title}, `} />
      <div aria-live="polite">
        {asking.data !== undefined && (
          <CodeBlock caption="Answer · 200" text={jsonText(asking.data)} label={`${operation.title}, answer`} tall>
            <JsonCode text={jsonText(asking.data)} />
          </CodeBlock>
        )}
      </div>
    </form>
  )
}

/** "biotValues" as "Biot values". */
function labelOf(name: string): string {
  const words = name.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`)
  return words.charAt(0).toUpperCase() + words.slice(1)
}
