import { usedRows, type Row } from '../motion/chains'
import { onceFor } from '../motion/once'
import type { Move } from '../settings/types'

/** The press rows that are in use. */
export const pressRows = onceFor((moves: readonly Move[]): readonly Row[] => usedRows(moves).filter(({ move }) => move.kind === 'press'))

/** The way a press pushes: from its approach towards its target; undefined where the two are one place. */
export function pushOf({ approach, target }: Move): 1 | -1 | undefined {
  if (approach === undefined || target === approach) return undefined
  return target > approach ? 1 : -1
}
