import { useSyncExternalStore } from 'react'

const NAME = 'signed-in'
const listeners = new Set<() => void>()

function read(): boolean {
  try {
    return localStorage.getItem(NAME) !== null
  } catch {
    return false
  }
}

/**
 * A hint that a session exists, so that public sheets need not ask the server who is reading. The session itself is a
 * cookie that scripts cannot see.
 */
export function noteSignedIn(signedIn: boolean) {
  try {
    if (signedIn) localStorage.setItem(NAME, '1')
    else localStorage.removeItem(NAME)
  } catch {
    // Without storage the public sheets show what a stranger sees.
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

export function useSignedIn(): boolean {
  return useSyncExternalStore(subscribe, read)
}
