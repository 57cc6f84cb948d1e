import { mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { expect, test } from 'vitest'
import { ensureFolder } from '../../scripts/folders.mjs'

test('a folder is made with those above it, and others may pass through it', () => {
  const parent = mkdtempSync(path.join(tmpdir(), 'soakstone-folders-'))
  const folder = path.join(parent, 'a/b')
  ensureFolder(folder)
  ensureFolder(folder)
  expect(statSync(folder).mode & 0o777 & 0o711).toBe(0o711 & ~process.umask())
  rmSync(parent, { recursive: true })
})

test('one that cannot be made is named, at once', () => {
  const file = path.join(mkdtempSync(path.join(tmpdir(), 'soakstone-folders-')), 'file')
  writeFileSync(file, '')
  expect(() => ensureFolder(path.join(file, 'data'))).toThrow(`The folder ${path.join(file, 'data')} cannot be written`)
  expect(() => ensureFolder('/proc/soakstone/data')).toThrow('The folder /proc/soakstone/data cannot be written')
  rmSync(path.dirname(file), { recursive: true })
})
