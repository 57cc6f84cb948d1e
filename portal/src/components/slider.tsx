import { type ReactNode, useId } from 'react'

interface Props {
  label: ReactNode
  /** The value in words, with its unit. */
  shown: string
  min: number
  max: number
  step?: number
  value: number
  onChange(value: number): void
  hint?: string
}

export function Slider({ label, shown, min, max, step = 1, value, onChange, hint }: Props) {
  const id = useId()
  return (
    <div className="range">
      <label htmlFor={id}>{label}</label>
      <output htmlFor={id}>{shown}</output>
      <input
        id={id}
        type="range"
        min={min}
        max={max}
        step={step}
        value={value}
        aria-valuetext={shown}
        aria-describedby={hint ? `${id}-hint` : undefined}
        onChange={(event) => onChange(event.target.valueAsNumber)}
      />
      {hint && (
        <span id={`${id}-hint`} className="lab">
          {hint}
        </span>
      )}
    </div>
  )
}
