import type { SheetTaught, SheetValue } from '#shared/sheet/types'
import { millimetres as mm, type Paper } from '../paper/paper'
import { box, type SheetPage } from './sheet-page'

const rowHeight = mm(5.3)
const gutter = mm(7)
const lineHeight = mm(3.3)
const number = { face: 'mono', size: 8 } as const
const label = { size: 8.2 } as const

/** Signs of a coded word that stands in its line; a longer text goes below it. */
const longestWord = 16

type Item = { readonly group: string } | { readonly value: SheetValue, readonly names: readonly string[], readonly lines: readonly string[] }

/** Where things stand within a column, from its left edge. */
interface Columns { readonly width: number, readonly label: number, readonly point: number, readonly unit: number, readonly box: number }

/** Two columns a page; a column is filled down to the foot before the next one begins, and heads repeat. */
export function drawValues(page: SheetPage, values: readonly SheetValue[]): void {
  if (values.length === 0) {
    page.paragraph('No setup value is copied.')
    return
  }
  const columns = columnsOf(page, values)
  const items = itemsOf(page.paper, values, columns)
  let next = 0
  while (next < items.length) {
    const capacity = Math.floor((page.bottom - page.y - mm(5)) / rowHeight)
    if (capacity < 4) {
      page.next()
      continue
    }
    const left = linesOf(items.slice(next))
    // What fits one page is parted evenly; else the first column goes down to the foot.
    const rows = left <= 2 * capacity ? Math.min(capacity, Math.ceil(left / 2) + 1) : capacity
    const begin = page.y
    let deepest = begin
    for (let column = 0; column < 2 && next < items.length; column += 1) {
      const taken = fill(items, next, column === 0 ? rows : capacity)
      deepest = Math.max(deepest, drawColumn(page, items.slice(next, taken), columns, column, begin))
      next = taken
    }
    page.y = deepest + mm(1)
    if (next < items.length) page.next()
  }
}

function columnsOf({ paper, width }: SheetPage, values: readonly SheetValue[]): Columns {
  const own = (width - gutter) / 2
  const widest = (texts: readonly string[], style: { face?: 'mono' | 'sans', size: number }) => Math.max(0, ...texts.map(text => paper.widthOf(text, style)))
  const numbers = Math.min(own * 0.25, widest(values.map(value => value.number), number))
  const label = numbers === 0 ? 0 : numbers + mm(2)
  const whole = Math.min(own * 0.2, widest(values.map(({ value }) => wholeOf(value)), number))
  const fraction = Math.min(own * 0.16, widest(values.map(({ value }) => value.slice(wholeOf(value).length)), number))
  const unit = own - mm(8) - Math.max(mm(12), own * 0.27)
  return { width: own, label, point: unit - fraction - mm(1.2), unit, box: own - box - mm(1), ...(whole > unit - fraction - label - mm(15) ? { point: unit - mm(1.2) } : {}) }
}

const isNumber = (value: string) => /^−?\d/.test(value)
/** What stands left of the decimal sign, point or comma. */
const wholeOf = (value: string) => isNumber(value) ? value.split(/[.,]/)[0] ?? value : value

function itemsOf(paper: Paper, values: readonly SheetValue[], columns: Columns): Item[] {
  let group = ''
  return values.flatMap((value): Item[] => {
    const beside = [value.unit, value.beside].filter(Boolean).join('  ')
    const item = { value, names: paper.lines(value.label, columns.point - columns.label - mm(9), label), lines: paper.lines(beside, columns.box - columns.unit - mm(1), { size: 7.2 }) }
    if (value.group === group) return [item]
    group = value.group
    return [{ group }, item]
  })
}

/** Rows that an item takes: a long name, and a long word beside, go on below. */
const heightOf = (item: Item) => ('group' in item ? 1 : Math.max(rowsOf(item.names.length), rowsOf(item.lines.length), longValue(item.value)))
const rowsOf = (lines: number) => Math.max(1, Math.ceil((lines * lineHeight + mm(1.2)) / rowHeight))
const longValue = ({ value }: SheetValue) => (isNumber(value) || value.length <= longestWord ? 1 : Math.ceil(value.length / 34) + 1)
const linesOf = (items: readonly Item[]) => items.reduce((sum, item) => sum + heightOf(item), 0)

/** The index after the last item that fits so many rows; a group's name never stands at the foot alone. */
function fill(items: readonly Item[], from: number, rows: number): number {
  let used = 0
  let index = from
  for (; index < items.length; index += 1) {
    const item = items[index]
    const height = item ? heightOf(item) : 0
    if (used + height > rows) break
    used += height
  }
  const last = items[index - 1]
  return index < items.length && last && 'group' in last && index - 1 > from ? index - 1 : Math.max(index, from + 1)
}

function drawColumn({ paper, left }: SheetPage, items: readonly Item[], columns: Columns, column: number, begin: number): number {
  const x = left + column * (columns.width + gutter)
  let y = begin + mm(4)
  const head = { size: 7 }
  paper.text(columns.label === 0 ? '' : 'No.', x, y - mm(1), head)
  paper.text('Value', x + columns.label, y - mm(1), head)
  paper.text('write', x + columns.unit - mm(1.2), y - mm(1), { ...head, align: 'right' })
  paper.text('unit', x + columns.unit, y - mm(1), head)
  paper.text('done', x + columns.width, y - mm(1), { ...head, align: 'right' })
  paper.line(x, y, x + columns.width, y, { weight: 1 })
  for (const item of items) {
    const height = heightOf(item) * rowHeight
    if ('group' in item) paper.text(item.group, x, y + mm(3.8), { face: 'sans-bold', size: 7.5 })
    else drawValue(paper, item, columns, x, y)
    y += height
    paper.line(x, y, x + columns.width, y, 'group' in item ? { weight: 0.8 } : { weight: 0.4, colour: '#bbb' })
  }
  return y
}

function drawValue(paper: Paper, { value, names, lines }: Extract<Item, { value: SheetValue }>, columns: Columns, x: number, y: number): void {
  const base = y + mm(3.8)
  paper.text(value.number, x, base, number)
  names.forEach((line, index) => paper.text(line, x + columns.label, base + index * lineHeight, label))
  let unit = x + columns.unit
  if (isNumber(value.value)) {
    const whole = wholeOf(value.value)
    paper.text(whole, x + columns.point, base, { ...number, align: 'right' })
    // Where a number has more places than there is room for, its unit stands behind it.
    unit = Math.max(unit, paper.text(value.value.slice(whole.length), x + columns.point, base, number) + mm(1))
  }
  else if (longValue(value) === 1) {
    paper.text(value.value, x + columns.unit - mm(1.2), base, { ...number, align: 'right' })
  }
  else {
    paper.lines(value.value, columns.box - columns.label, number).forEach((line, index) => paper.text(line, x + columns.label, base + rowHeight * 0.9 + index * mm(3.4), number))
  }
  lines.forEach((line, index) => paper.text(line, unit, base + index * lineHeight, { size: 7.2 }))
  paper.frame(x + columns.box, base - box + mm(0.5), box, box)
}

/** Dashed and empty, never a zero: to be filled in by hand once they are taught. */
export function drawTaught(page: SheetPage, taught: readonly SheetTaught[]): void {
  if (taught.length === 0) return
  const perRow = 3
  const rowOf = mm(10)
  page.need(mm(12) + rowOf)
  page.y += mm(2)
  let begin = page.y
  let rows = 0
  const open = () => {
    begin = page.y
    rows = 0
    page.paper.text('To be taught on this unit: leave as delivered until then', page.left + mm(3), page.y + mm(4.5), { face: 'sans-bold', size: 9 })
    page.y += mm(6)
  }
  const close = () => {
    page.y += mm(1.5)
    page.paper.frame(page.left, begin, page.width, page.y - begin, { weight: 0.8, dash: 2.4 })
  }
  open()
  for (let index = 0; index < taught.length; index += perRow) {
    if (rows > 0 && page.y + rowOf > page.bottom) {
      close()
      page.next()
      open()
    }
    taught.slice(index, index + perRow).forEach((one, column) => {
      const x = page.left + mm(3) + column * (page.width - mm(6)) / perRow
      const after = one.number === '' ? x : page.paper.text(one.number, x, page.y + mm(3.5), number) + mm(1.5)
      page.paper.text(one.label, after, page.y + mm(3.5), { size: 7.5 })
      page.paper.line(x, page.y + mm(8.5), x + mm(22), page.y + mm(8.5), { weight: 0.8 })
      page.paper.text(one.unit, x + mm(23.5), page.y + mm(8), { size: 7.2 })
    })
    page.y += rowOf
    rows += 1
  }
  close()
}
