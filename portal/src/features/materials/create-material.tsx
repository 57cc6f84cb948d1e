import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { useNavigate } from 'react-router-dom'
import { Button } from '../../components/button.tsx'
import { draftOf, dropDrafts, keepDraft } from '../../components/drafts.ts'
import { Dialog } from '../../components/dialog.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { MaterialFields, blank } from './material-fields.tsx'
import { type Typed, allLists, createMaterial } from './queries.ts'

const FORM = 'material'

/** A new material; its own sheet opens when it is kept. What is typed outlasts a session that ends. */
export function CreateMaterial({ onClose }: { onClose(): void }) {
  const client = useQueryClient()
  const navigate = useNavigate()
  const { register, handleSubmit, control } = useForm({ defaultValues: { ...blank, ...draftOf<Typed>(FORM) } })
  const typed = useWatch({ control })
  useEffect(() => keepDraft(FORM, typed), [typed])
  const leave = () => {
    dropDrafts(FORM)
    onClose()
  }
  const create = useMutation({
    mutationFn: createMaterial,
    onSuccess: async ({ id }) => {
      dropDrafts(FORM)
      await client.invalidateQueries(allLists)
      await navigate(`/materials/${id}`)
    },
  })
  return (
    <Dialog title="Keep a material" onClose={leave}>
      <form noValidate onSubmit={handleSubmit((typed) => create.mutate(typed))}>
        <div className="body">
          <MaterialFields register={register} error={create.error} />
        </div>
        <div className="acts btnrow">
          <SendButton kind="main" type="submit" error={create.error} disabled={create.isPending}>
            {create.isPending ? 'Keeping' : 'Keep it'}
          </SendButton>
          <Button onClick={leave}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}
