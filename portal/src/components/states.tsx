import { type ReactNode, useEffect, useState } from 'react'
import { ApiError } from '../api/api-error.ts'
import { failureWords } from './failure-words.ts'
import { SendButton } from './send-button.tsx'
import { useOfflineSince } from './use-online.ts'
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
  const since = useOfflineSince()
  const problem = error instanceof ApiError ? error.problem : undefined
  if (problem?.status === 403) return <Denied>{problem.detail}</Denied>
  if (!problem && since) return <Offline since={since} {...(retry ? { retry } : {})} />
  const { title, text } = failureWords(error, false)
  const repeatable = !(error instanceof ApiError) || error.worthRepeating
  return (
    <div className="state">
      <BrokenBody />
      <div className="grid gap-2 justify-items-start">
        <div role="alert" className="grid gap-2">
          <h3>{title}</h3>
          <p className="prose">{text}</p>
        </div>
        {problem?.requestId && (
          <p className="lab">
            Request <code>{problem.requestId}</code>
          </p>
        )}
        {retry && repeatable && (
          <SendButton small error={error} onClick={retry}>
            Send again
          </SendButton>
        )}
      </div>
    </div>
  )
}

interface OfflineProps {
  since: string
  /** What is shown meanwhile, and how old it is. */
  shown?: string | undefined
  retry?: () => void
}

/** A gap between two bodies. */
export function Offline({ since, shown, retry }: OfflineProps) {
  return (
    <div className="state">
      <PartedBodies />
      <div className="grid gap-2 justify-items-start">
        <div role="alert" className="grid gap-2">
          <h3>No connection since {since}</h3>
          <p className="prose">
            Nothing was sent or charged. What you typed is kept, and is sent only when you say so.{shown && ` ${shown}`}
          </p>
        </div>
        {retry && (
          <SendButton small error={undefined} onClick={retry}>
            Send again
          </SendButton>
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
