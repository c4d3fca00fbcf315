import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Swap } from '../../shared/api/swaps'
import { kitForms } from '../../shared/api/versions'
import { admin, startServer, type TestServer } from '../support/server'
import { plantOn, type ServerPlant } from '../support/server-plant'
import { moves, plates, setup } from '../support/swap-plant'
import { iso, settingsFile } from '../support/vault-plant'

/*
 * A swap through the routes alone: each shape that goes out is held against the table by the caller of the tests.
 */

let server: TestServer
let plant: ServerPlant
let axisId: number
const { password } = admin
let seconds = 0
/** Each file a second newer than the one before, and all of them past. */
const at = () => iso(Date.now() - 100_000 + 1000 * seconds++)

beforeAll(async () => {
  server = await startServer()
  plant = await plantOn(server)
  await plant.post('/api/nameplates', plates.press)
  await plant.post('/api/nameplates', plates.stronger)
  axisId = (await plant.axis('LID-02.Z', 'SN-0001', { firmware: '2.4' })).axisId
  for (const [serial, model] of [['SN-0002', 'HL40-200V'], ['SN-0050', 'HL50-200V']]) await plant.post('/api/units', { serial, model, firmware: '2.4', siteId: plant.siteId, state: 'spare' })
  const sent = await plant.upload(settingsFile({ setup, moves, exportedAt: at() }))
  const { version } = sent.json as unknown as { version: { id: number } }
  expect((await server.call('POST', `/api/versions/${version.id}/known-good`, { as: plant.as.planner, body: { meaning: 'approved', password } })).status).toBe(201)
})
afterAll(() => server.stop())

const step = (id: number, name: string, body: object, as = plant.as.technician) => server.call('POST', `/api/swaps/${id}/${name}`, { as, body })
const readBack = (id: number, parts: object, query = '', key?: string) => server.call('POST', `/api/swaps/${id}/read-back${query}`, {
  as: plant.as.technician, raw: settingsFile({ serial: 'SN-0002', setup, moves, exportedAt: at(), ...parts }), headers: { 'content-type': 'application/json', ...(key === undefined ? {} : { 'idempotency-key': key }) },
})
const open = () => server.call('POST', '/api/swaps', { as: plant.as.technician, body: { axisId, replaced: 'unit', failure: 'following error, motor hot' } })
const swapOf = (reply: { json: unknown }) => reply.json as Swap
const kit = (body: object) => server.call('POST', `/api/axes/${axisId}/kit`, { as: plant.as.technician, body: { form: 'json', cautionsRead: true, ...body } })

describe('a swap through the routes', () => {
  let id: number

  it('is opened once an axis, and tells which steps come first', async () => {
    const opened = await open()
    expect(opened).toMatchObject({ status: 201, json: { step: 'unit-in', rev: 1, unitOut: { serial: 'SN-0001' } } })
    id = swapOf(opened).id
    expect(await open()).toMatchObject({ status: 409, json: { code: 'swap-open', current: { id, step: 'unit-in' } } })
    expect(await step(id, 'safe', { confirmed: true })).toMatchObject({ status: 409, json: { code: 'step-missing', missing: ['unit-in'] } })
    expect(await readBack(id, {})).toMatchObject({ status: 409, json: { code: 'step-missing', missing: ['unit-in', 'safe'] } })
    expect((await server.call('GET', `/api/swaps/${id}/spares`, { as: plant.as.auditor })).json).toMatchObject({ items: [{ unit: { serial: 'SN-0002' }, fit: 'same' }, { unit: { serial: 'SN-0050' }, fit: 'adjust', adjusted: 4 }] })
  })

  it('asks for the forces of another base before a kit leaves, and takes another unit until it is safe', async () => {
    expect(await step(id, 'unit-in', { serial: 'SN-0050' })).toMatchObject({ status: 200, json: { fit: 'adjust', adjustments: [{ field: 'homingForceLimit' }, { field: 'thrustLimit', before: 60, after: 37.5, newtonsBefore: 240, newtonsAfter: 240 }, { field: 'overloadLevel' }, { field: 'forceLimit', row: 2 }] } })
    expect(await kit({})).toMatchObject({ status: 409, json: { code: 'forces-unconfirmed' } })
    expect(await step(id, 'unit-in', { serial: 'SN-0001' })).toMatchObject({ status: 409, json: { code: 'same-unit' } })
    expect(await step(id, 'unit-in', { serial: 'SN-0009' })).toMatchObject({ status: 422, json: { errors: [{ at: '/model', code: 'serial-unknown' }] } })
    expect(await step(id, 'unit-in', { serial: 'SN-0002' })).toMatchObject({ status: 200, json: { fit: 'same', step: 'safe', unitIn: { state: 'fitted' } } })
    // Every form is a way out of its own.
    for (const form of kitForms) expect(await kit({ form, cautionsRead: false }), form).toMatchObject({ status: 409, json: { code: 'cautions-unread', detail: 'Read the cautions, then take the kit: these values move a machine.' } })
    expect((await kit({})).json).toMatchObject({ unit: { serial: 'SN-0002' }, setup: { thrustLimit: 60 } })
  })

  it('refuses a device that read an older state, with what the other did', async () => {
    const stale = await step(id, 'safe', { confirmed: true, rev: 1 })
    expect(stale).toMatchObject({ status: 409, json: { code: 'edited-meanwhile', current: { step: 'safe', unitIn: { serial: 'SN-0002' } } } })
    expect((stale.json as unknown as { detail: string }).detail).toContain('SN-0002 (HL40-200V) goes in.')
    expect(await step(id, 'safe', { confirmed: true })).toMatchObject({ status: 409, json: { code: 'cautions-unread', detail: 'Read the cautions first; then make the axis safe.' } })
    expect((await step(id, 'cautions', { read: true })).status).toBe(200)
    expect(await step(id, 'safe', { confirmed: true })).toMatchObject({ status: 200, json: { step: 'read-back' } })
  })

  it('keeps every attempt of a read-back, each turned away in its own words', async () => {
    expect(await readBack(id, { serial: 'SN-0001' })).toMatchObject({ status: 409, json: { code: 'read-back-serial', current: { readBacks: [{ attempt: 1, problem: 'serial' }] } } })
    expect(await readBack(id, { model: 'HL50-200V' })).toMatchObject({ status: 409, json: { code: 'read-back-model' } })
    const cut = await server.call('POST', `/api/swaps/${id}/read-back`, { as: plant.as.technician, raw: '{"schema":', headers: { 'content-type': 'application/json' } })
    expect(cut).toMatchObject({ status: 422, json: { code: 'settings-unreadable', errors: [{ code: 'json-syntax' }] } })
    expect(await readBack(id, { moves: moves.slice(0, 2) })).toMatchObject({ status: 200, json: { compare: 'differs', attempt: 4, readBacks: [{}, {}, {}, { rowsMissing: [{ section: 'move', row: 2 }] }] } })
    expect(await readBack(id, {}, '?rev=1')).toMatchObject({ status: 409, json: { code: 'edited-meanwhile' } })
  })

  it('answers a read-back that is sent again under its key once, and calls the same file without one the same file', async () => {
    const bytes = settingsFile({ serial: 'SN-0002', setup, moves, exportedAt: at() })
    const send = (key?: string) => server.call('POST', `/api/swaps/${id}/read-back`, { as: plant.as.technician, raw: bytes, headers: { 'content-type': 'application/json', ...(key === undefined ? {} : { 'idempotency-key': key }) } })
    const first = await send('night-1')
    expect(first).toMatchObject({ status: 200, json: { compare: 'identical', attempt: 5 } })
    const again = await send('night-1')
    expect([again.status, again.headers.get('idempotency-replayed'), again.text]).toEqual([200, 'true', first.text])
    expect(await send()).toMatchObject({ status: 409, json: { code: 'read-back-twice' } })
    const { readBacks, kit: made } = swapOf(await server.call('GET', `/api/swaps/${id}`, { as: plant.as.auditor }))
    expect(readBacks.map(({ problem, compare }) => problem ?? compare)).toEqual(['serial', 'model', 'unreadable', 'differs', 'identical', 'twice'])
    expect(readBacks[4]?.scribeCode).toBe(made?.scribeCode)
  })

  it('keeps what was ticked and the hand-over note for another device, each once under its key', async () => {
    const headers = { 'idempotency-key': 'tick-1' }
    const { rev } = swapOf(await server.call('GET', `/api/swaps/${id}`, { as: plant.as.auditor }))
    const body = { tick: 'line', line: 'reset', words: 'Reset SN-0002', done: true, rev }
    const ticked = await server.call('POST', `/api/swaps/${id}/ticks`, { as: plant.as.technician, body, headers })
    expect(await server.call('POST', `/api/swaps/${id}/ticks`, { as: plant.as.technician, body, headers })).toMatchObject({ status: 200, json: { rev: swapOf(ticked).rev } })
    expect(await step(id, 'ticks', { tick: 'line', line: 'reset' })).toMatchObject({ status: 422, json: { code: 'input' } })
    expect(await step(id, 'ticks', body)).toMatchObject({ status: 409, json: { code: 'edited-meanwhile', current: { ticks: { lines: [{ line: 'reset', by: 'Tobias Achterberg' }] } } } })
    expect(await step(id, 'note', { note: 'Lamp of X4 is dim.' }, plant.as.planner)).toMatchObject({ status: 200, json: { draft: { note: 'Lamp of X4 is dim.', by: 'Runa Haldersen' } } })
    expect(await step(id, 'note', { note: 'x' }, plant.as.auditor)).toMatchObject({ status: 403 })
  })

  it('runs after the first motion, and is released by a planner who signs', async () => {
    const results = ['jog', 'enable-loss', 'emergency-stop', 'move-0', 'chain-1'].map(item => ({ item, outcome: 'ok' }))
    expect(await step(id, 'first-motion', { speedPercent: 10, results })).toMatchObject({ status: 200, json: { firstMotion: { untried: [] } } })
    expect(await readBack(id, {})).toMatchObject({ status: 200, json: { asLeft: { compare: 'identical' } } })
    expect(await step(id, 'running', {})).toMatchObject({ status: 200, json: { step: 'release' } })
    const words = { meaning: 'approved', oldUnitState: 'scrapped' }
    expect(await step(id, 'release', { ...words, password })).toMatchObject({ status: 403, json: { code: 'role' } })
    expect(await step(id, 'release', { ...words, password: 'wrong' }, plant.as.planner)).toMatchObject({ status: 403, json: { code: 'signature' } })
    expect(await step(id, 'release', { ...words, password }, plant.as.planner)).toMatchObject({ status: 200, json: { step: 'released', released: { carriedOver: true, oldUnitState: 'scrapped' } } })
    expect(await step(id, 'running', {})).toMatchObject({ status: 409, json: { code: 'swap-closed' } })
    expect((await server.call('GET', `/api/axes/${axisId}`, { as: plant.as.auditor })).json).toMatchObject({ status: 'in-line', unit: { serial: 'SN-0002' } })
    expect((await server.call('GET', '/api/swaps?axis=tag:LID-02.Z&limit=5', { as: plant.as.auditor })).json).toMatchObject({ items: [{ id, step: 'released', overdue: false }], next: null })
  })
})

describe('ways out through the routes', () => {
  it('the old unit goes back, and the swap is abandoned with the unit that truly sits there', async () => {
    const { id, unitOut } = swapOf(await open())
    await step(id, 'unit-in', { serial: 'SN-0050', forcesConfirmed: true })
    expect(await step(id, 'put-back', { reason: 'it was the cable' })).toMatchObject({ status: 200, json: { putBack: true, step: 'safe', unitIn: { serial: 'SN-0002' } } })
    expect(await step(id, 'put-back', { reason: 'again' })).toMatchObject({ status: 409, json: { code: 'already-back' } })
    expect(await step(id, 'abandon', { reason: 'nothing to swap', fittedUnitId: unitOut?.id })).toMatchObject({ status: 200, json: { step: 'abandoned' } })
    expect(await server.call('GET', '/api/swaps?open=true', { as: plant.as.technician })).toMatchObject({ status: 200, json: { items: [] } })
  })
})

describe('what a tired technician might send', () => {
  const told = (reply: { json: unknown }) => (reply.json as { detail: string }).detail
  const results = ['jog', 'enable-loss', 'emergency-stop', 'move-0', 'chain-1'].map(item => ({ item, outcome: 'ok' }))
  let id: number

  it('a spare that sits at another axis, one of another model than is registered, a unit of another kind of axis', async () => {
    await plant.axis('LID-03.Z', 'SN-0003')
    id = swapOf(await open()).id
    const elsewhere = await step(id, 'unit-in', { serial: 'SN-0003' })
    expect(elsewhere).toMatchObject({ status: 409, json: { code: 'fitted' } })
    expect(told(elsewhere)).toContain('SN-0003 sits at LID-03.Z')
    const other = await step(id, 'unit-in', { serial: 'SN-0050', model: 'HL40-200V' })
    expect([other.status, told(other)]).toMatchObject([422, expect.stringContaining('registered as HL50-200V')])
    expect((await server.call('GET', `/api/axes/${axisId}`, { as: plant.as.auditor })).json).toMatchObject({ unit: { serial: 'SN-0002' }, swap: { id, step: 'unit-in', openedBy: 'Tobias Achterberg', overdue: false } })
  })

  it('a kit with the cautions unread, which are then read once for the swap, and logged', async () => {
    await step(id, 'unit-in', { serial: 'SN-0050', forcesConfirmed: true })
    expect(await kit({ cautionsRead: false })).toMatchObject({ status: 409, json: { code: 'cautions-unread' } })
    expect(await step(id, 'cautions', { read: true })).toMatchObject({ status: 200, json: { cautions: { by: 'Tobias Achterberg' } } })
    const before = plant.rows().log ?? 0
    expect((await kit({ cautionsRead: false })).status).toBe(200)
    expect(plant.rows().log).toBe(before + 1)
    expect(await kit({ serial: 'SN-0001' })).toMatchObject({ status: 409, json: { code: 'other-unit' } })
  })

  it('the old file of the old unit, a table written in part, the same file twice, each told apart', async () => {
    await step(id, 'safe', { confirmed: true })
    const wrong = await readBack(id, { serial: 'SN-0001' })
    expect([wrong.status, told(wrong)]).toMatchObject([409, expect.stringContaining('SN-0001')])
    const model = await readBack(id, { serial: 'SN-0050' })
    expect(model).toMatchObject({ status: 409, json: { code: 'read-back-model' } })
    const half = await readBack(id, { serial: 'SN-0050', model: 'HL50-200V', moves: moves.slice(0, 1) })
    expect(swapOf(half).log.at(-1)?.text).toContain('The table was written in part: 2 rows are missing.')
  })

  it('a release of a unit whose last read-back differs, by a technician, and by a planner', async () => {
    expect(await step(id, 'first-motion', { speedPercent: 10, results })).toMatchObject({ status: 200 })
    expect(await readBack(id, { serial: 'SN-0050', model: 'HL50-200V' })).toMatchObject({ status: 200, json: { compare: 'differs' } })
    expect(await step(id, 'running', { note: 'old percentages' })).toMatchObject({ status: 200, json: { step: 'release' } })
    expect((await server.call('GET', `/api/axes/${axisId}`, { as: plant.as.auditor })).json).toMatchObject({ swap: { id, step: 'release', runningSince: expect.any(String) as string } })
    expect(await step(id, 'release', { meaning: 'approved', password })).toMatchObject({ status: 403, json: { code: 'role' } })
    const differs = await step(id, 'release', { meaning: 'approved', password }, plant.as.planner)
    expect(differs).toMatchObject({ status: 409, json: { code: 'read-back-differs' } })
    expect(told(differs)).toMatch(/mark version \d+ known-good/)
    expect(await step(id, 'abandon', { reason: 'put right tomorrow', fittedUnitId: null })).toMatchObject({ status: 200, json: { step: 'abandoned' } })
  })
})
