import type { RawCell, RawNode } from './raw'
import type { Reading } from './reading'
import { type Unit, findUnit, unitNames, unitsFor } from '../units/units'
import { nearestKey } from './nearest-key'
import { cutText } from './problems'

/** Which cell of a record holds the unit, from 0. */
export const unitCell = 4

/** The unit beside a cell; undefined for the canonical one left empty, null where it was refused. */
export function unitOf(reading: Reading, cell: RawCell, at: string, canonical: string | undefined): Unit | undefined | null {
  if (cell.unit === '' || canonical === undefined) return undefined
  const found = findUnit(cell.unit, canonical)
  if (typeof found !== 'string') return found
  const fitting = unitsFor(canonical).map(each => each.name).join(', ')
  const right = fitting === '' ? 'this value takes no unit; leave the cell empty' : `here fit ${fitting}`
  const fault = found === 'unit-unknown' ? 'is not a unit that is read' : 'does not fit this value'
  const meant = found === 'unit-unknown' && !reading.problems.full ? nearestKey(cell.unit, fitting === '' ? unitNames() : fitting.split(', ')) : undefined
  reading.problems.add(found, at, { ...cell, cell: unitCell }, `Unit "${cutText(cell.unit)}" ${fault}: ${right}.`,
    meant === undefined ? { value: cell.unit } : { value: cell.unit, meant })
  return null
}

/** Whether a cell has a unit where none belongs; reports it. */
export function refusesUnit(reading: Reading, node: RawNode, at: string): boolean {
  if (node.kind !== 'cell' || node.unit === '') return false
  reading.problems.add('unit-unfit', at, { ...node, cell: unitCell }, `This value takes no unit; leave the cell with "${cutText(node.unit)}" empty.`, { value: node.unit })
  return true
}
