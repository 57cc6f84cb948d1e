import { type ComponentProps, useId } from 'react'

interface Props extends ComponentProps<'input'> {
  label: string
  hint?: string
  error?: string | undefined
}

/** A plain field: label and hint left, box right, the refusal below, tied together by id. */
export function TextField({ label, hint, error, ...input }: Props) {
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
        <input
          id={id}
          className="box"
          aria-invalid={error ? true : undefined}
          aria-describedby={described || undefined}
          {...input}
        />
      </span>
      {error && (
        <p id={`${id}-error`} className="err">
          {error}
        </p>
      )}
    </div>
  )
}
