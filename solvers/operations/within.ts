import { DomainError } from '../errors.ts'

/** Pointers of a refused input pass through the member that holds it. */
export function within<T>(prefix: string, prepare: () => T): T {
  try {
    return prepare()
  } catch (error) {
    if (!(error instanceof DomainError)) throw error
    throw new DomainError(error.issues.map((issue) => ({ ...issue, pointer: prefix + issue.pointer.slice(1) })))
  }
}
