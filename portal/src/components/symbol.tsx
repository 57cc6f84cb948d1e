import { partsOf } from './symbol-parts.ts'

/** The symbol of a quantity, in text. */
export function Symbol({ of }: { of: string }) {
  return partsOf(of).map(({ text, low }, i) => (low ? <sub key={i}>{text}</sub> : text))
}

/** The same within an SVG text. */
export function SymbolSpans({ of }: { of: string }) {
  const parts = partsOf(of)
  return parts.map(({ text, low }, i) => {
    const before = parts[i - 1]?.low ?? false
    const drop = low === before ? 0 : low ? DROP : -DROP
    return (
      <tspan key={i} dy={drop} className={low ? 't-sub' : undefined}>
        {text}
      </tspan>
    )
  })
}

const DROP = 4
