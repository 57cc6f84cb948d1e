import { type ReactNode, useEffect, useRef } from 'react'
import { ScrollRestoration, useLocation } from 'react-router-dom'
import { Hatches } from '../figure/hatches.tsx'
import { ConnectionNote } from './connection-note.tsx'

/** What every sheet stands on; a new sheet takes the focus. */
export function Page({ children }: { children: ReactNode }) {
  const { pathname } = useLocation()
  const shown = useRef(pathname)
  useEffect(() => {
    if (shown.current === pathname) return
    shown.current = pathname
    document.getElementById('main')?.focus({ preventScroll: true })
  }, [pathname])
  return (
    <>
      <a className="skip" href="#main">
        Skip to the sheet
      </a>
      <Hatches />
      <ConnectionNote />
      <div className="page">{children}</div>
      <ScrollRestoration />
    </>
  )
}
