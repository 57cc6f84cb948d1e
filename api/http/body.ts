import express, { type Request, type RequestHandler, type Response } from 'express'
import { malformed } from '../operation.ts'
import { Problem } from '../problems.ts'
import { sizeText } from './size-text.ts'

const readers = new Map<number, RequestHandler>()

function readerOf(limit: number): RequestHandler {
  const known = readers.get(limit) ?? express.raw({ type: () => true, limit })
  readers.set(limit, known)
  return known
}

/** The bytes of a body; their number is limited after decompression. */
export async function readBody(
  req: Request,
  res: Response,
  limit: number,
  kind: keyof typeof malformed = 'application/json',
): Promise<Buffer> {
  refuseOtherKinds(req, kind)
  await new Promise<void>((resolve, reject) =>
    readerOf(limit)(req, res, (error?: unknown) => (error ? reject(translated(error, limit)) : resolve())),
  )
  const bytes: unknown = req.body
  if (!Buffer.isBuffer(bytes) || bytes.length === 0) throw new Problem(malformed[kind], 'The body is empty.')
  return bytes
}

function translated(error: unknown, limit: number): unknown {
  if ((error as { type?: unknown }).type !== 'entity.too.large') return error
  return new Problem(
    'body-too-large',
    `A body of this operation may have ${sizeText(limit)}, counted after decompression.`,
  )
}

/* A charset other than UTF-8 is refused however it is written; parameters of other names say nothing here. */
function refuseOtherKinds(req: Request, kind: string): void {
  const [type = '', ...parameters] = (req.headers['content-type'] ?? '').toLowerCase().split(';')
  const charsets = parameters.map((p) => p.trim()).filter((p) => /^charset\s*=/.test(p))
  const known = charsets.length < 2 && charsets.every((p) => /^charset=("?)utf-8\1$/.test(p))
  if (type.trim() !== kind || !known)
    throw new Problem('unsupported-media-type', `The body of this operation is ${kind} in UTF-8.`)
}
