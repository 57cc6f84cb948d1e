import { readFileSync } from 'node:fs'
import path from 'node:path'
import { gzipSync } from 'node:zlib'
import { beforeAll, expect, test } from 'vitest'
import { built, root } from './harness/built.ts'

interface Chunk {
  file: string
  imports?: string[]
  dynamicImports?: string[]
}

const dist = path.join(root, 'dist/portal')
let manifest: Record<string, Chunk>
beforeAll(async () => {
  await built()
  manifest = JSON.parse(readFileSync(path.join(dist, '.vite/manifest.json'), 'utf8')) as Record<string, Chunk>
})

/** A chunk with all that it imports, without what it reads later. */
function loaded(name: string, into = new Set<string>()): Set<string> {
  const chunk = manifest[name]
  if (!chunk) throw new Error(`the build has no ${name}`)
  if (into.has(name)) return into
  into.add(name)
  chunk.imports?.forEach((imported) => loaded(imported, into))
  return into
}

function kilobytes(names: Iterable<string>): number {
  const files = new Set([...names].map((name) => manifest[name]?.file ?? '').filter((file) => file.endsWith('.js')))
  return [...files].reduce((sum, file) => sum + gzipSync(readFileSync(path.join(dist, file))).length, 0) / 1000
}

test.each([
  'home/home-screen',
  'cases/catalogue-screen',
  'cases/case-screen',
  'docs/docs-screen',
  'docs/guide-screen',
  'keys/keys-screen',
  'usage/usage-screen',
  'materials/materials-screen',
])('the first load of %s is under 170 kB of compressed JavaScript', (screen) => {
  const names = loaded(`src/features/${screen}.tsx`, loaded('index.html'))
  const size = kilobytes(names)
  console.log(`${screen}: ${size.toFixed(1)} kB`)
  expect(size).toBeLessThan(170)
  expect([...names].join(' ')).not.toMatch(/katex|shiki|swagger|visx/)
})

test('explorer, formulas, highlighting and plots are read only where they are used', () => {
  const lazy = Object.values(manifest).flatMap(({ dynamicImports = [] }) => dynamicImports)
  for (const part of ['explorer.tsx', 'typeset.ts', 'highlighted.tsx', 'day-chart.tsx'])
    expect(
      lazy.some((name) => name.endsWith(part)),
      part,
    ).toBe(true)
})

test('the page carries a place for the nonce and nothing inline without it', () => {
  const html = readFileSync(path.join(dist, 'index.html'), 'utf8')
  const inline = [...html.matchAll(/<(script|style)\b([^>]*)>/g)].filter(
    ([, , attributes]) => !attributes?.includes('nonce="__CSP_NONCE__"'),
  )
  expect(inline.map(([tag]) => tag)).toEqual([])
  expect(html).not.toMatch(/ style="| on[a-z]+="/)
})
