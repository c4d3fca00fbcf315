import Database from 'better-sqlite3'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Problem } from '../../shared/api/common'
import { routes } from '../../shared/api/routes'
import { admin, startServer, type Reply, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { iso, settingsFile } from '../support/vault-plant'

/*
 * What is sent wrongly: the status, the words that a person reads, and that nothing of it is kept. Faults of settings files
 * have their own tests, a file each.
 */

let server: TestServer
let plant: ServerPlant
let administrator: string
/** What belongs to the other site, and a planner and technician who sees only his own. */
let far: { siteId: number, lineId: number, machineId: number, axisId: number, unitId: number, versionId: number, trayId: number }
let bound: string
let own: { siteId: number, lineId: number, machineId: number, axisId: number, unitId: number, versionId: number, ruleId: number }
const now = Date.now()

const idOf = (json: unknown) => (json as { id: number }).id
const versionOf = ({ status, json, text }: Reply): number => {
  if (status !== 201) throw new Error(`${status} ${text}`)
  return (json as unknown as { version: { id: number } }).version.id
}
const problemOf = ({ json }: Reply) => json as unknown as Problem
const file = (serial: string, thrustLimit = 38) => settingsFile({ serial, exportedAt: iso(now - 3600_000), setup: { thrustLimit } })
const send = (method: string, path: string, body?: unknown, as = bound, headers: Record<string, string> = {}) => server.call(method, path, { as, headers, ...body === undefined ? {} : { body } })

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
  administrator = await server.signIn('admin')
  const west = await plant.post('/api/sites', { name: 'West', timeZone: 'UTC' })
  const westLine = await plant.post('/api/lines', { siteId: west, name: 'Line W' })
  const westMachine = await plant.post('/api/machines', { lineId: westLine, name: 'Press W' })
  const atWest = await plant.axis('WEST-01.Z', 'SN-WEST', { machineId: westMachine })
  await plant.post('/api/nameplates', { model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
  own = {
    siteId: west, lineId: westLine, machineId: westMachine, ...atWest, versionId: versionOf(await plant.upload(file('SN-WEST'))),
    ruleId: await plant.post('/api/rules', { scope: 'axis', scopeId: atWest.axisId, field: 'jogSpeed', max: 50, reason: 'guard' }),
  }
  const atHome = await plant.axis('HOME-01.Z', 'SN-HOME')
  const lineId = await plant.post('/api/lines', { siteId: plant.siteId, name: 'Line H' })
  // What a spare of that site sent is that site's; a file of a serial that nobody knows is everybody's.
  await plant.post('/api/units', { serial: 'SN-SPARE', model: 'HL40-200V', siteId: plant.siteId })
  const trayId = ((await plant.upload(file('SN-SPARE'))).json as unknown as { tray: number }).tray
  far = { siteId: plant.siteId, lineId, machineId: plant.machineId, ...atHome, versionId: versionOf(await plant.upload(file('SN-HOME'))), trayId }
  const { email, password } = { email: 'jon.aas@larkfield.example', password: admin.password }
  await server.call('POST', '/api/people', { as: administrator, body: { name: 'Jon Aas', email, roles: ['planner', 'technician'], siteIds: [west], password } })
  bound = await server.signIn({ email, password })
})
afterAll(() => server.stop())

/** A refusal with words: a whole sentence, of a person's language, that leaves the tables as they were. */
async function refused(call: () => Promise<Reply>, status: number, code: string, words: RegExp = /\S/): Promise<void> {
  const before = plant.rows()
  const reply = await call()
  expect([reply.status, reply.json.code], reply.text).toEqual([status, code])
  const { title, detail, type } = problemOf(reply)
  expect(reply.headers.get('content-type')).toBe('application/problem+json')
  expect(type).toBe(`urn:witnessmark:problem:${code}`)
  expect(title).toMatch(/^[A-Z]\S*( \S+)*$/)
  expect(detail).toMatch(words)
  expect(detail).not.toMatch(/undefined|NaN|\[object|SQLITE|invalid|illegal/i)
  expect(plant.rows()).toEqual(before)
}

describe('a file that nobody can place', () => {
  it('of an unknown serial is kept, and told by its serial', async () => {
    const { status, json } = await plant.upload(file('SN-TYPO'))
    expect([status, (json as { problem?: string }).problem]).toEqual([202, 'serial-unknown'])
    expect((json as { detail?: string }).detail).toMatch(/SN-TYPO/)
  })

  it('of a unit that is not fitted is kept, and told so', async () => {
    await plant.post('/api/units', { serial: 'SN-SHELF', model: 'HL40-200V' })
    const { status, json } = await plant.upload(file('SN-SHELF'))
    expect([status, (json as { problem?: string }).problem]).toEqual([202, 'not-fitted'])
    expect((json as { detail?: string }).detail).toMatch(/SN-SHELF/)
  })

  it('of a model that nobody registered is stored; what needs its nameplate says that it is missing', async () => {
    await plant.axis('NEW-01.Z', 'SN-NEW', { model: 'HX99' })
    const reply = await plant.upload(settingsFile({ serial: 'SN-NEW', model: 'HX99', exportedAt: iso(now), setup: { softLimitMin: 0, softLimitMax: 180 } }))
    versionOf(reply)
    const { checks } = reply.json as unknown as { checks: { level: string, message: string }[] }
    expect(checks.filter(({ level }) => level === 'unknown').map(({ message }) => message)).toContain('The span of the soft limits cannot be judged without nameplate.stroke.')
  })
})

describe('a body that is not what an upload is', () => {
  const raw = (body: string | Buffer, headers: Record<string, string>) => () => server.call('POST', '/api/uploads', { as: plant.as.technician, raw: body, headers })
  const form = (...parts: string[]) => raw([...parts.map(part => `--x\r\nContent-Disposition: form-data; ${part}\r\n`), '--x--\r\n'].join(''), { 'content-type': 'multipart/form-data; boundary=x' })
  const part = 'name="file"; filename="a.json"\r\n\r\n{}'

  it('of 3 MiB says how much is taken', async () => {
    await refused(raw(Buffer.alloc(3 * 1024 * 1024, 0x20), { 'content-type': 'application/json' }), 413, 'too-large', /2 MiB \(2,097,152 bytes\)/)
    await refused(raw(Buffer.alloc(3 * 1024 * 1024, 0x20), { 'content-type': 'text/csv' }), 413, 'too-large')
  })

  it.each([
    ['of another type', { 'content-type': 'application/pdf' }, /application\/json, text\/csv or multipart\/form-data; this came as application\/pdf/],
    ['of no type', { 'content-type': '' }, /this came as nothing named/],
    ['that is packed', { 'content-type': 'application/json', 'content-encoding': 'gzip' }, /Send the file uncompressed; this came with Content-Encoding gzip/],
  ])('%s says which it may be', (_what, headers, words) => refused(raw(file('SN-HOME'), headers as unknown as Record<string, string>), 415, 'content-type', words))

  it('of a form that breaks off, or names no boundary, says what to send', async () => {
    await refused(raw(`--x\r\nContent-Disposition: form-data; ${part}`, { 'content-type': 'multipart/form-data; boundary=x' }), 422, 'multipart-broken', /Send it again as multipart\/form-data with one part named file/)
    await refused(raw(`--x\r\nContent-Disposition: form-data; ${part}\r\n--x--`, { 'content-type': 'multipart/form-data' }), 422, 'multipart-broken', /one part named file/)
  })

  it('of a form with no file, two files, or a field twice, says so', async () => {
    await refused(form('name="occasion"\r\n\r\nroutine'), 422, 'file-missing', /no part named file/)
    await refused(form('name="file"\r\n\r\n{}'), 422, 'file-missing', /give it a file name/)
    await refused(form(part, part), 422, 'file-twice', /Send each file on its own/)
    await refused(form('name="reason"\r\n\r\na', 'name="reason"\r\n\r\nb', part), 422, 'field-twice', /reason/)
    await refused(form('name="colour"\r\n\r\nred', part), 422, 'input', /colour/)
  })
})

describe('a session that is over', () => {
  it('stores nothing and says what to do, for an upload and for an edit', async () => {
    const cookie = await server.signIn({ email: 'tobias.achterberg@larkfield.example', password: admin.password, panel: true })
    const handle = new Database(join(server.folder, 'vault.sqlite'))
    const earlier = (at: string) => new Date(Date.parse(at) - 6 * 60_000).toISOString()
    for (const { id_hash: hash, seen_at: seen } of handle.prepare('SELECT id_hash, seen_at FROM session WHERE panel = 1').all() as { id_hash: string, seen_at: string }[]) {
      handle.prepare('UPDATE session SET seen_at = ? WHERE id_hash = ?').run(earlier(seen), hash)
    }
    handle.close()
    for (const call of [
      () => plant.upload(file('SN-HOME', 41), '', { as: cookie }),
      () => send('PATCH', `/api/axes/${far.axisId}`, { rev: 1, role: 'lid' }, cookie),
      () => send('GET', '/api/board', undefined, cookie),
    ]) {
      const before = plant.rows()
      const reply = await call()
      expect([reply.status, reply.json.code]).toEqual([401, 'sign-in-needed'])
      expect(problemOf(reply).title).toBe('Sign in first')
      // The session itself may be swept away.
      expect({ ...plant.rows(), session: 0 }).toEqual({ ...before, session: 0 })
    }
  })
})

describe('ids of another site', () => {
  it('in an address are not there', async () => {
    for (const path of [
      `/api/sites/${far.siteId}`, `/api/lines/${far.lineId}`, `/api/machines/${far.machineId}`, `/api/axes/${far.axisId}`, '/api/axes/tag:HOME-01.Z',
      `/api/versions/${far.versionId}`, `/api/versions/${far.versionId}/changes?against=${own.versionId}`, `/api/versions/${own.versionId}/changes?against=${far.versionId}`,
    ]) await refused(() => send('GET', path), 404, 'not-found')
    await refused(() => send('POST', `/api/tray/${far.trayId}/assign`, { axisId: own.axisId }), 404, 'not-found')
    await refused(() => send('POST', `/api/versions/${far.versionId}/known-good`, { meaning: 'approved', password: admin.password }), 404, 'not-found')
    await refused(() => send('POST', `/api/versions/${far.versionId}/judge`), 404, 'not-found')
  })

  it('in a body are not there either', async () => {
    const bodies: readonly (readonly [string, string, object])[] = [
      ['POST', '/api/lines', { siteId: far.siteId, name: 'Line X' }],
      ['POST', '/api/machines', { lineId: far.lineId, name: 'Press X' }],
      ['POST', '/api/axes', { machineId: far.machineId, tag: 'X-01.Z', axisKind: 'linear' }],
      ['POST', '/api/units', { serial: 'SN-X', model: 'HL40-200V', siteId: far.siteId }],
      ['POST', '/api/fittings', { axisId: far.axisId, unitId: own.unitId, at: iso(now) }],
      ['POST', '/api/rules', { scope: 'site', scopeId: far.siteId, field: 'jogSpeed', max: 5, reason: 'x' }],
      ['POST', '/api/rules', { scope: 'machine', scopeId: far.machineId, field: 'jogSpeed', max: 5, reason: 'x' }],
      ['POST', '/api/rules', { scope: 'axis', scopeId: far.axisId, field: 'jogSpeed', max: 5, reason: 'x' }],
      ['POST', '/api/waivers', { axisId: far.axisId, rule: 'travel-span', at: [], value: { level: 'unknown', missing: ['nameplate.stroke'] }, reason: 'x', until: iso(now + 86_400_000), password: admin.password }],
      ['PATCH', `/api/lines/${own.lineId}`, { rev: 1, siteId: far.siteId }],
      ['PATCH', `/api/machines/${own.machineId}`, { rev: 1, lineId: far.lineId }],
      ['PATCH', `/api/axes/${own.axisId}`, { rev: 1, machineId: far.machineId }],
      ['PATCH', `/api/units/${own.unitId}`, { rev: 2, siteId: far.siteId }],
    ]
    for (const [method, path, body] of bodies) await refused(() => send(method, path, body), 404, 'not-found')
  })

  it('that were never given to anything are told the same', async () => {
    const words = async (id: number) => problemOf(await send('GET', `/api/axes/${id}`)).detail.replaceAll(String(id), 'N')
    expect(await words(far.axisId)).toBe(await words(999_999))
  })

  it('as the axis of an upload store nothing there', async () => {
    const before = plant.rows()
    const { status } = await plant.upload(file('SN-HOME', 77), `?axis=${far.axisId}`, { as: bound })
    expect(status).toBeGreaterThanOrEqual(202)
    expect(plant.rows().version).toBe(before.version)
  })
})

describe('an edit', () => {
  /** An address, what is changed there, and the rev that it has: a unit was edited once, by fitting it. */
  const examples = (): Readonly<Record<string, readonly [path: string, body: object, rev?: number]>> => ({
    'PATCH /api/people/:id': [`/api/people/${personId}`, { name: 'Una Berg' }],
    'PATCH /api/sites/:id': [`/api/sites/${own.siteId}`, { releaseHours: 12 }],
    'PATCH /api/lines/:id': [`/api/lines/${own.lineId}`, { name: 'Line W1' }],
    'PATCH /api/machines/:id': [`/api/machines/${own.machineId}`, { name: 'Press W1' }],
    'PATCH /api/axes/:id': [`/api/axes/${own.axisId}`, { role: 'lid' }],
    'PATCH /api/units/:id': [`/api/units/${own.unitId}`, { location: 'cabinet 4' }, 2],
    'PATCH /api/nameplates/:id': [`/api/nameplates/${nameplateId}`, { maxSpeed: 800 }],
  })
  let personId: number
  let nameplateId: number
  beforeAll(async () => {
    personId = idOf((await server.call('POST', '/api/people', { as: administrator, body: { name: 'Una Dahl', email: 'una.dahl@larkfield.example', roles: ['technician'], siteIds: [] } })).json)
    nameplateId = await plant.post('/api/nameplates', { model: 'HR16', axisKind: 'rotary', stroke: 360 })
  })

  it('has an example here for each route that changes something', () => {
    expect(Object.keys(examples()).sort()).toEqual(Object.keys(routes).filter(name => name.startsWith('PATCH')).sort())
  })

  it.each(Object.keys(routes).filter(name => name.startsWith('PATCH')))('%s asks for the rev that was read, and tells what is there now when it is stale', async (name) => {
    const [path = '', body = {}, rev = 1] = examples()[name] ?? []
    const as = name.includes('people') ? administrator : plant.as.planner
    await refused(() => send('PATCH', path, body, as), 428, 'rev-missing', /rev/)
    const first = await send('PATCH', path, { rev, ...body }, as)
    expect([first.status, first.text]).toEqual([200, expect.stringContaining(`"rev":${rev + 1}`)])
    await refused(() => send('PATCH', path, { rev, ...body }, as), 409, 'edited-meanwhile', /Look at the present state/)
    expect(problemOf(await send('PATCH', path, { rev, ...body }, as)).current).toEqual(first.json)
    await refused(() => send('PATCH', path, { rev: rev + 2, ...body }, as), 409, 'edited-meanwhile')
  })
})

describe('a key for one request', () => {
  it('is 1 to 200 signs', async () => {
    await refused(() => send('POST', '/api/lines', { siteId: own.siteId, name: 'Line K' }, bound, { 'idempotency-key': 'k'.repeat(201) }), 422, 'input', /Idempotency-Key: 1 to 200/)
    expect((await send('POST', '/api/lines', { siteId: own.siteId, name: 'Line K' }, bound, { 'idempotency-key': 'k'.repeat(200) })).status).toBe(201)
  })

  it('sent again answers alike and stores nothing more; under another address or body it is refused with words', async () => {
    const key = { 'idempotency-key': 'again' }
    const first = await send('POST', '/api/machines', { lineId: own.lineId, name: 'Press K' }, bound, key)
    const before = plant.rows()
    const again = await send('POST', '/api/machines', { lineId: own.lineId, name: 'Press K' }, bound, key)
    expect([again.status, again.text, again.headers.get('idempotency-replayed')]).toEqual([first.status, first.text, 'true'])
    expect(plant.rows()).toEqual(before)
    await refused(() => send('POST', '/api/machines', { lineId: own.lineId, name: 'Press L' }, bound, key), 422, 'key-reused')
  })

  it('does not carry an answer past a refusal: signed again with a wrong password it is refused', async () => {
    const key = { 'idempotency-key': 'signed' }
    const mark = (password: string) => send('POST', `/api/axes/${own.axisId}/known-good/none`, { meaning: 'reviewed', password }, bound, key)
    await refused(() => mark('wrong'), 403, 'signature')
    expect((await mark(admin.password)).status).toBe(201)
    await refused(() => mark('wrong'), 403, 'signature')
  })
})
