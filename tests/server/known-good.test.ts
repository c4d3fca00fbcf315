import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { readSettings } from '../../shared/settings/read'
import { admin, startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { iso, settingsFile } from '../support/vault-plant'

let server: TestServer
let plant: ServerPlant
let axisId: number
let count = 0
const { password } = admin
const now = Date.now()

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
})
afterAll(() => server.stop())
beforeEach(async () => {
  count += 1
  axisId = (await plant.axis(`LID-${count}.Z`, `SN-${count}`, { firmware: '2.4' })).axisId
})

async function store(setup: object, as = plant.as.technician): Promise<number> {
  const { status, json, text } = await plant.upload(settingsFile({ serial: `SN-${count}`, exportedAt: iso(now - 60_000), setup }), '', { as })
  if (status !== 201) throw new Error(text)
  return (json as unknown as { version: { id: number } }).version.id
}
const mark = (id: number, body: object = {}, as = plant.as.planner) => server.call('POST', `/api/versions/${id}/known-good`, { as, body: { meaning: 'approved', password, ...body } })
const kit = (body: object, as = plant.as.technician) => server.call('POST', `/api/axes/${axisId}/kit`, { as, body: { form: 'json', cautionsRead: true, ...body } })

describe('POST /api/versions/:id/known-good', () => {
  it('is signed by a planner and puts the axis in line', async () => {
    const id = await store({ thrustLimit: 38 })
    expect(await mark(id, { password: 'wrong' })).toMatchObject({ status: 403, json: { code: 'signature' } })
    expect(await mark(id, {}, plant.as.technician)).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await mark(id, { meaning: 'fine' })).toMatchObject({ status: 422, json: { code: 'input' } })
    expect(await mark(id, { note: 'after service' })).toMatchObject({ status: 201 })
    const { json } = await server.call('GET', `/api/axes/${axisId}`, { as: plant.as.auditor })
    expect(json).toMatchObject({ status: 'in-line', knownGood: { versionId: id, number: 1, by: 'Runa Haldersen' } })
    expect(JSON.stringify(plant.rows())).not.toContain(password)
  })

  it('by who brought in a harm value is 403 four-eyes and names both; a site may switch that off', async () => {
    await mark(await store({ thrustLimit: 38 }))
    const own = await store({ thrustLimit: 55 }, plant.as.planner)
    expect(await mark(own)).toMatchObject({ status: 403, json: { code: 'four-eyes', errors: [{ at: '/setup/thrustLimit', message: 'Thrust limit 38 → 55 % was brought in by Runa Haldersen in version 2.' }] } })
    await server.call('PATCH', `/api/sites/${plant.siteId}`, { as: plant.as.planner, body: { rev: 1, fourEyes: false } })
    expect(await mark(own)).toMatchObject({ status: 201 })
    await server.call('PATCH', `/api/sites/${plant.siteId}`, { as: plant.as.planner, body: { rev: 2, fourEyes: true } })
  })

  it('with stop checks is 409 and lists them', async () => {
    await plant.post('/api/nameplates', { model: `HL40-${count}`, axisKind: 'linear', stroke: 100 })
    const tight = await plant.axis(`TIGHT-${count}.Z`, `TIGHT-${count}`, { model: `HL40-${count}` })
    const sent = await plant.upload(settingsFile({ serial: `TIGHT-${count}`, model: `HL40-${count}`, exportedAt: iso(now), setup: { softLimitMin: 0, softLimitMax: 180 } }))
    const { id } = (sent.json as unknown as { version: { id: number } }).version
    const refused = await mark(id)
    expect(refused).toMatchObject({ status: 409, json: { code: 'stop-checks' } })
    expect((refused.json as unknown as { errors: { code: string }[] }).errors.map(({ code }) => code)).toContain('travel-span')
    expect((await server.call('GET', `/api/axes/${tight.axisId}`, { as: plant.as.auditor })).json).toMatchObject({ knownGood: null, checks: { stop: expect.any(Number) as number } })
  })

  it('none, and voiding', async () => {
    const v1 = await store({ thrustLimit: 38 })
    await mark(v1)
    expect(await server.call('POST', `/api/versions/${v1}/void`, { as: plant.as.planner, body: { reason: 'wrong file', password } })).toMatchObject({ status: 409, json: { code: 'marked' } })
    expect(await server.call('POST', `/api/axes/${axisId}/known-good/none`, { as: plant.as.planner, body: { meaning: 'responsibility', note: 'gripper changed', password } })).toMatchObject({ status: 201 })
    expect(await server.call('POST', `/api/versions/${v1}/void`, { as: plant.as.planner, body: { reason: 'wrong file', password } })).toMatchObject({ status: 201 })
    expect(await server.call('POST', `/api/versions/${v1}/void`, { as: plant.as.planner, body: { reason: 'again', password } })).toMatchObject({ status: 409, json: { code: 'already-void' } })
    expect(await mark(v1)).toMatchObject({ status: 409, json: { code: 'already-void' } })
    expect((await server.call('GET', `/api/versions/${v1}`, { as: plant.as.auditor })).json).toMatchObject({ void: { by: 'Runa Haldersen', reason: 'wrong file' }, content: { setup: { thrustLimit: 38 } } })
    expect((await server.call('GET', `/api/axes/${axisId}`, { as: plant.as.auditor })).json).toMatchObject({ status: 'never-read', current: null })
  })
})

describe('POST /api/axes/:id/kit', () => {
  it('is refused with the cautions unread, and with nothing to restore', async () => {
    expect(await kit({ cautionsRead: false })).toMatchObject({ status: 409, json: { code: 'cautions-unread' } })
    expect(await kit({})).toMatchObject({ status: 409, json: { code: 'no-known-good' } })
    expect(await kit({}, plant.as.auditor)).toMatchObject({ status: 403, json: { code: 'role' } })
  })

  it('comes as a file of the format for the unit named, released or not', async () => {
    const id = await store({ thrustLimit: 38, homingMethod: 'current-position', homeOffset: 3 })
    await plant.post('/api/units', { serial: `NEW-${count}`, model: 'HL40-200V', firmware: '2.4' })
    const before = await kit({ serial: `NEW-${count}` })
    expect(before.headers.get('witnessmark-released')).toBe('no')
    await mark(id)
    const { status, headers, text } = await kit({ serial: `NEW-${count}`, form: 'csv' })
    expect(status).toBe(200)
    expect(headers.get('witnessmark-released')).toBe('yes')
    expect(headers.get('content-disposition')).toContain(`LID-${count}.Z-v1-kit.csv`)
    const read = readSettings(new TextEncoder().encode(text))
    expect(read.ok && read.value.file).toMatchObject({ unit: { serial: `NEW-${count}` }, setup: { thrustLimit: 38, homingMethod: 'current-position' } })
    expect(read.ok && 'homeOffset' in read.value.file.setup).toBe(false)
  })
})
