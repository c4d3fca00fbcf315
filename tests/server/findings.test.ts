import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Finding, PlannedChange } from '../../shared/api/findings'
import type { UploadStored } from '../../shared/api/uploads'
import { admin, startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { iso, settingsFile } from '../support/vault-plant'

let server: TestServer
let plant: ServerPlant
let axisId: number
const { password } = admin
let captured = Date.now() - 3_600_000

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
  axisId = (await plant.axis('LID-01.Z', 'SN-1')).axisId
  await send(38)
})
afterAll(() => server.stop())

async function send(thrustLimit: number, query = '', as = plant.as.technician): Promise<UploadStored> {
  captured += 60_000
  const { status, text, json } = await plant.upload(settingsFile({ serial: 'SN-1', exportedAt: iso(captured), setup: { thrustLimit, speedLimit: 500 } }), query, { as })
  if (status !== 201) throw new Error(text)
  return json as unknown as UploadStored
}
const read = async (id: number) => (await server.call('GET', `/api/findings/${id}`, { as: plant.as.auditor })).json as unknown as Finding
const list = async (query = '', as = plant.as.auditor) => ((await server.call('GET', `/api/findings${query}`, { as })).json as unknown as { items: Finding[] }).items
const act = (id: number, name: string, body: object, as: string) => server.call('POST', `/api/findings/${id}/${name}`, { as, body })

describe('findings', () => {
  let id: number

  it('come with the answer of an upload, and are listed by state, axis, site and weight', async () => {
    const { findings } = await send(55)
    expect(findings).toMatchObject([{ state: 'open' }])
    id = findings[0]!.id
    expect(await list()).toMatchObject([{ id, state: 'open', weight: 'harm', tag: 'LID-01.Z', changes: [{ field: 'thrustLimit', before: 38, after: 55 }] }])
    expect((await list(`?state=open&axis=tag:lid-01.z&site=${plant.siteId}&weight=harm`)).map(one => one.id)).toEqual([id])
    expect(await list('?state=closed')).toEqual([])
    expect(await list(`?axis=${axisId}&weight=text`)).toEqual([])
    expect(await server.call('GET', '/api/findings?state=done', { as: plant.as.auditor })).toMatchObject({ status: 422 })
  })

  it('are explained by technicians, planners and auditors, and by nobody else', async () => {
    expect(await act(id, 'explain', { text: 'x' }, await server.signIn('admin'))).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await act(id, 'explain', {}, plant.as.technician)).toMatchObject({ status: 422, json: { code: 'input' } })
    expect(await act(id, 'close', { as: 'accepted', allowedBy: 'Marit', password }, plant.as.auditor)).toMatchObject({ status: 409, json: { code: 'not-explained' } })
    expect(await act(id, 'explain', { text: 'to get through the shift', by: 'night shift' }, plant.as.technician)).toMatchObject({ status: 200, json: { state: 'explained' } })
  })

  it('are closed with a signature, harm by an auditor who did not explain it', async () => {
    const body = { as: 'accepted', allowedBy: 'Marit Lund', password }
    expect(await act(id, 'close', body, plant.as.technician)).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await act(id, 'close', body, plant.as.planner)).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await act(id, 'close', { ...body, password: 'wrong' }, plant.as.auditor)).toMatchObject({ status: 403, json: { code: 'signature' } })
    await act(id, 'explain', { text: 'I asked', by: 'Marit' }, plant.as.auditor)
    expect(await act(id, 'close', body, plant.as.auditor)).toMatchObject({ status: 403, json: { code: 'four-eyes' } })
    const email = 'second.auditor@larkfield.example'
    await server.call('POST', '/api/people', { as: await server.signIn('admin'), body: { name: 'Second Auditor', email, roles: ['auditor'], siteIds: [], password } })
    const second = await server.signIn({ email, password })
    expect(await act(id, 'close', { as: 'accepted', password }, second)).toMatchObject({ status: 422, json: { errors: [{ at: '/allowedBy' }] } })
    expect(await act(id, 'close', body, second)).toMatchObject({ status: 200, json: { state: 'closed', closure: { as: 'accepted', allowedBy: 'Marit Lund', by: 'Second Auditor' } } })
    expect(await act(id, 'reopen', { text: 'Marit was not asked' }, plant.as.planner)).toMatchObject({ status: 200, json: { state: 'open' } })
    expect((await read(id)).acts.map(({ kind }) => kind)).toEqual(['explained', 'explained', 'closed', 'reopened'])
    expect(JSON.stringify((await server.call('GET', '/api/log?limit=200', { as: plant.as.planner })).json)).not.toContain(password)
  })

  it('are put right by a version that shows it', async () => {
    await act(id, 'explain', { text: 'put back now' }, plant.as.technician)
    const email = 'third.auditor@larkfield.example'
    await server.call('POST', '/api/people', { as: await server.signIn('admin'), body: { name: 'Third Auditor', email, roles: ['auditor'], siteIds: [], password } })
    const third = await server.signIn({ email, password })
    const { version, findings } = await send(38, '?reason=back to what it was')
    expect(findings).toMatchObject([{ state: 'explained' }])
    expect(await act(id, 'close', { as: 'put-right', versionId: version.baseId, password }, third)).toMatchObject({ status: 422 })
    expect(await act(id, 'close', { as: 'put-right', versionId: version.id, password }, third)).toMatchObject({ status: 200, json: { closure: { version: { id: version.id, number: 3 } } } })
  })

  it('of other sites are not there', async () => {
    const siteId = await plant.post('/api/sites', { name: 'Other works', timeZone: 'UTC' })
    const email = 'bound@larkfield.example'
    await server.call('POST', '/api/people', { as: await server.signIn('admin'), body: { name: 'Bound', email, roles: ['auditor', 'planner'], siteIds: [siteId], password } })
    const bound = await server.signIn({ email, password })
    expect(await list('', bound)).toEqual([])
    for (const name of ['explain', 'reopen']) expect(await act(id, name, { text: 'x' }, bound)).toMatchObject({ status: 404, json: { code: 'not-found' } })
    expect(await server.call('GET', `/api/findings/${id}`, { as: bound })).toMatchObject({ status: 404 })
    expect(await server.call('POST', '/api/planned-changes', { as: bound, body: { axisIds: [axisId], fields: ['thrustLimit'], from: iso(Date.now()), until: iso(Date.now() + 1e6), reason: 'r', allowedBy: 'a' } })).toMatchObject({ status: 404 })
  })
})

describe('planned changes', () => {
  it('are announced by planners, explain what they cover, and are called off', async () => {
    const body = { axisIds: [axisId], fields: ['thrustLimit'], min: 40, max: 60, from: iso(captured - 1e6), until: iso(Date.now() + 1e7), reason: 'thicker lids', allowedBy: 'Marit Lund' }
    expect(await server.call('POST', '/api/planned-changes', { as: plant.as.auditor, body })).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await server.call('POST', '/api/planned-changes', { as: plant.as.planner, body: { ...body, fields: ['thrust'] } })).toMatchObject({ status: 422, json: { errors: [{ at: '/fields/0' }] } })
    const id = await plant.post('/api/planned-changes', body)
    captured = Date.now() + 1000
    const { findings } = await send(50)
    expect(findings).toMatchObject([{ state: 'explained' }])
    const plans = ((await server.call('GET', '/api/planned-changes', { as: plant.as.auditor })).json as unknown as { items: PlannedChange[] }).items
    expect(plans).toMatchObject([{ id, announcedBy: 'Runa Haldersen', came: [{ findingId: findings[0]!.id, tag: 'LID-01.Z' }] }])
    expect(await server.call('POST', `/api/planned-changes/${id}/end`, { as: plant.as.planner, body: { reason: 'old lids' } })).toMatchObject({ status: 200, json: { endReason: 'old lids' } })
    expect(await server.call('POST', `/api/planned-changes/${id}/end`, { as: plant.as.planner, body: { reason: 'old lids' } })).toMatchObject({ status: 409, json: { code: 'already-ended' } })
  })
})

describe('the board and the axis', () => {
  it('say what waits', async () => {
    const board = (await server.call('GET', '/api/board', { as: plant.as.planner })).json as unknown as { attention: { kind: string, count: number }[] }
    expect(board.attention[0]).toMatchObject({ kind: 'finding', count: 2 })
    const life = (await server.call('GET', `/api/axes/${axisId}/life`, { as: plant.as.planner })).json as unknown as { items: { kind: string }[] }
    expect(life.items.filter(({ kind }) => kind.startsWith('finding')).map(({ kind }) => kind).sort()).toEqual(['finding', 'finding', 'finding', 'finding-closed', 'finding-closed'])
  })
})
