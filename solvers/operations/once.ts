import type { Case } from '../case.ts'

/** Made once a case, since building a schema costs more than a solve. */
export function once<T>(make: (c: Case) => T): (c: Case) => T {
  const known = new Map<string, T>()
  return (c) => {
    if (!known.has(c.id)) known.set(c.id, make(c))
    return known.get(c.id)!
  }
}
