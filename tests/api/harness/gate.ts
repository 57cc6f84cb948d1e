/** A promise that is resolved from outside. */
export function gate(): { passed: Promise<void>; open: () => void } {
  let open = () => {}
  const passed = new Promise<void>((resolve) => (open = resolve))
  return { passed, open }
}
