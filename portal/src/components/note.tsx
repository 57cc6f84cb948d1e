import type { ReactNode } from 'react'

/** The edge shows the kind and a heading nearby, or the text itself, says it. */
export function Note({ kind, children }: { kind: 'warning' | 'caution' | 'information'; children: ReactNode }) {
  return <div className={`note ${kind}`}>{children}</div>
}
