import { type ReactNode, useLayoutEffect, useId, useRef } from 'react'
import { LinkButton } from './button.tsx'

interface Props {
  title: string
  onClose(): void
  /** Without it neither Close nor Escape leaves: a step that must be finished. */
  closable?: boolean
  children: ReactNode
}

/** A native dialog: focus stays inside and returns where it was. A click outside does nothing. */
export function Dialog({ title, onClose, closable = true, children }: Props) {
  const ref = useRef<HTMLDialogElement>(null)
  const id = useId()
  // Closed before it is taken away: a dialog that vanishes open gives no focus back.
  useLayoutEffect(() => {
    const dialog = ref.current
    dialog?.showModal()
    // The browser would choose Close, and Enter would then close.
    dialog?.querySelector<HTMLElement>('.body input.box')?.focus()
    return () => dialog?.close()
  }, [])
  return (
    <dialog
      ref={ref}
      className="dialog"
      aria-labelledby={id}
      onCancel={(event) => {
        event.preventDefault()
        if (closable) onClose()
      }}
    >
      <div className="head">
        <h2 id={id} className="!text-[18px] !leading-6 !font-[640]">
          {title}
        </h2>
        {closable ? <LinkButton onClick={onClose}>Close</LinkButton> : <span className="lab">shown once</span>}
      </div>
      {children}
    </dialog>
  )
}
