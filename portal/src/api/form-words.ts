import { MINUS } from '../figure/measures.ts'

/** What a form calls the fields and units that the service names by their codes. */
export interface FormWords {
  /** Label by the name of the contract. */
  labels: Readonly<Record<string, string>>
  /** Unit as it is shown, by its code. */
  units?: Readonly<Record<string, string>>
}

/** Minus signs before numbers as they stand on a sheet; days such as 2026-03-31 keep their hyphens. */
export const withMinus = (text: string): string =>
  text.replace(/(^|[^\w-])-(?=[\d.])/g, `$1${MINUS}`).replace(/(\de)-(?=\d)/g, `$1${MINUS}`)

const nameInText = /(?<![\w."/])([A-Za-z]\w*)(?:\/(\d+))?(?![\w"])/g

/** A text of the service in the words of the form. Plain words are names only where a sentence is about them. */
export function inFormWords(text: string, { labels, units = {} }: FormWords): string {
  const named = text.replace(nameInText, (whole, name: string, index: string | undefined, at: number) => {
    const label = Object.hasOwn(labels, name) ? labels[name] : undefined
    const first = at === 0 || text.slice(0, at).endsWith('. ')
    const subject = first && /^ (?:is|must|has|and|or) /.test(text.slice(at + whole.length))
    if (label === undefined || !(subject || index !== undefined || /[A-Z]/.test(name))) return whole
    const said = first ? label : label.charAt(0).toLowerCase() + label.slice(1)
    return index === undefined ? said : `${said}, value ${Number(index) + 1},`
  })
  const codes = Object.keys(units).sort((a, b) => b.length - a.length)
  const shown = codes.reduce(
    (said, code) => said.replaceAll(new RegExp(`(?<=\\d )${escaped(code)}(?![\\w(/])`, 'g'), units[code] ?? code),
    named,
  )
  return withMinus(shown)
}

const escaped = (code: string): string => code.replace(/[.*+?^${}()|[\]\\/]/g, '\\$&')
