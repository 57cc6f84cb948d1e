interface Props<V extends string> {
  label: string
  options: readonly { value: V; text: string }[]
  value: V
  onChange(value: V): void
}

/** A choice of few, all in view. */
export function Segmented<V extends string>({ label, options, value, onChange }: Props<V>) {
  return (
    <div className="seg" role="group" aria-label={label}>
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === value}
          onClick={() => onChange(option.value)}
        >
          {option.text}
        </button>
      ))}
    </div>
  )
}
