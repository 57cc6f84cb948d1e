/** Aborted once, by the first SIGINT or SIGTERM; what takes long listens to it, and closing is never cut short by a second. */
const controller = new AbortController()
export const stopping = controller.signal

export function listenForSignals() {
  for (const name of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) process.on(name, () => controller.abort())
}

/** Leaves the set-up after a step that a signal must not cut in two. */
export function checkStopping() {
  stopping.throwIfAborted()
}
