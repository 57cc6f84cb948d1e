import { ApiError } from '../api/api-error.ts'

export interface FailureWords {
  title: string
  text: string
}

/** A failure as a reader of a page is told of it. */
export function failureWords(error: unknown, offline: boolean): FailureWords {
  const problem = error instanceof ApiError ? error.problem : undefined
  if (!problem)
    return offline
      ? { title: 'No connection', text: 'Nothing was sent or charged. What you typed is kept.' }
      : { title: 'The answer did not arrive', text: 'What you typed is kept. Send it again.' }
  if (problem.code === 'rate-limited')
    return { title: problem.title, text: 'Nothing was charged. What you typed is kept.' }
  return { title: problem.title, text: problem.detail }
}
