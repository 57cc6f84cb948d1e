import { Suspense, lazy, useState } from 'react'
import { Band } from '../../components/sheet.tsx'
import type { Body } from '../../solving/body.ts'
import type { Operation } from './asking.ts'
import type { Case } from './described.ts'

const OperationForm = lazy(() => import('./operation-form.tsx').then((read) => ({ default: read.OperationForm })))

/** What else can be asked of the same body, each with its path, an example and a form to try it. */
export function OperationsBand({ description: c, solved }: { description: Case; solved: Body }) {
  const others = c.operations.filter(({ id }) => id !== 'solve')
  if (others.length === 0) return null
  return (
    <Band label="Other questions">
      <h2 className="mb-3">What else it answers</h2>
      {others.map((operation) => (
        <Question key={operation.id} description={c} operation={operation} solved={solved} />
      ))}
    </Band>
  )
}

/** Its form is made when it is first opened. */
function Question({ operation, ...rest }: { description: Case; operation: Operation; solved: Body }) {
  const [opened, setOpened] = useState(false)
  return (
    <details
      className="more"
      data-operation={operation.id}
      onToggle={(event) => event.currentTarget.open && setOpened(true)}
    >
      <summary>
        {operation.title} <code className="lab">{operation.path}</code>
      </summary>
      {opened && (
        <Suspense fallback={null}>
          <OperationForm operation={operation} {...rest} />
        </Suspense>
      )}
    </details>
  )
}
