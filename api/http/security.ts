import type { RequestHandler } from 'express'
import helmet from 'helmet'
import type { Config } from '../config.ts'

const shared = (config: Config) => ({
  strictTransportSecurity: config.https ? { maxAge: 31_536_000, includeSubDomains: true } : false,
  referrerPolicy: { policy: 'no-referrer' as const },
  frameguard: { action: 'deny' as const },
})

/** Headers of every answer that is no page: nothing may be loaded by it or frame it. */
export function secureAnswers(config: Config): RequestHandler {
  const directives = { defaultSrc: ["'none'"], baseUri: ["'none'"], formAction: ["'none'"], frameAncestors: ["'none'"] }
  return helmet({ ...shared(config), contentSecurityPolicy: { useDefaults: false, directives } })
}

/** Headers of the pages; only scripts and styles of ours run, the inline ones by their nonce. */
export function pagePolicy(nonce: string): string {
  const own = `'self' 'nonce-${nonce}'`
  return [
    "default-src 'self'",
    `script-src ${own}`,
    `style-src ${own}`,
    "img-src 'self' data:",
    "font-src 'self'",
    "connect-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ')
}
