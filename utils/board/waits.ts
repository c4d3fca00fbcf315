import type { BoardAxis } from '#shared/api/board'
import { addressOf } from '~/utils/addresses'

export interface Waiting { readonly words: string, readonly to?: string }

/** The one next thing an axis waits for, the gravest first; nothing where all is well. */
export function waitsFor(axis: BoardAxis): Waiting | undefined {
  if (axis.serial === null) return { words: 'a unit', to: addressOf.axis(axis.tag) }
  if (axis.status === 'never-read') return { words: 'first upload', to: addressOf.upload() }
  if (axis.checks.stop > 0) return { words: 'judgement', to: addressOf.axis(axis.tag) }
  if (axis.status === 'unmarked' && axis.current) return { words: `review of v${axis.current.number}`, to: addressOf.version(axis.tag, axis.current.number) }
  if (axis.status === 'off' && axis.current && axis.knownGood) return { words: 'comparison', to: addressOf.changes(axis.knownGood.versionId, axis.current.versionId) }
  if (axis.overdueSince !== null) return { words: 'upload', to: addressOf.upload() }
  return undefined
}
