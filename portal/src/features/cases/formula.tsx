import { useEffect, useRef } from 'react'

/** A line of formulas: each that follows a wide space may stand below the one before. */
export function Formula({ tex }: { tex: string }) {
  return (
    <div className="formula">
      {tex.split('\\qquad').map((part) => (
        <Part key={part} tex={part} />
      ))}
    </div>
  )
}

/** As MathML; until the typesetter is there, and where it fails, the TeX stands. */
function Part({ tex }: { tex: string }) {
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
  return <div ref={ref}>{tex}</div>
}
