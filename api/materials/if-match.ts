/** Whether a header If-Match holds a version by its tag; `*` holds any. Weak tags never do, as RFC 9110 says. */
export function matchesTag(ifMatch: string, tag: string): boolean {
  if (ifMatch.trim() === '*') return true
  const tags: readonly string[] = ifMatch.match(/(W\/)?"[^"]*"/g) ?? []
  return tags.includes(tag)
}
