import { useEffect, useState } from 'react'

/** The value once it has not changed for a moment. */
export function useSettled<V>(value: V, milliseconds = 180): V {
  const [settled, setSettled] = useState(value)
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), milliseconds)
    return () => clearTimeout(timer)
  }, [value, milliseconds])
  return settled
}
