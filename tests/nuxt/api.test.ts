import { mockNuxtImport, mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { getHeader, readBody, setResponseStatus, type H3Event } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { BaseDialog, NuxtPage } from '#components'
import { newRequestKey, useApi } from '~/composables/useApi'
import { useRead } from '~/composables/useRead'
import { useSession } from '~/stores/session'
import { toProblem } from '~/utils/api-problem'

const me = { id: 1, name: 'Runa Haldersen', email: 'runa@larkfield.example', roles: ['planner'], sites: [], plant: 'Larkfield Preserves', empty: false, shared: false }
const refused = (event: H3Event, status: number, code: string) => {
  setResponseStatus(event, status)
  return { type: 'about:blank', title: 'Refused', status, detail: `Refused by ${code}.`, code }
}

const { navigateToMock } = vi.hoisted(() => ({ navigateToMock: vi.fn((to: unknown) => to) }))
mockNuxtImport('navigateTo', () => navigateToMock)

describe('a call', () => {
  it('carries its key, so that a second try is the same request', async () => {
    const keys: (string | undefined)[] = []
    registerEndpoint('/api/rules', { method: 'POST', handler: async (event) => {
      keys.push(getHeader(event, 'idempotency-key'))
      return await readBody(event) as unknown
    } })
    const key = newRequestKey()
    const api = useApi()
    expect(await api.post('/api/rules', { reason: 'press of the jar' }, { key })).toEqual({ reason: 'press of the jar' })
    await api.post('/api/rules', { reason: 'press of the jar' }, { key })
    await api.post('/api/rules', {})
    expect(keys).toEqual([key, key, undefined])
    expect(key).toMatch(/^[0-9a-f]{32}$/)
    expect(newRequestKey()).not.toBe(key)
  })

  it('throws what the vault said as a problem', async () => {
    registerEndpoint('/api/units', event => refused(event, 409, 'edited-meanwhile'))
    const problem = await useApi().get('/api/units').then(() => undefined, toProblem)
    expect([problem?.code, problem?.problem.status, problem?.message]).toEqual(['edited-meanwhile', 409, 'Refused by edited-meanwhile.'])
  })

  it('without a session forgets the person and leads to the sign-in page and back', async () => {
    registerEndpoint('/api/board', event => refused(event, 401, 'sign-in-needed'))
    const session = useSession()
    session.begin({ ...me, roles: ['planner'] })
    const router = useRouter()
    const push = vi.spyOn(router, 'push').mockResolvedValue(undefined)
    const problem = await useApi().get('/api/board').then(() => undefined, toProblem)
    expect(problem?.problem.status).toBe(401)
    expect(session.me).toBeUndefined()
    expect(push).toHaveBeenCalledWith('/sign-in')
    push.mockRestore()
  })
})

describe('reading for a page', () => {
  const inScope = <Answer>(read: (signal: AbortSignal) => Promise<Answer>) => {
    const scope = effectScope()
    const reading = scope.run(() => useRead(read))
    if (!reading) throw new Error('the scope is closed')
    return { ...reading, scope }
  }

  it('keeps what it read last when a later read fails, and says so', async () => {
    const answers: (() => Promise<string>)[] = [() => Promise.resolve('46 axes'), () => Promise.reject(new TypeError('fetch failed'))]
    const { data, problem, loading, reload } = inScope(() => answers.shift()?.() ?? Promise.resolve('47 axes'))
    expect(loading.value).toBe(true)
    await flushPromises()
    expect([data.value, problem.value, loading.value]).toEqual(['46 axes', undefined, false])
    await reload()
    expect(data.value).toBe('46 axes')
    expect(problem.value?.unanswered).toBe(true)
    await reload()
    expect([data.value, problem.value]).toEqual(['47 axes', undefined])
  })

  it('takes the newest read, however late an older one answers', async () => {
    const waiting: ((answer: string) => void)[] = []
    const { data, reload } = inScope(() => new Promise<string>(resolve => waiting.push(resolve)))
    const second = reload()
    waiting[1]?.('new')
    await second
    waiting[0]?.('old')
    await flushPromises()
    expect(data.value).toBe('new')
  })

  it('gives up what runs when the page is left', () => {
    let signal: AbortSignal | undefined
    const { scope } = inScope((own) => {
      signal = own
      return new Promise<string>(() => {})
    })
    expect(signal?.aborted).toBe(false)
    scope.stop()
    expect(signal?.aborted).toBe(true)
  })
})

describe('the sign-in page', () => {
  beforeEach(() => navigateToMock.mockClear())
  const signIn = async (route: string) => {
    registerEndpoint('/api/me', event => refused(event, 401, 'sign-in-needed'))
    const page = await mountSuspended(NuxtPage, { route })
    await page.get('input[type=email]').setValue('runa@larkfield.example')
    await page.get('input[type=password]').setValue('demo: runa plans well')
    await page.get('form').trigger('submit')
    await vi.waitFor(() => expect(page.get('button[type=submit]').attributes('disabled')).toBeUndefined())
    return page
  }

  it('goes on to where one was going', async () => {
    const bodies: unknown[] = []
    registerEndpoint('/api/sign-in', { method: 'POST', handler: async (event) => {
      bodies.push(await readBody(event))
      return me
    } })
    await signIn('/sign-in?to=%2Funits%3Fstate%3Dspare')
    expect(bodies).toEqual([{ email: 'runa@larkfield.example', password: 'demo: runa plans well', panel: false }])
    expect(navigateToMock).toHaveBeenLastCalledWith('/units?state=spare', { replace: true })
    expect(useSession().me?.name).toBe('Runa Haldersen')
  })

  it('says in words what is wrong and empties the password only', async () => {
    registerEndpoint('/api/sign-in', { method: 'POST', handler: event => refused(event, 401, 'sign-in-failed') })
    const page = await signIn('/sign-in')
    expect(page.get('[role=alert]').text()).toBe('Refused. Refused by sign-in-failed.')
    expect(page.get<HTMLInputElement>('input[type=email]').element.value).toBe('runa@larkfield.example')
    expect(page.get<HTMLInputElement>('input[autocomplete=current-password]').element.value).toBe('')
    expect(navigateToMock).not.toHaveBeenCalled()
  })
})

describe('a dialog', () => {
  it('has its title as its name and closes with Escape', async () => {
    const dialog = await mountSuspended(BaseDialog, { props: { open: true, title: 'Mark version 2 known-good', sentence: 'It is restored to from now on.' }, slots: { default: () => 'Your password' } })
    const shown = document.querySelector('[role=dialog]')
    const named = (attribute: string) => document.getElementById(shown?.getAttribute(attribute) ?? '')?.textContent?.trim()
    expect(named('aria-labelledby')).toBe('Mark version 2 known-good')
    expect(named('aria-describedby')).toBe('It is restored to from now on.')
    document.dispatchEvent(new KeyboardEvent('keydown', { key: 'Escape', bubbles: true }))
    await flushPromises()
    expect(dialog.emitted('update:open')).toEqual([[false]])
  })
})
