import { chmodSync, existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import pg from 'pg'
import { afterEach, beforeEach, expect, test, vi } from 'vitest'
import { sharedFolder } from '../../scripts/folders.mjs'
import { borrowCluster } from '../../scripts/kept-cluster.mjs'
import { tryLock } from '../../scripts/lock.mjs'
import { startCluster } from '../../scripts/postgres.mjs'

let dir = ''
beforeEach(() => {
  dir = mkdtempSync(path.join(tmpdir(), 'soakstone-kept-'))
  chmodSync(dir, 0o711)
  vi.spyOn(process.stderr, 'write').mockReturnValue(true)
})
afterEach(() => {
  rmSync(dir, { recursive: true, force: true })
  rmSync(sharedFolder(dir), { recursive: true, force: true })
})

const inDir = (name: string) => path.join(dir, name)

async function ask(url: string, statement: string): Promise<unknown[]> {
  const client = new pg.Client(url)
  await client.connect()
  try {
    return (await client.query(statement)).rows
  } finally {
    await client.end()
  }
}

test('what a cluster holds outlives its stop, a killed start and a lost password', async () => {
  const first = await startCluster({ dir })
  await ask(first.url, 'CREATE TABLE kept AS SELECT 7 AS n')
  expect(statSync(inDir('database.json')).mode & 0o777).toBe(0o600)
  await first.stop()
  expect(existsSync(inDir('start.lock'))).toBe(false)

  const second = await startCluster({ dir })
  expect(second.url).toBe(first.url)
  // As a killed start leaves it: the lock names a process that is gone and the database runs on.
  writeFileSync(inDir('start.lock'), '4000000 1')
  const third = await startCluster({ dir })
  expect(await ask(third.url, 'SELECT n FROM kept')).toEqual([{ n: 7 }])

  rmSync(inDir('database.json'))
  writeFileSync(inDir('start.lock'), '4000000 1')
  const fourth = await startCluster({ dir })
  expect(fourth.url).not.toBe(third.url)
  expect(await ask(fourth.url, 'SELECT n FROM kept')).toEqual([{ n: 7 }])
  await fourth.stop()
})

test('an errand uses the cluster that runs, and starts and stops one that does not', async () => {
  const alone = await borrowCluster({ dir })
  expect(await ask(alone.url, 'SELECT 1 AS one')).toEqual([{ one: 1 }])
  await alone.stop()
  await expect(ask(alone.url, 'SELECT 1')).rejects.toThrow(/ECONNREFUSED/)

  const owner = await startCluster({ dir })
  const errand = await borrowCluster({ dir })
  expect(errand.url).toBe(owner.url)
  await errand.stop()
  expect(await ask(owner.url, 'SELECT 1 AS one')).toEqual([{ one: 1 }])
  await owner.stop()
})

test('an initialisation that was cut short is made again', async () => {
  mkdirSync(inDir('postgres.new'))
  writeFileSync(inDir('postgres.new/PG_VERSION'), '15\n')
  const cluster = await startCluster({ dir })
  expect(existsSync(inDir('postgres.new'))).toBe(false)
  expect(await ask(cluster.url, 'SELECT 1 AS one')).toEqual([{ one: 1 }])
  await cluster.stop()
})

test('where the user that runs the database cannot enter, its files lie elsewhere', async () => {
  const said = vi.spyOn(console, 'error').mockReturnValue()
  chmodSync(dir, 0o700)
  const root = process.getuid?.() === 0
  const cluster = await startCluster({ dir })
  await cluster.stop()
  const parent = root ? sharedFolder(dir) : dir
  expect(existsSync(path.join(parent, 'postgres/PG_VERSION'))).toBe(true)
  expect(said.mock.calls.flat()).toEqual(
    root ? [`The database is kept in ${parent}, because the user that runs it cannot enter ${dir}.`] : [],
  )
})

test('a folder that is no database is named, and left as it is', async () => {
  mkdirSync(inDir('postgres'))
  writeFileSync(inDir('postgres/letter.txt'), 'mine')
  await expect(startCluster({ dir })).rejects.toThrow(`The folder ${inDir('postgres')} is not a whole database`)
  expect(readFileSync(inDir('postgres/letter.txt'), 'utf8')).toBe('mine')
  expect(existsSync(inDir('start.lock'))).toBe(false)
})

test('a settings file that was damaged is named', async () => {
  writeFileSync(inDir('database.json'), '{"port":')
  mkdirSync(inDir('postgres'))
  writeFileSync(inDir('postgres/PG_VERSION'), '15\n')
  await expect(startCluster({ dir })).rejects.toThrow(`${inDir('database.json')} cannot be read`)
})

test('a second start beside a running one is refused, naming the process', async () => {
  const held = tryLock(inDir('start.lock'))
  expect(held.held).toBe(true)
  await expect(startCluster({ dir, patience: 1 })).rejects.toThrow(`Another start uses ${dir} (process ${process.pid})`)
})
