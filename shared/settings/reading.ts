import type { FormatErrorCode } from './types'
import { type Problems, cutText } from './problems'
import type { RawNode, RawObject, Source, Spot } from './raw'
import { nearestKey } from './nearest-key'

/** What goes along while one file is read. */
export interface Reading {
  readonly source: Source
  readonly problems: Problems
  /** Counted for the receipt. */
  rounded: number
  converted: number
}

/** What stands at a spot, cut to what a message shows. */
export function shownIn(reading: Reading, spot: Spot): string {
  return cutText(reading.source.shown(spot))
}

/** The known keys of one kind of object, each with its place in the slots. */
export interface KeyTable { readonly names: readonly string[], readonly index: ReadonlyMap<string, number> }

/** The table of these keys, in this order. */
export function keyTable(names: readonly string[]): KeyTable {
  return { names, index: new Map(names.map((name, index) => [name, index])) }
}

/** One place for each known key; undefined where it is missing, null or an empty text. */
export type Slots = (RawNode | undefined)[]

/**
 * Sorts the values of an object into the slots of the table and reports unknown and duplicate keys. The first of two equal
 * keys stays. null and the empty text count as not set.
 */
export function sortIntoSlots(reading: Reading, node: RawObject, table: KeyTable, at: string): Slots {
  const slots: Slots = new Array<RawNode | undefined>(table.names.length).fill(undefined)
  // An empty value still takes its place until all keys are seen: a second one is a duplicate.
  let emptied = false
  for (let index = 0; index < node.keys.length; index += 1) {
    const key = node.keys[index] as string
    const value = node.values[index] as RawNode
    const slot = table.index.get(key)
    if (slot === undefined) reportUnknown(reading, node, index, table, at)
    else if (slots[slot] !== undefined) reportDuplicate(reading, node, index, at)
    else slots[slot] = value
    if (isNotSet(value)) emptied = true
  }
  return emptied ? slots.map(value => value !== undefined && isNotSet(value) ? undefined : value) : slots
}

/** null, or a text without a character. */
export function isNotSet(node: RawNode): boolean {
  return node.kind === 'null' || ((node.kind === 'text' || node.kind === 'cell') && node.text === '')
}

/** A step of a JSON Pointer (RFC 6901, section 3): ~ becomes ~0, / becomes ~1. */
export function step(key: string): string {
  return /[~/]/.test(key) ? `/${key.replaceAll('~', '~0').replaceAll('/', '~1')}` : `/${key}`
}

function keySpot(node: RawObject, index: number) {
  const offset = node.keyOffsets[index] as number
  return node.cell === undefined ? { offset, end: offset } : { offset, end: offset, cell: 2 }
}

function reportUnknown(reading: Reading, node: RawObject, index: number, table: KeyTable, at: string): void {
  const key = node.keys[index] as string
  const meant = reading.problems.full ? undefined : nearestKey(key, table.names)
  const advice = meant === undefined ? 'take it out, or put it under extra' : `${meant} is probably meant`
  reading.problems.add('key-unknown', at + step(key), keySpot(node, index), `"${cutText(key)}" is no key of this place: ${advice}.`,
    meant === undefined ? { value: key } : { value: key, meant })
}

/** Reports that the key at this index of the object has been there before. */
export function reportDuplicate(reading: Reading, node: RawObject, index: number, at: string, code: FormatErrorCode = 'key-duplicate'): void {
  const key = node.keys[index] as string
  reading.problems.add(code, at + step(key), keySpot(node, index), `"${cutText(key)}" is given twice; leave one.`, { value: key })
}
