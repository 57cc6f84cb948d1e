import { useSyncExternalStore } from 'react'

let lostAt: string | undefined = navigator.onLine ? undefined : clockText(Date.now())

/** "09:40 UTC" */
export function clockText(instant: number): string {
  return `${new Date(instant).toISOString().slice(11, 16)} UTC`
}

function subscribe(changed: () => void) {
  const update = () => {
    lostAt = navigator.onLine ? undefined : (lostAt ?? clockText(Date.now()))
    changed()
  }
  addEventListener('online', update)
  addEventListener('offline', update)
  return () => {
    removeEventListener('online', update)
    removeEventListener('offline', update)
  }
}

/** Since when there is no connection; undefined while there is one. */
export function useOfflineSince(): string | undefined {
  return useSyncExternalStore(subscribe, () => lostAt)
}
