import { ApiError, issuesByField } from '../api/api-error.ts'
import type { FormWords } from '../api/form-words.ts'
import { failureWords } from './failure-words.ts'
import { useOfflineSince } from './use-online.ts'

/** A refusal that belongs to no field of the form. */
export function FormFailure({ error, words }: { error: unknown; words: FormWords }) {
  const offline = useOfflineSince() !== undefined
  if (!error) return null
  const issues = Object.entries(issuesByField(error, words))
  const elsewhere = issues.filter(([name]) => !Object.hasOwn(words.labels, name)).map(([, text]) => text)
  if (issues.length > 0 && elsewhere.length === 0) return null
  const { title, text } = failureWords(error, offline)
  const requestId = error instanceof ApiError ? error.problem?.requestId : undefined
  return (
    <div role="alert" className="note warning mt-4">
      <b>{title.replace(/[.]?$/, '.')}</b> {elsewhere.length ? elsewhere.join(' ') : text}
      {requestId && issues.length === 0 && (
        <span className="lab block">
          Request <code>{requestId}</code>
        </span>
      )}
    </div>
  )
}
