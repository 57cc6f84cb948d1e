import type { ComponentProps } from 'react'
import { Button } from './button.tsx'
import { useSecondsLeft } from './use-seconds-left.ts'

interface Props extends ComponentProps<typeof Button> {
  /** Of the last sending. */
  error: unknown
}

/** Sends; where the service asked to wait it counts the seconds first. */
export function SendButton({ error, disabled = false, children, ...rest }: Props) {
  const seconds = useSecondsLeft(error)
  return (
    <Button disabled={disabled || seconds > 0} {...rest}>
      {seconds > 0 ? `Try again in ${seconds} s` : children}
    </Button>
  )
}
