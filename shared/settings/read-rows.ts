import type { AxisKind, Zone } from './types'
import type { RawNode, RawObject } from './raw'
import { type Reading, type Slots, keyTable, shownIn, sortIntoSlots } from './reading'
import { zoneFields } from './move-fields'
import { readNumber, readWhole } from './read-number'

/** What a row is judged by. */
export interface RowContext {
  readonly axisKind: AxisKind | undefined
  /** The position wraps at the setup's modulo. */
  readonly wraps: boolean
}

export const maxMoves = 1024
export const maxZones = 32

/**
 * The rows of a list in the order of their numbers; a number that comes twice is reported at its second row. Answers
 * undefined for rows with a fault, which are left out. A list beyond the limit is not read.
 */
export function readRows<Row>(
  reading: Reading, node: RawNode, at: string, limit: number,
  readRow: (node: RawObject, at: string) => Row | undefined, numberOf: (row: Row) => number,
): Row[] {
  if (node.kind !== 'list') {
    if (node.kind !== 'refused') reading.problems.addValue('json-syntax', at, node, `A list of rows [ … ] belongs here.`)
    return []
  }
  if (node.items.length > limit) {
    reading.problems.add('limit', at, node, `${node.items.length} rows; at most ${limit} are read.`, { value: String(node.items.length) })
    return []
  }
  const rows: Row[] = []
  node.items.forEach((item, index) => {
    const rowAt = `${at}/${index}`
    if (item.kind !== 'object') {
      reading.problems.addValue('json-syntax', rowAt, item, 'A row is an object { … }.')
      return
    }
    const row = readRow(item, rowAt)
    if (row !== undefined) rows.push(row)
  })
  return rows.sort((a, b) => numberOf(a) - numberOf(b))
}

/** The row's own number; reports one that is missing, out of range or taken by another row. */
export function readRowNumber(
  reading: Reading, node: RawNode | undefined, row: RawObject, at: string, min: number, max: number, taken: Set<number>,
): number | undefined {
  if (node === undefined) {
    reading.problems.add('missing', at, row, `The row has no number; ${min} to ${max} belongs here.`)
    return undefined
  }
  const number = readWhole(reading, node, at, min, max, 'row-number')
  if (number === undefined) return undefined
  if (taken.has(number)) {
    reading.problems.addValue('row-duplicate', at, node, `Row ${number} is there already; each number is used once.`)
    return undefined
  }
  taken.add(number)
  return number
}

const zoneTable = keyTable(['from', 'to', 'zone'])

/** The zones, by zone; `from` lies below `to` unless the axis wraps. */
export function readZones(reading: Reading, node: RawNode, context: RowContext): Zone[] {
  const taken = new Set<number>()
  return readRows(reading, node, '/zones', maxZones, (row, at) => readZone(reading, row, at, context, taken), zone => zone.zone)
}

function readZone(reading: Reading, row: RawObject, at: string, context: RowContext, taken: Set<number>): Zone | undefined {
  const slots = sortIntoSlots(reading, row, zoneTable, at)
  const unit = context.axisKind && (zoneFields.from.unit[context.axisKind] ?? undefined)
  const from = readNeeded(reading, slots, 0, row, `${at}/from`, unit)
  const to = readNeeded(reading, slots, 1, row, `${at}/to`, unit)
  const zone = readRowNumber(reading, slots[2], row, `${at}/zone`, 1, maxZones, taken)
  if (from === undefined || to === undefined || zone === undefined) return undefined
  if (from === to || (from > to && !context.wraps)) {
    const sent = slots[0] as RawNode
    reading.problems.addValue('order', `${at}/from`, sent, `The zone begins at ${shownIn(reading, sent)} and ends at ${shownIn(reading, slots[1] as RawNode)}: from must lie below to.`)
    return undefined
  }
  return { from, to, zone }
}

function readNeeded(reading: Reading, slots: Slots, slot: number, row: RawObject, at: string, unit: string | undefined): number | undefined {
  const node = slots[slot]
  if (node !== undefined) return readNumber(reading, node, at, unit)
  reading.problems.add('missing', at, row, `${zoneTable.names[slot]} is missing: a position belongs here.`)
  return undefined
}
