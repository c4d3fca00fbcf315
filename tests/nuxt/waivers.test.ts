import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises, type VueWrapper } from '@vue/test-utils'
import { readBody, setResponseStatus, type H3Event } from 'h3'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { ChecksList, ChecksJudgeAgain } from '#components'
import type { JudgingRun, Rejudged } from '../../shared/api/judging'
import type { VersionOne } from '../../shared/api/versions'
import { after, axis, nameplate, today } from '../support/axis-answers'

const context = { axisKind: 'linear', nameplate, after } as const
const sent: { path: string, body: unknown }[] = []
const keeps = (path: string, answer: (event: H3Event) => unknown) => registerEndpoint(path, {
  method: 'POST',
  handler: async (event) => {
    sent.push({ path, body: await readBody(event) })
    return answer(event)
  },
})
let given: (event: H3Event) => unknown = () => ({ id: 4 })
keeps('/api/waivers', event => given(event))
keeps('/api/waivers/4/end', () => ({}))
keeps('/api/versions/15/judge', () => ({}))

const words = (text: string | null | undefined) => (text ?? '').replace(/\s+/g, ' ').trim()
const dialog = () => document.querySelector<HTMLElement>('[role="dialog"]')
let close = () => {}
async function show(version: VersionOne, me: { roles?: string[], shared?: boolean } = {}): Promise<VueWrapper> {
  useSession().begin({ id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false, ...me } as Parameters<ReturnType<typeof useSession>['begin']>[0])
  const mounted = await mountSuspended(ChecksList, { props: { version, context, axis } })
  close = () => mounted.unmount()
  return mounted
}
async function press(page: VueWrapper, word: string) {
  const button = page.findAll('button').find(one => words(one.text()) === word)
  if (!button) throw new Error(`no button ${word}`)
  await button.trigger('click')
  await flushPromises()
}
async function fill(selector: string, value: string) {
  const input = dialog()?.querySelector<HTMLInputElement>(selector)
  if (!input) throw new Error(`no ${selector}`)
  input.value = value
  input.dispatchEvent(new Event('input'))
  await flushPromises()
}
/** Opens the dialog for the stop by the rule of the site. */
async function acceptStop(page: VueWrapper) {
  const row = page.findAll('tr').find(one => one.text().includes('above the 45 % allowed'))
  await row?.get('button').trigger('click')
  await flushPromises()
}
const sign = () => dialog()?.querySelector('form')?.dispatchEvent(new Event('submit', { cancelable: true }))

beforeEach(() => {
  sent.length = 0
  given = () => ({ id: 4 })
})
afterEach(() => close())

const waived = { id: 4, by: 'Mira Lindqvist', givenAt: '2026-11-20T09:00:00.000Z', until: '2027-02-28T23:00:00.000Z', reason: 'softer lids ordered' }
const accepted = { ...today, checks: today.checks.map(check => check.level === 'stop' && check.rule === 'site-rule' ? { ...check, waived } : check) }

describe('accepting a stop', () => {
  it('sends what it covers, the reason, the end of the day at the site and the password', async () => {
    const page = await show(today)
    await acceptStop(page)
    expect(words(dialog()?.textContent)).toContain('Thrust limit 55 % is above the 45 % allowed')
    await fill('textarea', ' guard closed, tried with ten jars ')
    await fill('input[type="date"]', '2027-02-28')
    await fill('input[type="password"]', 'demo: runa plans well')
    sign()
    await vi.waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]).toEqual({ path: '/api/waivers', body: {
      axisId: 7, rule: 'site-rule', at: ['/setup/thrustLimit'], reason: 'guard closed, tried with ten jars', until: '2027-02-28T23:00:00.000Z', password: 'demo: runa plans well',
      value: { level: 'stop', values: [{ place: '/setup/thrustLimit', value: 55 }, { place: 'ruleId', value: 1 }] },
    } })
    await vi.waitFor(() => expect(page.emitted('changed')).toHaveLength(1))
    expect(dialog()).toBeNull()
  })

  it('cannot be signed without a reason, and stays open with what was refused', async () => {
    given = (event) => {
      setResponseStatus(event, 403)
      return { type: 'about:blank', title: 'Not signed', status: 403, code: 'signature', detail: 'The password is wrong; nothing was signed.' }
    }
    const page = await show(today)
    await acceptStop(page)
    await fill('input[type="password"]', 'guess')
    expect(dialog()?.querySelector<HTMLButtonElement>('button[type="submit"]')?.disabled).toBe(true)
    await fill('textarea', 'r')
    expect(dialog()?.querySelector<HTMLButtonElement>('button[type="submit"]')?.disabled).toBe(false)
    sign()
    await vi.waitFor(() => expect(words(dialog()?.querySelector('[role="alert"]')?.textContent)).toContain('The password is wrong'))
    expect(page.emitted('changed')).toBeUndefined()
  })

  it('is offered to planners alone, not on shared accounts, not on what was set aside', async () => {
    const offered = (page: VueWrapper) => page.findAll('button').filter(button => button.text().startsWith('Accept')).length
    expect(offered(await show(today))).toBeGreaterThan(0)
    close()
    expect(offered(await show(today, { roles: ['technician'] }))).toBe(0)
    close()
    expect(offered(await show(today, { shared: true }))).toBe(0)
    close()
    expect(offered(await show({ ...today, void: { at: today.receivedAt, by: 'Runa Haldersen', reason: 'wrong file' } }))).toBe(0)
  })
})

describe('an accepted stop', () => {
  it('is told with who, until when and why, and counts as a stop no more', async () => {
    const page = await show(accepted)
    expect(words(page.text())).toContain('Accepted stop by Mira Lindqvist, 20 Nov 2026 10:00 CET, until 1 Mar 2027 00:00 CET: softer lids ordered')
    expect(words(page.get('header p').text())).toContain('1 accepted')
    const stops = today.checks.filter(({ level }) => level === 'stop').length
    expect(page.findAll('table .level').filter(level => level.text() === 'stop')).toHaveLength(stops - 1)
    expect(page.findAll('table').some(table => table.text().includes('above the 45 % allowed'))).toBe(false)
  })

  it('is accepted no more with a reason and a signature', async () => {
    const page = await show(accepted)
    await press(page, 'Accept it no more')
    await fill('textarea', 'lids came')
    await fill('input[type="password"]', 'demo: runa plans well')
    sign()
    await vi.waitFor(() => expect(sent).toEqual([{ path: '/api/waivers/4/end', body: { reason: 'lids came', password: 'demo: runa plans well' } }]))
    await vi.waitFor(() => expect(page.emitted('changed')).toHaveLength(1))
  })
})

describe('the waivers of an axis', () => {
  const record = (id: number, rest: object) => ({ id, axisId: 7, rule: 'site-rule', at: [], value: { level: 'stop', values: [] }, reason: 'softer lids ordered', until: '2099-02-28T23:00:00.000Z', by: 'Mira Lindqvist', givenAt: '2026-11-20T09:00:00.000Z', endedAt: null, endedBy: null, endReason: null, ...rest })
  registerEndpoint('/api/axes/7/waivers', () => ({ items: [
    record(4, {}), record(3, { until: '2026-01-31T23:00:00.000Z' }), record(2, { endedAt: '2026-11-21T09:00:00.000Z', endedBy: 'Runa Haldersen', endReason: 'lids came' }),
  ], next: null }))

  it('are read when looked at: what holds, what is over, what was taken back', async () => {
    const page = await show(today)
    const [, , history] = page.findAll('details')
    expect(history?.find('li').exists()).toBe(false)
    await history?.trigger('toggle')
    await vi.waitFor(() => expect(history?.findAll('li').map(line => words(line.text()))).toEqual([
      'site-rule accepted by Mira Lindqvist, 20 Nov 2026 10:00 CET: softer lids ordered; holds until 1 Mar 2099 00:00 CET Accept it no more',
      'site-rule accepted by Mira Lindqvist, 20 Nov 2026 10:00 CET: softer lids ordered; held until 1 Feb 2026 00:00 CET',
      'site-rule accepted by Mira Lindqvist, 20 Nov 2026 10:00 CET: softer lids ordered; taken back by Runa Haldersen, 21 Nov 2026 10:00 CET: lids came',
    ]))
  })
})

it('what was judged is judged again on demand', async () => {
  const page = await show(today)
  await press(page, 'Judge it again')
  await vi.waitFor(() => expect(page.emitted('changed')).toHaveLength(1))
  expect(sent.map(({ path }) => path)).toEqual(['/api/versions/15/judge'])
})

describe('judging every axis again', () => {
  const row = (axisId: number, tag: string, stops: number, message: string | null): Rejudged =>
    ({ axisId, tag, versionId: axisId, number: 3, before: { stop: 0, warn: 1, note: 0, unknown: 0 }, after: { stop: stops, warn: 1, note: 0, unknown: 0 }, stops, message })
  const asked: string[] = []
  let answers: JudgingRun[] = []
  keeps('/api/judging-runs', () => ({ id: 77 }))
  registerEndpoint('/api/judging-runs/77', (event) => {
    asked.push(event.path.split('?')[1] ?? '')
    return answers.shift()
  })

  it('shows how far it has come and one list of what changed, what stops first', async () => {
    answers = [
      { id: 77, done: 8, of: 20, changed: [row(1, 'LID-01.Z', 0, null)], problem: null },
      { id: 77, done: 20, of: 20, changed: [row(2, 'LID-02.Z', 1, 'Thrust limit is 55 %, at most 45 % is allowed.')], problem: null },
    ]
    const page = await mountSuspended(ChecksJudgeAgain, { props: { changed: 'made' } })
    close = () => page.unmount()
    expect(words(page.text())).toContain('The rule holds.')
    await press(page, 'Judge every axis again')
    await vi.waitFor(() => expect(words(page.get('.progress').text())).toBe('8 of 20 axes judged'))
    await vi.waitFor(() => expect(words(page.get('.progress').text())).toBe('20 of 20 axes judged'), { timeout: 3000 })
    expect(asked).toEqual(['from=0', 'from=1'])
    expect(page.findAll('tbody tr').map(line => line.findAll('td').map(cell => words(cell.text())))).toEqual([
      ['LID-02.Z v3', '0 → 1', '1', 'Thrust limit is 55 %, at most 45 % is allowed.'],
      ['LID-01.Z v3', '0', '1', 'other results of a lower level'],
    ])
    expect(words(page.get('header p').text())).toBe('2 axes are judged otherwise than before, 1 of them with stops that stand')
    expect(page.get('tbody a').attributes('href')).toBe('/axes/LID-02.Z/versions/3')
    expect(page.emitted('begun')).toHaveLength(1)
  })

  it('says when it broke off', async () => {
    answers = [{ id: 77, done: 8, of: 20, changed: [], problem: 'The run broke off. What it judged is kept; begin again.' }]
    const page = await mountSuspended(ChecksJudgeAgain)
    close = () => page.unmount()
    await press(page, 'Judge every axis again')
    await vi.waitFor(() => expect(words(page.get('[role="alert"]').text())).toContain('The run broke off.'))
    answers = [{ id: 77, done: 20, of: 20, changed: [], problem: null }]
    await press(page, 'Begin again')
    await vi.waitFor(() => expect(words(page.get('header p').text())).toBe('nothing is judged otherwise than before'))
    expect(page.find('[role="alert"]').exists()).toBe(false)
  })

  it('says after a revision by which nameplate the axes were judged', async () => {
    const page = await mountSuspended(ChecksJudgeAgain, { props: { changed: 'revised', title: 'What the nameplate hits' } })
    close = () => page.unmount()
    expect(words(page.text())).toMatch(/What the nameplate hits.*The revision is kept\. What the drives hold today was judged by the one before\./)
  })
})
