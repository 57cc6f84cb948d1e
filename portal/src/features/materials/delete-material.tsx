import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { type Material, allLists, deleteMaterial, materialQuery } from './queries.ts'
import { words } from './words.ts'

/** States what follows before it happens. */
export function DeleteMaterial({ of: { id, name }, onClose }: { of: Material; onClose(): void }) {
  const client = useQueryClient()
  const navigate = useNavigate()
  const remove = useMutation({
    mutationFn: deleteMaterial,
    onSuccess: async () => {
      await client.invalidateQueries(allLists)
      await navigate('/materials')
      client.removeQueries(materialQuery(id))
    },
  })
  return (
    <Dialog title={`Delete ${name}`} onClose={onClose}>
      <div className="body grid gap-3">
        <p className="prose">
          A call that names <code>{id}</code> is refused from then on. Answers that used it hold its figures and stay as
          they are.
        </p>
        <p className="prose">It cannot be brought back. Keeping the same figures again gives another id.</p>
        <FormFailure error={remove.error} words={words} />
      </div>
      <div className="acts btnrow">
        <Button kind="risk" disabled={remove.isPending} onClick={() => remove.mutate(id)}>
          {remove.isPending ? 'Deleting' : 'Delete the material'}
        </Button>
        <Button onClick={onClose}>Keep it</Button>
      </div>
    </Dialog>
  )
}
