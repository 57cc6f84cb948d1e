import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { INLINE_BYTES } from '../../api/compute/compute.ts'
import { operations } from '../../api/operations.ts'
import { genericMaterials } from '../../solvers/materials/generic.ts'
import slab from '../../solvers/cases/slab-convection/case.ts'
import { type Answer, Client } from './harness/client.ts'
import { answerFaults } from './harness/documents.ts'
import { makeKey, query, signUp } from './harness/people.ts'
import { type TestService, startTestService } from './harness/service.ts'

let service: TestService
let anyone: Client
let key: string
let strangersKey: string
let accountId: string
beforeAll(async () => {
  service = await startTestService()
  anyone = new Client(service.url)
  const own = await signUp(service.url)
  accountId = own.accountId
  key = (await makeKey(own.client)).secret
  strangersKey = (await makeKey((await signUp(service.url)).client)).secret
})
afterAll(() => service.close())

const operationOf = (id: string) => operations.find((o) => o.id === id)!
const example = operationOf('createMaterial').example?.body as Record<string, unknown>
const csv = operationOf('importMaterials').upload!.example

interface Asked {
  method?: string
  body?: unknown
  headers?: Record<string, string>
  by?: string
}
const ask = (path: string, { by = key, headers = {}, ...call }: Asked = {}) =>
  anyone.call(`/v1/materials${path}`, { ...call, headers: { authorization: `Bearer ${by}`, ...headers } })
const keep = (change: object = {}) => ask('', { body: { ...example, ...change } })
const importCsv = (body: string, path = '/import', headers: Record<string, string> = {}) =>
  ask(path, { method: 'POST', body, headers: { 'content-type': 'text/csv', ...headers } })
const tagOf = (answer: Answer) => answer.headers.get('etag') ?? ''
const put = (id: string, body: unknown, headers: Record<string, string>, by = key) =>
  ask(`/${id}`, { method: 'PUT', body, headers, by })

const { conductivity: _, density: __, specificHeat: ___, ...rest } = slab.example
const solve = (change: object, by = key) => anyone.solve(slab.id, by, { ...rest, ...change })

const idsOf = (answer: Answer) => answer.json.materials.map((m: { id: string }) => m.id) as string[]

async function everyPage(parameters: string): Promise<string[]> {
  const ids: string[] = []
  for (let cursor = ''; ;) {
    const page = await ask(`?${parameters}${cursor && `&cursor=${cursor}`}`)
    expect(answerFaults(operationOf('listMaterials'), page)).toEqual([])
    ids.push(...idsOf(page))
    if (page.json.next === null) return ids
    cursor = page.json.next as string
  }
}

describe('the list', () => {
  test('holds the catalogue and then the own materials by name, each once, in pages of any size', async () => {
    const names = ['b', 'a', 'a', 'c']
    const made = await Promise.all(names.map((name) => keep({ name: `paged ${name}`, group: 'paging' })))
    const named = new Map(made.map((answer) => [answer.json.id as string, answer.json.name as string]))
    const own = (await everyPage('of=account&limit=200')).filter((id) => named.has(id))
    expect(own.map((id) => named.get(id))).toEqual(['paged a', 'paged a', 'paged b', 'paged c'])
    const all = [...genericMaterials.map(({ id }) => id), ...(await everyPage('of=account'))]
    for (const limit of [200, 50, 45, 7]) expect(await everyPage(`limit=${limit}`)).toEqual(all)
    expect(await everyPage('group=paging&limit=1')).toEqual(own)
    expect(idsOf(await ask(`?limit=90`))).toHaveLength(90)
  })

  test('is filtered by words and by group', async () => {
    expect(await everyPage('q=LIME%20plaster')).toEqual(['plaster-lime-sand'])
    expect(await everyPage('group=metal&of=catalogue')).toContain('steel')
    expect(await everyPage('group=metal&q=concrete')).toEqual([])
    const made = await keep({ name: '100% \\ "quoted" _ name' })
    expect(await everyPage('q=100%25')).toEqual([made.json.id])
    expect(await everyPage('q=%5C%20quoted%20_&of=account')).toEqual([made.json.id])
    expect(await everyPage('q=%25%25')).toEqual([])
  })

  test('cuts a page to its most, and refuses what is no number and no cursor of its own', async () => {
    expect(idsOf(await ask('?limit=999999'))).toHaveLength(Math.min(200, (await everyPage('')).length))
    const forged = Buffer.from('[0,"a\\u0000","b"]').toString('base64url')
    for (const parameter of [
      'limit=0',
      'limit=-1',
      'limit=x',
      'cursor=x',
      `cursor=${forged}`,
      'of=all',
      'q=',
      'q=%00',
    ]) {
      const answer = await ask(`?${parameter}`)
      expect(answer.json, parameter).toMatchObject({ status: 422, code: 'invalid-parameter' })
      expect(answer.json.errors[0].parameter).toBe(parameter.split('=')[0])
    }
  })
})

describe('an own material', () => {
  test('is kept with its units converted, and read as it was answered', async () => {
    const made = await keep({
      conductivity: { value: 0.5, unit: '[Btu_IT]/(h.[ft_i].[degR])' },
      density: { value: 1.65, unit: 'g/cm3' },
    })
    expect(made.json).toMatchObject({
      of: 'account',
      density: 1650,
      conductivity: 0.8653673331856956,
      volumetricHeatCapacity: 1650 * 950,
    })
    expect(made.json.id).toMatch(/^mat_[0-9A-Za-z_-]{21}$/)
    expect(made.headers.get('location')).toBe(`/v1/materials/${made.json.id}`)
    const read = await ask(`/${made.json.id}`)
    expect(read.text).toBe(made.text)
    expect(tagOf(read)).toBe(tagOf(made))
    expect(made.text).not.toContain(accountId)
  })

  test('is refused by its fields', async () => {
    const answer = await keep({ conductivity: 0, density: { value: 1, unit: 'kg' }, state: 'damp', name: ' x' })
    const faults = answer.json.errors.map(
      (e: { pointer: string; code: string }) => `${e.pointer} ${e.code}`,
    ) as string[]
    expect(faults.sort()).toEqual([
      '#/conductivity out-of-range',
      '#/density/unit unit-not-accepted',
      '#/name wrong-form',
      '#/state not-in-list',
    ])
  })

  test('is changed by who has its present version only', async () => {
    const made = await keep()
    const id = made.json.id as string
    const change = { ...example, conductivity: 0.9 }
    expect((await put(id, change, {})).json).toMatchObject({ status: 428, code: 'precondition-required' })
    for (const tag of ['"another"', `W/${tagOf(made)}`, 'nonsense', ''])
      expect((await put(id, change, { 'if-match': tag })).json).toMatchObject({
        status: 412,
        code: 'precondition-failed',
      })
    const changed = await put(id, change, { 'if-match': `"x", ${tagOf(made)}` })
    expect(changed.json).toMatchObject({ id, conductivity: 0.9 })
    expect(tagOf(changed)).not.toBe(tagOf(made))
    expect((await put(id, change, { 'if-match': tagOf(made) })).status).toBe(412)
    expect((await put(id, change, { 'if-match': '*' })).status).toBe(200)
    expect((await ask(`/${id}`)).json.conductivity).toBe(0.9)
  })

  test('is changed once where two change the same version at once', async () => {
    const made = await keep()
    const changes = Array.from({ length: 6 }, (_____, i) =>
      put(made.json.id as string, { ...example, conductivity: i + 1 }, { 'if-match': tagOf(made) }),
    )
    const statuses = (await Promise.all(changes)).map(({ status }) => status).sort()
    expect(statuses).toEqual([200, 412, 412, 412, 412, 412])
  })

  test('is deleted once, and the catalogue is not', async () => {
    const { json } = await keep()
    expect((await ask(`/${json.id}`, { method: 'DELETE' })).status).toBe(204)
    for (const method of ['DELETE', 'GET']) expect((await ask(`/${json.id}`, { method })).status).toBe(404)
    expect((await put(json.id as string, example, { 'if-match': '*' })).status).toBe(404)
    for (const method of ['DELETE', 'PUT']) {
      const body = method === 'PUT' ? example : undefined
      expect((await ask('/steel', { method, body, headers: { 'if-match': '*' } })).status).toBe(404)
    }
    expect((await ask('/steel')).json).toMatchObject({ of: 'catalogue', updatedAt: null, conductivity: 50 })
  })

  test('is nothing to another account', async () => {
    const { json } = await keep({ name: 'ours alone' })
    const id = json.id as string
    const by = strangersKey
    expect((await ask(`/${id}`, { by })).status).toBe(404)
    expect((await put(id, example, { 'if-match': '*' }, by)).status).toBe(404)
    expect((await ask(`/${id}`, { method: 'DELETE', by })).status).toBe(404)
    expect(idsOf(await ask('?of=account&limit=200', { by }))).toEqual([])
    expect((await solve({ material: id }, by)).json.errors).toMatchObject([
      { pointer: '#/material', code: 'material-unknown' },
    ])
    expect((await ask(`/${id}`)).json.name).toBe('ours alone')
  })

  test('comes to an end at 5,000, none of a too long import kept', async () => {
    const { client, accountId: full } = await signUp(service.url)
    const by = (await makeKey(client)).secret
    await query(
      service.databaseUrl,
      `INSERT INTO materials (id, account_id, name, "group", conductivity, density, specific_heat, state, source, confidence, created_by)
       SELECT 'mat_' || lpad(i::text, 21, '0'), $1, 'm', 'own', 1, 1, 1, 'dry', 's', 'low', 'k' FROM generate_series(1, 4999) i`,
      [full],
    )
    const two = csv + csv.split('\n')[1]
    const headers = { 'content-type': 'text/csv' }
    const imported = await ask('/import', { method: 'POST', body: two, headers, by })
    expect(imported.json).toMatchObject({ status: 409, code: 'too-many-materials' })
    expect((await ask('', { body: example, by })).status).toBe(201)
    expect((await ask('', { body: example, by })).json).toMatchObject({ status: 409, code: 'too-many-materials' })
  })
})

describe('a solve', () => {
  test('takes a material of the account, and says what it used', async () => {
    const { json } = await keep({ state: 'unspecified' })
    const answer = await solve({ material: json.id })
    const explicit = await solve({ conductivity: 0.72, density: 1650, specificHeat: 950 })
    expect(answer.json.result).toEqual(explicit.json.result)
    const { name, source, confidence } = example
    expect(answer.json.input).toMatchObject({
      conductivity: 0.72,
      material: { id: json.id, name, source, confidence, state: 'unspecified' },
    })
    expect(answer.json.warnings).toMatchObject([{ code: 'moisture-state-unspecified' }])
    expect(answerFaults(operationOf(`solve-${slab.id}`), answer)).toEqual([])
    expect((await solve({ material: json.id })).text).toBe(answer.text)
  })

  test('uses what the material is now, and refuses one that is gone', async () => {
    const made = await keep()
    const material = made.json.id as string
    const conductivityNow = async () => (await solve({ material })).json.input.conductivity as number
    expect(await conductivityNow()).toBe(0.72)
    await put(material, { ...example, conductivity: 1.5 }, { 'if-match': tagOf(made) })
    expect(await conductivityNow()).toBe(1.5)
    await ask(`/${material}`, { method: 'DELETE' })
    expect((await solve({ material })).json.errors).toMatchObject([{ pointer: '#/material', code: 'material-unknown' }])
  })

  test('takes one in a body that is long, too', async () => {
    const { json } = await keep()
    const times = Array.from({ length: 4000 }, (_____, i) => i + 1)
    expect(JSON.stringify(times).length).toBeGreaterThan(INLINE_BYTES)
    const outputs = ['meanTemperature']
    const answer = await solve({ material: json.id, times, outputs })
    const explicit = await solve({ conductivity: 0.72, density: 1650, specificHeat: 950, times, outputs })
    expect(answer.status, answer.text).toBe(200)
    expect(answer.json.result).toEqual(explicit.json.result)
    expect((await solve({ material: `${json.id}`.replace(/.$/, '!'), times, outputs })).json.code).toBe('invalid-input')
  })

  test('knows no own material where no key says whose', async () => {
    const { json } = await keep()
    const answer = await anyone.post(`/portal/v1/try/${slab.id}/solve`, { ...rest, material: json.id })
    expect(answer.json.errors).toMatchObject([{ pointer: '#/material', code: 'material-unknown' }])
    expect((await anyone.post(`/portal/v1/try/${slab.id}/solve`, { ...rest, material: 'steel' })).status).toBe(200)
  })
})

describe('an import', () => {
  const [head = '', row = ''] = csv.split('\n')

  test('keeps the rows that will do, and reports on each', async () => {
    const rows = [
      row,
      'Decimal comma,"0,72",1650,950,dry,lab,medium',
      'Too light,0.7,0,950,dry,lab,medium',
      'No source,0.7,1650,950,dry,,medium',
      'Short,0.7',
      '=1+1,.7,1.65e3,950,dry,"lab ""A""",high',
    ]
    const answer = await importCsv([head, ...rows].join('\r\n'))
    expect(answerFaults(operationOf('importMaterials'), answer)).toEqual([])
    expect(answer.json).toMatchObject({ dryRun: false, accepted: 2, refused: 4 })
    const told = answer.json.rows.map((r: { errors?: { column: string; code: string }[] }) =>
      (r.errors ?? []).map((e) => `${e.column} ${e.code}`).join(),
    )
    expect(told).toEqual([
      '',
      'conductivity wrong-type',
      'density out-of-range',
      'source missing-field',
      ' wrong-length',
      '',
    ])
    const last = await ask(`/${answer.json.rows[5].id}`)
    expect(last.json).toMatchObject({ name: '=1+1', conductivity: 0.7, density: 1650, source: 'lab "A"', group: 'own' })
  })

  test('is examined and not kept in a dry run', async () => {
    const before = await everyPage('of=account&limit=200')
    const answer = await importCsv(csv, '/import?dryRun=true')
    expect(answer.json).toEqual({ dryRun: true, accepted: 1, refused: 0, rows: [{ row: 1, status: 'accepted' }] })
    expect(await everyPage('of=account&limit=200')).toEqual(before)
  })

  test('takes its columns in any order, and the mark that some programs begin a text with', async () => {
    const text =
      '\uFEFFgroup,confidence,source,state,specificHeat,density,conductivity,name\nwalls,low,lab,dry,900,1000,1,Mixed up\n'
    const answer = await importCsv(text)
    expect((await ask(`/${answer.json.rows[0].id}`)).json).toMatchObject({
      name: 'Mixed up',
      group: 'walls',
      density: 1000,
    })
  })

  test.each([
    ['an open quote', `${head}\n"open,1,1,1,dry,lab,low`, 400, 'malformed-csv'],
    ['no rows', head, 400, 'malformed-csv'],
    ['nothing', '', 400, 'malformed-csv'],
    ['too many rows', `${head}\n${`${row}\n`.repeat(1001)}`, 400, 'malformed-csv'],
    ['a long line', `${head}\n${'x'.repeat(10_000)},1`, 400, 'malformed-csv'],
    ['an unknown, a missing and a second column', `name,name,colour,conductivity\nx,y,z,1`, 422, 'invalid-input'],
    ['a name of every object', `${head},__proto__\n${row},1`, 422, 'invalid-input'],
    ['more than its limit', `${head}\n${'x'.repeat(256 * 1024)}`, 413, 'body-too-large'],
  ])('is refused with %s', async (_____, body, status, code) => {
    const answer = await importCsv(body)
    expect(answer.json, answer.text).toMatchObject({ status, code })
    expect(answerFaults(operationOf('importMaterials'), answer)).toEqual([])
  })

  test('is refused as JSON, and in another alphabet', async () => {
    for (const kind of ['application/json', 'text/csv; charset=latin1', 'text/plain'])
      expect((await importCsv(csv, '/import', { 'content-type': kind })).json).toMatchObject({
        code: 'unsupported-media-type',
      })
    const bytes = Buffer.from(csv.replace('Lime', 'K\u00e4lk'), 'latin1')
    const headers = { authorization: `Bearer ${key}`, 'content-type': 'text/csv' }
    const answer = await fetch(`${service.url}/v1/materials/import`, { method: 'POST', headers, body: bytes })
    expect(await answer.json()).toMatchObject({ status: 400, code: 'malformed-csv' })
  })

  test('takes its most rows', async () => {
    const answer = await importCsv(`${head}\n${`${row}\n`.repeat(1000)}`, '/import?dryRun=true')
    expect(answer.json.accepted).toBe(1000)
  })

  /* Read to its end, a body of many small rows took seconds; what is beyond the most rows is not looked at. */
  test.each([
    ['small rows', `${head}\n${'a\n'.repeat(125_000)}`],
    ['names', ','.repeat(250_000)],
    ['quotes', `${head}\n${'"",'.repeat(80_000)}`],
    ['blank lines', `${head}\n${'\n'.repeat(250_000)}`],
    ['wrong cells', `${head}\n${',,,,,,\n'.repeat(1000)}`],
  ])('holds up nobody for long with %s', async (_____, text) => {
    const before = process.cpuUsage()
    await importCsv(text, '/import?dryRun=true')
    const { user } = process.cpuUsage(before)
    expect(user / 1000).toBeLessThan(500)
  })
})
