import { useEffect, useRef } from 'react'

/** A formula as MathML; until the typesetter is there, and where it fails, its TeX stands. */
export function Formula({ tex }: { tex: string }) {
  const ref = useRef<HTMLDivElement>(null)
  useEffect(() => {
    let left = false
    void import('./typeset.ts').then(({ typeset }) => {
      if (!left && ref.current) typeset(tex, ref.current)
    })
    return () => {
      left = true
    }
  }, [tex])
  return (
    <div ref={ref} className="formula">
      {tex}
    </div>
  )
}
