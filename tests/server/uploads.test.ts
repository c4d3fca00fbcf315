import { request } from 'node:http'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Problem } from '../../shared/api/common'
import type { UploadStored } from '../../shared/api/uploads'
import type { LifeEvent, VersionOne, VersionSummary } from '../../shared/api/versions'
import { admin, startServer, type Reply, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { iso, settingsFile, type FileParts } from '../support/vault-plant'

let server: TestServer
let plant: ServerPlant
let axisId: number
let count = 0
let serial: string
const now = Date.now()
const day = 24 * 3600_000

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
})
afterAll(() => server.stop())
beforeEach(async () => {
  count += 1
  serial = `SN-${count}`
  axisId = (await plant.axis(`LID-${count}.Z`, serial)).axisId
})

const bytes = (setup: object = {}, rest: FileParts = {}) => settingsFile({ serial, exportedAt: iso(now - day), setup, ...rest })
const stored = ({ status, json, text }: Reply): UploadStored => {
  if (status !== 201) throw new Error(`${status} ${text}`)
  return json as unknown as UploadStored
}
const problem = ({ json }: Reply) => json as unknown as Problem

describe('POST /api/uploads', () => {
  it('answers 201 with changes and checks, 200 for what was seen, and reads back whole', async () => {
    const first = stored(await plant.upload(bytes({ thrustLimit: 38 }, { readings: { hours: 9 } }), '?reason=as%20delivered&workOrder=WO-1&changedBy=&name=lid.json'))
    expect(first).toMatchObject({ version: { number: 1, reason: 'as delivered', workOrder: 'WO-1', changedBy: null }, changes: [], renumbered: [], findings: [] })
    const second = stored(await plant.upload(bytes({ thrustLimit: 55 })))
    expect(second.changes).toMatchObject([{ field: 'thrustLimit', before: 38, after: 55, points: 17 }])
    const seen = await plant.upload(bytes({ thrustLimit: 55 }, { readings: { hours: 10 } }))
    expect(seen.status).toBe(200)
    expect(seen.json).toMatchObject({ version: { id: second.version.id, sightings: 1 } })
    const one = (await server.call('GET', `/api/versions/${first.version.id}`, { as: plant.as.auditor })).json as unknown as VersionOne
    expect(one).toMatchObject({ readings: { hours: 9 }, upload: { name: 'lid.json', form: 'json' }, content: { setup: { thrustLimit: 38 } }, unit: { serial } })
    const byNumber = await server.call('GET', `/api/axes/tag:lid-${count}.z/versions/1`, { as: plant.as.auditor })
    expect(byNumber.json).toMatchObject({ id: first.version.id })
  })

  it('takes a form with one file and the same fields', async () => {
    const form = new FormData()
    form.set('occasion', 'as-found')
    form.set('reason', 'belt changed')
    form.set('file', new Blob([new Uint8Array(bytes({ thrustLimit: 38 }))]), 'Deckel ä.json')
    const { status, json } = await server.call('POST', '/api/uploads?occasion=routine', { as: plant.as.technician, raw: form })
    expect(status).toBe(201)
    expect(json).toMatchObject({ version: { occasion: 'as-found', reason: 'belt changed' } })
    const { version } = json as unknown as UploadStored
    const file = await server.call('GET', `/api/versions/${version.id}/file?form=original`, { as: plant.as.auditor })
    expect(file.headers.get('content-disposition')).toMatch(/filename\*=UTF-8''Deckel%20%C3%A4\.json/)
  })

  it('answers 202 and keeps the file for an unknown serial, a unit that is not fitted, another kind of axis', async () => {
    expect(await plant.upload(bytes({}, { serial: 'SN-NOWHERE' }))).toMatchObject({ status: 202, json: { problem: 'serial-unknown' } })
    await plant.post('/api/units', { serial: `SPARE-${count}`, model: 'HL40-200V' })
    expect(await plant.upload(bytes({}, { serial: `SPARE-${count}` }))).toMatchObject({ status: 202, json: { problem: 'not-fitted' } })
    expect(await plant.upload(bytes({}, { axisKind: 'rotary' }))).toMatchObject({ status: 202, json: { problem: 'axis-kind' } })
  })

  it('stores a file of a model without a nameplate; what needs one is unknown', async () => {
    const { checks } = stored(await plant.upload(bytes({ softLimitMin: 0, softLimitMax: 180 })))
    const unknown = checks.filter(({ level }) => level === 'unknown')
    expect(unknown.flatMap(({ missing }) => missing ?? []).some(name => name.startsWith('nameplate'))).toBe(true)
  })

  it('refuses 3 MiB with 413, in one piece and in chunks without a length, and keeps nothing', async () => {
    const before = plant.rows()
    const big = Buffer.alloc(3 * 1024 * 1024, 0x20)
    expect(problem(await plant.upload(big)).code).toBe('too-large')
    const chunked = await sendChunks(server.url, plant.as.technician, [big.subarray(0, 1024 * 1024), big.subarray(1024 * 1024)])
    expect(chunked).toMatchObject({ status: 413, body: { code: 'too-large' } })
    expect(plant.rows()).toEqual(before)
  })

  it('refuses another content type with 415 and a broken form with 422, and keeps nothing', async () => {
    const before = plant.rows()
    expect(await plant.upload(bytes(), '', { type: 'application/zip' })).toMatchObject({ status: 415, json: { code: 'content-type' } })
    const broken = await plant.upload('--x\r\nContent-Disposition: form-data; name="file"; filename="a"\r\n\r\n{', '', { type: 'multipart/form-data; boundary=x' })
    expect(broken).toMatchObject({ status: 422, json: { code: 'multipart-broken' } })
    expect(problem(broken).detail).toContain('Send it again')
    const empty = await plant.upload('--x--\r\n', '', { type: 'multipart/form-data; boundary=x' })
    expect(empty).toMatchObject({ status: 422, json: { code: 'file-missing' } })
    expect(plant.rows()).toEqual(before)
  })

  it('refuses fields that it does not know or cannot read', async () => {
    expect(await plant.upload(bytes(), '?colour=blue')).toMatchObject({ status: 422, json: { code: 'input', errors: [{ at: '?colour' }] } })
    expect(await plant.upload(bytes(), '?occasion=read-back')).toMatchObject({ status: 422, json: { code: 'input' } })
    expect(await plant.upload(bytes(), '?capturedAt=yesterday')).toMatchObject({ status: 422, json: { code: 'input' } })
    expect(await plant.upload(bytes(), '?changedBy=person:4000')).toMatchObject({ status: 422, json: { code: 'input', errors: [{ at: '?changedBy' }] } })
  })

  it('gives the first answer again for a key sent twice, and 422 with another body under it', async () => {
    const first = await plant.upload(bytes({ thrustLimit: 38 }), '', { key: `key-${count}` })
    const rows = plant.rows()
    const again = await plant.upload(bytes({ thrustLimit: 38 }), '', { key: `key-${count}` })
    expect(again.status).toBe(201)
    expect(again.text).toBe(first.text)
    expect(again.headers.get('idempotency-replayed')).toBe('true')
    expect(await plant.upload(bytes({ thrustLimit: 39 }), '', { key: `key-${count}` })).toMatchObject({ status: 422, json: { code: 'key-reused' } })
    const unreadable = await plant.upload('{', '', { key: `bad-${count}` })
    const replayed = await plant.upload('{', '', { key: `bad-${count}` })
    expect([unreadable.status, replayed.status]).toEqual([422, 422])
    expect(problem(replayed).tray).toBe(problem(unreadable).tray)
    expect(plant.rows()).toMatchObject({ version: rows.version, tray: (rows.tray ?? 0) + 1 })
  })

  it('tells late files and doubtful clocks, and refuses neither', async () => {
    const first = stored(await plant.upload(bytes({ thrustLimit: 38 }, { exportedAt: iso(now - 9 * day) })))
    stored(await plant.upload(bytes({ thrustLimit: 50 }, { exportedAt: iso(now - 2 * day) })))
    expect(stored(await plant.upload(bytes({ thrustLimit: 41 }, { exportedAt: iso(now - 5 * day) }))).version).toMatchObject({ number: 3, late: true, current: false, baseId: first.version.id })
    expect(stored(await plant.upload(bytes({ thrustLimit: 42 }, { exportedAt: '2001-01-01T00:00:00Z' }))).version).toMatchObject({ number: 4, clockDoubtful: true, late: false, current: true, capturedAt: '2001-01-01T00:00:00.000Z' })
    expect(stored(await plant.upload(bytes({ thrustLimit: 43 }, { exportedAt: iso(now + 9 * day) }))).version).toMatchObject({ number: 5, clockDoubtful: true, current: true })
    const axis = await server.call('GET', `/api/axes/${axisId}`, { as: plant.as.auditor })
    expect(axis.json).toMatchObject({ versions: 5, current: { number: 5 } })
  })

  it('wants a role and a sign-in', async () => {
    expect(await plant.upload(bytes(), '', { as: plant.as.auditor })).toMatchObject({ status: 403, json: { code: 'role' } })
    expect((await fetch(`${server.url}/api/uploads`, { method: 'POST', body: new Uint8Array(bytes()), headers: { 'content-type': 'application/json' } })).status).toBe(401)
  })

  it('takes a script’s token for its sites', async () => {
    const as = await server.signIn('admin')
    const { json } = await server.call('POST', '/api/tokens', { as, body: { name: `Nightly ${count}`, scopes: ['upload'], siteIds: [plant.siteId], endsAt: iso(now + 30 * day) } })
    const { token } = json as unknown as { token: string }
    expect(stored(await plant.upload(bytes(), '', { as: token })).version.storedBy).toBe(`Nightly ${count} (ines.okafor)`)
    expect(await server.call('GET', '/api/board', { as: token })).toMatchObject({ status: 403 })
  })

  it('a preview tells the same and writes nothing', async () => {
    stored(await plant.upload(bytes({ thrustLimit: 38 })))
    const before = plant.rows()
    const { status, json } = await server.call('POST', '/api/uploads/preview', { as: plant.as.technician, raw: bytes({ thrustLimit: 40 }), headers: { 'content-type': 'application/json' } })
    expect(status).toBe(200)
    expect(json).toMatchObject({ outcome: 'version', number: 2, changes: [{ field: 'thrustLimit' }] })
    const unreadable = await server.call('POST', '/api/uploads/preview', { as: plant.as.technician, raw: '{', headers: { 'content-type': 'application/json' } })
    expect(unreadable).toMatchObject({ status: 422, json: { code: 'settings-unreadable' } })
    expect(problem(unreadable).tray).toBeUndefined()
    expect(plant.rows()).toEqual(before)
  })
})

describe('versions and axes', () => {
  it('changes as a list, a patch that turns one content into the other, and a text', async () => {
    const a = stored(await plant.upload(bytes({ thrustLimit: 38 }))).version.id
    const b = stored(await plant.upload(bytes({ thrustLimit: 55, jogSpeed: 20 }))).version.id
    expect((await server.call('GET', `/api/versions/${b}/changes?against=${a}`, { as: plant.as.auditor })).json).toMatchObject({ compare: 'differs', renumbered: [], changes: [{ field: 'jogSpeed', after: 20 }, { field: 'thrustLimit', before: 38, after: 55 }] })
    const patch = await server.call('GET', `/api/versions/${b}/changes?against=${a}&form=json-patch`, { as: plant.as.auditor })
    expect(patch.json).toEqual([{ op: 'add', path: '/setup/jogSpeed', value: 20 }, { op: 'replace', path: '/setup/thrustLimit', value: 55 }])
    const text = await server.call('GET', `/api/versions/${b}/changes?against=${a}&form=text`, { as: plant.as.auditor })
    expect(text.headers.get('content-type')).toBe('text/plain; charset=utf-8')
    expect(text.text).toContain('-setup,,thrustLimit,38,%')
  })

  it('of another site are not there', async () => {
    const { version } = stored(await plant.upload(bytes({ thrustLimit: 38 })))
    const west = await plant.post('/api/sites', { name: `West ${count}`, timeZone: 'Europe/Copenhagen' })
    const boss = await server.signIn('admin')
    const far = { email: `far${count}@larkfield.example`, password: admin.password }
    await server.call('POST', '/api/people', { as: boss, body: { name: 'Jon Aas', email: far.email, roles: ['planner', 'technician'], siteIds: [west], password: far.password } })
    const as = await server.signIn(far)
    for (const path of [`/api/versions/${version.id}`, `/api/versions/${version.id}/file?form=json`, `/api/axes/${axisId}`, `/api/axes/tag:LID-${count}.Z/life`, `/api/axes/${axisId}/as-of?at=${iso(now)}`]) {
      expect(await server.call('GET', path, { as }), path).toMatchObject({ status: 404, json: { code: 'not-found' } })
    }
    expect(await server.call('POST', `/api/axes/${axisId}/kit`, { as, body: { form: 'json', cautionsRead: true } })).toMatchObject({ status: 404 })
    expect(await server.call('POST', `/api/versions/${version.id}/void`, { as, body: { reason: 'x', password: admin.password } })).toMatchObject({ status: 404 })
    expect(await plant.upload(bytes(), '', { as })).toMatchObject({ status: 202, json: { problem: 'serial-unknown' } })
  })

  it('an edit of the axis needs the rev that was read', async () => {
    expect(await server.call('PATCH', `/api/axes/${axisId}`, { as: plant.as.planner, body: { role: 'lid' } })).toMatchObject({ status: 428, json: { code: 'rev-missing' } })
    expect(await server.call('PATCH', `/api/axes/${axisId}`, { as: plant.as.planner, body: { rev: 1, role: 'lid' } })).toMatchObject({ status: 200, json: { rev: 2 } })
    expect(await server.call('PATCH', `/api/axes/${axisId}`, { as: plant.as.planner, body: { rev: 1, role: 'cap' } })).toMatchObject({ status: 409, json: { code: 'edited-meanwhile', current: { rev: 2, role: 'lid' } } })
  })

  it('their lists are paged and the life and the board tell of them', async () => {
    for (const thrustLimit of [30, 31, 32]) stored(await plant.upload(bytes({ thrustLimit })))
    const page = await server.call('GET', `/api/axes/${axisId}/versions?limit=2`, { as: plant.as.auditor })
    const { items, next } = page.json as unknown as { items: VersionSummary[], next: string }
    expect(items.map(({ number }) => number)).toEqual([3, 2])
    expect((await server.call('GET', `/api/axes/${axisId}/versions?limit=2&cursor=${next}`, { as: plant.as.auditor })).json).toMatchObject({ items: [{ number: 1 }], next: null })
    const life = (await server.call('GET', `/api/axes/${axisId}/life`, { as: plant.as.auditor })).json as unknown as { items: LifeEvent[] }
    expect(life.items.filter(({ kind }) => kind === 'version').map(({ number }) => number)).toEqual([3, 2, 1])
    const board = (await server.call('GET', '/api/board', { as: plant.as.auditor })).json as unknown as { axes: { id: number, status: string }[] }
    expect(board.axes.find(({ id }) => id === axisId)).toMatchObject({ status: 'unmarked', current: { number: 3 } })
  })
})

function sendChunks(url: string, cookie: string, chunks: readonly Buffer[]): Promise<{ status: number | undefined, body: Problem }> {
  return new Promise((resolve, reject) => {
    const outgoing = request(`${url}/api/uploads`, { method: 'POST', headers: { 'content-type': 'application/json', cookie } }, (incoming) => {
      let text = ''
      incoming.setEncoding('utf8').on('data', (part: string) => { text += part }).on('end', () => resolve({ status: incoming.statusCode, body: JSON.parse(text) as Problem }))
    })
    outgoing.on('error', reject)
    for (const chunk of chunks) outgoing.write(chunk)
    outgoing.end()
  })
}
