import type { ReactNode } from 'react'
import { Button } from '../../components/button.tsx'
import { FORM_ID } from './form-id.ts'

/** Why what is shown is older than the form: it was changed, or its numbers were refused. */
export type Stale = 'changed' | 'refused'

const words: Record<Stale, string> = {
  changed: 'These are the numbers of the last solve. The form has been changed since.',
  refused: 'These are the numbers of the last solve that was answered.',
}

/** A dashed frame with the reason, around what belongs to the last solve and not to the form. */
export function StaleFrame({ stale, children }: { stale: Stale | undefined; children: ReactNode }) {
  return (
    <div className={stale ? 'min-w-0 stale' : 'min-w-0'} data-stale={stale}>
      {stale && (
        <p className="stale-note">
          {words[stale]}
          <Button small type="submit" form={FORM_ID}>
            Solve again
          </Button>
        </p>
      )}
      {children}
    </div>
  )
}
