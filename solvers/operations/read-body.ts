import type { z } from 'zod'
import { DomainError, type Issue } from '../errors.ts'
import { readLists, withLists } from '../statement/number-lists.ts'
import { issuesOf } from '../statement/validate.ts'

/** A body by its schema, its long lists read apart; throws a DomainError with every issue found. */
export function readBody(
  schema: z.ZodObject,
  body: unknown,
  told: (issue: Issue) => Issue = (issue) => issue,
): Record<string, unknown> {
  const { body: brief, lists, issues } = readLists(schema, body)
  const parsed = schema.safeParse(brief, { reportInput: true })
  if (!parsed.success) issues.unshift(...issuesOf(schema, parsed.error).map(told))
  if (!parsed.success || issues.length > 0) throw new DomainError(issues)
  return withLists(parsed.data, lists)
}
