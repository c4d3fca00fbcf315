import { useEventListener } from '@vueuse/core'
import { defineStore } from 'pinia'
import type { Problem } from '#shared/api/common'
import { changeRows, rowsOf } from '~/utils/device/database'
import { changesTo, following, readOutbox, withRefusal, type OutboxEntry } from '~/utils/swap/outbox'

/**
 * Entries that wait for reception. They lie in the browser's own database, written before they are sent, so that a reload or
 * a flat battery loses none; windows of one browser share them. Where the browser has no room left an entry lives on this
 * page alone (`loose`), which says so.
 */
export const useOutboxStore = defineStore('outbox', () => {
  const kept = shallowRef<readonly OutboxEntry[]>([])
  const loose = shallowRef<readonly OutboxEntry[]>([])
  /** Being written this moment: shown, so that nobody enters it twice, and not sent yet. */
  const coming = shallowRef<readonly OutboxEntry[]>([])
  const toSend = computed(() => loose.value.length === 0 ? kept.value : [...kept.value, ...loose.value].sort((a, b) => (a.enteredAt < b.enteredAt ? -1 : 1)))
  const entries = computed(() => [...toSend.value, ...coming.value])
  /** What waited from before was read; until then nothing is said of where a swap stands. */
  const loaded = ref(false)
  /** Since when nothing of the vault came through; undefined while it answers. */
  const silentSince = ref<string>()
  /** Why the vault, though it answers, takes nothing just now: its disk is full, too many calls. */
  const trouble = shallowRef<Problem | null>(null)
  const sending = ref(false)
  /** The entry that was taken last, with what the vault answered. */
  const taken = shallowRef<{ readonly entry: OutboxEntry, readonly answer: unknown }>()
  /** The swap as another device left it, told with the newest refusal. */
  const overtaken = shallowRef<{ readonly swapId: number, readonly current: unknown }>()

  /** One change after another: each begins with what the one before it left. */
  let turn: Promise<unknown> = Promise.resolve()
  function inTurn<Answer>(work: () => Promise<Answer>): Promise<Answer> {
    const mine = turn.then(work)
    turn = mine.catch(() => undefined)
    return mine
  }
  const otherWindows = new BroadcastChannel('witnessmark-outbox')
  const read = () => inTurn(async () => {
    try {
      kept.value = readOutbox(await rowsOf('outbox'))
    }
    catch (failure) {
      // A browser that keeps nothing has nothing that waits.
      if (!(failure instanceof DOMException)) throw failure
    }
    loaded.value = true
  })
  useEventListener(otherWindows, 'message', () => { void read() })
  const ready = read()
  useEventListener(window, 'beforeunload', (event: BeforeUnloadEvent) => { if (loose.value.length > 0) event.preventDefault() })

  const change = (next: (now: readonly OutboxEntry[]) => readonly OutboxEntry[]) => inTurn(async () => {
    loose.value = next(loose.value)
    try {
      kept.value = readOutbox(await changeRows('outbox', (rows) => {
        const now = readOutbox(rows)
        return changesTo(now, next(now))
      }))
      otherWindows.postMessage('changed')
    }
    catch (failure) {
      if (!(failure instanceof DOMException)) throw failure
      // What the browser would not change there is sent once more after a reload, under the same key: it counts once.
      kept.value = next(kept.value)
    }
  })

  async function add(entry: OutboxEntry): Promise<void> {
    coming.value = [...coming.value, entry]
    try {
      await inTurn(async () => {
        kept.value = readOutbox(await changeRows('outbox', () => ({ put: [entry], drop: [] })))
      })
      otherWindows.postMessage('changed')
    }
    catch (failure) {
      if (!(failure instanceof DOMException)) throw failure
      loose.value = [...loose.value, entry]
    }
    finally {
      coming.value = coming.value.filter(({ key }) => key !== entry.key)
    }
  }
  /** The person has seen what another device did and decided: what was entered after it follows on the swap as it stands. */
  const decide = (refused: OutboxEntry, rev: number, again?: OutboxEntry) => change(now => following(
    now.flatMap(entry => entry.key !== refused.key ? [entry] : again ? [{ ...again, order: entry.order }] : []), refused, rev,
  ))
  const drop = (key: string) => change(now => now.filter(entry => entry.key !== key))
  /** Why it was not taken, in words about the entry: what the vault answered of the swap is shown, and does not stay on the device. */
  function refuse({ key, swapId }: OutboxEntry, { current, detail, ...problem }: Problem): Promise<void> {
    if (current) overtaken.value = { swapId, current }
    return change(now => withRefusal(now, key, { ...problem, detail: problem.code === 'edited-meanwhile' ? '' : detail }))
  }
  /** Taken: it goes, and what was entered after it follows on the answer. */
  async function settle(entry: OutboxEntry, answer: unknown): Promise<void> {
    const rev = (answer as { rev?: unknown } | null)?.rev
    taken.value = { entry, answer }
    await change(now => following(now.filter(({ key }) => key !== entry.key), entry, typeof rev === 'number' ? rev : entry.rev))
  }
  /** What the last call said of the reception. */
  function heard(answered: boolean): void {
    if (answered) silentSince.value = undefined
    else silentSince.value ??= new Date().toISOString()
  }

  return { entries, toSend, loose, loaded, ready, silentSince, trouble, sending, taken, overtaken, add, decide, drop, refuse, settle, heard }
})
