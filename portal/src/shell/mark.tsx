import { Link } from 'react-router-dom'

export function Mark() {
  return (
    <Link className="mark" to="/">
      <svg viewBox="0 0 30 30" aria-hidden="true">
        <path d="M10 3V27" stroke="currentColor" strokeWidth="2.5" />
        <path d="M10 3H27V27H10" fill="none" stroke="currentColor" />
        <path d="M10 11L18 3M10 19L26 3M10 27L27 10M18 27L27 18" stroke="currentColor" opacity=".55" />
        <path d="M1 24C8 24 9 23 10 20C13 11 19 8 27 7.5" fill="none" stroke="var(--clay)" strokeWidth="2.5" />
      </svg>
      Soakstone
    </Link>
  )
}
