import { useMutation, useQueryClient } from '@tanstack/react-query'
import { instantText } from '../../components/formats.ts'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { FormFailure } from '../../components/form-failure.tsx'
import { type Key, keysQuery, revokeKey } from './queries.ts'

/** States what follows before it happens. */
export function RevokeKey({ of: key, onClose }: { of: Key; onClose(): void }) {
  const client = useQueryClient()
  const revoke = useMutation({
    mutationFn: revokeKey,
    onSuccess: async () => {
      await client.invalidateQueries({ queryKey: keysQuery().queryKey })
      onClose()
    },
  })
  return (
    <Dialog title={`Revoke ${key.name}`} onClose={onClose}>
      <div className="body grid gap-3">
        <p className="prose">
          Programs that send <code>{key.prefix}</code> are answered 401 within a second.{' '}
          {key.lastUsedAt ? `It was last used ${instantText(key.lastUsedAt)} UTC.` : 'It has never been used.'}
        </p>
        <p className="prose">A revoked key cannot be given back. Its calls stay in usage and requests.</p>
        <FormFailure error={revoke.error} words={{ labels: {} }} />
      </div>
      <div className="acts btnrow">
        <Button kind="risk" disabled={revoke.isPending} onClick={() => revoke.mutate(key.id)}>
          {revoke.isPending ? 'Revoking' : 'Revoke the key'}
        </Button>
        <Button onClick={onClose}>Keep it</Button>
      </div>
    </Dialog>
  )
}
