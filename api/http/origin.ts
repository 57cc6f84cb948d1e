import type { Request } from 'express'
import { Problem } from '../problems.ts'

/**
 * A change must come from a page of ours: browsers state the origin of every such call, and which site it is,
 * and let no page set these headers.
 */
export function refuseCrossSite(req: Request, origins: readonly string[]): void {
  const { origin, 'sec-fetch-site': site } = req.headers
  if (site !== undefined && site !== 'same-origin') throw new Problem('cross-site')
  if (origin === undefined || !origins.includes(origin)) throw new Problem('cross-site')
}
