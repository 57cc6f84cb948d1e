import { useMutation } from '@tanstack/react-query'
import { useRef, useState } from 'react'
import type { Body } from '../../solving/body.ts'
import { type Answer, type CompactAnswer, trySolve } from '../../solving/solve.ts'

export interface Solved {
  body: Body
  answer: Answer | CompactAnswer
  /** When the answer arrived. */
  at: number
}

/** Solves one body at a time: a newer one, or Cancel, ends the one before. */
export function useSolve(caseId: string, example: Body) {
  const running = useRef<AbortController>(undefined)
  const [asked, setAsked] = useState(example)
  const [solved, setSolved] = useState<Solved>()
  const { mutate, reset, isPending, error } = useMutation({
    mutationFn: (body: Body) => {
      const own = new AbortController()
      running.current = own
      return trySolve(caseId, body, own.signal)
    },
    onSuccess: (answer, body) => setSolved({ body, answer, at: Date.now() }),
  })
  return {
    /** The body that was last sent. */
    asked,
    solved,
    pending: isPending,
    error,
    solve(body: Body) {
      running.current?.abort()
      setAsked(body)
      mutate(body)
    },
    cancel() {
      running.current?.abort()
      reset()
    },
  }
}
