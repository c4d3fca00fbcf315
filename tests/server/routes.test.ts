import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { roles, type Role } from '../../shared/api/common'
import { routes, type RouteDeclaration } from '../../shared/api/routes'
import { people, startServer, type TestServer } from '../support/server'

/*
 * Every route with every kind of caller, by real requests. The requests carry no valid input on purpose: 401 and 403 come
 * before it is looked at, and whoever may call gets past both, to a 422, a 404, or an answer.
 */

let server: TestServer
const cookies: Partial<Record<Role, string>> = {}
let shared: string
const tokens: Record<string, string> = {}

beforeAll(async () => {
  server = await startServer()
  for (const role of roles) cookies[role] = await server.signIn(role)
  const as = cookies.admin
  const password = 'four jars of quince jelly'
  await server.call('POST', '/api/people', { as, body: { name: 'Panel', email: 'panel@larkfield.example', roles: ['technician', 'planner'], siteIds: [], shared: true, password } })
  shared = await server.signIn({ email: 'panel@larkfield.example', password })
  for (const scope of ['upload', 'read']) {
    const endsAt = new Date(Date.now() + 86_400_000).toISOString()
    const { json } = await server.call('POST', '/api/tokens', { as, body: { name: scope, scopes: [scope], siteIds: [], endsAt } })
    tokens[scope] = json.token ?? ''
  }
})
afterAll(async () => { await server.stop() })

const declared: readonly (readonly [string, RouteDeclaration])[] = Object.entries(routes)
const table = declared.filter(([name]) => !/sign-out|set-up|sign-in/.test(name))
const send = (name: string, as?: string) => {
  const [method = '', path = ''] = name.split(' ')
  return server.call(method, path.replaceAll(/:\w+/g, '999999'), { as, ...(method === 'GET' ? {} : { body: {} }) })
}

describe.each(table)('%s', (name, { may, token }) => {
  it('without sign-in', async () => {
    const { status, json } = await send(name)
    if (may === 'anyone') expect(status).toBeLessThan(400)
    else expect([status, json.code]).toEqual([401, 'sign-in-needed'])
  })

  it.each(roles)('as %s', async (role) => {
    const { status, json } = await send(name, cookies[role])
    const admitted = typeof may === 'string' || may.includes(role)
    if (admitted) expect([401, 403, 405, 500].includes(status), `${status} ${json.code ?? ''}`).toBe(false)
    else expect([status, json.code]).toEqual([403, 'role'])
  })

  it.each(['upload', 'read'])('with a token to %s', async (scope) => {
    if (may === 'anyone') return
    const { status, json } = await send(name, tokens[scope])
    if (token === scope) expect([401, 403, 405, 500].includes(status), `${status} ${json.code ?? ''}`).toBe(false)
    else expect([status, json.code]).toEqual([403, 'token-scope'])
  })
})

describe('beside the table', () => {
  it('nothing answers under /api', async () => {
    expect((await server.call('GET', '/api/_auth/session')).json.code).toBe('no-route')
    expect((await server.call('DELETE', '/api/_auth/session', { as: cookies.planner })).json.code).toBe('no-route')
    const wrong = await server.call('DELETE', '/api/sites/1', { as: cookies.admin })
    expect([wrong.status, wrong.json.code, wrong.headers.get('allow')]).toEqual([405, 'method', 'GET, PATCH'])
  })

  it('no GET changes anything', async () => {
    const count = async () => (await server.call('GET', '/api/log?limit=200', { as: cookies.admin })).json.items
    const before = await count()
    for (const [name] of table.filter(([each]) => each.startsWith('GET'))) await send(name, cookies.planner)
    expect(await count()).toEqual(before)
  })

  it('a shared account and a token never sign', async () => {
    const { id: siteId } = (await server.call('POST', '/api/sites', { as: cookies.planner, body: { name: 'Larkfield', timeZone: 'UTC' } })).json as unknown as { id: number }
    const { id: lineId } = (await server.call('POST', '/api/lines', { as: cookies.planner, body: { siteId, name: 'Jar line' } })).json as unknown as { id: number }
    const { id: machineId } = (await server.call('POST', '/api/machines', { as: cookies.planner, body: { lineId, name: 'Lid press' } })).json as unknown as { id: number }
    const { id: axisId } = (await server.call('POST', '/api/axes', { as: cookies.planner, body: { machineId, tag: 'LID-02.Z', axisKind: 'linear' } })).json as unknown as { id: number }
    const path = `/api/axes/${axisId}/known-good/none`
    const refused = await server.call('POST', path, { as: shared, body: { meaning: 'reviewed', password: 'four jars of quince jelly' } })
    expect([refused.status, refused.json.code]).toEqual([403, 'signature'])
    const wrong = await server.call('POST', path, { as: cookies.planner, body: { meaning: 'reviewed', password: 'wrong' } })
    expect([wrong.status, wrong.json.code]).toEqual([403, 'signature'])
  })

  it('the people of the tests are those of the table', () => expect(Object.keys(people).sort()).toEqual([...roles].sort()))
})
