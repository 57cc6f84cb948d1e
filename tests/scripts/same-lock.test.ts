import { expect, test } from 'vitest'
import { sameLock } from '../../scripts/setup.mjs'

const a = { version: '1.0.0', integrity: 'sha512-a' }
const wanted = {
  packages: { '': { version: '9' }, 'node_modules/a': a, 'node_modules/win': { version: '2.0.0', optional: true } },
}

test.each([
  ['what is wanted, without the part for another machine', { 'node_modules/a': a }, true],
  ['another version', { 'node_modules/a': { ...a, version: '1.0.1' } }, false],
  ['another content', { 'node_modules/a': { ...a, integrity: 'sha512-b' } }, false],
  ['one too few', {}, false],
  ['one too many', { 'node_modules/a': a, 'node_modules/b': a }, false],
])('%s', (_, packages, same) => {
  expect(sameLock(wanted, { packages })).toBe(same)
})
