import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useForm } from 'react-hook-form'
import { useNavigate } from 'react-router-dom'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { SendButton } from '../../components/send-button.tsx'
import { MaterialFields, blank } from './material-fields.tsx'
import { allLists, createMaterial } from './queries.ts'

/** A new material; its own sheet opens when it is kept. */
export function CreateMaterial({ onClose }: { onClose(): void }) {
  const client = useQueryClient()
  const navigate = useNavigate()
  const { register, handleSubmit } = useForm({ defaultValues: blank })
  const create = useMutation({
    mutationFn: createMaterial,
    onSuccess: async ({ id }) => {
      await client.invalidateQueries(allLists)
      await navigate(`/materials/${id}`)
    },
  })
  return (
    <Dialog title="Keep a material" onClose={onClose}>
      <form noValidate onSubmit={handleSubmit((typed) => create.mutate(typed))}>
        <div className="body">
          <MaterialFields register={register} error={create.error} />
        </div>
        <div className="acts btnrow">
          <SendButton kind="main" type="submit" error={create.error} disabled={create.isPending}>
            {create.isPending ? 'Keeping' : 'Keep it'}
          </SendButton>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}
