import type { Deprecation } from '../operation.ts'

/** What each answer of an operation that will end says of that: RFC 9745 and RFC 8594. */
export function deprecationHeaders(
  { since, sunset, successor }: Deprecation,
  publicUrl: string,
): Record<string, string> {
  const links = [`<${publicUrl}/changelog>; rel="deprecation"; type="text/html"`]
  if (successor) links.push(`<${successor}>; rel="successor-version"`)
  return {
    Deprecation: `@${Math.floor(since.getTime() / 1000)}`,
    Sunset: sunset.toUTCString(),
    Link: links.join(', '),
  }
}
