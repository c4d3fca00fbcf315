import { nextToSend, type OutboxEntry } from '~/utils/swap/outbox'

/** Refusals of a read-back that the vault keeps as an attempt all the same: `current` is the swap with it. */
const keptAttempts = new Set(['read-back-serial', 'read-back-model', 'read-back-twice', 'settings-unreadable'])

/** Not signed in, too many calls, a door before the vault, the vault starting, its disk full: the same entry goes later. */
const passing = new Set([401, 429, 502, 503, 504, 507])

/** How often is tried again while something waits, in ms. */
const again = 8000

export type ToSend = Pick<OutboxEntry, 'swapId' | 'tag' | 'path' | 'body' | 'says' | 'rev'>

/** Keeps what was entered and sends it in order; what the vault refuses stays, with the reason, until the person has decided. */
export function useOutbox() {
  const store = useOutboxStore()
  const session = useSession()
  const api = useApi()

  /** Kept first, then sent as soon as it goes. */
  async function enter(entry: ToSend): Promise<void> {
    const { me } = session
    if (!me) return
    // A proxy of the page cannot be kept: what is told is data alone.
    const body = entry.body.kind === 'json' ? { ...entry.body, value: JSON.parse(JSON.stringify(entry.body.value)) as Record<string, unknown> } : entry.body
    await store.add({ ...entry, body, key: newRequestKey(), personId: me.id, person: me.name, enteredAt: new Date().toISOString(), refused: null })
    void send()
  }

  function post({ path, body, rev, key }: OutboxEntry): Promise<unknown> {
    if (body.kind === 'json') return api.post(path, { ...body.value, rev }, { key })
    return api.post(path, body.bytes, { key, query: { rev, name: body.name }, headers: { 'content-type': body.mediaType } })
  }

  async function sendOne(entry: OutboxEntry): Promise<boolean> {
    try {
      const answer = await post(entry)
      store.heard(true)
      store.trouble = null
      await store.settle(entry, answer)
      return true
    }
    catch (failure) {
      const problem = toProblem(failure)
      store.heard(!problem.unanswered)
      // Without reception, without a session, or while the vault is overrun or full it is tried again; the rest is an answer.
      const later = problem.unanswered || passing.has(problem.problem.status)
      store.trouble = later && !problem.unanswered ? problem.problem : null
      if (!later && keptAttempts.has(problem.code) && problem.problem.current) await store.settle(entry, problem.problem.current)
      else if (!later) await store.refuse(entry, problem.problem)
      return !later
    }
  }

  const next = () => session.me && nextToSend(store.toSend, session.me.id)
  async function send(): Promise<void> {
    if (store.sending || !session.me) return
    store.sending = true
    try {
      await store.ready
      for (let entry = next(); entry; entry = next()) {
        if (!await sendOne(entry)) break
      }
    }
    finally {
      store.sending = false
    }
  }

  /** The same entry once more, following on what the other device did. */
  async function sendAgain(entry: OutboxEntry, rev: number): Promise<void> {
    await store.decide(entry, rev, { ...entry, key: newRequestKey(), rev, refused: null })
    void send()
  }
  /** It is left out; what was entered after it goes on without it. */
  async function leaveOut(entry: OutboxEntry, rev: number): Promise<void> {
    await store.decide(entry, rev)
    void send()
  }

  return { enter, send, sendAgain, leaveOut }
}

/** Tries again while something waits; once for the whole application, in its frame. */
export function useOutboxSending(): void {
  const store = useOutboxStore()
  const session = useSession()
  const { send } = useOutbox()
  const waits = () => store.entries.some(({ refused }) => refused === null)

  useEventListener(window, 'online', () => { void send() })
  useIntervalFn(() => { if (waits()) void send() }, again)
  watch(() => session.me?.id, () => { void send() }, { immediate: true })
}
