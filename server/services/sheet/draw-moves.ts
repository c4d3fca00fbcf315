import type { SheetColumn, SheetMove, SheetMoves } from '#shared/sheet/types'
import { millimetres as mm, type Paper } from '../paper/paper'
import { box, type SheetPage } from './sheet-page'

const rowHeight = mm(6)
const bit = mm(3.6)
const value = { face: 'mono', size: 8 } as const
const word = { size: 8.2 } as const

interface Column extends SheetColumn { readonly x: number, readonly width: number, /** Where decimal signs stand. */ readonly point: number }
interface Layout { readonly columns: readonly Column[], readonly bits: number, readonly size: number }

/** The move table: inputs that are on for each move, every value on its decimal point, a box to tick; heads repeat on each page. */
export function drawMoves(page: SheetPage, moves: SheetMoves): void {
  if (moves.rows.length === 0) {
    page.paragraph('The move table is empty: leave it cleared.')
    return
  }
  const layout = layoutOf(page, moves)
  drawHead(page, moves, layout)
  for (const row of moves.rows) {
    const comment = row.comment === '' ? [] : page.paper.lines(row.comment, page.right - layout.bits - mm(6), { size: 7 })
    const height = rowHeight + comment.length * mm(3.2)
    if (page.need(height)) drawHead(page, moves, layout)
    drawRow(page, row, layout, comment)
    page.y += height
    page.paper.line(page.left, page.y, page.right, page.y, { weight: 0.4, colour: '#bbb' })
  }
  page.y += mm(1)
  const inputs = moves.inputs > 0 ? 'Black square with 1: input on. Open with 0: off. ' : 'No select inputs: called over the bus. '
  const empty = moves.rows.some(({ unused }) => unused) ? 'A row “empty” is kept empty: speed and acceleration 0. ' : ''
  page.paragraph(`${inputs}${empty}A deceleration that is not given is as the acceleration.`)
}

function layoutOf({ paper, left, right }: SheetPage, moves: SheetMoves): Layout {
  const bits = left + mm(9)
  const start = bits + (moves.inputs === 0 ? mm(2) : moves.inputs * mm(5) + mm(2))
  const room = right - start - mm(7)
  // Long tables of wide rows are set smaller rather than cut.
  for (let size = 8; ; size -= 0.5) {
    const widths = moves.columns.map((column, index) => widthOf(paper, column, moves.rows.map(row => row.cells[index] ?? ''), size))
    const whole = widths.reduce((sum, { whole: one, fraction }) => sum + one + fraction, 0)
    if (whole > room && size > 5) continue
    const spare = Math.max(0, room - whole) / Math.max(1, widths.length)
    let x = start
    const columns = moves.columns.map((column, index): Column => {
      const { whole: before = 0, fraction = 0 } = widths[index] ?? {}
      const width = before + fraction + spare
      const placed = { ...column, x, width, point: column.numeric ? x + width - fraction - mm(1.5) : x }
      x += width
      return placed
    })
    return { columns, bits, size }
  }
}

function widthOf(paper: Paper, column: SheetColumn, cells: readonly string[], size: number): { whole: number, fraction: number } {
  const head = Math.max(paper.widthOf(column.head, { size: 7 }), paper.widthOf(column.unit, { size: 6.5 })) + mm(2)
  if (!column.numeric) return { whole: Math.max(head, ...cells.map(cell => paper.widthOf(cell, { size: size + 0.2 }) + mm(2))), fraction: 0 }
  const fraction = Math.max(0, ...cells.map(cell => paper.widthOf(cell.slice(wholeOf(cell).length), { face: 'mono', size })))
  const whole = Math.max(0, ...cells.map(cell => paper.widthOf(wholeOf(cell), { face: 'mono', size })))
  return { whole: Math.max(head - fraction, whole + mm(2.5)), fraction }
}

const wholeOf = (cell: string) => cell.split(/[.,]/)[0] ?? cell

function drawHead(page: SheetPage, { inputs }: SheetMoves, { columns, bits }: Layout): void {
  const { paper, left, right } = page
  const base = page.y + mm(3.2)
  paper.text('move', left, base, { size: 7 })
  for (let input = 0; input < inputs; input += 1) paper.text(`I${inputs - input}`, bits + input * mm(5) + bit / 2, base, { size: 6.5, align: 'center' })
  for (const { head, unit, x, width, numeric } of columns) {
    const place = numeric ? { at: x + width - mm(1.5), align: 'right' as const } : { at: x, align: 'left' as const }
    paper.text(head, place.at, base, { size: 7, align: place.align })
    if (unit !== '') paper.text(unit, place.at, base + mm(2.8), { size: 6.5, align: place.align })
  }
  paper.text('done', right, base, { size: 7, align: 'right' })
  page.y += mm(7)
  paper.line(left, page.y, right, page.y, { weight: 1 })
}

function drawRow(page: SheetPage, row: SheetMove, { columns, bits, size }: Layout, comment: readonly string[]): void {
  const { paper, left, right } = page
  const base = page.y + mm(4.2)
  paper.text(String(row.move), left, base, { face: 'mono-bold', size: 8.2 })
  drawCall(paper, row, bits, base)
  columns.forEach(({ x, point, numeric }, index) => {
    const cell = row.cells[index] ?? ''
    if (!numeric) {
      paper.text(row.unused && index === 0 && cell === '' ? 'empty' : cell, x, base, { ...word, size: size + 0.2 })
      return
    }
    if (cell === '') {
      paper.text('·', point, base, { ...value, size, align: 'right' })
      return
    }
    const whole = wholeOf(cell)
    paper.text(whole, point, base, { ...value, size, align: 'right' })
    paper.text(cell.slice(whole.length), point, base, { ...value, size })
  })
  comment.forEach((line, index) => paper.text(line, bits, base + mm(3.4) + index * mm(3.2), { size: 7 }))
  paper.frame(right - box - mm(1), base - box + mm(0.5), box, box)
}

/** Drawn, so that it needs no sign that a font may lack: a filled square is on, an open one off, each with its number. */
function drawCall(paper: Paper, { call }: SheetMove, x: number, base: number): void {
  if (call.by !== 'inputs') {
    if (call.by !== 'bus') paper.text(call.by === 'itself' ? 'itself' : 'none', x, base, { size: 6.5 })
    return
  }
  call.on.forEach((on, index) => {
    const at = x + index * mm(5)
    const top = base - bit + mm(0.6)
    if (on) paper.fill(at, top, bit, bit)
    paper.frame(at, top, bit, bit)
    paper.text(on ? '1' : '0', at + bit / 2, top + bit - mm(0.9), { face: on ? 'mono-bold' : 'mono', size: 7, align: 'center', colour: on ? '#fff' : '#000' })
  })
}
