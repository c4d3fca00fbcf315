import { axisUnits, quantity } from '../checks/format'
import { remainder } from '../motion/exact'
import { timeline, type Timeline } from '../motion/timeline'
import { inputsOn, isCallable, selectCode, type Numbering } from '../motion/select-inputs'
import type { Nameplate } from '../settings/nameplate'
import type { AxisFlag, Content, Move } from '../settings/types'
import { drivenBack } from './falls'
import { calledMoves, type Called } from './motion-items'
import { atReducedSpeed } from './reduced'
import { startsOf } from './starts'
import type { MotionItem } from './types'

export interface FirstMotionCase {
  readonly content: Content
  readonly flags: readonly AxisFlag[]
  readonly nameplate?: Nameplate
  /** Of every speed in the table; accelerations stay. */
  readonly speedPercent: number
}

const jog = { item: 'jog', kind: 'jog', words: 'Jog a little both ways: the axis goes the way that counts up, and the position with it.' } as const
const hold = { item: 'brake-hold', kind: 'brake-hold', words: 'Take the enable away at rest: the load stays where it is.' } as const
const enable = { item: 'enable-loss', kind: 'enable-loss', words: 'Take the enable away while it jogs: it stops as it should, and stays.' } as const
const emergency = { item: 'emergency-stop', kind: 'emergency-stop', words: 'Press emergency stop while it jogs: it stops, and does not start again by itself.' } as const
const still = { moves: [], endless: false, direction: null, end: null, seconds: null, atLeast: false, inputs: null } as const

/**
 * What is tried first, in order: jog, brake where a load can fall, enable loss, emergency stop, then each move or chain that a
 * controller calls, with where it ends and how long it takes at the reduced speed.
 */
export function firstMotion(swap: FirstMotionCase): MotionItem[] {
  const falls = drivenBack(swap.flags, swap.content, swap.nameplate)
  return [
    { ...still, ...jog, direction: 'either' }, ...falls ? [{ ...still, ...hold }] : [], { ...still, ...enable }, { ...still, ...emergency },
    ...calledMoves(atReducedSpeed(swap.content, swap.speedPercent).moves).map(called => itemOf(called, swap)),
  ]
}

function itemOf(called: Called, swap: FirstMotionCase): MotionItem {
  const [first] = called.moves
  if (!first) throw new RangeError('A call without a move.')
  const runs = runsOf(called, swap)
  const placed = called.moves.some(({ kind }) => kind !== 'relative')
  const { modulo } = swap.content.setup
  const end = placed && !called.endless ? onlyOne(runs.map(run => modulo === undefined ? run.end : remainder(run.end, modulo))) : null
  return {
    item: `${called.moves.length > 1 ? 'chain' : 'move'}-${first.move}`, kind: called.moves.length > 1 ? 'chain' : 'move',
    words: wordsOf(called, end, swap.content), moves: called.moves.map(({ move }) => move), endless: called.endless, direction: directionOf(called, swap),
    end, seconds: runs.length === 0 ? null : Math.max(...runs.map(run => run.seconds)), atLeast: runs.some(run => run.atLeast), inputs: inputsFor(first, swap),
  }
}

/** The chain from each of the places from which it may take longest. */
function runsOf(called: Called, { content, nameplate, speedPercent }: FirstMotionCase): Timeline[] {
  const { setup } = atReducedSpeed(content, speedPercent)
  const around = { setup, stopsAtApproach: nameplate?.stopsAtApproach ?? false }
  return startsOf(called, content).map(from => timeline(called.moves, from, around))
}

const onlyOne = (ends: readonly number[]): number | null => ends.every(end => end === ends[0]) ? ends[0] ?? null : null

/** Which way the first movement goes, where that does not hang on where the axis stands. */
function directionOf({ moves }: Called, swap: FirstMotionCase): MotionItem['direction'] {
  const [first] = moves
  if (!first) return null
  if (first.kind === 'relative') return signWord(first.target)
  if (first.kind === 'press' && first.approach !== undefined) return signWord(first.target - first.approach)
  if (first.turn === 'positive' || first.turn === 'negative') return first.turn
  // An endless chain too is called wherever the axis stands, not only where a lap of it ends.
  const ways = runsOf({ moves, endless: false }, swap).map(({ stretches: [begin] }) => begin ? Math.sign(begin.a) || Math.sign(begin.v0) : 0).filter(way => way !== 0)
  return ways.length === 0 || ways.some(way => way !== ways[0]) ? 'either' : signWord(ways[0] ?? 0)
}

const signWord = (value: number): MotionItem['direction'] => value > 0 ? 'positive' : value < 0 ? 'negative' : null

function wordsOf({ moves, endless }: Called, end: number | null, content: Content): string {
  const { length } = axisUnits(content.axisKind)
  const [first] = moves
  if (first && moves.length === 1 && !endless) return `Move ${oneMove(first, length)}.`
  const numbers = moves.map(({ move }) => move).join('→')
  if (endless) return `${numbers} runs by itself without end: stop it by calling another move.`
  return `${numbers} runs by itself, ${moves.length} movements${end === null ? '' : `, ends at ${quantity(end, length)}`}.`
}

function oneMove({ move, kind, target, approach, forceLimit }: Move, length: string): string {
  if (kind === 'relative') return `${move} goes ${quantity(Math.abs(target), length)} towards ${target < 0 ? 'minus' : 'plus'}`
  if (kind === 'absolute') return `${move} goes to ${quantity(target, length)}`
  const from = approach === undefined ? '' : ` from ${quantity(approach, length)}`
  return `${move} presses${from}${forceLimit === undefined ? '' : ` with ${quantity(forceLimit, '%')}`}, to ${quantity(target, length)} at most`
}

/** Binary: input 0 weighs 1, input 1 weighs 2 (common practice, no source). Null where no input is used, or they do not reach. */
function inputsFor({ move }: Move, { content, nameplate }: FirstMotionCase): readonly number[] | null {
  const inputs = content.setup.selectInputs ?? 0
  const numbering: Numbering = { firstMove: nameplate?.firstMove ?? 0, allOff: nameplate?.allOff ?? 'first' }
  const code = selectCode(move, numbering)
  return inputs > 0 && isCallable(code, inputs, numbering) ? inputsOn(code) : null
}
