import { type ReactNode, useEffect, useState } from 'react'
import { ApiError } from '../api/api-error.ts'
import { useOnline } from './use-online.ts'
import { Button } from './button.tsx'
import { BrokenBody, ClosedBody, EmptyBody, FillingBody, PartedBodies } from './state-drawings.tsx'

interface Props {
  title: string
  children: ReactNode
}

export function Empty({ title, children }: Props) {
  return (
    <div className="state">
      <EmptyBody />
      <div className="grid gap-2 justify-items-start">
        <h3>{title}</h3>
        {children}
      </div>
    </div>
  )
}

/** Shown only when there has been something to wait for: after 300 ms. */
export function Loading({ what }: { what: string }) {
  const [late, setLate] = useState(false)
  useEffect(() => {
    const timer = setTimeout(() => setLate(true), 300)
    return () => clearTimeout(timer)
  }, [])
  return (
    <div role="status" className="min-h-[125px]">
      {late && (
        <div className="state">
          <FillingBody />
          <p className="prose">{what}</p>
        </div>
      )}
    </div>
  )
}

/** What failed, whether it cost anything, and what to do. */
export function Failed({ error, retry }: { error: unknown; retry?: () => void }) {
  const online = useOnline()
  const problem = error instanceof ApiError ? error.problem : undefined
  if (problem?.status === 403) return <Denied>{problem.detail}</Denied>
  return (
    <div role="alert" className="state">
      {online ? <BrokenBody /> : <PartedBodies />}
      <div className="grid gap-2 justify-items-start">
        <h3>{problem ? problem.title : online ? 'The answer did not arrive' : 'No connection'}</h3>
        <p className="prose">{problem ? problem.detail : 'Nothing was charged. What you typed is kept.'}</p>
        {problem?.requestId && (
          <p className="lab">
            Request <code>{problem.requestId}</code>
          </p>
        )}
        {retry && (
          <Button small onClick={retry}>
            Send again
          </Button>
        )}
      </div>
    </div>
  )
}

export function Denied({ children }: { children: ReactNode }) {
  return (
    <div role="alert" className="state">
      <ClosedBody />
      <div>
        <h3>Not in your role</h3>
        <p className="prose">{children}</p>
      </div>
    </div>
  )
}
