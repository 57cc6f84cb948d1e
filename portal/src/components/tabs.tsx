import { type KeyboardEvent, type ReactNode, useId, useState } from 'react'

interface Props {
  label: string
  tabs: readonly { name: string; content: ReactNode }[]
}

/** Panels of which one is shown; arrows move along the names. */
export function Tabs({ label, tabs }: Props) {
  const id = useId()
  const [chosen, setChosen] = useState(0)
  const move = (event: KeyboardEvent<HTMLDivElement>) => {
    const step = { ArrowRight: 1, ArrowLeft: -1 }[event.key]
    if (!step) return
    const next = (chosen + step + tabs.length) % tabs.length
    setChosen(next)
    event.currentTarget.querySelectorAll<HTMLElement>('[role=tab]')[next]?.focus()
  }
  return (
    <div>
      <div className="tabs" role="tablist" aria-label={label} onKeyDown={move}>
        {tabs.map(({ name }, i) => (
          <button
            key={name}
            id={`${id}-${i}`}
            role="tab"
            type="button"
            aria-selected={i === chosen}
            aria-controls={`${id}-panel`}
            tabIndex={i === chosen ? 0 : -1}
            onClick={() => setChosen(i)}
          >
            {name}
          </button>
        ))}
      </div>
      <div id={`${id}-panel`} role="tabpanel" aria-labelledby={`${id}-${chosen}`}>
        {tabs[chosen]?.content}
      </div>
    </div>
  )
}
