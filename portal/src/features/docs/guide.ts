import type { Body } from '../../solving/body.ts'

/** A call that a guide shows; each is answered as it stands. */
export interface Call {
  /** Of the API, from its root. */
  path: string
  body: Body
}

export interface Part {
  heading: string
  /** Paragraphs; what stands between backticks is code. */
  text: readonly string[]
  call?: Call
}

export interface Guide {
  slug: string
  title: string
  /** One sentence. */
  summary: string
  parts: readonly Part[]
  /** Where to go on. */
  links?: readonly { to: string; text: string }[]
}
