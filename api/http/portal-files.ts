import { randomBytes } from 'node:crypto'
import { readFile } from 'node:fs/promises'
import path from 'node:path'
import express, { type RequestHandler, type Router } from 'express'
import { pagePolicy } from './security.ts'

const PLACEHOLDER = /__CSP_NONCE__/g
const notPages = /^\/(v1|portal\/v1|support\/v1|assets|healthz|readyz)(\/|$)/

/** The built portal: named files for ever, and its one page, with a fresh nonce, for every address of a page. */
export function portalFiles(folder: string): Router {
  const router = express.Router()
  router.use(
    '/assets',
    express.static(path.join(folder, 'assets'), { immutable: true, maxAge: '1y', index: false, redirect: false }),
  )
  router.use(express.static(folder, { maxAge: '1h', index: false, redirect: false, setHeaders: refusePage }))
  router.get('/{*path}', page(path.join(folder, 'index.html')))
  return router
}

/* The page as a file has no nonce in it; it is only sent as a page. */
function refusePage(res: { setHeader(name: string, value: string): void }, file: string): void {
  if (file.endsWith('.html')) res.setHeader('Cache-Control', 'no-store')
}

function page(file: string): RequestHandler {
  return async (req, res, next) => {
    if (notPages.test(req.path) || req.accepts(['json', 'html']) !== 'html') return next()
    const html = await readFile(file, 'utf8').catch(() => undefined)
    if (html === undefined) return next()
    const nonce = randomBytes(18).toString('base64url')
    res.set({ 'Content-Security-Policy': pagePolicy(nonce), 'Cache-Control': 'no-store' })
    res.type('html').send(html.replace(PLACEHOLDER, nonce))
  }
}
