import type { Refusal } from '../../api/refusal.ts'

/** The first refusal of a field or of anything inside it, but for what is shown with a field of its own. */
export function refusalAt(
  refusals: readonly Refusal[],
  path: string,
  apart: readonly string[] = [],
): string | undefined {
  const inside = (whole: string, part: string) => part === whole || part.startsWith(`${whole}/`)
  return refusals.find((one) => inside(path, one.path) && !apart.some((other) => inside(other, one.path)))?.text
}
