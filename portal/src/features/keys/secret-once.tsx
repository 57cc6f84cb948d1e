import { useState } from 'react'
import { Button } from '../../components/button.tsx'
import { CodeBlock } from '../../components/code-block.tsx'
import { CopyButton } from '../../components/copy-button.tsx'
import { download } from '../../components/download.ts'
import { Dialog } from '../../components/dialog.tsx'

interface Props {
  name: string
  secret: string
  onDone(): void
}

/** The one time that a key can be read. The tick says that it was stored. */
export function SecretOnce({ name, secret, onDone }: Props) {
  const [stored, setStored] = useState(false)
  const trial = [
    `export SOAK_KEY=${secret}`,
    `curl "${location.origin}/v1/usage" -H "Authorization: Bearer $SOAK_KEY"`,
  ].join('\n')
  return (
    <Dialog title={`${name}, your new key`} onClose={onDone} closable={false}>
      <div className="body">
        <p className="prose">Copy it now. When you leave this sheet nobody can read it again, support included.</p>
        <div className="secret" data-secret>
          {secret}
        </div>
        <div className="btnrow mb-5">
          <CopyButton main text={secret}>
            Copy the key
          </CopyButton>
          <Button onClick={() => download('soakstone.env', new Blob([`SOAK_KEY=${secret}\n`], { type: 'text/plain' }))}>
            Download as .env
          </Button>
        </div>
        <CodeBlock caption="try it" text={trial} label="First call with this key">
          <code>{trial.replace(secret, '…')}</code>
        </CodeBlock>
        <label className="opt mt-4">
          <input type="checkbox" checked={stored} onChange={(event) => setStored(event.target.checked)} />I have stored
          it where my program reads it
        </label>
      </div>
      <div className="acts btnrow">
        <Button disabled={!stored} onClick={onDone}>
          Done
        </Button>
        {!stored && <span className="lab">tick the line above first</span>}
      </div>
    </Dialog>
  )
}
