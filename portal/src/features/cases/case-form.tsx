import { useEffect, useRef } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { ApiError, refusalsOf } from '../../api/api-error.ts'
import { Button, LinkButton } from '../../components/button.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { CopyButton } from '../../components/copy-button.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { Offline } from '../../components/states.tsx'
import { clockText, useOfflineSince } from '../../components/use-online.ts'
import type { Body } from '../../solving/body.ts'
import { FieldList } from './field-list.tsx'
import type { Field } from './fields.ts'
import { LONGEST, addressOf } from './form-address.ts'
import { FORM_ID } from './form-id.ts'
import { wordsOf } from './form-labels.ts'
import { type FormValues, bodyOf, isComplete, valuesOf } from './form-values.ts'
import type { Case } from './described.ts'
import { refusalAt } from './refusals.ts'
import { waysOf } from './solid-ways.ts'
import { useSettled } from '../../solving/use-settled.ts'
import type { Solved } from './use-solve.ts'

interface Props {
  description: Case
  /** What stands in the form first. */
  first: FormValues
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
  /** Told what the address of the page is to say of the form; empty for the example. */
  onAddress(address: string): void
}

/** Every field of the contract. It solves when a field is left changed, and on Solve. */
export function CaseForm(props: Props) {
  const { description: c, first, asked, solved, pending, error, onSolve, onCancel, onChanged, onAddress } = props
  const { fields } = c
  const { control, register, handleSubmit, getValues, reset } = useForm<FormValues>({
    defaultValues: first,
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
  const address = addressIn(c, values)
  const settled = useSettled(address, 400)
  useEffect(() => onAddress(settled), [settled, onAddress])

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
        <CopyButton text={location.origin + location.pathname + (address && `?${address}`)}>
          Copy a link to it
        </CopyButton>
      </div>
      <p role="status" className="lab mt-3 min-h-4">
        {stale
          ? `The numbers below are older than your last change.${pending ? '' : ' Solve again.'}`
          : 'Free while you try it here.'}
      </p>
    </form>
  )
}

/** What the address says of the form: nothing where the example stands in it, or where it would be too long. */
function addressIn({ fields, example }: Case, values: FormValues): string {
  if (same(bodyOf(fields, values), bodyOf(fields, valuesOf(fields, example)))) return ''
  const address = addressOf(fields, values).toString()
  return address.length > LONGEST ? '' : address
}

const same = (a: Body, b: Body): boolean => JSON.stringify(a) === JSON.stringify(b)

/** Shown at once: what must be given, and what the example gives. */
function isOpen({ fields, example }: Case, { name, required }: Field): boolean {
  if (required || name in example || name === 'outputs') return true
  const ways = waysOf(fields)
  return ways.some((way) => way.includes(name)) && ways.flat().some((one) => one in example)
}
