import type { ReactNode } from 'react'
import { NavLink } from 'react-router-dom'
import { Mark } from './mark.tsx'
import { ThemeSwitch } from './theme-switch.tsx'

const sheets = [
  { to: '/cases', text: 'Cases' },
  { to: '/docs', text: 'Docs' },
  { to: '/reference', text: 'Reference' },
  { to: '/problems', text: 'Problems' },
]

/** Name, public sheets, and at the end what the reader can do here. */
export function Masthead({ children }: { children: ReactNode }) {
  return (
    <header className="masthead">
      <Mark />
      <nav aria-label="Public sheets">
        <ul>
          {sheets.map(({ to, text }) => (
            <li key={to}>
              <NavLink to={to}>{text}</NavLink>
            </li>
          ))}
        </ul>
      </nav>
      <div className="end">
        <ThemeSwitch />
        {children}
      </div>
    </header>
  )
}
