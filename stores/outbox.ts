import { useEventListener } from '@vueuse/core'
import { defineStore } from 'pinia'
import type { Problem } from '#shared/api/common'
import { following, readOutbox, withRefusal, type OutboxEntry } from '~/utils/swap/outbox'

const name = 'witnessmark-outbox'

/**
 * Entries that wait for reception. They live in the browser's own store, written before anything else is done with them, so
 * that a reload or a flat battery loses none; windows of one browser share them.
 */
export const useOutboxStore = defineStore('outbox', () => {
  const kept = () => readOutbox(localStorage.getItem(name) ?? '[]')
  const entries = shallowRef<readonly OutboxEntry[]>(kept())
  /** Since when nothing of the vault came through; undefined while it answers. */
  const silentSince = ref<string>()
  /** Why the vault, though it answers, takes nothing just now: its disk is full, too many calls. */
  const trouble = shallowRef<Problem | null>(null)
  const sending = ref(false)
  /** The entry that was taken last, with what the vault answered. */
  const taken = shallowRef<{ readonly entry: OutboxEntry, readonly answer: unknown }>()

  useEventListener(window, 'storage', ({ key }: StorageEvent) => { if (key === name) entries.value = kept() })

  /** Throws a DOMException where the browser has no room left. Another window may have written since: its entries stay. */
  function change(next: (now: readonly OutboxEntry[]) => readonly OutboxEntry[]): void {
    const after = next(kept())
    localStorage.setItem(name, JSON.stringify(after))
    entries.value = after
  }

  const add = (entry: OutboxEntry) => change(now => [...now, entry])
  const replace = (key: string, by: OutboxEntry) => change(now => now.map(entry => entry.key === key ? by : entry))
  const drop = (key: string) => change(now => now.filter(entry => entry.key !== key))
  const refuse = (key: string, problem: OutboxEntry['refused']) => change(now => withRefusal(now, key, problem))
  /** Taken: it goes, and what was entered after it follows on the answer. */
  function settle(entry: OutboxEntry, answer: unknown): void {
    const rev = (answer as { rev?: unknown } | null)?.rev
    change(now => following(now.filter(({ key }) => key !== entry.key), entry, typeof rev === 'number' ? rev : entry.rev))
    taken.value = { entry, answer }
  }
  /** What the last call said of the reception. */
  function heard(answered: boolean): void {
    if (answered) silentSince.value = undefined
    else silentSince.value ??= new Date().toISOString()
  }

  return { entries, silentSince, trouble, sending, taken, add, replace, drop, refuse, settle, heard }
})
