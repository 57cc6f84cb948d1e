import type { ReactNode } from 'react'
import { CopyButton } from './copy-button.tsx'

interface Props {
  caption: ReactNode
  /** What Copy takes. */
  text: string
  label: string
  children?: ReactNode
  /** What the copy is of, where that is not plain. */
  copy?: string
  /** Own scroll from this height on. */
  tall?: boolean
}

export function CodeBlock({ caption, text, label, children, copy = 'Copy', tall = false }: Props) {
  return (
    <div className="code">
      <div className="cap">
        <span>{caption}</span>
        <CopyButton text={text}>{copy}</CopyButton>
      </div>
      <pre tabIndex={0} role="region" aria-label={label} className={tall ? 'max-h-[560px]' : undefined}>
        {children ?? <code>{text}</code>}
      </pre>
    </div>
  )
}
