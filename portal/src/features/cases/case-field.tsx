import { useId } from 'react'
import type { UseFormRegisterReturn } from 'react-hook-form'
import { withMinus } from '../../api/form-words.ts'
import { unitText } from '../../components/formats.ts'
import { Symbol } from '../../components/symbol.tsx'
import { plain } from '../../figure/measures.ts'
import { type Field, controlOf, isMaterial, optionsOf, unitsOf } from './fields.ts'
import { MaterialBox } from './material-box.tsx'

interface Props {
  field: Field
  /** Where the field stands in the body. */
  path: string
  register: UseFormRegisterReturn
  /** Of the unit in which it is given. */
  registerUnit: UseFormRegisterReturn
  error: string | undefined
}

/** One field of the contract, in the control that its schema asks for. */
export function CaseField({ field, path, register, registerUnit, error }: Props) {
  const id = useId()
  const kind = controlOf(field)
  const units = unitsOf(field)
  const title = field.title ?? field.name
  const hint = hintOf(field)
  const grouped = kind === 'several' || (kind === 'choice' && field.required)
  const described = [hint ? `${id}-hint` : '', error ? `${id}-error` : ''].filter(Boolean).join(' ') || undefined
  const access = { 'aria-invalid': error ? (true as const) : undefined, 'aria-describedby': described }
  const parts = (
    <>
      <span className={(field.symbol ?? '').length > 3 ? 'sym long' : 'sym'} aria-hidden="true">
        <Symbol of={field.symbol ?? ''} />
      </span>
      <span className="label">
        {grouped ? <span aria-hidden="true">{title}</span> : <label htmlFor={id}>{title}</label>}
        {hint && (
          <span id={`${id}-hint`} className="hint">
            {hint}
          </span>
        )}
      </span>
      {kind === 'number' && (
        <>
          <span className="control">
            <input id={id} className="box" inputMode="text" autoComplete="off" {...access} {...register} />
          </span>
          {units.length === 0 && <span className="unit">{unitText(field.unit ?? '')}</span>}
        </>
      )}
      {['list', 'rows'].includes(kind) && (
        <span className="control">
          <input id={id} className="box" autoComplete="off" {...access} {...register} />
        </span>
      )}
      {units.length > 0 && (
        <select className="box unit-box" aria-label={`Unit of ${title}`} {...registerUnit}>
          {units.map((code) => (
            <option key={code} value={code === field.unit ? '' : code}>
              {unitText(code)}
            </option>
          ))}
        </select>
      )}
      {kind === 'text' && (
        <span className="control">
          {isMaterial(field) ? (
            <MaterialBox id={id} access={access} register={register} />
          ) : (
            <input id={id} className="box" autoComplete="off" {...access} {...register} />
          )}
        </span>
      )}
      {kind === 'choice' && !grouped && (
        <span className="control">
          <select id={id} className="box" {...access} {...register}>
            <option value="">not given</option>
            {optionsOf(field).map((option) => (
              <option key={String(option)}>{String(option)}</option>
            ))}
          </select>
        </span>
      )}
      {grouped && (
        <span
          className={
            kind === 'choice'
              ? 'control seg justify-self-start'
              : 'control grid gap-x-4 grid-cols-[repeat(auto-fit,minmax(190px,1fr))]'
          }
        >
          {optionsOf(field).map((option) => (
            <label key={String(option)} className={kind === 'several' ? 'opt' : undefined}>
              <input
                type={kind === 'several' ? 'checkbox' : 'radio'}
                value={String(option)}
                {...access}
                {...register}
              />
              {kind === 'several' ? (
                <span className="fig min-w-0 wrap-anywhere">{String(option)}</span>
              ) : (
                String(option)
              )}
            </label>
          ))}
        </span>
      )}
      {error && (
        <p id={`${id}-error`} className="err">
          {error}
        </p>
      )}
    </>
  )
  const form = kind === 'number' ? ' quantity' : units.length > 0 ? ' listed' : kind === 'several' ? ' several' : ''
  const name = `field${form}${error ? ' bad' : ''}`
  if (!grouped)
    return (
      <div className={name} data-field={path}>
        {parts}
      </div>
    )
  return (
    <fieldset className={name} data-field={path} aria-describedby={described}>
      <legend className="sr-only">{title}</legend>
      {parts}
    </fieldset>
  )
}

const short = (value: number): string =>
  Math.abs(value) >= 1e6 || (value !== 0 && Math.abs(value) < 1e-3)
    ? withMinus(value.toExponential().replace('e+', 'e'))
    : plain(value)

function hintOf(field: Field): string {
  const [low, high] = field.typical ?? []
  const unit = unitText(field.unit ?? '')
  const typical =
    low !== undefined && high !== undefined ? `usually ${short(low)} to ${short(high)}${unit && ` ${unit}`}` : ''
  const control = controlOf(field)
  const between = control === 'list' ? listHint(field, unit) : control === 'rows' ? rowsHint(field, unit) : ''
  return [between, withMinus(field.hint ?? ''), typical].filter(Boolean).join(' · ')
}

const listHint = (field: Field, unit: string): string =>
  unit && unitsOf(field).length === 0 ? `in ${unit}, commas between` : 'commas between'

/** How a row is typed: its columns in their order, or by name where some may be left out. */
function rowsHint({ fields = [] }: Field, unit: string): string {
  const names = fields.map(({ name }) => name)
  const row = fields.every(({ required }) => required)
    ? names.join(', ')
    : names.map((name) => `${name} 0.1`).join(', ')
  return `${row}${unit ? ` in ${unit}` : ''}; semicolons between`
}
