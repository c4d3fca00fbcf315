import { millimetres as mm, type Paper, type TextStyle } from '../paper/paper'
import { drawStrip } from '../sheet/sheet-page'
import type { Block, Column } from './blocks'

/** What stands at the head and the foot of every page. */
export interface PageWords { readonly title: string, readonly subject: string, readonly foot: string }

const left = mm(20)
const right = mm(12)
const top = mm(12)
const foot = mm(16)
const size = 8
const leading = 1.35
/** A heading goes to the next page with what it heads rather than stand alone at the foot. */
const kept = mm(22)
const headings = { 1: { size: 13, before: mm(7), after: mm(3) }, 2: { size: 10.5, before: mm(5), after: mm(1.5) }, 3: { size: 8.5, before: mm(3.5), after: mm(1) } } as const

/**
 * Lays blocks out on pages. Without `total` nothing is drawn and the pages are counted; with it the same blocks come out the same,
 * each page bearing its number and theirs. Rows of a table that go on overleaf bring their head along.
 */
export class ReportPages {
  private y = 0
  private table: readonly Column[] | null = null
  private count = 0
  /** A heading stands right above. */
  private headed = false

  constructor(private readonly paper: Paper, private readonly words: PageWords, private readonly total: number | null) {
    this.turn()
  }

  get pages(): number {
    return this.count
  }

  private get width(): number {
    return this.paper.width - left - right
  }

  private get bottom(): number {
    return this.paper.height - foot
  }

  put(block: Block): void {
    if (block.kind !== 'row') this.table = null
    if (block.kind !== 'heading') this.headed = false
    if (block.kind === 'heading') this.heading(block)
    else if (block.kind === 'text') this.text(block.text, { face: block.face ?? 'sans', size: block.size ?? size }, block.indent ?? 0)
    else if (block.kind === 'fact') this.fact(block.label, block.value, { face: block.face ?? 'sans', size: block.face === undefined ? size : 7.5 })
    else if (block.kind === 'gap') this.y += block.height
    else this.row(block.columns, block.cells)
  }

  private turn(): void {
    this.paper.addPage()
    this.count += 1
    this.y = top
    const { title, subject, foot: words } = this.words
    if (this.total !== null) {
      drawStrip(this.paper, left, this.y, mm(5))
      this.paper.text(title, left + mm(4), this.y + mm(3.9), { face: 'sans-bold', size: 9 })
      this.paper.text(subject, this.paper.width - right, this.y + mm(3.9), { size, align: 'right' })
      this.paper.text(words, left, this.paper.height - mm(8), { size: 6.5 })
      this.paper.text(`page ${this.count} of ${this.total}`, this.paper.width - right, this.paper.height - mm(8), { size, align: 'right' })
    }
    this.rule(this.y + mm(6.5), 0.8)
    this.y += mm(9)
  }

  /** Whether it had to go to the next page. */
  private need(height: number): boolean {
    if (this.y + height <= this.bottom) return false
    this.turn()
    return true
  }

  private write(text: string, x: number, baseline: number, style: TextStyle): void {
    if (this.total !== null) this.paper.text(text, x, baseline, style)
  }

  private rule(y: number, weight: number): void {
    if (this.total !== null) this.paper.line(left, y, this.paper.width - right, y, { weight })
  }

  private heading({ level, text, aside = '' }: Extract<Block, { kind: 'heading' }>): void {
    const { size: high, before, after } = headings[level]
    const style: TextStyle = { face: level === 2 ? 'mono-bold' : 'sans-bold', size: high }
    const beside: TextStyle = { face: 'mono', size: 7, align: 'right' }
    const lines = this.paper.lines(text, this.width - (aside === '' ? 0 : this.paper.widthOf(aside, beside) + mm(4)), style)
    this.need(before + lines.length * high * leading + after + kept)
    const first = this.y <= top + mm(9)
    if (!first && !this.headed) this.y += before
    if (!first && level === 1) this.rule(this.y - mm(1.5), 1.6)
    for (const [index, line] of lines.entries()) {
      this.y += high * leading
      this.write(line, left, this.y, style)
      if (index === 0 && aside !== '') this.write(aside, this.paper.width - right, this.y, beside)
    }
    this.y += after
    this.headed = true
  }

  private text(text: string, style: TextStyle, indent: number): void {
    const step = (style.size ?? size) * leading
    for (const line of this.paper.lines(text, this.width - indent, style)) {
      this.need(step)
      this.write(line, left + indent, this.y + (style.size ?? size), style)
      this.y += step
    }
  }

  /** A label with its value behind it; long values go on under themselves. */
  private fact(label: string, value: string, style: TextStyle): void {
    const column = mm(34)
    const lines = this.paper.lines(value, this.width - column, style)
    for (const [index, line] of (lines.length === 0 ? [''] : lines).entries()) {
      this.need(size * leading)
      if (index === 0) this.write(label, left, this.y + size, { size })
      this.write(line, left + column, this.y + size, style)
      this.y += size * leading
    }
  }

  private row(columns: readonly Column[], cells: readonly string[]): void {
    const lines = columns.map(({ share, face = 'sans' }, index) => this.paper.lines(cells[index] ?? '', this.width * share - mm(2), { face, size: 7.5 }))
    const step = 7.5 * 1.3
    const tall = Math.max(1, ...lines.map(column => column.length))
    const headed = this.table === columns ? 0 : mm(5)
    const room = this.bottom - top - mm(16)
    if (this.need(Math.min(headed + tall * step + mm(1.6), room)) || headed > 0) this.tableHead(columns)
    this.table = columns
    for (let from = 0; from < tall;) {
      if (from > 0) {
        this.turn()
        this.tableHead(columns)
      }
      const fits = Math.max(1, Math.floor((this.bottom - this.y - mm(1.6)) / step))
      this.cells(columns, lines, from, Math.min(tall, from + fits), step)
      from += fits
    }
  }

  private tableHead(columns: readonly Column[]): void {
    let x = left
    for (const { head, share } of columns) {
      this.write(head, x, this.y + mm(3), { face: 'sans-bold', size: 7 })
      x += this.width * share
    }
    this.rule(this.y + mm(4.2), 0.6)
    this.y += mm(5)
  }

  private cells(columns: readonly Column[], lines: readonly (readonly string[])[], from: number, to: number, step: number): void {
    let x = left
    for (const [index, { share, face = 'sans' }] of columns.entries()) {
      for (const [row, text] of (lines[index] ?? []).slice(from, to).entries()) this.write(text, x, this.y + (row + 1) * step - 1.5, { face, size: 7.5 })
      x += this.width * share
    }
    this.y += (to - from) * step + mm(1.6)
    this.rule(this.y - mm(0.8), 0.25)
  }
}
