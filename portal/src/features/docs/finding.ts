import type { ProblemEntry } from '../../api/problem-entry.ts'
import type { Guide } from './guide.ts'

/** Something that a search may find, with where it stands. */
export interface Entry {
  to: string
  title: string
  text: string
  kind: 'Guide' | 'Case' | 'Problem' | 'Warning' | 'Code of a field'
  /** What is looked through beside title and text. */
  more?: string
}

export const guideEntries = (guides: readonly Guide[]): Entry[] =>
  guides.map(({ slug, title, summary, parts }) => ({
    to: `/docs/${slug}`,
    title,
    text: summary,
    kind: 'Guide',
    more: parts.flatMap(({ heading, text }) => [heading, ...text]).join(' '),
  }))

export const caseEntries = (cases: readonly { id: string; title: string; summary: string }[]): Entry[] =>
  cases.map(({ id, title, summary }) => ({ to: `/cases/${id}`, title, text: summary, kind: 'Case', more: id }))

const kinds = { problem: 'Problem', entry: 'Code of a field', warning: 'Warning' } as const

export const codeEntries = (codes: readonly ProblemEntry[]): Entry[] =>
  codes.map(({ code, title, text, kind }) => ({
    to: `/problems/${code}`,
    title,
    text,
    kind: kinds[kind],
    more: code,
  }))

/** Entries in which every word stands; those that have all of them in the title come first. */
export function found(entries: readonly Entry[], words: string): Entry[] {
  const wanted = words.toLowerCase().split(/\s+/).filter(Boolean)
  if (wanted.length === 0) return []
  const has = (text: string) => wanted.every((word) => text.toLowerCase().includes(word))
  const all = entries.filter(({ title, text, more = '' }) => has(`${title} ${text} ${more}`))
  const first = all.filter(({ title, more = '' }) => has(title) || more.toLowerCase() === words.trim().toLowerCase())
  return [...first, ...all.filter((one) => !first.includes(one))]
}
