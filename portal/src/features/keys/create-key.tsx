import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { issuesByField } from '../../api/api-error.ts'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { TextField } from '../../components/text-field.tsx'
import { createKey, keysQuery } from './queries.ts'
import { SecretOnce } from './secret-once.tsx'

const words = { labels: { name: 'Name', quota: 'Own quota' } }

/** Name and quota; then, as a step of its own, the secret. */
export function CreateKey({ onClose }: { onClose(): void }) {
  const client = useQueryClient()
  const { register, handleSubmit } = useForm({ defaultValues: { name: '', quota: '' } })
  const [made, setMade] = useState<{ name: string; secret: string }>()
  const create = useMutation({
    mutationFn: createKey,
    gcTime: 0,
    onSuccess: ({ key, secret }) => {
      setMade({ name: key.name, secret })
      return client.invalidateQueries({ queryKey: keysQuery().queryKey })
    },
  })
  if (made) return <SecretOnce name={made.name} secret={made.secret} onDone={onClose} />
  const errors = issuesByField(create.error, words)
  return (
    <Dialog title="Create a key" onClose={onClose}>
      <form noValidate onSubmit={handleSubmit((values) => create.mutate(values))}>
        <div className="body">
          <TextField
            label="Name"
            hint="where it will be used"
            autoComplete="off"
            error={errors['name']}
            {...register('name')}
          />
          <TextField
            label="Own quota"
            hint="points a day; empty: that of the account"
            inputMode="numeric"
            autoComplete="off"
            error={errors['quota']}
            {...register('quota')}
          />
          <FormFailure error={create.error} words={words} />
        </div>
        <div className="acts btnrow">
          <SendButton kind="main" type="submit" error={create.error} disabled={create.isPending}>
            {create.isPending ? 'Creating' : 'Create and show once'}
          </SendButton>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}
