import { type ComponentProps, useId } from 'react'

interface Props extends ComponentProps<'select'> {
  label: string
  hint?: string
  error?: string | undefined
  options: readonly { value: string; text: string }[]
}

/** A choice from a list, laid out as a plain field is. */
export function SelectField({ label, hint, error, options, ...select }: Props) {
  const id = useId()
  const described = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ')
  return (
    <div className={error ? 'field plain bad' : 'field plain'}>
      <span className="label">
        <label htmlFor={id}>{label}</label>
        {hint && (
          <span id={`${id}-hint`} className="hint">
            {hint}
          </span>
        )}
      </span>
      <span className="control">
        <select
          id={id}
          className="box"
          aria-invalid={error ? true : undefined}
          aria-describedby={described || undefined}
          {...select}
        >
          {options.map(({ value, text }) => (
            <option key={value} value={value}>
              {text}
            </option>
          ))}
        </select>
      </span>
      {error && (
        <p id={`${id}-error`} className="err">
          {error}
        </p>
      )}
    </div>
  )
}
