/** The body of a call. */
export type Body = Readonly<Record<string, unknown>>
