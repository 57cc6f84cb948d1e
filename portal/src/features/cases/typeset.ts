import '@fontsource/noto-sans-math/400.css'
import katex from 'katex'

/** Sets TeX as MathML; the maths font draws what must stretch. */
export function typeset(tex: string, element: HTMLElement): void {
  katex.render(tex, element, { output: 'mathml', displayMode: true, throwOnError: true })
}
