import type { BoardAxis } from '#shared/api/board'
import { addressOf } from '~/utils/addresses'
import { formatShort } from '~/utils/format'

export interface Waiting { readonly words: string, readonly to?: string }

/** The one next thing an axis waits for, the gravest first; nothing where all is well. */
export function waitsFor(axis: BoardAxis): Waiting | undefined {
  if (axis.swap) return { words: axis.swap.runningSince ? 'swap, release' : 'swap, go on', to: addressOf.swap(axis.swap.id) }
  if (axis.serial === null) return { words: 'a unit', to: addressOf.axis(axis.tag) }
  if (axis.status === 'never-read') return { words: 'first upload', to: addressOf.upload() }
  if (axis.checks.stop > 0) return { words: 'judgement', to: addressOf.axis(axis.tag) }
  if (axis.status === 'unmarked' && axis.current) return { words: `review of v${axis.current.number}`, to: addressOf.version(axis.tag, axis.current.number) }
  if (axis.status === 'off' && axis.current && axis.knownGood) return { words: 'comparison', to: addressOf.changes(axis.knownGood.versionId, axis.current.versionId) }
  if (axis.overdueSince !== null) return { words: 'upload', to: addressOf.upload() }
  return undefined
}

/** The open swap in words, for readers and for who rests the pointer on it: 'Swap running since 30 Nov 21:10, not released'. */
export function swapWords({ swap, timeZone }: BoardAxis, now: Date): string | undefined {
  if (!swap) return undefined
  const since = formatShort(swap.runningSince ?? swap.openedAt, timeZone, now)
  return `Swap ${swap.runningSince ? 'running' : 'open'} since ${since}, not ${swap.runningSince ? 'released' : 'ended'}${swap.overdue ? ', late' : ''}`
}
