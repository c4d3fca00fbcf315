import { type MoveFieldName, isUnused, moveFields } from './move-fields'
import { type Move, moveKinds, turns } from './types'
import type { RawNode, RawObject } from './raw'
import { type Reading, type Slots, keyTable, sortIntoSlots } from './reading'
import { cutText } from './problems'
import { type RowContext, maxMoves, readRowNumber, readRows } from './read-rows'
import { readChoice, readNumber, readText, readWhole } from './read-value'
import { sortedMoveKeys } from './sorted-keys'
import { textRules } from './text-rules'

const table = keyTable(sortedMoveKeys)
const slotOf = (name: string) => table.index.get(name) as number
const numberSlot = slotOf('move')

/** The moves, by move. */
export function readMoves(reading: Reading, node: RawNode, context: RowContext): Move[] {
  const taken = new Set<number>()
  return readRows(reading, node, '/moves', maxMoves, (row, at) => readMove(reading, row, at, context, taken), move => move.move)
}

type Draft = { -readonly [Key in keyof Move]?: Move[Key] }

function readMove(reading: Reading, row: RawObject, at: string, context: RowContext, taken: Set<number>): Move | undefined {
  const slots = sortIntoSlots(reading, row, table, at)
  const draft: Record<string, string | number> = {}
  let sound = true
  for (let slot = 0; slot < slots.length; slot += 1) {
    const node = slots[slot]
    if (node === undefined && slot !== numberSlot) continue
    const name = sortedMoveKeys[slot] as MoveFieldName | 'move'
    const value = name === 'move'
      ? readRowNumber(reading, node, row, `${at}/move`, 0, maxMoves - 1, taken)
      : readField(reading, node as RawNode, `${at}/${name}`, name, context)
    if (value === undefined) sound = false
    else draft[name] = value
  }
  const move = draft as Draft
  const fits = [needs(reading, row, at, slots, move), refuses(reading, at, slots, move, context), ranges(reading, at, slots, move)]
  // Sound: every key that was sent was read by its field, and the needed ones are there.
  return sound && fits.every(Boolean) ? move as Move : undefined
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

const always: readonly MoveFieldName[] = ['kind', 'target', 'speed', 'acceleration']
const ofPress: readonly MoveFieldName[] = ['forceLimit', 'approach']
const pressOnly: readonly MoveFieldName[] = ['approach', 'pressSpeed']

function needs(reading: Reading, row: RawObject, at: string, slots: Slots, move: Draft): boolean {
  const missing = [...always, ...(move.kind === 'press' ? ofPress : [])].filter(name => slots[slotOf(name)] === undefined)
  for (const name of missing) {
    const who = always.includes(name) ? 'Every move' : 'A press'
    reading.problems.add('missing', `${at}/${name}`, row, `${name} is missing. ${who} needs it: ${moveFields[name].help}`)
  }
  return missing.length === 0
}

function refuses(reading: Reading, at: string, slots: Slots, move: Draft, context: RowContext): boolean {
  let fits = true
  const refuse = (name: MoveFieldName, why: string) => {
    const node = slots[slotOf(name)]
    if (node === undefined) return
    fits = false
    reading.problems.addValue('not-allowed-here', `${at}/${name}`, node, why)
  }
  if (move.kind !== undefined && move.kind !== 'press') {
    for (const name of pressOnly) refuse(name, `${name} belongs to a press; this move is ${move.kind}. Take it out.`)
  }
  if (context.axisKind !== undefined && !context.wraps) refuse('turn', 'turn belongs to a rotary axis with a modulo in its setup. Take it out.')
  if (slots[slotOf('next')] === undefined) refuse('dwell', 'dwell waits before the move that follows; this one has no next. Take it out, or give next.')
  return fits
}

const positive: readonly MoveFieldName[] = ['speed', 'acceleration', 'deceleration', 'forceLimit', 'pressSpeed']
const notNegative: readonly MoveFieldName[] = ['window', 'dwell']

/** An unused row keeps its zeros, so that its emptiness is restored. */
function ranges(reading: Reading, at: string, slots: Slots, move: Draft): boolean {
  const unused = move.speed !== undefined && move.acceleration !== undefined && isUnused({ speed: move.speed, acceleration: move.acceleration })
  let fits = true
  const check = (name: MoveFieldName, least: number, orEqual: boolean) => {
    const value = move[name]
    if (typeof value !== 'number' || value > least || (orEqual && value === least)) return
    fits = false
    const node = slots[slotOf(name)] as RawNode
    reading.problems.addValue('number-range', `${at}/${name}`, node, `${cutText(reading.source.shown(node))} will not do for ${moveFields[name].label}: it must be ${orEqual ? '0 or more' : 'more than 0'}${unit(name)}.`)
  }
  for (const name of positive) check(name, 0, unused)
  for (const name of notNegative) check(name, 0, true)
  return fits
}

function unit(name: MoveFieldName): string {
  return name === 'speed' || name === 'acceleration' ? '; 0 in both speed and acceleration marks an unused row' : ''
}
