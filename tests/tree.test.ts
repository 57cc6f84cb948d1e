import { execFileSync } from 'node:child_process'
import { readFileSync } from 'node:fs'
import path from 'node:path'
import { expect, test } from 'vitest'
import { root } from './imports.ts'

/** What is committed, and what would be. */
const files = execFileSync('git', ['ls-files', '--cached', '--others', '--exclude-standard', '-z'], {
  cwd: root,
  encoding: 'utf8',
})
  .split('\0')
  .filter((name) => name && !/\.(png|woff2|ico)$/.test(name))

/** The documented example: no key is ever made of it, whatever checksum follows. */
const EXAMPLE = '0123456789ABCDEFGHIJKLMNOPQRSTUV'
const found: Record<string, RegExp> = {
  'a key that could work': new RegExp(`soak_(trial|metered)_(?!${EXAMPLE})[0-9A-Za-z]{38}`),
  'a private key': /-----BEGIN [A-Z ]*PRIVATE KEY-----/,
  'a database password': /postgres(ql)?:\/\/[^\s:/@'"`$]+:[0-9a-f]{16,}@/,
  'the home of somebody': /(^|[^A-Za-z0-9_.])\/(root|home|work|farm|Users)\/[A-Za-z.]/m,
  'a test that never runs': /\b(it|test|describe)\.(skip|only|todo)\b/,
}

const finds = (text: string) => Object.keys(found).filter((name) => found[name]?.test(text))

test('no committed file holds a secret, a path of one machine or a test that never runs', () => {
  expect(files.length).toBeGreaterThan(50)
  const faults = files.flatMap((name) => {
    const text = readFileSync(path.join(root, name), 'utf8')
    return finds(text).map((fault) => `${name} holds ${fault}`)
  })
  expect(faults).toEqual([])
})

test('each of these would be found', () => {
  const planted = [
    'soak_' + 'trial_' + 'a'.repeat(38),
    '-----BEGIN ' + 'PRIVATE KEY-----',
    'postgres' + '://someone:' + '0123456789abcdef@127.0.0.1/db',
    'cd /' + 'root/clone',
    'test' + '.skip(',
  ]
  expect(planted.map(finds)).toEqual(Object.keys(found).map((name) => [name]))
  expect(finds(`soak_trial_${EXAMPLE}1ggZdL`)).toEqual([])
})

test('the lock of the packages names no address to download from', () => {
  const lock = JSON.parse(readFileSync(path.join(root, 'package-lock.json'), 'utf8')) as {
    packages: Record<string, { resolved?: string; integrity?: string; inBundle?: boolean }>
  }
  const packages = Object.entries(lock.packages).filter(([name]) => name !== '')
  expect(packages.length).toBeGreaterThan(100)
  expect(packages.filter(([, { resolved }]) => resolved?.includes('://')).map(([name]) => name)).toEqual([])
  expect(packages.filter(([, { integrity, inBundle }]) => !integrity && !inBundle).map(([name]) => name)).toEqual([])
})
