import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { JudgingRun } from '../../shared/api/judging'
import type { VersionOne } from '../../shared/api/versions'
import type { WaiverRecord } from '../../shared/api/waivers'
import { admin, startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { iso, settingsFile } from '../support/vault-plant'

let server: TestServer
let plant: ServerPlant
let axisId: number
let versionId: number
const { password } = admin
const now = Date.now()
const until = iso(now + 30 * 86_400_000)

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
  await plant.post('/api/nameplates', { model: 'HL40-200V', axisKind: 'linear', stroke: 200 })
  axisId = (await plant.axis('LID-01.Z', 'SN-1')).axisId
  const sent = await plant.upload(settingsFile({ serial: 'SN-1', exportedAt: iso(now - 60_000), setup: { softLimitMin: 0, softLimitMax: 300, thrustLimit: 60 } }))
  versionId = (sent.json as unknown as { version: { id: number } }).version.id
})
afterAll(() => server.stop())

const read = async () => (await server.call('GET', `/api/versions/${versionId}`, { as: plant.as.auditor })).json as unknown as VersionOne
const words = { rule: 'travel-span', reason: 'bracket ordered', until, password }
const covers = (softLimitMax = 300) => ({ at: ['/setup/softLimitMin', '/setup/softLimitMax'], value: { level: 'stop', values: [{ place: '/setup/softLimitMin', value: 0 }, { place: '/setup/softLimitMax', value: softLimitMax }] } })
const give = (body: object, as = plant.as.planner) => server.call('POST', '/api/waivers', { as, body: { axisId, ...words, ...covers(), ...body } })
const mark = () => server.call('POST', `/api/versions/${versionId}/known-good`, { as: plant.as.planner, body: { meaning: 'approved', password } })

describe('waivers', () => {
  it('are signed by planners, with an end to come', async () => {
    expect(await give({ password: 'wrong' })).toMatchObject({ status: 403, json: { code: 'signature' } })
    expect(await give({}, plant.as.technician)).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await give({ until: iso(now - 1000) })).toMatchObject({ status: 422, json: { code: 'time-order' } })
    expect(await give({ value: { level: 'warn' } })).toMatchObject({ status: 422, json: { code: 'input' } })
    expect(await give({ axisId: 999 })).toMatchObject({ status: 404, json: { code: 'not-found' } })
    expect(plant.rows()).toMatchObject({ waiver: 0 })
  })

  it('let a version be marked that stop checks held up, and only for the value they cover', async () => {
    expect(await mark()).toMatchObject({ status: 409, json: { code: 'stop-checks' } })
    expect((await read()).checks.find(({ level }) => level === 'stop')).toMatchObject({ rule: 'travel-span', at: covers().at, waived: null })
    await give(covers(299))
    expect(await mark()).toMatchObject({ status: 409, json: { code: 'stop-checks' } })
    expect(await give({})).toMatchObject({ status: 201 })
    expect((await read()).checks.find(({ level }) => level === 'stop')).toMatchObject({ waived: { by: 'Runa Haldersen', until, reason: 'bracket ordered' } })
    expect(await mark()).toMatchObject({ status: 201 })
    expect(JSON.stringify((await server.call('GET', '/api/log?limit=200', { as: plant.as.planner })).json)).not.toContain(password)
  })

  it('are listed by tag, and end with a signature', async () => {
    const list = async () => ((await server.call('GET', '/api/axes/tag:LID-01.Z/waivers', { as: plant.as.technician })).json as unknown as { items: WaiverRecord[] }).items
    const [newest] = await list()
    expect(newest).toMatchObject({ axisId, rule: 'travel-span', ...covers(), by: 'Runa Haldersen', endedAt: null })
    const end = (given: string) => server.call('POST', `/api/waivers/${newest?.id ?? 0}/end`, { as: plant.as.planner, body: { reason: 'bracket fitted', password: given } })
    expect(await end('wrong')).toMatchObject({ status: 403, json: { code: 'signature' } })
    expect(await end(password)).toMatchObject({ status: 200, json: { endedBy: 'Runa Haldersen', endReason: 'bracket fitted' } })
    expect(await end(password)).toMatchObject({ status: 409, json: { code: 'already-ended' } })
    expect((await list()).map(({ endReason }) => endReason)).toEqual(['bracket fitted', null])
  })
})

describe('judging again', () => {
  it('judges one version by the rules of today', async () => {
    await plant.post('/api/rules', { scope: 'site', scopeId: plant.siteId, field: 'thrustLimit', max: 45, reason: 'jars crack' })
    expect(await server.call('POST', `/api/versions/${versionId}/judge`, { as: plant.as.technician })).toMatchObject({ status: 403, json: { code: 'role' } })
    const answer = await server.call('POST', `/api/versions/${versionId}/judge`, { as: plant.as.planner })
    expect(answer).toMatchObject({ status: 201, json: { changed: true } })
    expect((answer.json as unknown as VersionOne).checks).toEqual((await read()).checks)
    expect((await read()).checkCounts.stop).toBe(2)
  })

  it('runs over every axis while others are answered, and tells its outcome to who began it', async () => {
    await plant.post('/api/rules', { scope: 'axis', scopeId: axisId, field: 'thrustLimit', max: 50, reason: 'guard' })
    const id = await plant.post('/api/judging-runs', undefined)
    let run: JudgingRun
    do run = (await server.call('GET', `/api/judging-runs/${id}`, { as: plant.as.planner })).json as unknown as JudgingRun
    while (run.done < run.of)
    expect(run).toMatchObject({ id, done: 1, of: 1, problem: null, changed: [{ axisId, tag: 'LID-01.Z', versionId, number: 1, stops: 3 }] })
    expect(await server.call('GET', `/api/judging-runs/${id}?from=1`, { as: plant.as.planner })).toMatchObject({ status: 200, json: { changed: [] } })
    expect(await server.call('GET', `/api/judging-runs/${id + 1}`, { as: plant.as.planner })).toMatchObject({ status: 404 })
  })
})
