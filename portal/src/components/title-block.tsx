import type { ReactNode } from 'react'

export interface Fact {
  name: string
  value: ReactNode
  full?: boolean
}

interface Props {
  title: ReactNode
  children: ReactNode
  facts?: readonly Fact[]
  /** The first sheet has a larger title. */
  large?: boolean
}

/** Name and one sentence, and beside them cells of fact. */
export function TitleBlock({ title, children, facts = [], large = false }: Props) {
  return (
    <header className={large ? 'tb large' : 'tb'}>
      <div className="name">
        <h1>{title}</h1>
        {children}
      </div>
      {facts.length > 0 && (
        <dl className="facts">
          {facts.map(({ name, value, full }) => (
            <div key={name} className={full ? 'full' : undefined}>
              <dt>{name}</dt>
              <dd>{value}</dd>
            </div>
          ))}
        </dl>
      )}
    </header>
  )
}
