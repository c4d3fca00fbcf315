import type { ReadBack, Swap } from '#shared/api/swaps'

/** Read-backs of the unit now in, oldest first: what was read of one that went out again says nothing of it. */
export function attemptsOfUnit({ readBacks, log }: Pick<Swap, 'readBacks' | 'log'>): ReadBack[] {
  const since = log.findLast(({ act }) => act === 'unit-in' || act === 'put-back')?.at ?? '1970-01-01T00:00:00Z'
  return readBacks.filter(({ at }) => Date.parse(at) > Date.parse(since))
}
