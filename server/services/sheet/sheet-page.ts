import { millimetres as mm, type Paper } from '../paper/paper'

/*
 * The page of a sheet: margins, a place to write at, page breaks, and what stands on every page. Black on white, nothing grey that
 * means anything.
 */

const left = mm(14)
const right = mm(12)
const top = mm(10)
const foot = mm(14)

export class SheetPage {
  /** The next free line. */
  y = top
  readonly left = left

  constructor(readonly paper: Paper, private readonly head: (page: SheetPage) => void) {}

  get right(): number {
    return this.paper.width - right
  }

  get width(): number {
    return this.right - left
  }

  /** How far down one may write. */
  get bottom(): number {
    return this.paper.height - foot
  }

  /** The first page has a head of its own. */
  first(): void {
    this.paper.addPage()
    this.y = top
  }

  next(): void {
    this.paper.addPage()
    this.y = top
    this.head(this)
  }

  /** Goes on to the next page where so much does not fit any more. Answers whether it did. */
  need(height: number): boolean {
    if (this.y + height <= this.bottom) return false
    this.next()
    return true
  }

  /** A title with boxes to tick behind its parts. */
  steps(parts: readonly string[], after = mm(1)): void {
    let x = left
    for (const part of parts) {
      const width = this.paper.widthOf(part, { face: 'sans-bold', size: 9 }) + box + mm(5)
      if (x > left && x + width > this.right + mm(5)) {
        x = left
        this.y += mm(6)
      }
      if (x === left) this.need(mm(10))
      x = this.paper.text(part, x, this.y + mm(6), { face: 'sans-bold', size: 9 }) + mm(1.5)
      this.tick(x, this.y + mm(6))
      x += box + mm(4)
    }
    this.y += mm(7) + after
  }

  title(text: string): void {
    this.need(mm(14))
    this.paper.text(text, left, this.y + mm(6), { face: 'sans-bold', size: 9 })
    this.y += mm(8)
  }

  paragraph(text: string, { size = 7.5, indent = 0, bold = false, width = this.width - indent }: { readonly size?: number, readonly indent?: number, readonly bold?: boolean, readonly width?: number } = {}): void {
    const style = { face: bold ? 'sans-bold' : 'sans', size } as const
    for (const line of this.paper.lines(text, width, style)) {
      this.need(size * 1.35)
      this.paper.text(line, left + indent, this.y + size, style)
      this.y += size * 1.35
    }
  }

  /** A box to tick, standing on a base line. */
  tick(x: number, baseline: number): void {
    this.paper.frame(x, baseline - box + mm(0.5), box, box)
  }
}

/** Side of a box to tick. */
export const box = mm(3.4)

/** The strip in line, as it stands on screens and labels: two strokes, one above the other. */
export function drawStrip(paper: Paper, x: number, y: number, height: number): void {
  const width = height / 24 * 5
  const gap = height / 12
  paper.fill(x, y, width, (height - gap) / 2)
  paper.fill(x, y + (height + gap) / 2, width, (height - gap) / 2)
}
