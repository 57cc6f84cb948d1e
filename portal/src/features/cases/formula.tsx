import { useEffect, useRef } from 'react'

/** A formula as MathML; until the typesetter is there, and where it fails, its TeX stands. */
export function Formula({ tex }: { tex: string }) {
  const ref = useRef<HTMLDivElement>(null)
  useEffect(() => {
    let left = false
    void import('katex').then(({ default: katex }) => {
      if (!left && ref.current)
        katex.render(tex, ref.current, { output: 'mathml', displayMode: true, throwOnError: true })
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
