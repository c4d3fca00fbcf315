import { setEntries } from '../settings/move-row'
import type { Content, ExtraValue, Move, Zone } from '../settings/types'
import { diffContents } from './diff'
import type { FieldChange } from './types'

/** An operation of RFC 6902; of its six kinds these three are enough. */
export type PatchOperation
  = | { readonly op: 'add' | 'replace', readonly path: string, readonly value: ExtraValue | Move | Zone }
    | { readonly op: 'remove', readonly path: string }

/**
 * The flat reading as a JSON Patch (RFC 6902) that turns the first content into the second. Values first, by the indices of
 * the first content; then whole rows, removed from the highest index down, then added from the lowest up.
 */
export function jsonPatchOf(before: Content, after: Content): PatchOperation[] {
  const zones = tableOf('zone', before.zones.map(row => row.zone), after.zones.map(row => row.zone))
  const moves = tableOf('move', before.moves.map(row => row.move), after.moves.map(row => row.move))
  const values = diffContents(before, after).flatMap(change => valueOperation(change, change.section === 'zone' ? zones : moves))
  return [
    ...values,
    ...removals('/zones', zones), ...additions('/zones', zones, after.zones),
    ...removals('/moves', moves), ...additions('/moves', moves, after.moves),
  ]
}

/** Where the rows of one table stand, by number, in each content. */
interface Table { readonly section: 'zone' | 'move', readonly before: ReadonlyMap<number, number>, readonly after: ReadonlyMap<number, number> }

function tableOf(section: Table['section'], before: readonly number[], after: readonly number[]): Table {
  const indexed = (numbers: readonly number[]) => new Map(numbers.map((number, index) => [number, index]))
  return { section, before: indexed(before), after: indexed(after) }
}

/** Nothing for a field of a row that comes or goes: the row does so as a whole. */
function valueOperation(change: FieldChange, table: Table): PatchOperation[] {
  const path = pathInFirst(change, table)
  if (path === undefined) return []
  if (change.after === undefined) return [{ op: 'remove', path }]
  return [{ op: change.before === undefined ? 'add' : 'replace', path, value: change.after }]
}

function pathInFirst(change: FieldChange, table: Table): string | undefined {
  if (change.section !== table.section || change.row === undefined) return change.at
  const index = table.before.get(change.row)
  return index === undefined || !table.after.has(change.row) ? undefined : `/${table.section}s/${index}/${change.field}`
}

function removals(path: string, table: Table): PatchOperation[] {
  return [...table.before].filter(([number]) => !table.after.has(number)).reverse().map(([, index]) => ({ op: 'remove', path: `${path}/${index}` }))
}

function additions(path: string, table: Table, rows: readonly (Move | Zone)[]): PatchOperation[] {
  return [...table.after].filter(([number]) => !table.before.has(number)).map(([, index]) => ({ op: 'add', path: `${path}/${index}`, value: Object.fromEntries(setEntries(rows[index] as Move | Zone)) as unknown as Move | Zone }))
}
