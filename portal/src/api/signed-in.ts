import { useSyncExternalStore } from 'react'

export type Who = 'member' | 'staff'

const nameOf = (who: Who) => `signed-in-${who}`
const listeners = new Set<() => void>()

function read(who: Who): boolean {
  try {
    return localStorage.getItem(nameOf(who)) !== null
  } catch {
    return false
  }
}

/**
 * A hint that a session exists, so that a sheet need not ask the server who is reading. The session itself is a cookie
 * that scripts cannot see.
 */
export function noteSignedIn(who: Who, signedIn: boolean) {
  try {
    if (signedIn) localStorage.setItem(nameOf(who), '1')
    else localStorage.removeItem(nameOf(who))
  } catch {
    // Without storage the reader signs in anew on each visit.
  }
  listeners.forEach((changed) => changed())
}

function subscribe(changed: () => void) {
  listeners.add(changed)
  addEventListener('storage', changed)
  return () => {
    listeners.delete(changed)
    removeEventListener('storage', changed)
  }
}

export function useSignedIn(who: Who): boolean {
  return useSyncExternalStore(subscribe, () => read(who))
}
