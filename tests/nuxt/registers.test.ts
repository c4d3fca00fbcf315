import { mockNuxtImport, mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { readBody, setResponseStatus, type H3Event } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import FormatPage from '~/pages/format.vue'
import InterfacePage from '~/pages/interface.vue'
import NameplatesPage from '~/pages/nameplates/index.vue'
import PeoplePage from '~/pages/people.vue'
import PlacesPage from '~/pages/places.vue'
import RulesPage from '~/pages/rules.vue'
import TrayPage from '~/pages/tray.vue'
import UnitsPage from '~/pages/units.vue'

let roles: string[] = ['planner', 'admin']
let bodies: unknown[] = []
const session = { me: { id: 1, name: 'Runa Haldersen', roles, sites: [{ id: 1, name: 'North hall', timeZone: 'Europe/Berlin' }], empty: false }, may: (...wanted: string[]) => wanted.some(role => roles.includes(role)), forget: () => {}, renew: async () => {} }
mockNuxtImport('useSession', () => () => session)

const site = { id: 1, rev: 3, name: 'North hall', timeZone: 'Europe/Berlin', fourEyes: true, releaseHours: 24, knownGoodMonths: 12, watched: [] }
const unit = { id: 9, rev: 1, serial: 'HL40-25-00914', channel: null, model: 'HL40-200V', firmware: null, actuatorSerial: null, actuatorModel: null, location: 'store 2', state: 'spare', siteId: 1, axis: null, modelKnown: false }
const plate = { id: 4, model: 'HL40-200V', revision: 2, rev: 2, madeAt: '2026-11-01T08:00:00.000Z', madeBy: 'Runa Haldersen', nameplate: { model: 'HL40-200V', axisKind: 'linear', stroke: 200, ratedThrust: 640 }, units: 3 }
const rule = { id: 2, scope: 'site', scopeId: 1, scopeName: 'North hall', field: 'thrustLimit', min: null, max: 45, fixed: null, reason: 'lids crack', madeAt: '2026-11-01T08:00:00.000Z', madeBy: 'Runa Haldersen', endedAt: null, endedBy: null, endReason: null }
const waiting = { id: 5, problem: 'serial-unknown', detail: 'HL25-26-01207 is not registered.', errors: [], more: 0, name: 'new-unit.json', bytes: 912, sha256: 'x', receivedAt: '2026-11-30T08:00:00.000Z', sentBy: 'station 2', serial: 'HL25-26-01207', model: 'HL25-100', capturedAt: '2026-11-30T07:00:00.000Z', siteId: 1, copies: 2, guess: { axisId: 7, tag: 'CAS-01.P', why: 'the same address 31' } }

let siteAnswer: (event: H3Event) => unknown = () => site
const page = (items: unknown[]) => () => ({ items, next: null })
const lists = { '/api/lines': [], '/api/machines': [], '/api/units': [unit], '/api/nameplates': [plate], '/api/rules': [rule], '/api/tray': [waiting], '/api/people': [], '/api/tokens': [] }
for (const [path, items] of Object.entries(lists)) registerEndpoint(path, page(items))
registerEndpoint('/api/sites', { method: 'GET', handler: page([site]) })
registerEndpoint('/api/sites/1', { method: 'PATCH', handler: async (event) => {
  bodies.push(await readBody(event))
  return siteAnswer(event)
} })
registerEndpoint('/api/tray/5/discard', { method: 'POST', handler: async (event) => {
  bodies.push(await readBody(event))
  setResponseStatus(event, 204)
  return null
} })
registerEndpoint('/api/tokens', { method: 'POST', handler: async (event) => {
  bodies.push(await readBody(event))
  setResponseStatus(event, 201)
  return { id: 3, token: 'wm_shown-once' }
} })

const pressed = async (mounted: VueWrapper, words: string) => {
  const found = mounted.findAll('button').find(button => button.text().includes(words))
  if (!found) throw new Error(`no button ${words}`)
  if (found.attributes('type') === 'submit') await mounted.get('form').trigger('submit')
  else await found.trigger('click')
  await flushPromises()
}
const labelled = (mounted: VueWrapper, words: string) => {
  const label = mounted.findAll('label').find(one => one.text().startsWith(words))
  return mounted.get(`[id="${label?.attributes('for')}"]`)
}
const reads = async (mounted: VueWrapper, words: string) => vi.waitFor(() => expect(mounted.text()).toContain(words))

beforeEach(() => {
  bodies = []
  roles = ['planner', 'admin']
  siteAnswer = () => site
})

describe('places', () => {
  it('send only what was edited, with the rev that was read', async () => {
    const places = await mountSuspended(PlacesPage)
    await reads(places, 'North hall')
    await pressed(places, 'edit')
    await labelled(places, 'Known-good stays fresh').setValue('6')
    await pressed(places, 'Keep it')
    await vi.waitFor(() => expect(bodies).toEqual([{ rev: 3, knownGoodMonths: 6 }]))
  })

  it('name what is wrong at the field and send nothing', async () => {
    const places = await mountSuspended(PlacesPage)
    await reads(places, 'North hall')
    await pressed(places, 'edit')
    await labelled(places, 'Known-good stays fresh').setValue('1,5')
    await pressed(places, 'Keep it')
    expect(places.text()).toContain('Write a number with a point')
    expect(bodies).toEqual([])
  })

  it('show both where somebody was quicker, and go on from there', async () => {
    siteAnswer = (event) => {
      setResponseStatus(event, 409)
      return { type: 'about:blank', title: 'Edited meanwhile', status: 409, detail: 'Edited meanwhile.', code: 'edited-meanwhile', current: { ...site, rev: 4, name: 'South hall' } }
    }
    const places = await mountSuspended(PlacesPage)
    await reads(places, 'North hall')
    await pressed(places, 'edit')
    await labelled(places, 'Known-good stays fresh').setValue('6')
    await pressed(places, 'Keep it')
    await reads(places, 'Changed meanwhile by somebody else')
    expect(places.text()).toContain('South hall')
    siteAnswer = () => site
    await pressed(places, 'Put mine on top of theirs')
    await pressed(places, 'Keep it')
    await vi.waitFor(() => expect(bodies.at(-1)).toEqual({ rev: 4, knownGoodMonths: 6 }))
  })

  it('offer no edit to a technician, and say whose work it is', async () => {
    roles = ['technician']
    const places = await mountSuspended(PlacesPage)
    await reads(places, 'North hall')
    expect(places.findAll('button').map(button => button.text())).not.toContain('edit')
    expect(places.text()).toContain('Planners register and edit places')
  })
})

describe('the tray', () => {
  it('says what waits, why, and where it probably belongs', async () => {
    const tray = await mountSuspended(TrayPage)
    await reads(tray, '1 file waits in the tray')
    expect(tray.text()).toContain('Probably CAS-01.P: the same address 31')
    expect(tray.text()).toContain('came 2 times')
  })

  it('sets aside with a reason, never without', async () => {
    const tray = await mountSuspended(TrayPage)
    await reads(tray, 'new-unit.json')
    await pressed(tray, 'Set aside')
    await tray.get('form').trigger('submit')
    await flushPromises()
    expect(bodies).toEqual([])
    await labelled(tray, 'Why it is set aside').setValue('a test file')
    await tray.get('form').trigger('submit')
    await vi.waitFor(() => expect(bodies).toEqual([{ reason: 'a test file' }]))
  })
})

describe('the other registers', () => {
  it('units count spares and say where they lie', async () => {
    const units = await mountSuspended(UnitsPage)
    await reads(units, '1 unit, 1 spare')
    expect(units.text()).toContain('store 2, North hall')
    expect(units.text()).toContain('no nameplate')
  })

  it('rules say what they allow and why', async () => {
    const rules = await mountSuspended(RulesPage)
    await reads(rules, '1 rule holds')
    expect(rules.text()).toContain('at most 45 %')
  })

  it('nameplates count what is said', async () => {
    const nameplates = await mountSuspended(NameplatesPage)
    await reads(nameplates, 'HL40-200V')
    expect(nameplates.get('tbody').text()).toMatch(/4of \d+/)
  })

  it('a token is shown once, then gone from the page', async () => {
    const people = await mountSuspended(PeoplePage)
    await reads(people, 'No token yet')
    await pressed(people, 'Make a token')
    await labelled(people, 'Name').setValue('station 2, nightly')
    await pressed(people, 'Make the token')
    await reads(people, 'wm_shown-once')
    expect(bodies[0]).toMatchObject({ name: 'station 2, nightly', scopes: ['upload'], siteIds: [] })
    await pressed(people, 'I have kept it')
    expect(people.text()).not.toContain('wm_shown-once')
  })

  it('people are for administrators', async () => {
    roles = ['planner']
    const people = await mountSuspended(PeoplePage)
    expect(people.text()).toContain('People are kept by administrators')
  })
})

describe('the reference pages', () => {
  it('format explains a field with weight and unit', async () => {
    const format = await mountSuspended(FormatPage)
    expect(format.get('#setup-thrustLimit').text()).toContain('6072h')
    expect(format.text()).toContain('number-unclear')
  })
  it('interface finds a call by its words', async () => {
    const calls = await mountSuspended(InterfacePage)
    await calls.get('input').setValue('shown once')
    expect(calls.findAll('details')).toHaveLength(1)
    expect(calls.get('summary').text()).toContain('/api/tokens')
  })
})
