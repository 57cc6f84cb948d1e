import { Fragment, useEffect, useRef } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { ApiError, issuesByField } from '../../api/api-error.ts'
import type { FormWords } from '../../api/form-words.ts'
import { Button, LinkButton } from '../../components/button.tsx'
import { unitText } from '../../components/formats.ts'
import { FormFailure } from '../../components/form-failure.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { Offline } from '../../components/states.tsx'
import { clockText, useOfflineSince } from '../../components/use-online.ts'
import type { Body } from '../../solving/solve.ts'
import { CaseField } from './case-field.tsx'
import { FORM_ID } from './form-id.ts'
import { HeatChoice } from './heat-choice.tsx'
import { type FormValues, bodyOf, isSent, valuesOf, waysOf } from './form-values.ts'
import type { Case, Field } from './queries.ts'
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
  const { control, register, handleSubmit, getValues, reset } = useForm<FormValues>({
    defaultValues: valuesOf(c, c.example),
  })
  const values = useWatch({ control }) as FormValues
  const form = useRef<HTMLFormElement>(null)
  const words = wordsOf(c, values.heat)
  const errors = issuesByField(error, words)
  const sent = (name: string) => isSent(c, name, values.heat)
  const open = c.fields.filter((field) => isOpen(c, field))
  const folded = c.fields.filter((field) => !isOpen(c, field))
  const stale = solved !== undefined && !same(bodyOf(c, values), bodyOf(c, valuesOf(c, solved.body)))
  const since = useOfflineSince()
  const unsent = since !== undefined && error instanceof ApiError && !error.problem
  useEffect(() => onChanged(stale), [stale, onChanged])

  useEffect(() => {
    if (error) form.current?.querySelector<HTMLElement>('[aria-invalid=true]')?.focus()
  }, [error])

  const send = (always: boolean) => {
    const body = bodyOf(c, getValues())
    if (always || !same(body, bodyOf(c, valuesOf(c, asked)))) onSolve(body)
  }
  const ways = waysOf(c).flat()
  const firstWay = c.fields.find(({ name }) => ways.includes(name))
  const fields = (list: readonly Field[]) =>
    list.map((field) => (
      <Fragment key={field.name}>
        {field === firstWay && <HeatChoice description={c} register={register('heat')} />}
        {sent(field.name) && (
          <CaseField field={field} error={errors[field.name]} register={register(`fields.${field.name}`)} />
        )}
      </Fragment>
    ))

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
      {fields(open)}
      {folded.length > 0 && (
        <details className="more" open={folded.some(({ name }) => errors[name])}>
          <summary>Other ways to give it, and more</summary>
          {fields(folded)}
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
            reset(valuesOf(c, c.example))
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
function wordsOf(c: Case, heat: string): FormWords {
  const fields = c.fields.filter(({ name }) => isSent(c, name, heat))
  return {
    labels: Object.fromEntries(fields.map(({ name, title }) => [name, title ?? name])),
    units: Object.fromEntries(fields.flatMap(({ unit }) => (unit ? [[unit, unitText(unit)]] : []))),
  }
}

/** Shown at once: what must be given, and what the example gives. */
function isOpen(c: Case, { name, required }: Field): boolean {
  if (required || name in c.example || name === 'outputs') return true
  const ways = waysOf(c)
  return ways.some((way) => way.includes(name)) && ways.flat().some((one) => one in c.example)
}
