import type { ComponentProps } from 'react'
import { Link, type LinkProps } from 'react-router-dom'

type Kind = 'main' | 'plain' | 'risk'

const nameOf = (kind: Kind, small: boolean) =>
  ['btn', kind === 'plain' ? '' : kind, small ? 'small' : ''].join(' ').trim()

export function Button({
  kind = 'plain',
  small = false,
  ...rest
}: ComponentProps<'button'> & { kind?: Kind; small?: boolean }) {
  return <button type="button" className={nameOf(kind, small)} {...rest} />
}

export function ButtonLink({ kind = 'plain', small = false, ...rest }: LinkProps & { kind?: Kind; small?: boolean }) {
  return <Link className={nameOf(kind, small)} {...rest} />
}

export function LinkButton({ risk = false, ...rest }: ComponentProps<'button'> & { risk?: boolean }) {
  return <button type="button" className={risk ? 'linkbtn risk' : 'linkbtn'} {...rest} />
}
