import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { getQuery, readBody } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { FindingsWork } from '#components'
import type { Finding, PlannedChange } from '#shared/api/findings'
import FindingsPage from '~/pages/findings/index.vue'
import FindingPage from '~/pages/findings/[id].vue'
import PlannedPage from '~/pages/planned.vue'

const at = '2026-12-01T06:00:00.000Z'
const finding: Finding = {
  id: 4, state: 'open', cause: 'stop-check', weight: 'harm', title: 'LID-02.Z: Thrust limit 55 % is above the 45 % allowed', axisId: 7, tag: 'LID-02.Z', timeZone: 'Europe/Berlin', openedAt: at, dueAt: '2020-01-01T00:00:00.000Z', overdue: true,
  changes: [], more: 0, explanations: [], closure: null, acts: [],
  versions: [{ at, axisId: 7, tag: 'LID-02.Z', versionId: 15, number: 8, capturedAt: at, baseId: null, baseNumber: null, says: 'Thrust limit 55 % is above 45 %.', changes: [] }],
}
const explained = { kind: 'explained' as const, at, by: 'Tobias Achterberg', text: 'to get through the shift', madeBy: 'night shift', madeAt: null, workOrder: null, plannedChangeId: null, as: null, allowedBy: null, version: null }
let shown: Finding = finding
const asked: Record<string, unknown>[] = []
const bodies: unknown[] = []
registerEndpoint('/api/findings', (event) => {
  asked.push(getQuery(event))
  return { items: getQuery(event).state === shown.state ? [shown] : [], next: null }
})
registerEndpoint('/api/findings/4', () => shown)
registerEndpoint('/api/findings/4/explain', { method: 'POST', handler: async (event) => {
  bodies.push(await readBody(event))
  shown = { ...shown, state: 'explained', acts: [explained], explanations: [explained] }
  return shown
} })
registerEndpoint('/api/axes/7/versions', () => ({ items: [], next: null }))
const plan: PlannedChange = {
  id: 2, axes: [{ id: 7, tag: 'LID-02.Z' }], fields: ['thrustLimit'], min: 40, max: 60, ranges: [{ field: 'thrustLimit', min: 40, max: 60 }], from: at, until: '2999-01-01T00:00:00.000Z', reason: 'thicker lids', allowedBy: 'Marit Lund', announcedAt: at, announcedBy: 'Runa Haldersen', timeZone: 'Europe/Berlin',
  endedAt: null, endedBy: null, endReason: null, came: [{ findingId: 4, at, tag: 'LID-02.Z', versionId: 15, number: 8, title: 'LID-02.Z thrust limit 38 → 55 %', state: 'explained' }],
}
registerEndpoint('/api/planned-changes', () => ({ items: [plan], next: null }))
const reads = async (mounted: VueWrapper, words: string) => vi.waitFor(() => expect(mounted.text().replace(/\s+/g, ' ')).toContain(words))
const signInAs = (roles: ('technician' | 'planner' | 'auditor')[], name = 'Ines Okafor', shared = false) =>
  useSession().begin({ id: 3, name, email: 'i@larkfield.example', roles, sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared })
const buttons = (mounted: VueWrapper) => mounted.findAll('button').map(button => button.text())

beforeEach(() => {
  shown = finding
  asked.length = 0
  bodies.length = 0
  signInAs(['auditor'])
})

describe('the findings', () => {
  it('stand by what is to be done, with what is overdue', async () => {
    const page = await mountSuspended(FindingsPage)
    await reads(page, '1 finding to be explained')
    await reads(page, 'overdue since')
    await reads(page, 'Nothing waits to be closed.')
    expect(asked.map(({ state }) => state).sort()).toEqual(['explained', 'open'])
  })

  it('say so where none is open', async () => {
    shown = { ...finding, state: 'closed', overdue: false, closure: { ...explained, kind: 'closed', as: 'accepted', allowedBy: 'Marit' } }
    const page = await mountSuspended(FindingsPage)
    await reads(page, 'No finding is open')
    await page.findAll('button').find(button => button.text() === 'Show what was closed')?.trigger('click')
    await reads(page, 'Tobias Achterberg')
  })
})

describe('one finding', () => {
  it('is explained under one’s name', async () => {
    const page = await mountSuspended(FindingPage, { route: '/findings/4' })
    await reads(page, 'Nobody has said why. Whoever knows, explains it.')
    await reads(page, 'Thrust limit 55 % is above 45 %.')
    await page.findAll('button').find(button => button.text() === 'Explain it')?.trigger('click')
    const form = page.get('form')
    await form.get('textarea').setValue('to get through the shift')
    await form.trigger('submit')
    await flushPromises()
    await reads(page, 'Tobias Achterberg explained')
    expect(bodies).toEqual([{ text: 'to get through the shift' }])
  })

  it('offers each what they may do', async () => {
    const work = async (state: Finding['state'], weight: Finding['weight'] = 'harm', explanations: Finding['explanations'] = []) => {
      const mounted = await mountSuspended(FindingsWork, { props: { finding: { ...finding, state, weight, explanations } } })
      const found = buttons(mounted)
      mounted.unmount()
      return found
    }
    expect(await work('open')).toEqual(['Explain it'])
    expect(await work('explained')).toEqual(['Say more', 'Close it'])
    expect(await work('explained', 'harm', [{ ...explained, by: 'Ines Okafor' }])).toEqual(['Say more'])
    expect(await work('closed')).toEqual(['Reopen it'])
    signInAs(['planner'])
    expect([await work('explained'), await work('explained', 'motion')]).toEqual([['Say more'], ['Say more', 'Close it']])
    signInAs(['technician'])
    expect([await work('explained', 'text'), await work('closed')]).toEqual([['Say more'], []])
    signInAs(['technician'], 'Panel', true)
    expect(await work('open')).toEqual([])
  })
})

describe('planned changes', () => {
  it('say what may change, who allowed it, and what came of it', async () => {
    const page = await mountSuspended(PlannedPage)
    await reads(page, '1 change is announced')
    await reads(page, 'force: thrust limit, 40 to 60 %')
    await reads(page, 'allowed by Marit Lund')
    await reads(page, 'LID-02.Z thrust limit 38 → 55 %')
    expect(buttons(page)).not.toContain('Announce a change')
  })
})
