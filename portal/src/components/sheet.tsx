import type { ReactNode } from 'react'
import { Foot } from './foot.tsx'

interface Props {
  /** Of the document and of the foot. */
  title: string
  children: ReactNode
}

/** One sheet of the set: frame, scale at the binding edge, foot. */
export function Sheet({ title, children }: Props) {
  return (
    <main id="main" className="sheet" tabIndex={-1}>
      <title>{`${title} · Soakstone`}</title>
      {children}
      <Foot title={title} />
    </main>
  )
}

interface BandProps {
  children: ReactNode
  tight?: boolean
  label?: string
}

export function Band({ children, tight = false, label }: BandProps) {
  return (
    <section className={tight ? 'band tight' : 'band'} aria-label={label}>
      {children}
    </section>
  )
}
