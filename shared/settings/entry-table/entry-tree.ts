import type { AxisKind } from '../types'
import type { CsvRecord } from '../csv-records'
import { CsvTree, type Entry } from '../csv-tree'
import { nearestKey } from '../nearest-key'
import { type Problems, cutText } from '../problems'
import type { RawNode } from '../raw'
import { unguard } from '../spreadsheet-guard'
import { type Address, addressOf, rowKind } from './address'
import { type CellFault, type NeutralCell, readDriveCell } from './cell'
import { fromDrive } from './drive-number'
import type { EntryColumn, EntryParameter, EntryTable } from './schema'

interface Block { readonly section: 'zone' | 'move', readonly columns: readonly EntryColumn[], readonly at: string }
interface Placed { readonly column: EntryColumn, readonly cell: number }

/**
 * Builds the tree of the neutral form from the records of a drive's list. A parameter that the table does not know is kept
 * under `extra` by its own number, so that nothing of a file is lost.
 */
export class EntryTree {
  private readonly tree: CsvTree
  private readonly parameters: ReadonlyMap<string, EntryParameter>
  private readonly blocks: readonly Block[]
  private readonly seenBlocks = new Set<Block>()
  private readonly given = new Set<string>()
  private readonly rows = new Set<string>()
  private block: Block | undefined
  private placed: readonly Placed[] = []

  constructor(
    private readonly table: EntryTable, private readonly axisKind: AxisKind, private readonly problems: Problems,
    private readonly startOf: (record: CsvRecord, cell: number) => number,
  ) {
    this.tree = new CsvTree(problems, 0)
    this.parameters = new Map(table.parameters.map(entry => [entry.number, entry]))
    this.blocks = ([{ section: 'zone', columns: table.zones, at: '/zones' }, { section: 'move', columns: table.moves, at: '/moves' }] as const).filter(({ columns }) => columns.length > 0)
  }

  get root() {
    return this.tree.root
  }

  /** A value that does not stand in the file; one that does goes before it. */
  addKnown(section: 'file' | 'unit', field: string, value: string | undefined): void {
    if (value === undefined || this.given.has(`${section}:${field}`)) return
    this.put({ section, row: '', field }, 0, { text: value, unit: '' })
  }

  add(record: CsvRecord): void {
    const first = (record.cells[0] ?? '').trim()
    const block = this.blocks.find(({ columns }) => columns[0]?.name === first)
    if (block) this.open(block, record)
    else if (this.block) this.addRow(this.block, record)
    else this.addParameter(record)
  }

  /** Says which tables never came: a file cut off must not read as one without moves. */
  close(end: number): void {
    for (const { section, columns, at } of this.blocks.filter(block => !this.seenBlocks.has(block))) {
      this.problems.add('header', at, { offset: end, end }, `The ${section}s are missing: no line begins with "${columns[0]?.name ?? ''}".`)
    }
  }

  private open(block: Block, record: CsvRecord): void {
    this.block = block
    this.seenBlocks.add(block)
    const names = record.cells.map(cell => cell.trim())
    this.placed = block.columns.flatMap((column) => {
      const cell = names.indexOf(column.name)
      if (cell >= 0) return [{ column, cell }]
      const { offset } = record
      const meant = nearestKey(column.name, names)
      this.problems.add('header', block.at, { offset, end: offset }, `The column "${column.name}" of the ${block.section}s is missing.`, { value: names.join(this.table.delimiter), ...(meant === undefined ? {} : { meant }) })
      return []
    })
  }

  private addRow({ section, at }: Block, record: CsvRecord): void {
    const number = this.placed.find(({ column }) => column.field === section)
    if (number === undefined) return
    const row = fromDrive((record.cells[number.cell] ?? '').trim(), undefined)
    if (this.rows.has(`${section} ${row}`)) {
      const offset = this.startOf(record, number.cell)
      return this.problems.addValue('row-duplicate', at, { offset, end: offset }, `Row ${cutText(row)} is there already; each number is used once.`)
    }
    this.rows.add(`${section} ${row}`)
    for (const { column, cell } of this.placed) {
      const kind = rowKind(section, column.field, this.axisKind)
      if (column.field === section || kind === undefined) continue
      const read = readDriveCell(record.cells[cell] ?? '', '', column, kind, this.table.decimal)
      if (read !== undefined) this.put({ section, row, field: column.field }, this.startOf(record, cell), read)
    }
  }

  private addParameter(record: CsvRecord): void {
    const { columns, decimal } = this.table
    const cell = (column: number) => record.cells[column - 1] ?? ''
    const number = unguard(cell(columns.number).trim())
    if (number === '') {
      return this.problems.add('csv-syntax', '', { offset: record.offset, end: record.offset }, `The line has no number: column ${columns.number} is empty.`, { value: record.cells.join(this.table.delimiter) })
    }
    const entry = this.parameters.get(number) ?? { number, field: `extra:${number}` }
    const address = addressOf(entry.field, this.axisKind)
    if (address === undefined) return
    const read = readDriveCell(cell(columns.value), columns.unit === 0 ? '' : cell(columns.unit), entry, address.kind, decimal)
    if (read === undefined) return
    this.given.add(entry.field)
    this.put(address, this.startOf(record, columns.value - 1), read)
  }

  private put({ section, row, field }: Pick<Address, 'section' | 'row' | 'field'>, offset: number, read: NeutralCell | CellFault): void {
    const spot = { offset, end: offset }
    const make = (_: Entry, __: unknown, at: string): RawNode => {
      if (!('code' in read)) return { kind: 'cell', ...spot, ...read }
      this.problems.addValue(read.code, at, spot, read.message, read.meant)
      return { kind: 'refused', ...spot }
    }
    this.tree.add({ cells: [section, row, field, '', ''], offset }, make)
  }
}
