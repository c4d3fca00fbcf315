import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import { neighboursAnswer, neighboursTold } from '../../../shared/api/neighbours'
import type { PersonActor } from '../../../server/database/actor'
import { readNeighbours } from '../../../server/services/neighbours/neighbours'
import { storeUpload } from '../../../server/services/uploads/store-upload'
import { day, minute, openPlant, settingsFile, start, type Plant } from '../../support/vault-plant'

let plant: Plant
let runa: PersonActor
beforeEach(() => {
  plant = openPlant()
  runa = plant.person('Runa Haldersen')
})
afterEach(() => plant.close())

interface Held { readonly role?: string, readonly bus?: string, readonly model?: string, readonly machineId?: number, readonly kind?: 'linear' | 'rotary' }
function axis(tag: string, setup: object | null, { role = 'seat lid', bus = '', model = 'HL40-200V', machineId = plant.machineId, kind = 'linear' }: Held = {}): number {
  const axisId = plant.axis(tag, { machineId, kind })
  plant.vault.sqlite.prepare('UPDATE axis SET role = ?, bus = ? WHERE id = ?').run(role, bus, axisId)
  plant.fit(axisId, plant.unit(`SN-${tag}`, { model }), start - 300 * day)
  plant.now += minute
  if (setup === null) return axisId
  const outcome = storeUpload(plant.vault, runa, { bytes: settingsFile({ serial: `SN-${tag}`, model, axisKind: kind, setup }), name: null }, {})
  if (outcome.outcome !== 'version') throw new Error(JSON.stringify(outcome))
  return axisId
}
const read = async (actor = runa, machineId = plant.machineId) => neighboursAnswer.parse(await readNeighbours(plant.vault, actor, machineId))

describe('the sisters of the axes of a machine', () => {
  it('stand in a column each by tag, and the one that stands apart is told', async () => {
    for (const [index, thrustLimit] of [38, 38, 55, 38, 38, 38].entries()) axis(`LID-${index + 8}.Z`, { thrustLimit, jogSpeed: 20 })
    const { sisters: [group] } = await read()
    expect(group).toMatchObject({ role: 'seat lid', model: 'HL40-200V', of: 6, more: 0 })
    expect(group?.axes.map(({ tag }) => tag)).toEqual(['LID-8.Z', 'LID-9.Z', 'LID-10.Z', 'LID-11.Z', 'LID-12.Z', 'LID-13.Z'])
    expect(group?.rows.map(({ key, same, odd }) => [key, same, odd])).toEqual([['jogSpeed', true, []], ['thrustLimit', false, [2]]])
    expect(group?.results.map(({ rule, axes, message }) => [rule, axes, message])).toEqual([['sister-outlier', ['LID-10.Z'], 'LID-10.Z: thrust limit is 55 %, while 5 sister axes have 38 %.']])
  })

  it('are of one role, model and kind, read once at least, whatever the case of the role', async () => {
    axis('A', { thrustLimit: 38 })
    axis('B', { thrustLimit: 38 }, { role: 'Seat Lid' })
    axis('C', { thrustLimit: 38 }, { role: 'feed lid' })
    axis('D', { thrustLimit: 38 }, { model: 'HL25-150' })
    axis('E', null)
    axis('F', { thrustLimit: 38 }, { role: '' })
    axis('G', { thrustLimit: 38 }, { role: '' })
    expect((await read()).sisters.map(({ axes }) => axes.map(({ tag }) => tag))).toEqual([['A', 'B']])
  })

  it('are told to a machine that has one of them, and stay within the site', async () => {
    axis('A', { thrustLimit: 38 })
    axis('B', { thrustLimit: 38 })
    const other = plant.machineAt('Northfield')
    axis('C', { thrustLimit: 38 }, { machineId: other.machineId })
    expect((await read(runa, other.machineId)).sisters).toEqual([])
    expect((await read()).sisters[0]?.of).toBe(2)
    await expect(readNeighbours(plant.vault, runa, 99)).rejects.toMatchObject({ code: 'not-found' })
  })

  it('get columns for the machine’s own and the odd ones first where there are very many', async () => {
    const other = inLine('Lid press 2')
    for (let index = 1; index <= neighboursTold.columns + 12; index += 1) axis(`LID-${index}.Z`, { thrustLimit: index === 40 ? 55 : 38 }, { machineId: index > neighboursTold.columns + 10 ? plant.machineId : other })
    const { sisters: [group] } = await read()
    const tags = group?.axes.map(({ tag }) => tag)
    expect([group?.of, tags?.length]).toEqual([neighboursTold.columns + 12, neighboursTold.columns])
    expect(tags).toEqual(expect.arrayContaining(['LID-1.Z', 'LID-40.Z', 'LID-59.Z', 'LID-60.Z']))
    expect(group?.rows[0]).toMatchObject({ key: 'thrustLimit', same: false, odd: [tags?.indexOf('LID-40.Z')] })
  })
})

function inLine(name: string): number {
  plant.vault.sqlite.prepare('INSERT INTO machine (line_id, name, made_at) SELECT line_id, ?, made_at FROM machine WHERE id = ?').run(name, plant.machineId)
  return plant.vault.sqlite.prepare('SELECT max(id) FROM machine').pluck().get() as number
}

describe('the buses of a machine', () => {
  it('tell who answers to one address; an axis alone has nobody to share with', async () => {
    axis('A', { nodeAddress: 21 }, { bus: 'bus 1', role: 'feed' })
    axis('B', { nodeAddress: 21 }, { bus: 'bus 1', role: 'turn', machineId: inLine('Capper') })
    axis('C', { nodeAddress: 21 }, { bus: 'bus 2' })
    axis('D', { nodeAddress: 21 })
    const { buses } = await read()
    expect(buses.map(({ bus, of, results }) => [bus, of, results.map(({ level, message }) => `${level}: ${message}`)])).toEqual([
      ['bus 1', 2, ['stop: A and B answer to one address on this bus: 21.']],
    ])
  })

  it('are as they stand now: nothing is kept', async () => {
    axis('A', { nodeAddress: 21 }, { bus: 'bus 1' })
    axis('B', { nodeAddress: 22 }, { bus: 'bus 1' })
    const before = plant.rows()
    expect((await read()).buses[0]?.results).toEqual([])
    plant.now += minute
    storeUpload(plant.vault, runa, { bytes: settingsFile({ serial: 'SN-B', setup: { nodeAddress: 21 } }), name: null }, {})
    expect((await read()).buses[0]?.results).toHaveLength(1)
    expect(plant.rows().check_set).toBe((before.check_set ?? 0) + 1)
  })
})
