import { useEffect, useState } from 'react'
import { ApiError } from '../api/api-error.ts'

/** Whole seconds until the failed call may be sent again; 0 where it may be at once. */
export function useSecondsLeft(error: unknown): number {
  const until = error instanceof ApiError ? error.notBefore : 0
  const [now, setNow] = useState(() => Date.now())
  useEffect(() => {
    if (until === 0) return
    const timer = setInterval(() => setNow(Date.now()), 250)
    return () => clearInterval(timer)
  }, [until])
  return until === 0 ? 0 : Math.max(0, Math.ceil((until - now) / 1000))
}
