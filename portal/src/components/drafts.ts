/* What was typed into a form and not sent, kept for this tab: a session may end meanwhile. */

const nameOf = (form: string) => `draft-${form}`

/** What was kept of a form; nothing where the browser keeps nothing. */
export function draftOf<V extends object>(form: string): Partial<V> {
  try {
    const kept: unknown = JSON.parse(sessionStorage.getItem(nameOf(form)) ?? '{}')
    return typeof kept === 'object' && kept !== null ? (kept as Partial<V>) : {}
  } catch {
    return {}
  }
}

export function keepDraft(form: string, values: object): void {
  try {
    sessionStorage.setItem(nameOf(form), JSON.stringify(values))
  } catch {
    // Without storage what was typed is lost with the page.
  }
}

/** Of one form, when it was sent or left; of all, when somebody signs out. */
export function dropDrafts(form?: string): void {
  try {
    for (const name of Object.keys(sessionStorage))
      if (form === undefined ? name.startsWith('draft-') : name === nameOf(form)) sessionStorage.removeItem(name)
  } catch {
    // Nothing was kept.
  }
}
