import { type ReactNode, useEffect, useRef, useState } from 'react'

interface Props {
  label: string
  className?: string
  children: ReactNode
}

/** Scrolls by itself where its content is wider, says so, and takes the focus so that arrows move it. */
export function ScrollRegion({ label, className = '', children }: Props) {
  const ref = useRef<HTMLDivElement>(null)
  const [wider, setWider] = useState(false)
  useEffect(() => {
    const element = ref.current
    if (!element) return
    const measure = () => setWider(element.scrollWidth > element.clientWidth + 1)
    const sized = new ResizeObserver(measure)
    const filled = new MutationObserver(measure)
    sized.observe(element)
    filled.observe(element, { childList: true, subtree: true })
    void document.fonts.ready.then(measure)
    return () => {
      sized.disconnect()
      filled.disconnect()
    }
  }, [])
  return (
    <div className={className}>
      <div ref={ref} className="scroll" role="region" aria-label={label} tabIndex={0}>
        {children}
      </div>
      {wider && <p className="lab pt-2">Wider than the sheet: it scrolls sideways.</p>}
    </div>
  )
}
