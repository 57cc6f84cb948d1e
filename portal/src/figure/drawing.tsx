import type { ReactNode, SVGProps } from 'react'

interface Props extends SVGProps<SVGSVGElement> {
  width: number
  height: number
  /** What the drawing shows, in a sentence; without one it is decoration. */
  label?: string
  children: ReactNode
}

/** An SVG at its real pixel size, so that labels keep theirs. */
export function Drawing({ width, height, label, children, ...rest }: Props) {
  const access = label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': true }
  return (
    <svg className="drawing" viewBox={`0 0 ${width} ${height}`} width={width} height={height} {...access} {...rest}>
      {children}
    </svg>
  )
}
