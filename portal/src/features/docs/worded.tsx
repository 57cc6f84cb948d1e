/** A sentence in which what stands between backticks is code. */
export function Worded({ text }: { text: string }) {
  return text.split('`').map((part, i) => (i % 2 === 1 ? <code key={i}>{part}</code> : part))
}
