import { type MoveFieldName, moveFields } from './move-fields'
import { type MoveDraft, unsetMove } from './move-row'
import { type Move, moveKinds, turns } from './types'
import type { RawNode, RawObject } from './raw'
import { type Reading, type Slots, keyTable, shownIn, sortIntoSlots } from './reading'
import { type RowContext, maxMoves, readRowNumber, readRows } from './read-rows'
import { readNumber, readWhole } from './read-number'
import { readChoice, readText } from './read-value'
import { sortedMoveKeys } from './sorted-keys'
import { largestNumber } from '../units/number'
import { textRules } from './text-rules'

const table = keyTable(sortedMoveKeys)
const slotOf = (name: string) => table.index.get(name) as number
const numberSlot = slotOf('move')
const isNumber = sortedMoveKeys.map(key => key !== 'move' && moveFields[key].type === 'number')

/** The moves, by move. */
export function readMoves(reading: Reading, node: RawNode, context: RowContext): Move[] {
  const taken = new Set<number>()
  return readRows(reading, node, '/moves', maxMoves, (row, at) => readMove(reading, row, at, context, taken), move => move.move)
}

function readMove(reading: Reading, row: RawObject, at: string, context: RowContext, taken: Set<number>): Move | undefined {
  const slots = sortIntoSlots(reading, row, table, at)
  const move = unsetMove()
  const values: Record<string, string | number | undefined> = move
  let sound = true
  for (let slot = 0; slot < slots.length; slot += 1) {
    const node = slots[slot]
    if (node === undefined && slot !== numberSlot) continue
    const name = sortedMoveKeys[slot] as MoveFieldName | 'move'
    // Most values are plain numbers: they need no pointer and no further look.
    const value = node?.kind === 'number' && isNumber[slot] && Math.abs(node.value) <= largestNumber
      ? node.value
      : name === 'move'
        ? readRowNumber(reading, node, row, `${at}/move`, 0, maxMoves - 1, taken)
        : readField(reading, node as RawNode, `${at}/${name}`, name, context)
    if (value === undefined) sound = false
    else values[name] = value
  }
  const { problems } = reading
  const before = problems.total
  needs(reading, row, at, slots, move)
  refuses(reading, at, slots, move, context)
  ranges(reading, at, slots, move)
  // Sound: every key that was sent was read by its field, and the needed ones are there.
  return sound && problems.total === before ? move as Move : undefined
}

function readField(reading: Reading, node: RawNode, at: string, name: MoveFieldName, { axisKind }: RowContext): string | number | undefined {
  switch (name) {
    case 'kind': return readChoice(reading, node, at, moveKinds)
    case 'turn': return readChoice(reading, node, at, turns)
    case 'label': return readText(reading, node, at, textRules.label)
    case 'comment': return readText(reading, node, at, textRules.comment)
    case 'next': return readWhole(reading, node, at, 0, maxMoves - 1, 'row-number')
    default: return readNumber(reading, node, at, axisKind && (moveFields[name].unit[axisKind] ?? undefined))
  }
}

const slotted = (...names: MoveFieldName[]) => names.map(name => ({ name, slot: slotOf(name) }))
const always = slotted('kind', 'target', 'speed', 'acceleration')
const ofPress = slotted('forceLimit', 'approach')
const pressOnly = slotted('approach', 'pressSpeed')
const turn = slotted('turn')
const dwell = slotted('dwell')
const positive = slotted('speed', 'acceleration', 'deceleration', 'forceLimit', 'pressSpeed')
const notNegative = slotted('window', 'dwell')
const nextSlot = slotOf('next')

type Named = readonly { readonly name: MoveFieldName, readonly slot: number }[]

function needs(reading: Reading, row: RawObject, at: string, slots: Slots, move: MoveDraft): void {
  need(reading, row, at, slots, always, 'move')
  if (move.kind === 'press') need(reading, row, at, slots, ofPress, 'press')
}

function need(reading: Reading, row: RawObject, at: string, slots: Slots, fields: Named, what: string): void {
  for (const { name, slot } of fields) {
    if (slots[slot] === undefined) reading.problems.add('missing', `${at}/${name}`, row, `This ${what} has no ${name}: ${moveFields[name].help}`)
  }
}

function refuses(reading: Reading, at: string, slots: Slots, move: MoveDraft, context: RowContext): void {
  if (move.kind !== undefined && move.kind !== 'press') refuse(reading, at, slots, pressOnly, `belongs to a press; this move is ${move.kind}. Take it out.`)
  if (context.axisKind !== undefined && !context.wraps) refuse(reading, at, slots, turn, 'belongs to a rotary axis with a modulo in its setup. Take it out.')
  if (slots[nextSlot] === undefined) refuse(reading, at, slots, dwell, 'waits before the move that follows; this one has no next. Take it out, or give next.')
}

function refuse(reading: Reading, at: string, slots: Slots, fields: Named, why: string): void {
  for (const { name, slot } of fields) {
    const node = slots[slot]
    if (node !== undefined) reading.problems.addValue('not-allowed-here', `${at}/${name}`, node, `${name} ${why}`)
  }
}

/** An unused row keeps its zeros, so that its emptiness is restored. */
function ranges(reading: Reading, at: string, slots: Slots, move: MoveDraft): void {
  const unused = move.speed === 0 && move.acceleration === 0
  atLeastZero(reading, at, slots, move, positive, unused)
  atLeastZero(reading, at, slots, move, notNegative, true)
}

function atLeastZero(reading: Reading, at: string, slots: Slots, move: MoveDraft, fields: Named, orZero: boolean): void {
  for (const { name, slot } of fields) {
    const value = move[name]
    if (typeof value !== 'number' || value > 0 || (orZero && value === 0)) continue
    const node = slots[slot] as RawNode
    const right = orZero ? '0 or more' : 'more than 0'
    const unused = name === 'speed' || name === 'acceleration' ? '; 0 in both speed and acceleration marks an unused row' : ''
    reading.problems.addValue('number-range', `${at}/${name}`, node, `${shownIn(reading, node)} will not do for ${moveFields[name].label}: it must be ${right}${unused}.`)
  }
}
