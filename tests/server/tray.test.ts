import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { iso, settingsFile } from '../support/vault-plant'

let server: TestServer
let plant: ServerPlant
const now = Date.now()

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
})
afterAll(() => server.stop())

const keep = async (serial: string): Promise<number> => {
  const { status, json, text } = await plant.upload(settingsFile({ serial, exportedAt: iso(now - 3600_000), setup: { thrustLimit: 38 } }))
  if (status !== 202) throw new Error(text)
  return (json as unknown as { tray: number }).tray
}

describe('the tray', () => {
  it('lists what waits, and assigns it: the unit is registered and fitted by a planner', async () => {
    const axisId = await plant.post('/api/axes', { machineId: plant.machineId, tag: 'LID-01.Z', axisKind: 'linear' })
    const id = await keep('SN-1')
    expect((await server.call('GET', '/api/tray', { as: plant.as.technician })).json).toMatchObject({ items: [{ id, serial: 'SN-1', problem: 'serial-unknown', copies: 1 }], next: null })
    expect(await server.call('POST', `/api/tray/${id}/assign`, { as: plant.as.technician, body: { axisId } })).toMatchObject({ status: 403, json: { code: 'role' } })
    const assigned = await server.call('POST', `/api/tray/${id}/assign`, { as: plant.as.planner, body: { axisId, at: iso(now - 7200_000) } })
    expect(assigned).toMatchObject({ status: 201, json: { version: { axisId, number: 1, serial: 'SN-1', storedBy: 'Tobias Achterberg', clockDoubtful: false } } })
    expect(await server.call('POST', `/api/tray/${id}/assign`, { as: plant.as.planner, body: { axisId } })).toMatchObject({ status: 409, json: { code: 'tray-settled' } })
    expect(await plant.upload(settingsFile({ serial: 'SN-1', exportedAt: iso(now), setup: { thrustLimit: 38 } }))).toMatchObject({ status: 200 })
  })

  it('sets aside with a reason', async () => {
    const id = await keep('SN-2')
    expect(await server.call('POST', `/api/tray/${id}/discard`, { as: plant.as.technician, body: {} })).toMatchObject({ status: 422 })
    expect(await server.call('POST', `/api/tray/${id}/discard`, { as: plant.as.technician, body: { reason: 'a test file' } })).toMatchObject({ status: 204 })
    expect((await server.call('GET', '/api/tray', { as: plant.as.technician })).json).toMatchObject({ items: [] })
    expect((await server.call('GET', `/api/tray/${id}/file`, { as: plant.as.technician })).text).toContain('SN-2')
  })
})
