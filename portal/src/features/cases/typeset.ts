import '@fontsource/noto-sans-math/400.css'
import katex from 'katex'

/** Sets TeX as MathML; the maths font draws what must stretch. */
export function typeset(tex: string, element: HTMLElement): void {
  katex.render(tex, element, { output: 'mathml', displayMode: true, throwOnError: true })
  for (const applied of element.querySelectorAll('mo')) if (applied.textContent === APPLIED) setApart(applied)
}

/** The sign that a function is applied, which is written as nothing. */
const APPLIED = '\u2061'
const MATHML = 'http://www.w3.org/1998/Math/MathML'

/** A thin space before the name of a function that follows a factor, and behind it where no bracket opens. */
function setApart(applied: Element): void {
  const name = applied.previousElementSibling
  if (!name) return
  const [before, after] = [name.previousElementSibling, applied.nextElementSibling]
  if (before && !isOperator(before)) name.before(thinSpace())
  if (after && !isOperator(after) && !(after.firstElementChild && isOperator(after.firstElementChild)))
    applied.after(thinSpace())
}

const isOperator = ({ localName }: Element): boolean => localName === 'mo' || localName === 'mspace'

function thinSpace(): Element {
  const space = document.createElementNS(MATHML, 'mspace')
  space.setAttribute('width', '0.17em')
  return space
}
