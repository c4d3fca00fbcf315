import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { createError } from 'h3'
import { beforeEach, describe, expect, it } from 'vitest'
import MachinePage from '~/pages/machines/[id].vue'
import { neighboursAnswer, type Neighbours } from '#shared/api/neighbours'
import type { Axis, VersionOne } from '#shared/api/versions'
import { axis, before, versionAnswer } from '../support/axis-answers'

const thrustOf: readonly number[] = [38, 38, 55, 38, 38, 38]
const sisters: readonly Axis[] = thrustOf.map((_, index) => ({
  ...axis, id: index + 1, tag: `LID-0${index + 1}.Z`, machine: { id: index + 1, name: `LID-0${index + 1}` }, current: axis.current && { ...axis.current, versionId: 100 + index },
}))
const versionOf = (index: number): VersionOne => versionAnswer(15, { ...before, setup: { ...before.setup, thrustLimit: thrustOf[index] ?? 38 } }, { id: 100 + index })
const stop = { at: ['/setup/nodeAddress'], values: {}, rule: 'address-twice', level: 'stop', message: 'LID-01.Z and LID-05.Z answer to one address on this bus: 21.', axes: ['LID-01.Z', 'LID-05.Z'] } as const
const warn = { at: ['/setup/thrustLimit'], values: {}, rule: 'sister-outlier', level: 'warn', message: 'LID-03.Z: thrust limit is 55 %, while 5 sister axes have 38 %.', axes: ['LID-03.Z'] } as const
const neighbours = (of = sisters.length): Neighbours => neighboursAnswer.parse({
  sisters: [{
    role: 'seat lid', model: 'HL40-200V', of, axes: sisters.map(({ id, tag, machine }) => ({ id, tag, machineId: machine.id })), results: [warn], more: 0,
    rows: [
      { key: 'thrustLimit', words: 'thrust limit', same: false, texts: thrustOf.map(value => `${value} %`), odd: [2] },
      { key: 'jogSpeed', words: 'jog speed', same: true, texts: thrustOf.map(() => '20 mm/s'), odd: [] },
    ],
  }],
  buses: [{ bus: 'bus 1', of: 6, results: [stop], more: 0 }],
})
let broken = false
let of = sisters.length
registerEndpoint('/api/machines/3', () => ({ id: 3, rev: 1, lineId: 1, name: 'LID-03', controllerScanMs: null }))
registerEndpoint('/api/machines/3/neighbours', () => {
  if (broken) throw createError({ statusCode: 503 })
  return neighbours(of)
})
registerEndpoint('/api/axes', () => ({ items: sisters.filter(one => one.machine.id === 3), next: null }))
for (const index of thrustOf.keys()) registerEndpoint(`/api/versions/${100 + index}`, () => versionOf(index))

const words = (text: string | null) => (text ?? '').replace(/\s+/g, ' ').trim()
async function open() {
  const page = await mountSuspended(MachinePage, { route: '/machines/3' })
  for (let round = 0; round < 16; round++) {
    await flushPromises()
    await new Promise(resolve => setTimeout(resolve, 5))
  }
  return page
}

beforeEach(() => {
  broken = false
  of = sisters.length
  useSession().begin({ id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false })
})

describe('sister axes on the page of a machine', () => {
  it('stand in a column each, the one that stands apart marked and told in a sentence', async () => {
    const page = await open()
    const section = page.findAll('section').find(one => one.find('h2').exists() && one.get('h2').text() === 'Sister axes: seat lid')
    if (!section) throw new Error('no sister axes')
    expect(words(section.text())).toContain('LID-03.Z: thrust limit is 55 %, while 5 sister axes have 38 %.')
    const matrix = section.get('table.matrix')
    expect(matrix.findAll('thead a').map(link => link.text())).toEqual(sisters.map(one => one.tag))
    const row = matrix.findAll('tbody tr').find(one => one.get('th').text() === 'thrust limit')
    expect(row?.findAll('td').map(cell => cell.classes('odd'))).toEqual([false, false, true, false, false, false])
    expect(row?.get('td.odd svg').attributes('aria-label')).toBe('stands apart:')
    expect(section.findAll('a[href="/help#sister-outlier"]').length).toBe(1)
  })

  it('show what all share on demand', async () => {
    const page = await open()
    const rows = () => page.findAll('table.matrix tbody tr').length
    expect(rows()).toBe(1)
    const box = page.findAll('.box').find(one => one.text().includes('Also values that all share'))
    await box?.get('input').setValue(true)
    expect(rows()).toBe(2)
  })

  it('say how many more were compared than there are columns', async () => {
    of = 900
    const text = words((await open()).text())
    expect(text).toContain('900 axes on HL40-200V')
    expect(text).toContain('894 more sisters were compared')
  })

  it('tell an address that two drives of a bus share', async () => {
    const page = await open()
    expect(words(page.text())).toContain('LID-01.Z and LID-05.Z answer to one address on this bus: 21.')
  })
})

describe('when the sister axes cannot be read', () => {
  it('the machine stands nevertheless, and reading again is offered', async () => {
    broken = true
    const page = await open()
    expect(page.findAll('[role="alert"]').map(alert => words(alert.text())).join(' ')).toContain('Read the sister axes again')
    expect(page.findAll('h2').map(head => head.text())).toContain('Side by side')
  })
})
