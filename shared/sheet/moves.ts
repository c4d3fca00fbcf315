import { followers, usedRows } from '../motion/chains'
import { selectCode, isCallable, type Numbering } from '../motion/select-inputs'
import { rowKind } from '../settings/entry-table/address'
import type { EntryColumn } from '../settings/entry-table/schema'
import { isUnused, moveFieldNames, moveFields, type MoveFieldName } from '../settings/move-fields'
import type { Nameplate } from '../settings/nameplate'
import type { Content, Move } from '../settings/types'
import { writtenCell } from './beside'
import type { MoveCall, SheetColumn, SheetMove, SheetMoves } from './types'

const always: ReadonlySet<MoveFieldName> = new Set(['kind', 'target', 'speed', 'acceleration'])

/**
 * Every move with every value it has: the columns are those that at least one move fills, in the order of the field table; where
 * the entry table has a column for a field, the number is the drive's own. The inputs of a move: common practice, no source.
 */
export function sheetMoves({ content, nameplate }: { readonly content: Content, readonly nameplate?: Nameplate }): SheetMoves {
  const fields = moveFieldNames.filter(name => name !== 'comment' && (always.has(name) || content.moves.some(move => move[name] !== undefined)))
  const own = new Map((nameplate?.entryTable?.moves ?? []).map(column => [column.field, column]))
  // A row that only follows itself still has to be called a first time.
  const led = followers(usedRows(content.moves).filter(({ move }) => move.next !== move.move))
  const inputs = content.setup.selectInputs ?? 0
  const numbering: Numbering = { firstMove: nameplate?.firstMove ?? 0, allOff: nameplate?.allOff ?? 'first' }
  const sign = nameplate?.entryTable?.decimal ?? 'point'
  const cellOf = (move: Move, field: MoveFieldName) => {
    const kind = rowKind('move', field, content.axisKind)
    if (!kind || move[field] === undefined) return ''
    const cell = writtenCell(move[field], own.get(field) ?? { field }, kind, sign)
    // A coded word stands beside its code: nobody knows by heart what a 2 means.
    return kind.type === 'choice' && cell !== move[field] ? `${cell} ${String(move[field])}` : cell
  }
  return {
    inputs,
    columns: fields.map(field => columnOf(field, own.get(field), content)),
    rows: content.moves.map((move): SheetMove => ({
      move: move.move, call: callOf(move, inputs, numbering, led), unused: isUnused(move),
      cells: fields.map(field => cellOf(move, field)), comment: move.comment ?? '',
    })),
  }
}

function columnOf(field: MoveFieldName, own: EntryColumn | undefined, { axisKind }: Content): SheetColumn {
  const known = moveFields[field]
  const canonical = 'unit' in known ? known.unit[axisKind] ?? '' : ''
  const unit = own?.unit ?? canonical
  return {
    field, head: known.label, numeric: known.type === 'number' || known.type === 'row',
    unit: own?.factor !== undefined && own.factor !== 1 ? `× ${own.factor} ${unit}`.trim() : unit,
  }
}

function callOf({ move }: Move, inputs: number, numbering: Numbering, led: ReadonlySet<number>): MoveCall {
  if (inputs === 0) return led.has(move) ? { by: 'itself' } : { by: 'bus' }
  const code = selectCode(move, numbering)
  if (!isCallable(code, inputs, numbering)) return { by: led.has(move) ? 'itself' : 'nothing' }
  return { by: 'inputs', on: Array.from({ length: inputs }, (_, index) => Math.floor(code / 2 ** (inputs - 1 - index)) % 2 === 1) }
}
