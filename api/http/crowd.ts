import { Problem } from '../problems.ts'

/** Calls under way, by key. */
export interface Crowd {
  /** Lets one more call of a key in, and gives what ends it; throws where there are too many. */
  enter(keyId: string): () => void
}

export function createCrowd(most: number): Crowd {
  const inside = new Map<string, number>()
  return {
    enter(keyId) {
      const count = (inside.get(keyId) ?? 0) + 1
      if (count > most) throw new Problem('too-many-at-once', undefined, { headers: { 'Retry-After': '1' } })
      inside.set(keyId, count)
      return () => {
        const left = (inside.get(keyId) ?? 1) - 1
        if (left > 0) inside.set(keyId, left)
        else inside.delete(keyId)
      }
    },
  }
}
