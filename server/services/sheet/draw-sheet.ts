import { setImmediate } from 'node:timers/promises'
import { millimetres as mm, Paper, type PaperSize } from '../paper/paper'
import { drawFirstHead, drawNextHead } from './draw-head'
import { drawMoves } from './draw-moves'
import { drawRail } from './draw-rail'
import { drawTaught, drawValues } from './draw-values'
import { box, SheetPage } from './sheet-page'
import type { SheetWords } from './sheet-words'

/** A restore sheet as a PDF: everything that the words hold, on as many pages as it takes. `at` becomes the file's date. */
export async function drawSheet(words: SheetWords, size: PaperSize, at: string): Promise<Buffer> {
  const paper = new Paper(size, { title: `Restore sheet ${words.tag} ${words.code}`, at })
  const page = new SheetPage(paper, next => drawNextHead(next, words))
  page.first()
  drawFirstHead(page, words)
  const reset = words.tableRows === null ? 'Reset the unit, clear its move table' : `Reset the unit, clear all ${words.tableRows} rows of its move table`
  page.steps([`1 ${reset}`, `2 Write, ${words.order}`])
  drawValues(page, words.values)
  drawTaught(page, words.taught)
  // Other requests get their turn between the parts of a long sheet.
  await setImmediate()
  page.title(`3 Write the moves: ${words.moves.rows.length === 1 ? '1 row' : `${words.moves.rows.length} rows`}, none else`)
  if (words.rail) drawRail(page, words.rail)
  drawMoves(page, words.moves)
  await setImmediate()
  page.steps(['4 Restart', `5 Home at creep speed${words.creep}`, `6 Prove: zero at the scribed mark${words.prove.length === 0 ? '' : `; ${words.prove.join(', ')}`}`, '7 Teach'])
  drawReadBack(page, words)
  drawMotion(page, words)
  drawSignatures(page)
  drawCheckpoint(page, words)
  drawFeet(page, words)
  return paper.bytes()
}

function drawReadBack(page: SheetPage, { code }: SheetWords): void {
  page.need(mm(9))
  const base = page.y + mm(6)
  let x = page.paper.text('8 Read back: code', page.left, base, { face: 'sans-bold', size: 9 }) + mm(2)
  page.paper.line(x, base + mm(0.8), x + mm(34), base + mm(0.8), { weight: 0.8 })
  x = page.paper.text(`is ${code}`, x + mm(36), base, { face: 'sans-bold', size: 9 }) + mm(2)
  page.tick(x, base)
  page.y += mm(8)
}

function drawMotion(page: SheetPage, { motion }: SheetWords): void {
  // The title never stands at the foot without its first lines.
  page.need(mm(40))
  page.title(`9 ${motion.title}`)
  const { paper, left, right } = page
  const ends = left + page.width * 0.52
  const takes = left + page.width * 0.655
  const ticks = left + page.width * 0.7
  const fault = left + page.width * 0.75
  const head = () => {
    const base = page.y + mm(3)
    paper.text('call', left, base, { size: 7 })
    paper.text('what to see', left + mm(22), base, { size: 7 })
    paper.text('ends at', ends, base, { size: 7, align: 'right' })
    paper.text('takes, s', takes, base, { size: 7, align: 'right' })
    paper.text('ok', ticks, base, { size: 7, align: 'center' })
    paper.text('fault, in words', fault, base, { size: 7 })
    page.y += mm(4)
    paper.line(left, page.y, right, page.y, { weight: 1 })
  }
  head()
  for (const line of motion.lines) {
    const calls = paper.lines(line.call, mm(20), { face: 'mono-bold', size: 8 })
    const words = paper.lines(line.words, ends - left - mm(22) - mm(18), { size: 8 })
    const height = Math.max(mm(7), mm(3) + Math.max(calls.length, words.length) * mm(3.5))
    if (page.need(height)) head()
    const base = page.y + mm(4.6)
    calls.forEach((text, index) => paper.text(text, left, base + index * mm(3.5), { face: 'mono-bold', size: 8 }))
    words.forEach((text, index) => paper.text(text, left + mm(22), base + index * mm(3.5), { size: 8 }))
    paper.text(line.ends, ends, base, { face: 'mono', size: 8, align: 'right' })
    paper.text(line.takes, takes, base, { face: 'mono', size: 8, align: 'right' })
    paper.frame(ticks - box / 2, base - box + mm(0.5), box, box)
    page.y += height
    paper.line(left, page.y, fault - mm(2), page.y, { weight: 0.4, colour: '#bbb' })
    paper.line(fault, page.y, right, page.y, { weight: 0.8 })
  }
}

/** Lines to sign. */
function drawSignatures(page: SheetPage): void {
  const rows = ['Written and read back', 'Zero proved, first motion', 'Released (planner)']
  const height = mm(10)
  page.need(mm(9) + rows.length * height)
  page.y += mm(4)
  const { paper, left, right } = page
  const columns = [left, left + mm(44), left + mm(92), left + mm(132)] as const
  ;['for', 'name', 'date, time', 'signature'].forEach((head, index) => paper.text(head, (columns[index] ?? left) + (index === 0 ? 0 : mm(1.5)), page.y + mm(3), { size: 7 }))
  page.y += mm(4)
  paper.line(left, page.y, right, page.y, { weight: 1 })
  for (const row of rows) {
    paper.text(row, left, page.y + height - mm(2))
    for (const x of columns.slice(1)) paper.line(x, page.y, x, page.y + height, { weight: 0.4, colour: '#bbb' })
    page.y += height
    paper.line(left, page.y, right, page.y, { weight: 0.8 })
  }
}

/** The signed note over the log, as it stands: kept elsewhere than the vault, it proves what the log held. */
function drawCheckpoint(page: SheetPage, { checkpoint }: SheetWords): void {
  if (checkpoint === null) return
  const style = { face: 'mono', size: 6 } as const
  const lines = checkpoint.flatMap(line => (line === '' ? [''] : page.paper.lines(line, page.width, style)))
  page.need(mm(9) + lines.length * mm(2.8))
  page.y += mm(3)
  page.paragraph('Checkpoint of the trail when this was printed. Kept here, away from the vault, it proves what the log held.', { size: 7 })
  for (const line of lines) {
    page.paper.text(line, page.left, page.y + mm(2.4), style)
    page.y += mm(2.8)
  }
}

function drawFeet({ paper, left, right, width }: SheetPage, { tag, subject, code, log, printed }: SheetWords): void {
  const pages = paper.pageCount
  const size = 7
  for (let number = 0; number < pages; number += 1) {
    paper.turnTo(number)
    const y = paper.height - mm(9.5)
    paper.line(left, y, right, y, { weight: 1 })
    const base = y + mm(3.8)
    const after = paper.text(`${tag}${subject}, `, left, base, { size })
    paper.text(code, after, base, { face: 'mono-bold', size })
    paper.text(log, left + width * 0.36, base, { size })
    paper.text(printed, left + width * 0.86, base, { size, align: 'right' })
    paper.text(`page ${number + 1} of ${pages}`, right, base, { face: 'sans-bold', size, align: 'right' })
  }
}
