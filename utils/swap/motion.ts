import type { Swap, SwapKit } from '#shared/api/swaps'
import type { OutboxEntry } from './outbox'

/** Reduced speeds of the first motion, in percent of each move's own. */
export const reducedSpeeds = [5, 10, 25] as const

type Item = SwapKit['firstMotion'][number]
export interface Result { readonly item: string, readonly outcome: 'ok' | 'fault', readonly text: string | null, readonly by: string, readonly at: string, readonly waits: boolean }

/** Every result in the order in which it was given: those of the vault, then those that wait here. */
export function resultsOf(swap: Swap, waiting: readonly OutboxEntry[]): Result[] {
  const kept = (swap.firstMotion?.results ?? []).map(result => ({ ...result, waits: false }))
  const here = waiting.filter(({ path }) => path.endsWith('/first-motion')).flatMap(({ body, person, enteredAt }) => {
    const given = body.kind === 'json' && Array.isArray(body.value.results) ? body.value.results as { item: string, outcome: 'ok' | 'fault', text?: string }[] : []
    return given.map(({ item, outcome, text }) => ({ item, outcome, text: text ?? null, by: person, at: enteredAt, waits: true }))
  })
  return [...kept, ...here]
}

export interface ListedItem extends Item {
  /** The newest first; an item that has been repeated keeps what was said before. */
  readonly results: readonly Result[]
  readonly state: 'ok' | 'fault' | 'to come'
}

export function listedItems(items: readonly Item[], results: readonly Result[]): ListedItem[] {
  return items.map((item) => {
    const own = results.filter(result => result.item === item.item).toReversed()
    return { ...item, results: own, state: own[0]?.outcome ?? 'to come' }
  })
}

/** The item to be done next: the first that is not as it should be, or the one that was asked for. */
export function itemNow(items: readonly ListedItem[], wanted?: string): ListedItem | undefined {
  return items.find(({ item }) => item === wanted) ?? items.find(({ state }) => state !== 'ok')
}

/** Longest time of an item, as it is said: '1.9 s', 'at least 1.9 s', 'not known'. */
export function secondsWords({ seconds, atLeast }: Pick<Item, 'seconds' | 'atLeast'>): string {
  if (seconds === null) return ''
  return `${atLeast ? 'at least ' : ''}${(Math.ceil(seconds * 10) / 10).toFixed(1)} s`
}
