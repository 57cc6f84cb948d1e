import { expect, test } from 'vitest'
import { snippets } from '../../portal/src/solving/snippets.ts'
import { cases } from '../../solvers/cases/index.ts'

const written = (name: string, body: Record<string, unknown>) =>
  snippets.find((one) => one.name === name)!.write('https://soakstone.example/v1/cases/x/solve', body)

/** What each language reads between the quotes that it puts around the body. */
const bodyIn: Record<string, (text: string) => unknown> = {
  curl: (text) => JSON.parse(/ -d '(.*)'$/s.exec(text)![1]!.replaceAll(`'\\''`, `'`)),
  Python: (text) => JSON.parse(/r'''((?:(?!''').)*)'''\n/s.exec(text)![1]!),
  'C#': (text) => JSON.parse(/"""\n(.*?)\n"""/s.exec(text)![1]!),
  TypeScript: (text) => JSON.parse(/JSON\.stringify\((.*)\),\n\}\)/s.exec(text)![1]!),
}

test.each(snippets.map(({ name }) => name))('a snippet of %s sends the very body, whatever stands in it', (name) => {
  const odd = { material: `'a' "b" \\ ''' \u2028 %s $x {y} é`, times: [1e-9, 1e17], left: { kind: 'flux', on: true } }
  for (const body of [odd, ...cases.map(({ example }) => example as Record<string, unknown>)]) {
    const text = written(name, body)
    expect(bodyIn[name]?.(text)).toEqual(body)
    expect(text).toContain('https://soakstone.example/v1/cases/x/solve')
    expect(text).toContain('SOAK_KEY')
  }
})
