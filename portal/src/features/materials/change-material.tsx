import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { ApiError } from '../../api/api-error.ts'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { MaterialFields, typedOf } from './material-fields.tsx'
import { type Material, type Typed, allLists, materialQuery, replaceMaterial } from './queries.ts'
import { labels } from './words.ts'

interface Version {
  data: Material
  etag: string
}

/** Changes the version that was read. Where somebody was faster it says what differs, and keeps what was typed. */
export function ChangeMaterial({ of: read, onClose }: { of: Version; onClose(): void }) {
  const client = useQueryClient()
  // The sheet behind is refreshed; the form stays with what it was opened on.
  const [opened] = useState(read)
  const [version, setVersion] = useState(read)
  const { id } = version.data
  const { register, handleSubmit } = useForm({ defaultValues: typedOf(opened.data) })
  const change = useMutation({
    mutationFn: (typed: Typed) => replaceMaterial(id, version.etag, typed),
    onSuccess: async () => {
      await Promise.all([client.invalidateQueries(materialQuery(id)), client.invalidateQueries(allLists)])
      onClose()
    },
  })
  const again = useMutation({
    mutationFn: () => client.fetchQuery(materialQuery(id)),
    onSuccess: (now) => {
      setVersion(now)
      change.reset()
    },
  })
  const overtaken = change.error instanceof ApiError && change.error.problem?.code === 'precondition-failed'
  return (
    <Dialog title={`Change ${opened.data.name}`} onClose={onClose}>
      <form noValidate onSubmit={handleSubmit((typed) => change.mutate(typed))}>
        <div className="body">
          <p className="prose mb-2">
            Answers from now on use the new figures. Answers that were given hold the old ones, and stay as they are.
          </p>
          <MaterialFields register={register} error={overtaken ? again.error : change.error} />
          {overtaken && (
            <div role="alert" className="note warning mt-4">
              <b>It was changed since you read it.</b> Nothing was replaced, and what you typed is kept.
              <div className="btnrow mt-2">
                <Button small disabled={again.isPending} onClick={() => again.mutate()}>
                  Read it again
                </Button>
              </div>
            </div>
          )}
          <Differences from={opened.data} to={version.data} />
        </div>
        <div className="acts btnrow">
          <SendButton kind="main" type="submit" error={change.error} disabled={change.isPending || overtaken}>
            {change.isPending ? 'Changing' : 'Change it'}
          </SendButton>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}

/** What somebody else changed while the form was open. */
function Differences({ from, to }: { from: Material; to: Material }) {
  const [before, now] = [typedOf(from), typedOf(to)]
  const changed = (Object.keys(now) as (keyof Typed)[]).filter((name) => before[name] !== now[name])
  if (from.updatedAt === to.updatedAt) return null
  return (
    <div role="status" className="note information mt-4">
      <b>As it stands now</b>
      {changed.length === 0 && <p>The same figures as those you read.</p>}
      {changed.map((name) => (
        <p key={name}>
          {labels[name]}: <span className="fig">{now[name]}</span>, was <span className="fig">{before[name]}</span>
        </p>
      ))}
      <p>Changing it now replaces this with what stands in the form.</p>
    </div>
  )
}
