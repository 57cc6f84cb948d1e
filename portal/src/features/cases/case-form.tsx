import { useEffect, useRef } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { ApiError, refusalsOf } from '../../api/api-error.ts'
import type { FormWords } from '../../api/form-words.ts'
import { Button, LinkButton } from '../../components/button.tsx'
import { unitText } from '../../components/formats.ts'
import { FormFailure } from '../../components/form-failure.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { Offline } from '../../components/states.tsx'
import { clockText, useOfflineSince } from '../../components/use-online.ts'
import type { Body } from '../../solving/body.ts'
import { FieldList } from './field-list.tsx'
import { type Field, fieldsInside } from './fields.ts'
import { FORM_ID } from './form-id.ts'
import { type FormValues, bodyOf, isComplete, valuesOf } from './form-values.ts'
import type { Case } from './described.ts'
import { refusalAt } from './refusals.ts'
import { isSent, waysOf } from './solid-ways.ts'
import type { Solved } from './use-solve.ts'

interface Props {
  description: Case
  /** The body that was last sent. */
  asked: Body
  /** The body that the sheet shows the answer of. */
  solved: Solved | undefined
  pending: boolean
  error: unknown
  onSolve(body: Body): void
  onCancel(): void
  /** Told whether the form differs from what was solved. */
  onChanged(changed: boolean): void
}

/** Every field of the contract. It solves when a field is left changed, and on Solve. */
export function CaseForm({ description: c, asked, solved, pending, error, onSolve, onCancel, onChanged }: Props) {
  const { fields } = c
  const { control, register, handleSubmit, getValues, reset } = useForm<FormValues>({
    defaultValues: valuesOf(fields, c.example),
  })
  const values = useWatch({ control }) as FormValues
  const form = useRef<HTMLFormElement>(null)
  const words = wordsOf(fields, values)
  const refusals = refusalsOf(error, words)
  const open = fields.filter((field) => isOpen(c, field))
  const folded = fields.filter((field) => !isOpen(c, field))
  const read = (body: Body) => bodyOf(fields, valuesOf(fields, body))
  const stale = solved !== undefined && !same(bodyOf(fields, values), read(solved.body))
  const since = useOfflineSince()
  const unsent = since !== undefined && error instanceof ApiError && !error.problem
  useEffect(() => onChanged(stale), [stale, onChanged])

  useEffect(() => {
    if (error) form.current?.querySelector<HTMLElement>('[aria-invalid=true]')?.focus()
  }, [error])

  const send = (always: boolean) => {
    const now = getValues()
    const body = bodyOf(fields, now)
    if (always || (isComplete(fields, now) && !same(body, read(asked)))) onSolve(body)
  }
  const list = {
    fields,
    values,
    example: c.example,
    refusals,
    path: '',
    box: '',
    register: (box: string) => register(box as 'fields'),
  }

  return (
    <form
      ref={form}
      id={FORM_ID}
      noValidate
      aria-labelledby="numbers"
      className="min-w-0"
      onSubmit={handleSubmit(() => send(true))}
      onBlur={(event) => {
        if (event.target instanceof HTMLInputElement || event.target instanceof HTMLSelectElement) send(false)
      }}
    >
      <h2 id="numbers" className="mb-2">
        Your numbers
      </h2>
      <FieldList {...list} shown={open} />
      {folded.length > 0 && (
        <details className="more" open={folded.some(({ name }) => refusalAt(refusals, name))}>
          <summary>Other ways to give it, and more</summary>
          <FieldList {...list} shown={folded} />
        </details>
      )}
      {unsent ? (
        <Offline since={since} shown={solved && `The numbers below were solved at ${clockText(solved.at)}.`} />
      ) : (
        <FormFailure error={error} words={words} />
      )}
      <div className="btnrow mt-5">
        <SendButton kind="main" type="submit" error={error}>
          {pending ? 'Solving' : 'Solve'}
        </SendButton>
        {pending && <Button onClick={onCancel}>Cancel</Button>}
        <LinkButton
          onClick={() => {
            reset(valuesOf(fields, c.example))
            send(false)
          }}
        >
          Back to the example
        </LinkButton>
      </div>
      <p role="status" className="lab mt-3 min-h-4">
        {stale
          ? `The numbers below are older than your last change.${pending ? '' : ' Solve again.'}`
          : 'Free while you try it here.'}
      </p>
    </form>
  )
}

const same = (a: Body, b: Body): boolean => JSON.stringify(a) === JSON.stringify(b)

/** The labels and units of the fields that stand in the form. */
function wordsOf(fields: readonly Field[], values: FormValues): FormWords {
  const sent = fields.filter(({ name }) => isSent(fields, name, values.solid))
  const inside = sent.flatMap((field) => {
    const own = values.fields[field.name]
    return fieldsInside(field, (own as FormValues | undefined)?.kind ?? '')
  })
  const labels = (list: readonly Field[]) => Object.fromEntries(list.map(({ name, title }) => [name, title ?? name]))
  const units = [...sent, ...inside].flatMap(({ unit }) => (unit ? [[unit, unitText(unit)] as const] : []))
  return { labels: labels(sent), inside: labels(inside), units: Object.fromEntries(units) }
}

/** Shown at once: what must be given, and what the example gives. */
function isOpen({ fields, example }: Case, { name, required }: Field): boolean {
  if (required || name in example || name === 'outputs') return true
  const ways = waysOf(fields)
  return ways.some((way) => way.includes(name)) && ways.flat().some((one) => one in example)
}
