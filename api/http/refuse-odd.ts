import type { RequestHandler } from 'express'
import { Problem } from '../problems.ts'

/** What HTTP itself refuses, and Node would refuse with an empty answer. */
export const refuseOdd: RequestHandler = (req, _res, next) => {
  const { expect } = req.headers
  if (expect !== undefined && !/^100-continue$/i.test(expect)) throw new Problem('expectation-failed')
  const hosts = req.headersDistinct['host']?.length ?? 0
  if (hosts > 1 || (hosts === 0 && req.httpVersion !== '1.0'))
    throw new Problem('malformed-request', 'A request has one Host header.')
  next()
}
