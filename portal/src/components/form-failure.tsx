import { ApiError, issuesByField } from '../api/api-error.ts'

/** A refusal that belongs to no field. */
export function FormFailure({ error, fields }: { error: unknown; fields: readonly string[] }) {
  if (!error) return null
  const issues = Object.entries(issuesByField(error))
  const elsewhere = issues.filter(([name]) => !fields.includes(name)).map(([, text]) => text)
  if (issues.length > 0 && elsewhere.length === 0) return null
  const problem = error instanceof ApiError ? error.problem : undefined
  return (
    <div role="alert" className="note warning mt-4">
      <b>{problem?.title ?? 'The answer did not arrive.'}</b>{' '}
      {elsewhere.length ? elsewhere.join(' ') : (problem?.detail ?? 'What you typed is kept. Send it again.')}
    </div>
  )
}
