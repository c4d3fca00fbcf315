import { setImmediate } from 'node:timers/promises'
import type { HistoryItem } from '#shared/api/history'
import { formatExact } from '#shared/units/exact-time'
import { millimetres as mm, Paper, type TextStyle } from '../paper/paper'
import type { FileHead } from './file'
import { changerText, marksText, placeText, sideText, whyText } from './words'

/*
 * The history for the binder, A4 across. It is laid out twice: first to count the lines of each page, so that "page x of y" is
 * true on the first, then to draw them; neither keeps more than one page in memory.
 */

const sheet = { width: 841.89, height: 595.28 }
const left = mm(12)
const right = sheet.width - mm(12)
const bottom = sheet.height - mm(14)
const size = 7.5
const step = size * 1.3
const gap = mm(2.5)

/** To the second and with its zone; the offset stands at the head of the file. */
const timeText = (at: string, zone: string) => formatExact(at, zone).replace(/ \(.*\)$/, '')

const columns: readonly { readonly head: string, readonly width: number, readonly style?: TextStyle, readonly of: (item: HistoryItem) => string }[] = [
  { head: 'Captured, received by the vault', width: mm(40), style: { face: 'mono', size: 6.5 }, of: item => `${timeText(item.capturedAt, item.timeZone)}, ${timeText(item.at, item.timeZone)}` },
  { head: 'Axis', width: mm(22), style: { face: 'mono', size }, of: item => item.tag },
  { head: 'Value', width: mm(34), of: item => `${placeText(item)} (${item.weight})` },
  { head: 'Before', width: mm(24), style: { face: 'mono', size }, of: item => sideText(item, 'before') },
  { head: 'After', width: mm(24), style: { face: 'mono-bold', size }, of: item => sideText(item, 'after') },
  { head: 'Changed by, stored by', width: mm(36), of: item => `${changerText(item)}, ${item.storedBy}` },
  { head: 'Allowed by', width: mm(24), of: item => item.allowedBy ?? 'Nobody named' },
  { head: 'Why', width: mm(47), of: item => whyText(item) },
  { head: 'Versions', width: mm(19), style: { face: 'mono', size }, of: item => [`${item.baseNumber === null ? '' : `v${item.baseNumber} to `}v${item.number}`, marksText(item)].filter(Boolean).join(' ') },
]

type Line = readonly (readonly string[])[]
interface Count { readonly pages: number[], readonly lines: number }

export async function* historyPdf(pages: () => Iterable<readonly HistoryItem[]>, head: FileHead): AsyncGenerator<Buffer> {
  const count = await countLines(pages(), head)
  const paper = new Paper(sheet, { title: head.question, at: head.madeAt, kept: false })
  const total = count.pages.length
  const rest = lineFeed(paper, pages())
  for (const [index, lines] of count.pages.entries()) {
    paper.addPage()
    let y = drawHead(paper, head, index === 0 ? count.lines : null)
    for (let line = 0; line < lines; line += 1) {
      const next = rest.next()
      if (next.done !== true) y = drawLine(paper, next.value, y)
    }
    drawFoot(paper, head, index + 1, total)
    await setImmediate()
    yield paper.taken()
  }
  yield await paper.bytes()
}

/** How many lines go on each page; at least one page, with the head alone. */
async function countLines(pages: Iterable<readonly HistoryItem[]>, head: FileHead): Promise<Count> {
  const paper = new Paper(sheet, { title: '', at: head.madeAt, kept: false })
  paper.addPage()
  const first = drawHead(paper, head, 0)
  const later = drawHead(paper, head, null)
  const counted = { pages: [0], lines: 0 }
  let y = first
  for (const items of pages) {
    for (const item of items) {
      const height = heightOf(linesOf(paper, item))
      if (y + height > bottom - mm(4) && (counted.pages.at(-1) ?? 0) > 0) {
        counted.pages.push(0)
        y = later
      }
      counted.pages.push((counted.pages.pop() ?? 0) + 1)
      counted.lines += 1
      y += height
    }
    await setImmediate()
  }
  return counted
}

function* lineFeed(paper: Paper, pages: Iterable<readonly HistoryItem[]>): Generator<Line> {
  for (const items of pages) for (const item of items) yield linesOf(paper, item)
}

const linesOf = (paper: Paper, item: HistoryItem): Line => columns.map(({ width, style = { size }, of }) => paper.lines(of(item), width - gap, style))
const heightOf = (line: Line) => Math.max(...line.map(column => column.length)) * step + mm(2.2)

function drawHead(paper: Paper, { plant, question, zone, rests, checkpoint, madeAt }: FileHead, lines: number | null): number {
  let y = mm(14)
  paper.text(`History${plant === '' ? '' : `, ${plant}`}`, left, y, { face: 'sans-bold', size: 13 })
  const write = (text: string, style: TextStyle) => {
    for (const line of paper.lines(text, right - left, style)) paper.text(line, left, y += step + 1, style)
  }
  write(question, { size: 9 })
  if (lines !== null) {
    write(`${lines} ${lines === 1 ? 'change' : 'changes'}, newest first by the vault’s own order. Made ${formatExact(madeAt, zone)}. Each line is told in the zone of its site.`, { size })
    write(rests, { size })
    write(`Checkpoint of the log: ${checkpoint.trim().split('\n').filter(Boolean).join(' | ')}`, { face: 'mono', size: 6.5 })
  }
  y += mm(6)
  let x = left
  for (const { head, width } of columns) {
    paper.text(head, x, y, { face: 'sans-bold', size })
    x += width
  }
  paper.line(left, y + mm(1.4), right, y + mm(1.4), { weight: 1 })
  return y + mm(2)
}

function drawLine(paper: Paper, line: Line, y: number): number {
  let x = left
  for (const [index, { width, style = { size } }] of columns.entries()) {
    for (const [row, text] of (line[index] ?? []).entries()) paper.text(text, x, y + (row + 1) * step, style)
    x += width
  }
  const end = y + heightOf(line)
  paper.line(left, end - mm(0.4), right, end - mm(0.4), { weight: 0.3 })
  return end
}

function drawFoot(paper: Paper, { zone, madeAt }: FileHead, page: number, total: number): void {
  paper.text(`Made ${formatExact(madeAt, zone)}`, left, sheet.height - mm(8), { size })
  paper.text(`page ${page} of ${total}`, right, sheet.height - mm(8), { size, align: 'right' })
}
