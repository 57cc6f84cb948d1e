import { MINUS } from '../figure/measures.ts'

/** What a form calls the fields and units that the service names by their codes. */
export interface FormWords {
  /** Label by the name of the contract. */
  labels: Readonly<Record<string, string>>
  /** Label of what stands inside a field. */
  inside?: Readonly<Record<string, string>>
  /** Unit as it is shown, by its code. */
  units?: Readonly<Record<string, string>>
}

/** Minus signs before numbers as they stand on a sheet; days such as 2026-03-31 keep their hyphens. */
export const withMinus = (text: string): string =>
  text.replace(/(^|[^\w-])-(?=[\d.])/g, `$1${MINUS}`).replace(/(\de)-(?=\d)/g, `$1${MINUS}`)

const nameInText = /(?<![\w."/])([A-Za-z]\w*)((?:\/\w+)*)(?![\w"])/g

/** A text of the service in the words of the form. Plain words are names only where a sentence is about them. */
export function inFormWords(text: string, { labels, inside = {}, units = {} }: FormWords): string {
  const labelOf = (name: string) => ownOf(labels, name) ?? ownOf(inside, name)
  const named = text.replace(nameInText, (whole, name: string, rest: string, at: number) => {
    const label = labelOf(name)
    const first = at === 0 || text.slice(0, at).endsWith('. ')
    const subject = first && /^ (?:is|must|has|and|or) /.test(text.slice(at + whole.length))
    if (label === undefined || !(subject || rest || /[A-Z]/.test(name))) return whole
    const parts = rest.split('/').slice(1)
    const more = parts.map((part) => (/^\d+$/.test(part) ? `value ${Number(part) + 1}` : lower(labelOf(part) ?? part)))
    return [first ? label : lower(label), ...more].join(', ') + (more.length > 0 ? ',' : '')
  })
  const codes = Object.keys(units).sort((a, b) => b.length - a.length)
  const shown = codes.reduce(
    (said, code) => said.replaceAll(new RegExp(`(?<=\\d )${escaped(code)}(?![\\w(/])`, 'g'), units[code] ?? code),
    named,
  )
  return withMinus(shown)
}

const lower = (label: string): string => label.charAt(0).toLowerCase() + label.slice(1)
const ownOf = (labels: Readonly<Record<string, string>>, name: string) =>
  Object.hasOwn(labels, name) ? labels[name] : undefined
const escaped = (code: string): string => code.replace(/[.*+?^${}()|[\]\\/]/g, '\\$&')
