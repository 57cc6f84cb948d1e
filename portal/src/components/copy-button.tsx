import { type ReactNode, useEffect, useState } from 'react'
import { Button, LinkButton } from './button.tsx'

interface Props {
  text: string
  children?: ReactNode
  /** The main action of its band. */
  main?: boolean
}

/** Copies a text and says so, also where the browser refuses. */
export function CopyButton({ text, children = 'Copy', main = false }: Props) {
  const [said, setSaid] = useState<string>()
  useEffect(() => {
    if (!said) return
    const timer = setTimeout(() => setSaid(undefined), 3000)
    return () => clearTimeout(timer)
  }, [said])
  const copy = () =>
    copyText(text).then(
      () => setSaid('Copied'),
      () => setSaid('The browser refused. Select the text and copy it.'),
    )
  return (
    <>
      {main ? (
        <Button kind="main" onClick={copy}>
          {said === 'Copied' ? 'Copied' : children}
        </Button>
      ) : (
        <LinkButton onClick={copy}>{said ?? children}</LinkButton>
      )}
      <span role="status" className={main && said && said !== 'Copied' ? 'lab' : 'sr-only'}>
        {said}
      </span>
    </>
  )
}

async function copyText(text: string): Promise<void> {
  if (!navigator.clipboard) throw new Error('no clipboard')
  await navigator.clipboard.writeText(text)
}
