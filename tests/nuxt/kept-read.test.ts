import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { setResponseStatus } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { z } from 'zod'
import { copyOf, copyOfMe, dropCopies, keepCopy, trimCopies } from '~/utils/device/copies'
import { rowsOf } from '~/utils/device/database'
import { soon } from '../support/soon'

vi.setConfig({ testTimeout: 30_000 })

let answer: () => unknown = () => ({ n: 1 })
registerEndpoint('/api/kept', () => answer())
registerEndpoint('/api/me', (event) => {
  setResponseStatus(event, 401)
  return { type: 'about:blank', title: 'no', status: 401, code: 'sign-in-needed', detail: 'no' }
})

const me = { id: 2, name: 'Tobias Achterberg', email: 'tobias@larkfield.example', roles: ['technician' as const], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false }
const day = 24 * 60 * 60 * 1000
const isoBefore = (ms: number) => new Date(Date.now() - ms).toISOString()
const copies = async () => await rowsOf('copies') as { name: string }[]
const cut = () => vi.spyOn(globalThis, '$fetch').mockImplementation(() => { throw new TypeError('network is cut') })

/** A page that reads `/api/kept` and shows what it has. */
const Page = defineComponent({
  setup() {
    const api = useApi()
    const { data, seenAt, problem } = useKeptRead(() => '/api/kept', z.object({ n: z.number() }), signal => api.get<{ n: number }>('/api/kept', { signal }))
    return () => h('p', [data.value ? `n ${data.value.n}` : 'nothing', ` seen ${seenAt.value ?? 'never'}`, problem.value ? ' no reception' : ''])
  },
})

beforeEach(async () => {
  vi.restoreAllMocks()
  answer = () => ({ n: 1 })
  useSession().begin(me)
  await dropCopies()
})

describe('what was read', () => {
  it('stays on the device, with who read it, and is shown as of then when there is no reception', async () => {
    const first = await mountSuspended(Page)
    await soon(() => expect(first.text()).toContain('n 1'))
    await soon(async () => expect((await copies()).map(({ name }) => name).sort()).toEqual(['/api/kept', copyOfMe]))
    first.unmount()
    const { readAt } = (await copyOf('/api/kept', Date.now()))!
    cut()
    const again = await mountSuspended(Page)
    await soon(() => expect(again.text()).toBe(`n 1 seen ${readAt} no reception`))
    again.unmount()
  })

  it('is shown meanwhile when an answer hangs, and gives way to it', async () => {
    await keepCopy({ name: '/api/kept', personId: 2, readAt: isoBefore(60_000), value: { n: 7 } })
    let letThrough: (value: unknown) => void = () => undefined
    answer = () => new Promise((resolve) => { letThrough = resolve })
    const page = await mountSuspended(Page)
    expect(page.text()).toContain('nothing')
    await soon(() => expect(page.text()).toContain('n 7'))
    letThrough({ n: 8 })
    await soon(() => expect(page.text()).toContain('n 8'))
    page.unmount()
  })

  it('in a form that this release does not know, of another person, or a week old is left', async () => {
    cut()
    for (const copy of [{ personId: 2, readAt: isoBefore(0), value: { n: 'seven' } }, { personId: 9, readAt: isoBefore(0), value: { n: 7 } }, { personId: 2, readAt: isoBefore(7 * day), value: { n: 7 } }]) {
      await keepCopy({ name: '/api/kept', ...copy })
      const page = await mountSuspended(Page)
      await soon(() => expect(page.text()).toContain('no reception'))
      await flushPromises()
      expect(page.text()).toContain('nothing')
      page.unmount()
    }
  })

  it('on a shared panel is not kept', async () => {
    useSession().begin(me, true)
    const page = await mountSuspended(Page)
    await soon(() => expect(page.text()).toContain('n 1'))
    await flushPromises()
    expect(await copyOf('/api/kept', Date.now())).toBeUndefined()
    page.unmount()
  })
})

describe('copies', () => {
  const kept = (name: string, rest: object = {}) => keepCopy({ name, personId: 2, readAt: isoBefore(0), value: 1, ...rest })

  it('go with the sign-out, with a session that the vault no longer knows, and when somebody signs in', async () => {
    const session = useSession()
    for (const end of [() => session.forget(), () => session.renew(), () => session.begin({ ...me, id: 9 })]) {
      await kept('/api/swaps/118')
      await end()
      await soon(async () => expect(await copyOf('/api/swaps/118', Date.now())).toBeUndefined())
    }
  })

  it('say without reception who was here, until the vault answers', async () => {
    const session = useSession()
    session.forget()
    await dropCopies()
    await kept(copyOfMe, { value: me })
    cut()
    await expect(session.renew()).rejects.toThrow()
    expect([session.me?.name, session.may('technician')]).toEqual(['Tobias Achterberg', true])
    vi.restoreAllMocks()
    expect(await session.find()).toBeUndefined()
    expect(session.me).toBeUndefined()
  })

  it('are the newest eighty, none older than a week', async () => {
    for (let number = 0; number < 85; number += 1) await kept(`swap ${number}`, { readAt: isoBefore(number * 1000) })
    await kept('old', { readAt: isoBefore(8 * day) })
    await trimCopies(Date.now())
    expect((await copies()).map(({ name }) => name).sort()).toEqual(Array.from({ length: 80 }, (_, number) => `swap ${number}`).sort())
  })
})
