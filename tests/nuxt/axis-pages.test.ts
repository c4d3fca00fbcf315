import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { readBody, setResponseStatus } from 'h3'
import { afterEach, beforeEach, describe, expect, it } from 'vitest'
import AxisPage from '~/pages/axes/[tag]/index.vue'
import VersionPage from '~/pages/axes/[tag]/versions/[n].vue'
import ChangesPage from '~/pages/changes.vue'
import MachinePage from '~/pages/machines/[id].vue'
import { after, axis, before, changesAnswer, knownGood, life, nameplate, today } from '../support/axis-answers'

const never = { ...axis, id: 8, tag: 'NEW-01.X', status: 'never-read', off: { harm: 0, motion: 0, text: 0 }, knownGood: null, current: null, versions: 0, sightings: 0 }
registerEndpoint('/api/axes/tag:LID-03.Z', () => axis)
registerEndpoint('/api/axes/tag:NEW-01.X', () => never)
const openSwap = { id: 12, step: 'read-back', openedAt: '2026-11-30T20:10:00.000Z', openedBy: 'Tobias Achterberg', runningSince: null, releaseDueAt: '2026-12-01T20:10:00.000Z', overdue: false }
const swapped = (tag: string, swap: object) => registerEndpoint(`/api/axes/tag:${tag}`, () => ({ ...never, id: 9, tag, swap }))
swapped('OPEN-01.X', openSwap)
swapped('RUNS-01.X', { ...openSwap, step: 'release', runningSince: '2026-11-30T22:40:00.000Z', overdue: true })
for (const tag of ['OPEN-01.X', 'RUNS-01.X']) registerEndpoint(`/api/axes/tag:${tag}/life`, () => ({ items: [], next: null }))
registerEndpoint('/api/axes/7', () => axis)
registerEndpoint('/api/axes', () => ({ items: [axis, never], next: null }))
registerEndpoint('/api/axes/tag:LID-03.Z/life', () => ({ items: life, next: null }))
registerEndpoint('/api/axes/tag:NEW-01.X/life', () => ({ items: [], next: null }))
registerEndpoint('/api/axes/tag:LID-03.Z/versions/15', () => today)
registerEndpoint('/api/axes/tag:LID-03.Z/versions/14', () => knownGood)
registerEndpoint('/api/versions/15', () => today)
registerEndpoint('/api/versions/14', () => knownGood)
registerEndpoint('/api/versions/15/changes', () => changesAnswer(before, after))
registerEndpoint('/api/judging-context', () => ({ problem: null, registered: null, axis: null, current: null, knownGood: null, nextNumber: 16, nameplate, rules: [] }))
registerEndpoint('/api/axes/tag:LID-03.Z/fittings', () => ({ items: [] }))
const asked: string[] = []
registerEndpoint('/api/axes/tag:LID-03.Z/values', (event) => {
  asked.push(event.path.split('?')[1] ?? '')
  const step = (number: number, at: string, value: number, rest = {}) => ({
    versionId: number, number, at, capturedAt: at, value, unit: '%', before: { versionId: number - 1, number: number - 1, seenAt: at }, occasion: 'routine', changedBy: null, allowedBy: null, storedBy: 'station 2, nightly',
    reason: null, workOrder: null, serial: 'HL40-24-00817', model: 'HL40-200V', ...rest,
  })
  return {
    section: 'setup', field: 'thrustLimit', row: null, versions: 15, leftOut: 0, steps: [step(1, '2025-02-12T08:00:00.000Z', 38, { before: null, changedBy: 'Tobias Achterberg' }), step(15, '2026-11-30T05:12:00.000Z', 55)],
    knownGood: [{ versionId: 14, number: 14, from: '2026-09-03T07:20:00.000Z', to: null, value: 38 }], bounds: [{ by: 'rule', max: 45, from: '2025-09-01T00:00:00.000Z', to: null, words: 'Jars crack above 300 N' }],
  }
})
registerEndpoint('/api/machines/3', () => ({ id: 3, rev: 1, lineId: 1, name: 'LID-03' }))
registerEndpoint('/api/findings', () => ({ items: [], next: null }))
registerEndpoint('/api/me/letters', () => ({ choices: [], watches: [] }))
registerEndpoint('/api/units', () => ({ items: [], next: null }))
const signed: unknown[] = []
registerEndpoint('/api/versions/15/known-good', {
  method: 'POST',
  handler: async (event) => {
    signed.push(await readBody(event))
    setResponseStatus(event, 409)
    return { type: 'about:blank', title: 'Stop checks stand', status: 409, code: 'stop-checks', detail: 'One stop stands against it.', errors: [{ at: '/setup/thrustLimit', code: 'site-rule', message: 'Thrust limit 55 % is above the 45 % allowed on this machine: Jars crack above 300 N.' }] }
  },
})

const words = (text: string | null) => (text ?? '').replace(/\s+/g, ' ').trim()
const settle = async () => {
  for (let round = 0; round < 12; round++) {
    await flushPromises()
    await new Promise(resolve => setTimeout(resolve, 5))
  }
}
let close = () => {}
async function open(page: typeof AxisPage, route: string) {
  const mounted = await mountSuspended(page, { route })
  close = () => mounted.unmount()
  await settle()
  return mounted
}
afterEach(() => close())
async function press(page: Awaited<ReturnType<typeof open>>, word: string) {
  const button = page.findAll('button').find(one => words(one.text()).startsWith(word))
  if (!button) throw new Error(`no button ${word}`)
  await button.trigger('click')
  await settle()
}

beforeEach(() => {
  useSession().begin({ id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false })
})

describe('the page of an axis', () => {
  it('shows today against the known-good, and where to compare them', async () => {
    const page = await open(AxisPage, '/axes/LID-03.Z')
    expect(page.get('h1').text()).toBe('LID-03.Z')
    expect(page.findAll('h2').map(head => head.text())).toEqual(['It could not be restored tonight', 'Its life', 'On the rail', 'Checks', 'Moves', 'Motion', 'Setup', 'A value over time'])
    expect(page.findAll('a').some(link => link.attributes('href') === '/changes?a=14&b=15')).toBe(true)
    expect(words(page.get('dl').text())).toContain('v15, 30 Nov 2026 06:12 CET')
  })

  it('says how to begin where nothing was read', async () => {
    const page = await open(AxisPage, '/axes/NEW-01.X')
    expect(words(page.text())).toContain('Nothing has been uploaded for this axis.')
    expect(page.findAll('h2').map(head => head.text())).toEqual(['It could not be restored tonight', 'Its life'])
  })

  it('offers to begin a swap only where none is open, and leads to the one that is', async () => {
    const offered = (page: Awaited<ReturnType<typeof open>>) => page.findAll('a').filter(link => words(link.text()) === 'Swap the unit').length
    const links = (page: Awaited<ReturnType<typeof open>>) => page.findAll('a[href="/swaps/12"]').map(link => words(link.text()))
    const none = await open(AxisPage, '/axes/NEW-01.X')
    expect([offered(none), links(none)]).toEqual([1, []])
    close()
    const begun = await open(AxisPage, '/axes/OPEN-01.X')
    expect([offered(begun), links(begun)]).toEqual([0, ['Go on with swap 12']])
    expect(words(begun.text())).toMatch(/Swap open since Mon 30 Nov (2026 )?21:10 CET/)
    expect(words(begun.text())).toContain('Tobias Achterberg: written, then read back.')
    close()
    const runs = await open(AxisPage, '/axes/RUNS-01.X')
    expect([offered(runs), links(runs)]).toEqual([0, ['Release swap 12']])
    expect(words(runs.text())).toMatch(/Swap running since Mon 30 Nov (2026 )?23:40 CET, not released .*, opened by Tobias Achterberg, late\./)
  })

  it('hands out a kit only after the cautions were read', async () => {
    const page = await open(AxisPage, '/axes/LID-03.Z')
    await press(page, 'Take a kit')
    const take = () => [...document.querySelectorAll('button')].find(one => words(one.textContent) === 'Take the kit')
    expect(take()?.disabled).toBe(true)
    expect(words(document.body.textContent)).toContain('Values to be taught are not copied.')
    document.querySelector<HTMLInputElement>('[role="dialog"] input[type="checkbox"]')?.click()
    await settle()
    expect(take()?.disabled).toBe(false)
  })

  it('keeps its name where it cannot be read', async () => {
    const page = await open(AxisPage, '/axes/NOPE-1')
    expect(page.get('h1').text()).toBe('NOPE-1')
    expect(page.get('[role="alert"]').text()).not.toBe('')
  })
})

describe('the page of a version', () => {
  it('says who, when and why, and gives the file in three forms', async () => {
    const page = await open(VersionPage, '/axes/LID-03.Z/versions/15')
    expect(words(page.text())).toMatch(/Changed by ?nobody named.*Why ?no reason given/)
    expect(words(page.text())).toContain('Read as UTF-8, 2 values converted from another unit, nothing rounded.')
    expect(page.findAll('a[download]').map(link => link.attributes('href'))).toEqual(['json', 'csv', 'original'].map(form => `/api/versions/15/file?form=${form}`))
  })

  it('sends a signature and says in words why it was refused', async () => {
    signed.length = 0
    const page = await open(VersionPage, '/axes/LID-03.Z/versions/15')
    await press(page, 'Mark known-good')
    const password = document.querySelector<HTMLInputElement>('[role="dialog"] input[type="password"]')
    if (!password) throw new Error('no password field')
    password.value = 'demo: runa plans well'
    password.dispatchEvent(new Event('input'))
    await settle()
    document.querySelector('[role="dialog"] form')?.dispatchEvent(new Event('submit', { cancelable: true }))
    await settle()
    expect(signed).toEqual([{ meaning: 'approved', password: 'demo: runa plans well' }])
    expect(words(document.querySelector('[role="dialog"] [role="alert"]')?.textContent ?? '')).toContain('Thrust limit 55 % is above the 45 % allowed on this machine: Jars crack above 300 N.')
    expect(password.value).toBe('')
  })
})

describe('other pages', () => {
  it('compares by id or by tag and number', async () => {
    const page = await open(ChangesPage, '/changes?a=LID-03.Z/14&b=15')
    expect(words(page.text())).toContain('243.2 N became 352 N.')
    expect(versionPath('LID-03.Z/14')).toBe('/api/axes/tag:LID-03.Z/versions/14')
    expect([versionPath('15'), versionPath('0'), versionPath('../x'), versionPath('a/b/1')]).toEqual(['/api/versions/15', undefined, undefined, undefined])
  })
  it('asks for two versions where none is named', async () => {
    const page = await open(ChangesPage, '/changes')
    expect(page.get('h1').text()).toBe('Changes')
    expect(page.findAll('legend').map(legend => legend.text())).toEqual(['Before, above', 'After, below'])
  })
  it('stands the axes of a machine side by side', async () => {
    const page = await open(MachinePage, '/machines/3')
    const row = page.findAll('tbody tr').find(one => one.text().startsWith('thrust limit'))
    expect(page.findAll('thead a').map(link => link.text())).toEqual(['LID-03.Z', 'NEW-01.X'])
    expect(row?.findAll('td').map(cell => cell.text())).toEqual(['55', '–'])
  })
})

describe('a value over time', () => {
  const sectionOf = (page: Awaited<ReturnType<typeof open>>) => {
    const section = page.findAll('section').find(one => one.find('h2').exists() && one.get('h2').text() === 'A value over time')
    if (!section) throw new Error('no value over time')
    return section
  }

  it('begins with the heaviest change, and says who, since when, and what it stands against', async () => {
    const section = sectionOf(await open(AxisPage, '/axes/LID-03.Z'))
    expect(asked.at(-1)).toBe('section=setup&field=thrustLimit')
    expect(words(section.get('header').text())).toContain('Thrust limit: 1 change in 15 versions, 1 by nobody named')
    const [newest, first] = section.get('.steps').findAll('tbody tr').map(row => words(row.text()))
    expect(newest).toMatch(/^1 ?30 Nov 2026 06:12 CET.*before 38.*after 55.*352 N ?nobody named/)
    expect(newest).toContain('v14 to v15')
    expect(first).toContain('first reading')
    expect(words(section.get('details').text())).toContain('at most 45 % of rated')
  })

  it('asks for the value that is chosen', async () => {
    const section = sectionOf(await open(AxisPage, '/axes/LID-03.Z'))
    const [where] = section.findAll('select')
    await where?.setValue('move 5')
    await settle()
    expect(asked.at(-1)).toBe('section=move&field=target&row=5')
  })
})

describe('the motion of a version', () => {
  it('is drawn for the run that is chosen, with its numbers as a table', async () => {
    const page = await open(AxisPage, '/axes/LID-03.Z')
    const section = page.findAll('section').find(one => one.find('h2').exists() && one.get('h2').text() === 'Motion')
    if (!section) throw new Error('no motion')
    const legs = () => section.findAll('tbody tr').map(row => row.get('th').text())
    expect(legs().length).toBeGreaterThan(1)
    const options = section.findAll('option')
    await section.get('select').setValue(options.find(option => option.text() === 'move 1, Over lid')?.element.value)
    await settle()
    expect(legs()).toEqual(['1 Over lid'])
    expect(section.findAll('figcaption').map(caption => caption.text())[0]).toBe('speed, mm/s')
    expect(words(section.get('header').text())).toContain('where move 0 ends')
    expect(section.get('[role="region"]').attributes('aria-label')).toContain('Motion of move 1, Over lid, in numbers')
  })
})
