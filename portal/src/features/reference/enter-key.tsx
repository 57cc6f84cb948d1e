import { useState } from 'react'
import { Button } from '../../components/button.tsx'
import { Dialog } from '../../components/dialog.tsx'
import { TextField } from '../../components/text-field.tsx'

/** Asks for the key that calls are sent with. It is held by the page alone. */
export function EnterKey({ onUse, onClose }: { onUse(key: string): void; onClose(): void }) {
  const [key, setKey] = useState('')
  return (
    <Dialog title="Enter a key" onClose={onClose}>
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault()
          if (key.trim()) onUse(key.trim())
        }}
      >
        <div className="body">
          <TextField
            label="Key"
            hint="forgotten when you leave this page"
            type="password"
            autoComplete="off"
            value={key}
            onChange={(event) => setKey(event.target.value)}
          />
        </div>
        <div className="acts btnrow">
          <Button kind="main" type="submit" disabled={!key.trim()}>
            Use the key
          </Button>
          <Button onClick={onClose}>Cancel</Button>
        </div>
      </form>
    </Dialog>
  )
}
