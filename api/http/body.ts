import express, { type Request, type Response } from 'express'
import { Problem } from '../problems.ts'
import { BODY_LIMIT, parseJson } from './json.ts'

const readRaw = express.raw({ type: () => true, limit: BODY_LIMIT })

/** The body of a request as a JSON value; its size is counted after decompression. */
export async function readJson(req: Request, res: Response): Promise<unknown> {
  refuseOtherKinds(req)
  await new Promise<void>((resolve, reject) =>
    readRaw(req, res, (error?: unknown) => (error ? reject(error) : resolve())),
  )
  const bytes: unknown = req.body
  if (!Buffer.isBuffer(bytes) || bytes.length === 0) throw new Problem('malformed-json', 'The body is empty.')
  return parseJson(decode(bytes))
}

function refuseOtherKinds(req: Request): void {
  const [type = '', ...parameters] = (req.headers['content-type'] ?? '').toLowerCase().split(';')
  if (type.trim() !== 'application/json') throw new Problem('unsupported-media-type')
  const charset = parameters.map((p) => p.trim()).find((p) => p.startsWith('charset='))
  if (charset && !/^charset="?utf-8"?$/.test(charset)) throw new Problem('unsupported-media-type')
}

function decode(bytes: Buffer): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes)
  } catch {
    throw new Problem('malformed-json', 'The body is not UTF-8.')
  }
}
