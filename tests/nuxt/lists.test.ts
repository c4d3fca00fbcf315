import { mockNuxtImport, mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { readBody, setResponseStatus } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { NameplatesForm, PlacesList, RulesForm } from '#components'
import { listExample } from '~/utils/places/list'

mockNuxtImport('useSession', () => () => ({ me: { sites: [{ timeZone: 'Europe/Berlin' }] }, may: () => true, forget: () => {} }))

let bodies: [string, Record<string, unknown>][] = []
let refuses = ''
for (const path of ['/api/sites', '/api/lines', '/api/machines', '/api/units']) registerEndpoint(path, { method: 'GET', handler: () => ({ items: [], next: null }) })
registerEndpoint('/api/board', () => ({ axes: [] }))
let lastId = 0
for (const path of ['/api/sites', '/api/lines', '/api/machines', '/api/axes', '/api/units', '/api/fittings', '/api/nameplates']) {
  registerEndpoint(path, { method: 'POST', handler: async (event) => {
    if (path === refuses) {
      setResponseStatus(event, 409)
      return { type: 'about:blank', title: 'Taken', status: 409, detail: 'Another one has this name.', code: 'taken' }
    }
    bodies.push([path, await readBody(event)])
    setResponseStatus(event, 201)
    return { id: lastId += 1 }
  } })
}
registerEndpoint('/api/nameplates/4', { method: 'PATCH', handler: async (event) => {
  bodies.push(['PATCH', await readBody(event)])
  return { ...record, id: 5, revision: 3 }
} })

const record = { id: 4, model: 'HL40-200V', revision: 2, rev: 2, madeAt: '2026-11-01T08:00:00.000Z', madeBy: 'Runa Haldersen', units: 3, nameplate: { model: 'HL40-200V', axisKind: 'linear' as const, stroke: 200, ratedThrust: 640, dictionary: { 'K-017': { name: 'damping' } } } }

const button = (mounted: VueWrapper, words: string) => {
  const found = mounted.findAll('button').find(one => one.text().includes(words))
  if (!found) throw new Error(`no button ${words}`)
  return found
}
const labelled = (mounted: VueWrapper, words: string) => {
  const label = mounted.findAll('label').find(one => one.text().startsWith(words))
  return mounted.get(`[id="${label?.attributes('for')}"]`)
}
async function listOf(text: string) {
  const list = await mountSuspended(PlacesList)
  const input = list.get('input[type="file"]')
  Object.defineProperty(input.element, 'files', { value: [new File([text], 'plant.csv')] })
  await input.trigger('change')
  await vi.waitFor(() => expect(list.text()).toContain('plant.csv'))
  return list
}

beforeEach(() => {
  bodies = []
  refuses = ''
  lastId = 0
})

describe('a list of what stands where', () => {
  it('says what it would register, then does it in order with the ids it is given', async () => {
    const list = await listOf(listExample)
    expect(list.text()).toContain('Registers 1 site, 1 line, 1 machine, 2 axes, 2 units, 2 fittings.')
    await button(list, 'Register 9 entries').trigger('click')
    await vi.waitFor(() => expect(list.text()).toContain('9 registered.'))
    expect(bodies.map(([path]) => path.replace('/api/', ''))).toEqual(['sites', 'lines', 'machines', 'axes', 'axes', 'units', 'units', 'fittings', 'fittings'])
    expect(bodies[1]?.[1]).toEqual({ name: 'Line 1', siteId: 1 })
    expect(bodies[7]?.[1]).toMatchObject({ axisId: 4, unitId: 6 })
  })

  it('registers nothing while the list has an error', async () => {
    const list = await listOf(listExample.replace('rotary', 'round'))
    expect(list.text()).toContain('line 3 kind: one of linear, rotary')
    expect(button(list, 'Register').attributes('disabled')).toBeDefined()
  })

  it('leaves out what hangs on a step that failed, and says so', async () => {
    refuses = '/api/machines'
    const list = await listOf(listExample)
    await button(list, 'Register 9 entries').trigger('click')
    await vi.waitFor(() => expect(list.text()).toContain('4 registered, 5 not.'))
    expect(list.text()).toContain('Another one has this name.')
    expect(bodies.some(([path]) => path === '/api/axes')).toBe(false)
  })
})

describe('the form of a nameplate', () => {
  it('sends what changed, null for what was cleared, and the dictionary as a patch', async () => {
    const form = await mountSuspended(NameplatesForm, { props: { record } })
    await labelled(form, 'Rated thrust').setValue('')
    await labelled(form, 'Highest speed').setValue('500')
    await form.findAll('button').find(one => one.text() === 'take out')?.trigger('click')
    await form.get('form').trigger('submit')
    await vi.waitFor(() => expect(bodies).toEqual([['PATCH', { rev: 2, ratedThrust: null, maxSpeed: 500, dictionary: { 'K-017': null } }]]))
    expect(form.emitted('done')).toEqual([[5]])
  })

  it('says units by the kind of axis', async () => {
    const form = await mountSuspended(NameplatesForm)
    expect(form.text()).toContain('Stroke, mm (needed)')
    await labelled(form, 'Kind').setValue('rotary')
    await flushPromises()
    expect(form.text()).toContain('Stroke, deg (needed)')
  })
})

describe('the form of a rule', () => {
  it('wants a bound, and one that can be kept', async () => {
    const form = await mountSuspended(RulesForm)
    await form.get('form').trigger('submit')
    await flushPromises()
    expect(form.text()).toContain('fields need another look')
    expect(bodies).toEqual([])
  })
})
