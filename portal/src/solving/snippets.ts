import { jsonText } from '../components/json-text.ts'
import type { Body } from './body.ts'

export interface Snippet {
  name: string
  language: 'shellscript' | 'typescript'
  write(url: string, body: Body): string
}

const quoted = (text: string): string => text.replaceAll("'", `'\\''`)
const indented = (text: string): string => text.replaceAll('\n', '\n  ')

export const snippets: readonly Snippet[] = [
  {
    name: 'curl',
    language: 'shellscript',
    write: (url, body) =>
      [
        `curl "${url}" \\`,
        '  -H "Authorization: Bearer $SOAK_KEY" \\',
        '  -H "Content-Type: application/json" \\',
        `  -d '${quoted(jsonText(body))}'`,
      ].join('\n'),
  },
  {
    name: 'TypeScript',
    language: 'typescript',
    write: (url, body) =>
      [
        `const response = await fetch('${url}', {`,
        "  method: 'POST',",
        '  headers: {',
        '    Authorization: `Bearer ${process.env.SOAK_KEY}`,',
        "    'Content-Type': 'application/json',",
        '  },',
        `  body: JSON.stringify(${indented(jsonText(body))}),`,
        '})',
        'const answer = await response.json()',
        'if (!response.ok) throw new Error(`${answer.code}: ${answer.detail}`)',
        'console.log(JSON.stringify(answer.result))',
      ].join('\n'),
  },
]
