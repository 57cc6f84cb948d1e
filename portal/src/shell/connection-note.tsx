import { useSyncExternalStore } from 'react'

let lostAt: string | undefined = navigator.onLine ? undefined : now()

function now(): string {
  return `${new Date().toISOString().slice(11, 16)} UTC`
}

function subscribe(changed: () => void) {
  const update = () => {
    lostAt = navigator.onLine ? undefined : now()
    changed()
  }
  addEventListener('online', update)
  addEventListener('offline', update)
  return () => {
    removeEventListener('online', update)
    removeEventListener('offline', update)
  }
}

export function ConnectionNote() {
  const since = useSyncExternalStore(subscribe, () => lostAt)
  return (
    <div role="status">
      {since && (
        <p className="px-6 py-3 bg-frost-wash border-b-[1.5px] border-cut">
          <b>No connection since {since}.</b> You see what was read before; forms keep what you typed.
        </p>
      )}
    </div>
  )
}
