import { minus, plus } from '../motion/exact'
import { lapStart } from '../motion/timeline'
import type { Content, Move } from '../settings/types'
import type { Called } from './motion-items'

/** The smallest difference that the format holds, mm or deg. */
const least = 1e-6

/**
 * The places from which a call takes longest: either soft limit; on a modulo axis those from which the first move to a place
 * has farthest to go as its `turn` says. Relative moves alone take as long from anywhere: 0 stands for all. An endless chain
 * where a lap of it begins. None where the soft limits are not known.
 */
export function startsOf({ moves, endless }: Called, { setup: { softLimitMin, softLimitMax, modulo } }: Pick<Content, 'setup'>): readonly number[] {
  if (moves.every(({ kind }) => kind === 'relative')) return [0]
  if (endless) return [lapStart(moves, modulo)]
  if (modulo !== undefined) return farthest(moves, modulo)
  return softLimitMin === undefined || softLimitMax === undefined ? [] : [softLimitMin, softLimitMax]
}

function farthest(moves: readonly Move[], modulo: number): readonly number[] {
  const placed = moves.findIndex(({ kind }) => kind !== 'relative')
  const first = moves[placed]
  const { turn = 'signed', target = 0 } = first?.kind === 'absolute' ? first : {}
  if (turn === 'signed') return [0, modulo]
  const almostHalf = minus(modulo / 2, least)
  const back = { positive: [-least], negative: [least], shortest: [-almostHalf, almostHalf] }[turn]
  const before = moves.slice(0, placed).reduce((sum, relative) => plus(sum, relative.target), 0)
  return back.map(away => minus(minus(target, away), before))
}
