import type { CsvRecord } from './csv-records'
import type { Problems } from './problems'
import type { RawNode, RawObject, Spot } from './raw'
import { cutText } from './problems'
import { nearestKey } from './nearest-key'
import { step } from './reading'

/*
 * One record, one value: the records become the tree of the JSON form. What a cell says stays text until the field that it
 * belongs to is known.
 */

const fileFields = ['schema', 'exportedAt', 'exportedBy', 'note', 'axisKind'] as const
const sections = ['file', 'unit', 'setup', 'zone', 'move', 'extra', 'reading'] as const
type Section = (typeof sections)[number]
const places: Readonly<Record<Section, string>> = {
  file: '', unit: '/unit', setup: '/setup', zone: '/zones', move: '/moves', extra: '/extra', reading: '/readings',
}

const rowCell = 1, fieldCell = 2, valueCell = 3
export const cellsOfRecord = 5

export interface Entry { readonly section: Section, readonly field: string, readonly value: string, readonly unit: string }

/** Makes the node of one value, or a refused one that it has reported itself. */
export type CellMaker = (entry: Entry, spot: Spot, at: string) => RawNode

/** Builds the tree and reports what is wrong with the records themselves: sections, rows, fields given twice, `file` fields. */
export class CsvTree {
  readonly root: RawObject
  private readonly objects = new Map<string, { readonly node: RawObject, readonly at: string }>()
  private readonly lists = new Map<Section, RawNode[]>()
  private readonly seen = new Set<string>()

  constructor(private readonly problems: Problems, header: number) {
    this.root = emptyObject(header, 0)
    this.objects.set('file\n', { node: this.root, at: '' })
  }

  add(record: CsvRecord, make: CellMaker): void {
    const [section = '', row = '', field = '', value = '', unit = ''] = record.cells
    if (!isSection(section)) return this.refuseSection(section, record.offset)
    const spotOf = (cell: number): Spot => ({ offset: record.offset, end: record.offset, cell })
    const hasRows = section === 'zone' || section === 'move'
    if (!hasRows && row !== '') {
      return this.problems.addValue('row-number', places[section] + step(field), spotOf(rowCell), `Only zones and moves have row numbers; leave the cell with "${cutText(row)}" empty.`)
    }
    const owner = this.ownerOf(section, row, record.offset)
    const at = owner.at + step(field)
    const known = section === 'file' ? fileFields.some(each => each === field) : field !== section
    if (!known) return this.refuseField(section, field, at, spotOf(fieldCell))
    const key = `${section}\n${row}\n${field}`
    if (this.seen.has(key)) {
      return this.problems.addValue('value-duplicate', at, spotOf(valueCell), `${cutText(field)} is given twice${row && ` for ${section} ${cutText(row)}`}; leave one.`)
    }
    this.seen.add(key)
    put(owner.node, field, make({ section, field, value, unit }, spotOf(valueCell), at), record.offset)
  }

  private ownerOf(section: Section, row: string, offset: number) {
    const key = `${section}\n${row}`
    const known = this.objects.get(key)
    if (known) return known
    const node = emptyObject(offset, rowCell)
    let at = places[section]
    if (section === 'zone' || section === 'move') {
      const list = this.listOf(section, offset)
      at = `${at}/${list.length}`
      list.push(node)
      put(node, section, { kind: 'cell', offset, end: offset, cell: rowCell, text: row, unit: '' }, offset)
    }
    else {
      put(this.root, at.slice(1), node, offset)
    }
    const owner = { node, at }
    this.objects.set(key, owner)
    return owner
  }

  private listOf(section: Section, offset: number): RawNode[] {
    const known = this.lists.get(section)
    if (known) return known
    const items: RawNode[] = []
    this.lists.set(section, items)
    put(this.root, places[section].slice(1), { kind: 'list', offset, end: offset, cell: 0, items }, offset)
    return items
  }

  private refuseSection(section: string, offset: number): void {
    const meant = this.problems.full ? undefined : nearestKey(section, sections)
    this.problems.add('key-unknown', step(section), { offset, end: offset, cell: 0 },
      `"${cutText(section)}" is no section; one of ${sections.join(', ')} belongs here.`, { value: section, ...(meant === undefined ? {} : { meant }) })
  }

  private refuseField(section: Section, field: string, at: string, spot: Spot): void {
    const meant = section === 'file' && !this.problems.full ? nearestKey(field, fileFields) : undefined
    const right = section === 'file' ? `one of ${fileFields.join(', ')} belongs here` : 'the number stands in the row column'
    this.problems.add('key-unknown', at, spot, `"${cutText(field)}" is no field of ${section}: ${right}.`, { value: field, ...(meant === undefined ? {} : { meant }) })
  }
}

function isSection(text: string): text is Section {
  return sections.some(each => each === text)
}

function emptyObject(offset: number, cell: number): RawObject {
  return { kind: 'object', offset, end: offset, cell, keys: [], keyOffsets: [], values: [] }
}

function put(node: RawObject, key: string, value: RawNode, offset: number): void {
  node.keys.push(key)
  node.keyOffsets.push(offset)
  node.values.push(value)
}
