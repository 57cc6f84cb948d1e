import { NavLink, useLocation } from 'react-router-dom'

interface Props {
  label: string
  /** Whose sheets these are. */
  owner: string
  sheets: readonly { to: string; text: string; end?: boolean }[]
}

/** The sheets of an account: beside the sheet, above it, or folded, as the width allows. */
export function Rail({ label, owner, sheets }: Props) {
  const { pathname } = useLocation()
  const here = sheets.find(({ to }) => pathname.startsWith(to))
  const narrow = matchMedia('(max-width: 700px)').matches
  return (
    <nav className="rail" aria-label={label}>
      <span className="lab">{owner}</span>
      <details key={pathname} open={!narrow}>
        <summary>{here?.text ?? 'Sheets'} · all sheets</summary>
        <ul>
          {sheets.map(({ to, text, end }) => (
            <li key={to}>
              <NavLink to={to} end={end ?? false}>
                {text}
              </NavLink>
            </li>
          ))}
        </ul>
      </details>
    </nav>
  )
}
