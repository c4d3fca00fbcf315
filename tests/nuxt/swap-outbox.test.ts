import { mountSuspended, registerEndpoint } from '@nuxt/test-utils/runtime'
import { flushPromises } from '@vue/test-utils'
import { getQuery, getRequestHeader, readBody, readRawBody, setResponseStatus, type H3Event } from 'h3'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { SwapRefused, SwapWaiting } from '#components'
import { changesTo, fileBodyOf, following, nextToSend, readOutbox, withRefusal, type OutboxEntry } from '~/utils/swap/outbox'
import { changeRows, rowsOf } from '~/utils/device/database'
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
const kept = async () => readOutbox(await rowsOf('outbox'))
const isKept = (check: (entries: OutboxEntry[]) => unknown) => soon(async () => check(await kept()))
/** What all stores of rows of this browser have in common. */
const rowsPrototype = () => new Promise<IDBObjectStore>((resolve) => {
  const asked = indexedDB.open('witnessmark')
  asked.onsuccess = () => resolve(Object.getPrototypeOf(asked.result.transaction('outbox').objectStore('outbox')) as IDBObjectStore)
})
const cut = () => { throw new TypeError('network is cut') }

beforeEach(async () => {
  vi.restoreAllMocks()
  await flushPromises()
  received.length = 0
  answer = () => ({ rev: 4 })
  const store = useOutboxStore()
  await store.ready
  for (const { key } of store.entries) await store.drop(key)
  store.silentSince = undefined
  store.trouble = null
  store.sending = false
  signIn()
})

describe('what is entered', () => {
  it('is sent at once with the rev it follows on and a key of its own, and is gone when it was taken', async () => {
    void useOutbox().enter(safe)
    expect(useOutboxStore().entries).toMatchObject([{ says: 'made safe, pin' }])
    await soon(() => expect(useOutboxStore().entries).toEqual([]))
    expect(await kept()).toEqual([])
    expect(received).toMatchObject([{ body: { confirmed: true, rev: 3 }, key: expect.stringMatching(/^[0-9a-f]{32}$/) as string }])
    expect(useOutboxStore().taken?.answer).toEqual({ rev: 4 })
  })

  it('waits in the browser while nothing answers, and goes out under the same key, in order', async () => {
    const fetched = vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    const outbox = useOutbox()
    await outbox.enter(safe)
    await outbox.enter({ ...safe, says: 'running' })
    await soon(() => expect(useOutboxStore().silentSince).toBeDefined())
    expect((await kept()).map(({ says, refused }) => [says, refused])).toEqual([['made safe, pin', null], ['running', null]])
    const [first] = await kept()
    fetched.mockRestore()
    await outbox.send()
    expect(received.map(({ key, body }) => [key === first?.key, (body as { rev: number }).rev])).toEqual([[true, 3], [false, 4]])
    expect(await kept()).toEqual([])
    expect(useOutboxStore().silentSince).toBeUndefined()
  })

  it('stays with the reason when the vault refuses it, and holds back what follows on it', async () => {
    answer = event => problem(event, 409, 'edited-meanwhile', { current: { ...begun, rev: 7 } })
    const outbox = useOutbox()
    await outbox.enter(safe)
    await outbox.enter({ ...safe, says: 'running' })
    await isKept(([first]) => expect(first?.refused?.code).toBe('edited-meanwhile'))
    expect(received).toHaveLength(1)
    // What the vault answered of the swap is not left on the device.
    expect((await kept())[0]?.refused).toMatchObject({ detail: '' })
    expect((await kept())[0]?.refused).not.toHaveProperty('current')
    expect(useOutboxStore().overtaken).toMatchObject({ swapId: 118, current: { rev: 7 } })
    answer = () => ({ rev: 8 })
    const [first] = useOutboxStore().entries
    await outbox.sendAgain(first!, 7)
    await isKept(entries => expect(entries).toEqual([]))
    expect((received[1]?.body as { rev: number }).rev).toBe(7)
    expect(received[1]?.key).not.toBe(received[0]?.key)
    // What was entered after it follows on the answer, and asks nothing of its own.
    expect(received.map(({ body }) => (body as { rev: number }).rev)).toEqual([3, 7, 8])
  })

  it('left out, lets what was entered after it go on from where the swap stands', async () => {
    answer = event => problem(event, 409, 'edited-meanwhile', { current: { ...begun, rev: 7 } })
    const outbox = useOutbox()
    await outbox.enter(safe)
    await outbox.enter({ ...safe, says: 'running' })
    await isKept(([first]) => expect(first?.refused?.code).toBe('edited-meanwhile'))
    answer = () => ({ rev: 8 })
    await outbox.leaveOut(useOutboxStore().entries[0]!, 7)
    await isKept(entries => expect(entries).toEqual([]))
    expect(received.map(({ body }) => (body as { rev: number }).rev)).toEqual([3, 7])
  })

  it('waits on while the vault is full, and the person is told why', async () => {
    answer = event => problem(event, 507, 'disk-full')
    await useOutbox().enter(safe)
    await soon(() => expect(useOutboxStore().trouble?.code).toBe('disk-full'))
    expect((await kept()).map(({ refused }) => refused)).toEqual([null])
    const shown = await mountSuspended(SwapWaiting)
    expect(shown.text()).toContain('1 entry waits on this device. disk-full. It is tried again by itself.')
  })

  it('of another person waits until that person signs in here', async () => {
    const fetched = vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    await useOutbox().enter(safe)
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

  it('lives on the page alone where the browser has no room, says so, and is sent all the same', async () => {
    const fetched = vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    await useOutbox().enter(safe)
    const full = vi.spyOn(await rowsPrototype(), 'put').mockImplementation(() => { throw new DOMException('full', 'QuotaExceededError') })
    await useOutbox().enter({ ...safe, says: 'running' })
    full.mockRestore()
    expect(useOutboxStore().entries.map(({ says }) => says)).toEqual(['made safe, pin', 'running'])
    expect((await kept()).map(({ says }) => says)).toEqual(['made safe, pin'])
    const shown = await mountSuspended(SwapWaiting)
    expect(shown.text()).toContain('This device has no room left. 1 entry lives on this page alone: leave it open and do not reload it until it is sent.')
    fetched.mockRestore()
    await useOutbox().send()
    expect(received.map(({ body }) => (body as { rev: number }).rev)).toEqual([3, 4])
    expect(useOutboxStore().entries).toEqual([])
    await soon(() => expect(shown.text()).toBe(''))
  })

  it('of two windows of one browser stands in both', async () => {
    vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    await useOutbox().enter(safe)
    const other = new BroadcastChannel('witnessmark-outbox')
    const [row] = await rowsOf('outbox') as { order: number }[]
    await changeRows('outbox', () => ({ put: [], drop: [row!.order] }))
    other.postMessage('changed')
    await soon(() => expect(useOutboxStore().entries).toEqual([]))
    other.close()
  })

  it('a read-back of 1.8 MiB waits with its bytes, and goes out as it was', async () => {
    const fetched = vi.spyOn(globalThis, '$fetch').mockImplementation(cut)
    const text = JSON.stringify({ filler: 'x'.repeat(1.8 * 1024 * 1024) })
    await useOutbox().enter({ ...safe, path: '/api/swaps/118/read-back', body: await fileBodyOf(new File([text], 'lid-02.z.json'), 'application/json'), says: 'Read-back lid-02.z.json' })
    const [waits] = await kept()
    expect(waits?.body.kind === 'file' && waits.body.bytes.byteLength).toBe(text.length)
    fetched.mockRestore()
    await useOutbox().send()
    expect(received).toMatchObject([{ query: { rev: '3', name: 'lid-02.z.json' } }])
    expect(received[0]?.body === text).toBe(true)
  })

  it('a read-back that was turned away and kept is an answer, not a conflict', async () => {
    const current = { ...begun, rev: 9 }
    answer = event => problem(event, 409, 'read-back-serial', { current })
    await useOutbox().enter({ ...safe, path: '/api/swaps/118/read-back', body: await fileBodyOf(new File(['{}'], 'x.json'), 'application/json'), says: 'Read-back x.json' })
    await isKept(entries => expect(entries).toEqual([]))
    expect(useOutboxStore().taken?.answer).toMatchObject({ id: 118, rev: 9 })
  })
})

describe('the store of what waits', () => {
  const entry = (rest: Partial<OutboxEntry>): OutboxEntry => ({ ...safe, key: 'k', personId: 2, person: 'Tobias Achterberg', enteredAt: '2026-11-30T02:00:00.000Z', refused: null, ...rest })
  const refusal = { type: 'about:blank', title: 'no', status: 409, code: 'step-missing', detail: 'no' }

  it('leaves out what it cannot read, and keeps the rest', () => {
    expect(readOutbox([entry({ key: 'a' }), { key: 'old form' }, null, entry({ key: 'b' })]).map(({ key }) => key)).toEqual(['a', 'b'])
  })

  it('changes what was changed, drops what went, and leaves the rest where it lies', () => {
    const now = [entry({ key: 'a', order: 1 }), entry({ key: 'b', order: 2 }), entry({ key: 'c', order: 4 })]
    expect(changesTo(now, withRefusal(now.filter(({ key }) => key !== 'a'), 'c', refusal))).toEqual({ put: [{ ...now[2], refused: refusal }], drop: [1] })
    expect(changesTo(now, now)).toEqual({ put: [], drop: [] })
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
