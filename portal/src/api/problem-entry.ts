export interface Described {
  title: string
  text: string
}

/** A code that an answer can carry. */
export interface ProblemEntry extends Described {
  code: string
  kind: 'problem' | 'entry' | 'warning'
  status?: number
  retryable?: boolean
}
