import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { getQuery, readBody, setResponseStatus } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import SwapPage from '~/pages/swaps/[id].vue'
import SwapsPage from '~/pages/swaps/index.vue'
import type { Swap, SwapLine } from '#shared/api/swaps'
import { axis, nameplate } from '../support/axis-answers'
import { attempt, begun, differing, fitted, otherUnit, readBack, rescaled, running, safe, spares, swapKit } from '../support/swap-answers'
import { soon } from '../support/soon'

vi.setConfig({ testTimeout: 30_000 })

let swap: Swap = begun
const sent: { path: string, body: unknown }[] = []
registerEndpoint('/api/swaps/118', () => swap)
registerEndpoint('/api/swaps/118/spares', () => spares)
registerEndpoint('/api/swaps/118/kit', () => swapKit)
registerEndpoint('/api/axes/7', () => ({ ...axis, tag: 'LID-02.Z' }))
registerEndpoint('/api/axes/tag:LID-02.Z', () => ({ ...axis, tag: 'LID-02.Z' }))
registerEndpoint('/api/nameplates', () => ({ items: [], next: null }))
registerEndpoint('/api/judging-context', () => ({ nameplate }))
registerEndpoint('/api/board', () => ({ axes: [{ id: 7, tag: 'LID-02.Z', role: 'seat lid', machine: 'LID-02', line: 'Line 1' }] }))
let next: (body: unknown) => Swap = () => swap
for (const step of ['unit-in', 'cautions', 'safe', 'running', 'first-motion', 'ticks', 'note', 'abandon', 'put-back']) {
  registerEndpoint(`/api/swaps/118/${step}`, { method: 'POST', handler: async (event) => {
    const body = await readBody<unknown>(event)
    sent.push({ path: step, body })
    swap = next(body)
    return swap
  } })
}

const words = (text: string) => text.replace(/\s+/g, ' ').trim()
const begin = (role: 'technician' | 'planner' | 'auditor', id = 2) => useSession().begin({ id, name: 'Tobias Achterberg', email: 'tobias@larkfield.example', roles: [role], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false } as Parameters<ReturnType<typeof useSession>['begin']>[0])
async function pageOf(now: Swap): Promise<VueWrapper> {
  swap = now
  const page = await mountSuspended(SwapPage, { route: '/swaps/118' })
  await soon(() => expect(page.find('.steps').exists()).toBe(true))
  await flushPromises()
  return page
}
const step = (page: VueWrapper) => page.get('[aria-current="step"]')
const button = (page: VueWrapper, word: string | RegExp) => {
  const found = page.findAll('button').find(one => typeof word === 'string' ? words(one.text()) === word : word.test(words(one.text())))
  if (!found) throw new Error(`no button ${word}; there are ${page.findAll('button').map(one => words(one.text())).join(' | ')}`)
  return found
}
/** Held, as who cannot hold does: two presses apart. */
async function hold(page: VueWrapper, word: RegExp): Promise<void> {
  const now = vi.spyOn(performance, 'now')
  const start = 1_000_000
  now.mockReturnValue(start)
  const found = button(page, word)
  await found.trigger('click')
  now.mockReturnValue(start + 900)
  await found.trigger('click')
  now.mockRestore()
  await flushPromises()
}

beforeEach(async () => {
  // What the test before entered was answered, so that it moves nothing here.
  await soon(() => expect(useOutboxStore().entries).toEqual([]))
  useOutboxStore().silentSince = undefined
  sent.length = 0
  next = () => swap
  begin('technician')
})

describe('a swap, step by step', () => {
  it('opens one step at a time, and says of the others what was done or is to come', async () => {
    const page = await pageOf(begun)
    expect(page.findAll('.step').map(one => one.classes().find(name => ['done', 'open', 'next'].includes(name)))).toEqual(['done', 'open', ...Array.from({ length: 7 }, () => 'next')])
    expect(words(page.get('.step').text())).toContain('Whole unit HL40-23-00417, encoder fault.')
    expect(words(page.get('[aria-label="Scribe code"]').text())).toBe('v11, known-good, goes back. Its codeTY8D7-BXY3D')
    expect(words(page.text())).toContain('LID-02.Z carries a load that can fall: block it')
  })

  it('offers spares that fit, says why others do not, and takes one', async () => {
    const page = await pageOf(begun)
    await soon(() => expect(step(page).findAll('input[type="radio"]')).toHaveLength(3))
    expect(words(step(page).text())).toContain('HL25-22-00031, HL25-100: Its stroke of 100 mm is shorter than the 140 mm of move 6.')
    next = () => rescaled
    await step(page).findAll('input[type="radio"]')[1]?.setValue()
    await button(page, 'Take HL50-25-01203').trigger('click')
    await soon(() => expect(words(step(page).text())).toContain('fits, and 2 values change'))
    expect(sent).toEqual([{ path: 'unit-in', body: { serial: 'HL50-25-01203', rev: 1 } }])
    expect(words(step(page).text())).toContain('Thrust limit setup243.2 N')
  })

  it('confirms rescaled values in newtons, by name', async () => {
    const page = await pageOf(rescaled)
    next = () => ({ ...rescaled, rev: 3, step: 'safe', forcesConfirmed: { by: 'Tobias Achterberg', at: '2026-11-30T01:36:00.000Z' } })
    await hold(page, /^Hold: the newtons are right, Tobias Achterberg$/)
    await soon(() => expect(sent).toEqual([{ path: 'unit-in', body: { serial: otherUnit.serial, forcesConfirmed: true, rev: 2 } }]))
    await soon(() => expect(step(page).get('h2').text()).toContain('Kit'))
  })

  it('gives no kit before the cautions were read', async () => {
    const page = await pageOf({ ...fitted, cautions: null })
    expect(page.findAll('button').some(one => one.text().includes('Restore file'))).toBe(false)
    next = () => fitted
    await hold(page, /^Hold: I have read these/)
    await soon(() => expect(page.findAll('button').some(one => one.text().includes('Restore file'))).toBe(true))
    expect(sent).toEqual([{ path: 'cautions', body: { read: true, rev: 3 } }])
    expect(words(step(page).text())).toContain('The read-back must showTBJCX-BNNQC')
  })

  it('asks how the load is blocked before it can be confirmed', async () => {
    const page = await pageOf(fitted)
    const inHand = { ...fitted, rev: 4, ticks: { ...fitted.ticks, kit: { by: 'Tobias Achterberg', at: '2026-11-30T01:41:00.000Z' } } }
    next = () => inHand
    await button(page, 'I have the kit').trigger('click')
    await soon(() => expect(sent).toEqual([{ path: 'ticks', body: { tick: 'kit', rev: 3 } }]))
    sent.length = 0
    expect(button(page, 'Say first how it is blocked').attributes('disabled')).toBeDefined()
    await step(page).findAll('input[type="radio"]')[1]?.setValue()
    next = () => ({ ...safe, rev: 5 })
    await hold(page, /^Hold: all five are done$/)
    await soon(() => expect(sent).toEqual([{ path: 'safe', body: { confirmed: true, blocked: 'pin', rev: 4 } }]))
    await soon(() => expect(step(page).get('h2').text()).toContain('Write'))
  })

  it('lets nothing be called written while a line is open, and shows what another device ticked', async () => {
    const page = await pageOf(safe)
    await soon(() => expect(step(page).findAll('input[type="checkbox"]').length).toBeGreaterThan(6))
    expect(button(page, /^Written, 8 lines to go$/).attributes('disabled')).toBeDefined()
    const done = { line: 'clear', words: 'Clear the whole move table', by: 'Runa Haldersen', at: '2026-11-30T02:12:00.000Z' }
    next = () => ({ ...safe, rev: 5, ticks: { ...safe.ticks, lines: [{ ...done, line: 'reset', by: 'Tobias Achterberg' }, done] } })
    await step(page).findAll('input[type="checkbox"]')[0]?.setValue(true)
    await soon(() => expect(sent).toEqual([{ path: 'ticks', body: { tick: 'line', line: 'reset', words: 'Reset HL40-25-00958', done: true, rev: 4 } }]))
    await soon(() => expect(words(step(page).text())).toContain('Written, 6 lines to go'))
    expect(words(step(page).text())).toMatch(/Clear the whole move table ?done .*03:12 CET, Runa Haldersen/)
    page.unmount()
    const again = await pageOf(swap)
    await soon(() => expect(words(step(again).text())).toContain('Written, 6 lines to go'))
    again.unmount()
  })

  it('goes on from a verdict only when it was read', async () => {
    const page = await pageOf({ ...safe, readBacks: [differing] })
    expect(words(step(page).text())).toContain('Differs in 2 values. Write them again.')
    page.unmount()
    const same = await pageOf(readBack)
    expect(words(step(same).text())).toContain('Same as the kit.')
    next = () => ({ ...readBack, rev: 6, ticks: { ...readBack.ticks, verdict: { by: 'Tobias Achterberg', at: '2026-11-30T08:10:00.000Z', attempt: 1 } } })
    await button(same, 'Go to first motion').trigger('click')
    await soon(() => expect(sent).toEqual([{ path: 'ticks', body: { tick: 'verdict', attempt: 1, rev: 5 } }]))
    expect(step(same).get('h2').text()).toContain('First motion')
    expect(words(step(same).text())).toContain('Nobody in reach.')
  })

  it('says that nothing carries over without an as-left', async () => {
    const page = await pageOf({ ...readBack, step: 'running', firstMotion: { speedPercent: 10, untried: [], results: [] } })
    expect(words(step(page).text())).toContain('Without one no known-good carries over')
    await step(page).get('textarea').setValue('Gains taught with empty tool.')
    next = () => ({ ...swap, rev: 6, draft: { note: 'Gains taught with empty tool.', by: 'Tobias Achterberg', at: '2026-11-30T08:50:00.000Z' } })
    await step(page).get('textarea').trigger('blur')
    await soon(() => expect(words(step(page).text())).toContain('09:50 CET, Tobias Achterberg: another device finds it too.'))
    expect(sent.splice(0)).toEqual([{ path: 'note', body: { note: 'Gains taught with empty tool.', rev: 5 } }])
    next = () => running
    await button(page, 'It runs: hand over without an as-left').trigger('click')
    await soon(() => expect(sent).toEqual([{ path: 'running', body: { note: 'Gains taught with empty tool.', rev: 6 } }]))
  })

  it('is released by a planner who did not send the read-back', async () => {
    const technician = await pageOf(running)
    expect(words(step(technician).text())).toContain('A planner signs, by day.')
    technician.unmount()
    begin('planner', 9)
    const planner = await pageOf(running)
    expect(words(step(planner).text())).toContain('The mark moves from v11 to v12: as left is the kit.')
    expect(words(step(planner).text())).toContain('all 4, at 10 %')
    expect(button(planner, 'Sign and release').exists()).toBe(true)
    planner.unmount()
    begin('planner', 2)
    const own = await pageOf({ ...running, readBacks: [attempt(3)] })
    expect(words(step(own).text())).toContain('You sent the last read-back: another planner signs.')
  })

  it('is only read by who neither swaps nor releases', async () => {
    begin('auditor')
    const page = await pageOf(fitted)
    expect(words(step(page).text())).toContain('A technician or a planner does this step.')
    expect(page.findAll('button').some(one => /Abandon/.test(one.text()))).toBe(false)
  })

  it('can be left at any step, with the unit that is truly fitted', async () => {
    const page = await pageOf(fitted)
    await button(page, 'Abandon the swap').trigger('click')
    await flushPromises()
    const dialog = document.querySelector<HTMLElement>('[role="dialog"]')
    expect(words(dialog?.textContent ?? '')).toContain('Which unit is truly fitted now?')
    const reason = dialog?.querySelector('textarea')
    if (reason) reason.value = 'part did not come'
    reason?.dispatchEvent(new Event('input'))
    const none = [...dialog?.querySelectorAll<HTMLInputElement>('input[type="radio"]') ?? []].at(-1)
    if (none) none.checked = true
    none?.dispatchEvent(new Event('change'))
    await flushPromises()
    dialog?.querySelector('form')?.dispatchEvent(new Event('submit', { cancelable: true }))
    await soon(() => expect(sent).toEqual([{ path: 'abandon', body: { reason: 'part did not come', fittedUnitId: null, rev: 3 } }]))
    page.unmount()
  })
})

describe('the swaps', () => {
  const line = (id: number, rest: Partial<SwapLine> = {}): SwapLine => ({
    id, axisId: 7, tag: 'LID-02.Z', machine: 'LID-02', timeZone: 'Europe/Berlin', step: 'release', replaced: 'unit', failure: 'encoder fault', openedAt: '2026-11-30T01:19:00.000Z', openedBy: 'Tobias Achterberg',
    changedAt: '2026-11-30T09:05:00.000Z', serialOut: 'HL40-23-00417', serialIn: 'HL40-25-00958', runningSince: '2026-11-30T09:05:00.000Z', releaseDueAt: '2026-12-01T09:05:00.000Z', overdue: false, ...rest,
  })
  let lists: Readonly<Record<string, SwapLine[]>> = {}
  let began: unknown
  registerEndpoint('/api/swaps', { method: 'GET', handler: event => ({ items: lists[String(getQuery(event).open)] ?? [], next: null }) })
  registerEndpoint('/api/swaps', { method: 'POST', handler: async (event) => {
    began = await readBody<unknown>(event)
    setResponseStatus(event, 409)
    return { type: 'about:blank', title: 'This axis has an open swap', status: 409, code: 'swap-open', detail: 'This axis has an open swap.', current: { id: 117, step: 'safe' } }
  } })

  it('stand open first, those that are late told', async () => {
    lists = { true: [line(118, { overdue: true })], false: [line(90, { step: 'released' })] }
    const page = await mountSuspended(SwapsPage, { route: '/swaps' })
    await soon(() => expect(page.get('h1').text()).toBe('1 swap not released, 1 late'))
    expect(words(page.get('li a').text())).toMatch(/^LID-02\.Z running, not released late.*HL40-23-00417 → HL40-25-00958.*open since .*02:19 CET/)
  })

  it('begin with the axis, the unit by its plate, what is replaced and what failed', async () => {
    lists = {}
    const page = await mountSuspended(SwapsPage, { route: '/swaps' })
    await soon(() => expect(page.get('h1').text()).toBe('No swap is open'))
    await page.get('input').setValue('02z')
    await soon(() => expect(page.find('[aria-label="Axes found"] button').exists()).toBe(true))
    await page.get('[aria-label="Axes found"] button').trigger('click')
    await soon(() => expect(page.text()).toContain('Which unit sits there?'))
    expect(button(page, 'Say which unit sits there').attributes('disabled')).toBeDefined()
    await page.findAll('input[type="radio"]')[1]?.setValue()
    await page.get('input[maxlength="64"]').setValue(' HL40-24-00817x ')
    await page.findAll('input[type="radio"]')[3]?.setValue()
    await page.get('textarea').setValue('encoder fault')
    await button(page, 'Begin the swap of LID-02.Z').trigger('submit')
    await soon(() => expect(began).toEqual({ axisId: 7, replaced: 'drive', failure: 'encoder fault', unitOut: { serial: 'HL40-24-00817x' } }))
    await soon(() => expect(page.get('[role="alert"]').text()).toContain('Go on with swap 117'))
  })
})
