import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { admin, startServer, type TestServer } from '../support/server'

let server: TestServer
let planner: string
let administrator: string
let siteId: number
let axisId: number

const idOf = (json: unknown) => (json as { id: number }).id
async function post(path: string, body: unknown, as = planner, headers: Record<string, string> = {}) {
  return server.call('POST', path, { as, body, headers })
}

beforeAll(async () => {
  server = await startServer()
  planner = await server.signIn('planner')
  administrator = await server.signIn('admin')
  siteId = idOf((await post('/api/sites', { name: 'Larkfield Preserves', timeZone: 'Europe/Copenhagen' })).json)
  const lineId = idOf((await post('/api/lines', { siteId, name: 'Jar line 1' })).json)
  const machineId = idOf((await post('/api/machines', { lineId, name: 'Lid press 2' })).json)
  axisId = idOf((await post('/api/axes', { machineId, tag: 'LID-02.Z', axisKind: 'linear' })).json)
})
afterAll(async () => { await server.stop() })

describe('an edit', () => {
  it('says which rev it read', async () => {
    const patch = (body: unknown) => server.call('PATCH', `/api/sites/${siteId}`, { as: planner, body })
    expect((await patch({ name: 'Other' })).status).toBe(428)
    expect((await patch({ rev: 1, releaseHours: 12 })).json).toMatchObject({ rev: 2, releaseHours: 12 })
    const stale = await patch({ rev: 1, releaseHours: 48 })
    expect([stale.status, stale.json.code, (stale.json.current as unknown as { releaseHours: number }).releaseHours]).toEqual([409, 'edited-meanwhile', 12])
  })

  it('may come as a merge patch', async () => {
    const answer = await server.call('PATCH', '/api/axes/tag:lid-02.z', { as: planner, raw: '{"rev":1,"role":"lid press"}', headers: { 'content-type': 'application/merge-patch+json' } })
    expect(answer.json).toMatchObject({ id: axisId, tag: 'LID-02.Z', role: 'lid press', rev: 2 })
  })
})

describe('another site’s', () => {
  it('records are not there, whichever way they are asked for', async () => {
    const other = idOf((await post('/api/sites', { name: 'Northfield', timeZone: 'UTC' })).json)
    const password = 'a ladder leans on the quince'
    await post('/api/people', { name: 'Ada Lindqvist', email: 'ada@larkfield.example', roles: ['planner', 'technician', 'auditor'], siteIds: [other], password }, administrator)
    const ada = await server.signIn({ email: 'ada@larkfield.example', password })
    for (const path of [`/api/sites/${siteId}`, `/api/axes/${axisId}`, '/api/axes/tag:LID-02.Z', `/api/axes/${axisId}/versions`, `/api/axes/${axisId}/life`, `/api/axes/${axisId}/values?field=thrustLimit`, `/api/axes/${axisId}/fittings`]) {
      const { status, json } = await server.call('GET', path, { as: ada })
      expect([path, status, json.code]).toEqual([path, 404, 'not-found'])
    }
    expect((await server.call('PATCH', `/api/axes/${axisId}`, { as: ada, body: { rev: 2, role: 'x' } })).status).toBe(404)
    expect((await post(`/api/axes/${axisId}/known-good/none`, { meaning: 'reviewed', password }, ada)).status).toBe(404)
    expect((await server.call('GET', '/api/axes', { as: ada })).json.items).toEqual([])
    expect((await server.call('GET', '/api/board', { as: ada })).json.axes).toEqual([])
    const log = await server.call('GET', '/api/log', { as: ada })
    expect([log.status, log.json.code]).toEqual([403, 'site-bounds'])
    expect((await server.call('GET', '/api/me', { as: ada })).json.sites).toMatchObject([{ id: other }])
  })
})

describe('a keyed POST', () => {
  const key = { 'idempotency-key': 'b2f0-one' }
  it('is carried out once', async () => {
    const first = await post('/api/lines', { siteId, name: 'Jar line 9' }, planner, key)
    const second = await post('/api/lines', { siteId, name: 'Jar line 9' }, planner, key)
    expect([first.status, second.status]).toEqual([201, 201])
    expect(second.json).toEqual(first.json)
    expect([first.headers.get('idempotency-replayed'), second.headers.get('idempotency-replayed')]).toEqual([null, 'true'])
  })

  it('refuses another body under its key', async () => {
    const { status, json } = await post('/api/lines', { siteId, name: 'Jar line 10' }, planner, key)
    expect([status, json.code]).toEqual([422, 'key-reused'])
  })

  it('sent twenty times at once makes one record', async () => {
    const answers = await Promise.all(Array.from({ length: 20 }, () => post('/api/lines', { siteId, name: 'Jar line 11' }, planner, { 'idempotency-key': 'b2f0-two' })))
    expect(new Set(answers.map(({ status, text }) => `${status} ${text}`)).size).toBe(1)
    expect(answers.filter(({ headers }) => headers.get('idempotency-replayed') === null)).toHaveLength(1)
  })

  it('answers a token twice alike, though it is shown once', async () => {
    const body = { name: 'nightly', scopes: ['upload'], siteIds: [], endsAt: new Date(Date.now() + 86_400_000).toISOString() }
    const first = await post('/api/tokens', body, administrator, { 'idempotency-key': 'tok' })
    expect((await post('/api/tokens', body, administrator, { 'idempotency-key': 'tok' })).json).toEqual(first.json)
  })
})

describe('a request', () => {
  it('from another site’s page is refused, one from none is not', async () => {
    const send = (headers: Record<string, string>) => post('/api/lines', { siteId, name: `Line ${Math.random()}` }, planner, headers)
    const foreign: Record<string, string>[] = [{ 'sec-fetch-site': 'cross-site' }, { origin: 'https://evil.example' }]
    const own: Record<string, string>[] = [{ 'sec-fetch-site': 'same-origin' }, { origin: server.url }, {}]
    for (const headers of foreign) expect((await send(headers)).json.code).toBe('origin')
    for (const headers of own) expect((await send(headers)).status).toBe(201)
    const signIn = await server.call('POST', '/api/sign-in', { body: admin, headers: { 'sec-fetch-site': 'cross-site' } })
    expect(signIn.json.code).toBe('origin')
  })

  it('is refused in the order that the interface promises', async () => {
    const path = `/api/versions/999999/known-good`
    expect((await server.call('POST', path, { body: {} })).status).toBe(401)
    expect((await server.call('POST', path, { as: administrator, body: {} })).status).toBe(403)
    expect((await server.call('POST', path, { as: planner, body: {} })).status).toBe(422)
    expect((await server.call('POST', path, { as: planner, body: { meaning: 'approved', password: 'wrong' } })).status).toBe(404)
  })

  it('is told every place that is wrong', async () => {
    const { status, json, headers } = await post('/api/axes', { machineId: 0, tag: 'no spaces', extra: 1 })
    expect(status).toBe(422)
    expect(headers.get('content-type')).toBe('application/problem+json')
    expect((json.errors as unknown as { at: string }[]).map(({ at }) => at).sort()).toEqual(['/axisKind', '/extra', '/machineId', '/tag'])
    expect((await server.call('GET', '/api/lines?limit=201&cursor=', { as: planner })).json).toMatchObject({ code: 'input', errors: [{ at: '?limit' }] })
    expect((await server.call('GET', '/api/me?x=1', { as: planner })).json.code).toBe('input')
    expect((await server.call('GET', '/api/sites/0', { as: planner })).json).toMatchObject({ code: 'input', errors: [{ at: ':id' }] })
  })

  it('with a body that is no JSON or too long stores nothing', async () => {
    const raw = (body: string, type = 'application/json') => server.call('POST', '/api/lines', { as: planner, raw: body, headers: { 'content-type': type } })
    expect((await raw('{')).json.code).toBe('json-syntax')
    expect((await raw('{}', 'text/plain')).status).toBe(415)
    expect((await raw(JSON.stringify({ siteId, name: 'x'.repeat(1024 * 1024) }))).status).toBe(413)
  })
})

describe('answers', () => {
  it('run nothing and are not kept', async () => {
    const { headers } = await server.call('GET', '/api/me', { as: planner })
    expect(headers.get('content-security-policy')).toContain('default-src \'none\'')
    expect(headers.get('x-content-type-options')).toBe('nosniff')
    expect(headers.get('cache-control')).toBe('no-store')
    expect(headers.get('access-control-allow-origin')).toBeNull()
    expect(headers.get('set-cookie')).toBeNull()
  })

  it('of the application page hold a strict policy with a nonce', async () => {
    const page = await fetch(`${server.url}/sign-in`)
    const policy = page.headers.get('content-security-policy') ?? ''
    const nonce = /script-src [^;]*'nonce-([^']+)'/.exec(policy)?.[1] ?? 'none'
    expect(policy).toContain('frame-ancestors \'none\'')
    expect(policy).not.toContain('unsafe-inline')
    const scripts = [...(await page.text()).matchAll(/<script([^>]*)>/g)].map(([, attributes = '']) => attributes)
    expect(scripts.length).toBeGreaterThan(0)
    expect(scripts.every(attributes => attributes.includes(`nonce="${nonce}"`))).toBe(true)
    expect(page.headers.get('x-frame-options')).toBe('DENY')
  })

  it('of the application page lend the device’s camera to its own pages, nothing else, and no name that a browser does not know', async () => {
    const policy = (await fetch(`${server.url}/sign-in`)).headers.get('permissions-policy') ?? ''
    const features = policy.split(',').map(each => each.trim().split('='))
    expect(features.filter(([, allowed]) => allowed !== '()')).toEqual([['camera', '(self)']])
    expect(features.map(([name]) => name)).toEqual(expect.arrayContaining(['microphone', 'geolocation', 'usb', 'payment', 'display-capture', 'sync-xhr']))
    expect(features.map(([name]) => name)).not.toContain('web-share')
  })

  it('of the worker that keeps the swap pages name each file of the page, and the policy lets none but ours run', async () => {
    const worker = await fetch(`${server.url}/service-worker.js`)
    expect(worker.headers.get('content-type')).toMatch(/javascript/)
    const { release, files } = JSON.parse(/^const shell = (.*)$/m.exec(await worker.text())?.[1] ?? '{}') as { release: string, files: string[] }
    expect(release).toMatch(/^[0-9a-f]{16}$/)
    expect(files.length).toBeGreaterThan(10)
    const statuses = await Promise.all(files.map(async path => [path, (await fetch(server.url + path)).status]))
    expect(statuses.filter(([, status]) => status !== 200)).toEqual([])
    expect(files.filter(path => !path.startsWith('/_nuxt/'))).toEqual(['/favicon.svg'])
    const policy = (await fetch(`${server.url}/swaps`)).headers.get('content-security-policy') ?? ''
    expect(policy).toContain('worker-src \'self\'')
  })

  it('of the table and of the format are there for programs', async () => {
    expect((await server.call('GET', '/api/openapi.json')).json).toMatchObject({ openapi: '3.1.0' })
    expect((await server.call('GET', '/api/format/schema.json')).text).toContain('json-schema.org/draft/2020-12')
    expect((await server.call('GET', '/api/health')).json).toEqual({ status: 'ok', schema: expect.any(Number) as number, writable: true, verified: true, lettersWaitingSince: null })
  })
})
