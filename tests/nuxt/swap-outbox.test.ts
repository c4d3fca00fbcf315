import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { getQuery, getRequestHeader, readBody, readRawBody, setResponseStatus, type H3Event } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { SwapRefused, SwapWaiting } from '#components'
import { bytesOf, fileBodyOf, following, nextToSend, readOutbox, type OutboxEntry } from '~/utils/swap/outbox'
import { begun } from '../support/swap-answers'
import { soon } from '../support/soon'

vi.setConfig({ testTimeout: 30_000 })

const received: { key: string | undefined, body: unknown, query: Record<string, unknown> }[] = []
let answer: (event: H3Event, body: unknown) => unknown = () => ({})
registerEndpoint('/api/swaps/118/safe', { method: 'POST', handler: async (event) => {
  const body = await readBody<unknown>(event)
  received.push({ key: getRequestHeader(event, 'idempotency-key'), body, query: getQuery(event) })
  return answer(event, body)
} })
registerEndpoint('/api/swaps/118/read-back', { method: 'POST', handler: async (event) => {
  const body = String(await readRawBody(event, false))
  received.push({ key: getRequestHeader(event, 'idempotency-key'), body, query: getQuery(event) })
  return answer(event, body)
} })
const problem = (event: H3Event, status: number, code: string, more: object = {}) => {
  setResponseStatus(event, status)
  return { type: 'about:blank', title: code, status, code, detail: `${code} it is.`, ...more }
}

const safe = { swapId: 118, tag: 'LID-02.Z', path: '/api/swaps/118/safe', rev: 3, body: { kind: 'json' as const, value: { confirmed: true } }, says: 'made safe, pin' }
const me = { id: 2, name: 'Tobias Achterberg', email: 'tobias@larkfield.example', roles: ['technician'], sites: [{ id: 1, name: 'Larkfield', timeZone: 'Europe/Berlin' }], plant: 'Larkfield Preserves', empty: false, shared: false }
const signIn = (person: { id: number, name: string } = me) => useSession().begin({ ...me, ...person } as Parameters<ReturnType<typeof useSession>['begin']>[0])
/** What a reload finds. */
const kept = () => readOutbox(localStorage.getItem('witnessmark-outbox') ?? '')
const cut = () => { throw new TypeError('network is cut') }

beforeEach(async () => {
  vi.restoreAllMocks()
  await flushPromises()
  received.length = 0
  answer = () => ({ rev: 4 })
  const store = useOutboxStore()
  for (const { key } of store.entries) store.drop(key)
  store.silentSince = undefined
  store.trouble = null
  store.sending = false
  signIn()
})

describe('what is entered', () => {
  it('is sent at once with the rev it follows on and a key of its own, and is gone when it was taken', async () => {
    expect(useOutbox().enter(safe)).toBe(true)
    await soon(() => expect(kept()).toEqual([]))
    expect(received).toMatchObject([{ body: { confirmed: true, rev: 3 }, key: expect.stringMatching(/^[0-9a-f]{32}$/) as string }])
    expect(useOutboxStore().taken?.answer).toEqual({ rev: 4 })
  })

  it('waits in the browser while nothing answers, and goes out under the same key, in order', async () => {
    const fetched = vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    const outbox = useOutbox()
    outbox.enter(safe)
    outbox.enter({ ...safe, says: 'running' })
    await soon(() => expect(useOutboxStore().silentSince).toBeDefined())
    expect(kept().map(({ says, refused }) => [says, refused])).toEqual([['made safe, pin', null], ['running', null]])
    const [first] = kept()
    fetched.mockRestore()
    await outbox.send()
    expect(received.map(({ key, body }) => [key === first?.key, (body as { rev: number }).rev])).toEqual([[true, 3], [false, 4]])
    expect(kept()).toEqual([])
    expect(useOutboxStore().silentSince).toBeUndefined()
  })

  it('stays with the reason when the vault refuses it, and holds back what follows on it', async () => {
    answer = event => problem(event, 409, 'edited-meanwhile', { current: { ...begun, rev: 7 } })
    const outbox = useOutbox()
    outbox.enter(safe)
    outbox.enter({ ...safe, says: 'running' })
    await soon(() => expect(kept()[0]?.refused?.code).toBe('edited-meanwhile'))
    expect(received).toHaveLength(1)
    answer = () => ({ rev: 8 })
    const [first] = useOutboxStore().entries
    outbox.sendAgain(first!, 7)
    await soon(() => expect(kept()).toEqual([]))
    expect((received[1]?.body as { rev: number }).rev).toBe(7)
    expect(received[1]?.key).not.toBe(received[0]?.key)
  })

  it('waits on while the vault is full, and the person is told why', async () => {
    answer = event => problem(event, 507, 'disk-full')
    useOutbox().enter(safe)
    await soon(() => expect(useOutboxStore().trouble?.code).toBe('disk-full'))
    expect(kept().map(({ refused }) => refused)).toEqual([null])
    const shown = await mountSuspended(SwapWaiting)
    expect(shown.text()).toContain('1 entry waits on this device. disk-full. It is tried again by itself.')
  })

  it('of another person waits until that person signs in here', async () => {
    const fetched = vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    useOutbox().enter(safe)
    await soon(() => expect(useOutboxStore().silentSince).toBeDefined())
    fetched.mockRestore()
    signIn({ id: 9, name: 'Runa Haldersen' })
    await useOutbox().send()
    expect(received).toEqual([])
    const shown = await mountSuspended(SwapWaiting)
    expect(shown.text()).toContain('1 entry of Tobias Achterberg waits on this device. It is sent when Tobias Achterberg signs in here.')
    signIn()
    await soon(() => expect(received).toHaveLength(1))
  })

  it('is told that there is no room for it, and keeps what was there', async () => {
    vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    useOutbox().enter(safe)
    const room = localStorage
    vi.stubGlobal('localStorage', { getItem: (name: string) => room.getItem(name), setItem: () => { throw new DOMException('full', 'QuotaExceededError') } })
    expect(useOutbox().enter({ ...safe, says: 'running' })).toBe(false)
    vi.unstubAllGlobals()
    expect(kept().map(({ says }) => says)).toEqual(['made safe, pin'])
  })

  it('a read-back waits with its bytes', async () => {
    const bytes = Uint8Array.from([0xff, 0xfe, 0x7b, 0x00, 0x7d, 0x00])
    const body = await fileBodyOf(new File([bytes], 'lid-02.z.json'), 'application/json')
    expect(body.kind === 'file' && [...bytesOf(body.base64)]).toEqual([...bytes])
    const text = await fileBodyOf(new File(['{"a":1}'], 'lid-02.z.json'), 'application/json')
    useOutbox().enter({ ...safe, path: '/api/swaps/118/read-back', body: text, says: 'Read-back lid-02.z.json' })
    await soon(() => expect(kept()).toEqual([]))
    expect(received).toMatchObject([{ body: '{"a":1}', query: { rev: '3', name: 'lid-02.z.json' } }])
  })

  it('a read-back that was turned away and kept is an answer, not a conflict', async () => {
    const current = { ...begun, rev: 9 }
    answer = event => problem(event, 409, 'read-back-serial', { current })
    useOutbox().enter({ ...safe, path: '/api/swaps/118/read-back', body: { kind: 'file', name: 'x.json', mediaType: 'application/json', base64: btoa('{}') }, says: 'Read-back x.json' })
    await soon(() => expect(kept()).toEqual([]))
    expect(useOutboxStore().taken?.answer).toMatchObject({ id: 118, rev: 9 })
  })
})

describe('the store of what waits', () => {
  const entry = (rest: Partial<OutboxEntry>): OutboxEntry => ({ ...safe, key: 'k', personId: 2, person: 'Tobias Achterberg', enteredAt: '2026-11-30T02:00:00.000Z', refused: null, ...rest })
  const refusal = { type: 'about:blank', title: 'no', status: 409, code: 'step-missing', detail: 'no' }

  it('leaves out what it cannot read, and keeps the rest', () => {
    expect(readOutbox(JSON.stringify([entry({ key: 'a' }), { key: 'old form' }, entry({ key: 'b' })])).map(({ key }) => key)).toEqual(['a', 'b'])
    expect(readOutbox('{torn')).toEqual([])
  })

  it('sends a swap’s entries in order, and goes on with other swaps past one that is stuck', () => {
    const stuck = entry({ key: 'a', refused: refusal })
    expect(nextToSend([stuck, entry({ key: 'b' }), entry({ key: 'c', swapId: 119 })], 2)?.key).toBe('c')
    expect(nextToSend([stuck, entry({ key: 'b' })], 2)).toBeUndefined()
  })

  it('lets follow on the answer only what was to follow on the entry', () => {
    const list = [entry({ key: 'b' }), entry({ key: 'c', rev: 9 }), entry({ key: 'd', swapId: 119 })]
    expect(following(list, entry({ key: 'a' }), 4).map(({ rev }) => rev)).toEqual([4, 9, 3])
  })

  it('shows what the other device did, and lets the person decide', async () => {
    const log = [...begun.log, { rev: 4, at: '2026-11-30T02:01:00.000Z', by: 'Ole Vestby', act: 'swap-unit-in', text: 'HL40-25-00958 goes in' }]
    const shown = await mountSuspended(SwapRefused, { props: { entry: entry({ refused: { ...refusal, code: 'edited-meanwhile' } }), log, timeZone: 'Europe/Berlin' } })
    expect(shown.text()).toContain('Another device went on. Yours was not taken: made safe, pin, entered')
    expect(shown.findAll('li').map(item => item.text())).toEqual([expect.stringMatching(/03:01 CET, Ole Vestby: HL40-25-00958 goes in$/)])
    const [leave, again] = shown.findAll('button')
    await leave?.trigger('click')
    await again?.trigger('click')
    expect([shown.emitted('leave')?.length, shown.emitted('again')?.length, again?.text()]).toEqual([1, 1, 'Send mine all the same'])
  })
})
