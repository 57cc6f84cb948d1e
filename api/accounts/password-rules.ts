/** A password alone guards the account, so it is long; nothing else is asked of it. */
export const MIN_PASSWORD = 15
/** bcrypt reads no further. */
export const MAX_PASSWORD_BYTES = 72

const easy = [
  'password passwort passphrase letmein welcome qwertyuiop qwerty asdfghjkl zxcvbnm iloveyou administrator admin',
  'changeme correcthorsebatterystaple correct horse battery staple trustno1 dragon monkey sunshine princess football',
  'baseball superman master secret login abc123 abcdefghijklmnopqrstuvwxyz 01234567890 1234567890 123456789 12345678',
  '1234567 123456 12345 0987654321 987654321 87654321 654321 soakstone',
].flatMap((line) => line.split(' '))
/** So much must be left once everything easy is taken away. */
const LEAST_REST = 8

/** True for a password made of little but well-known words, its own context or repetition. */
export function easilyGuessed(password: string, context: readonly string[]): boolean {
  let rest = password.toLowerCase()
  const words = [...context.flatMap((text) => text.toLowerCase().split(/[^\p{L}\p{N}]+/u)), ...easy]
  for (const word of words.filter((w) => w.length >= 3).sort((a, b) => b.length - a.length))
    rest = rest.replaceAll(word, '')
  const letters = rest.replace(/[^\p{L}\p{N}]/gu, '')
  return letters.length < LEAST_REST || new Set(letters).size < 5 || isRun(letters)
}

/** Every character follows its neighbour by the same step. */
function isRun(text: string): boolean {
  const step = text.charCodeAt(1) - text.charCodeAt(0)
  return [...text.slice(1)].every((_, i) => text.charCodeAt(i + 1) - text.charCodeAt(i) === step)
}
