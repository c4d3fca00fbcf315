import { millimetres as mm } from '../paper/paper'
import { drawQr } from '../paper/qr'
import { drawStrip, type SheetPage } from './sheet-page'
import type { SheetWords } from './sheet-words'

const qrSide = mm(31)
const tagSize = 30
const codeSize = 24

/** The head of the first page: whose sheet it is, the code that the read-back must show, who and what, the cautions. */
export function drawFirstHead(page: SheetPage, words: SheetWords): void {
  const { paper, left } = page
  const inner = page.right - qrSide - mm(6)
  drawStrip(paper, left + mm(1), page.y, mm(6))
  paper.text(`Witnessmark${words.plant === '' ? '' : `, ${words.plant}`}`, left + mm(6), page.y + mm(4.2))
  paper.text('Restore sheet', inner, page.y + mm(4.2), { face: 'sans-bold', size: 10, align: 'right' })
  drawQr(paper, words.address, page.right - qrSide, page.y + mm(4), qrSide)
  paper.text(words.leadsTo, page.right - qrSide / 2, page.y + mm(37.5), { size: 7, align: 'center' })
  const size = Math.min(tagSize, tagSize * (inner - left) / paper.widthOf(words.tag, { face: 'mono-bold', size: tagSize }))
  paper.text(words.tag, left, page.y + mm(18), { face: 'mono-bold', size })
  paper.lines(words.place, inner - left).slice(0, 2).forEach((line, index) => paper.text(line, left, page.y + mm(22.5) + index * mm(3.8)))
  const above = page.y + mm(28)
  paper.line(left, above, inner, above, { weight: 1.5 })
  paper.text('The read-back must show', left, above + mm(6.5))
  paper.text(words.code, inner, above + mm(8), { face: 'mono-bold', size: codeSize, align: 'right' })
  paper.line(left, above + mm(11), inner, above + mm(11), { weight: 1.5 })
  page.y = above + mm(14)
  drawFacts(page, words)
  if (words.notReleased !== null) drawFramed(page, 'Not released', [words.notReleased])
  if (words.warnings.length > 0) drawFramed(page, 'Read this first', words.warnings)
  drawCautions(page, words)
}

/** The head of every further page. */
export function drawNextHead(page: SheetPage, words: SheetWords): void {
  drawStrip(page.paper, page.left + mm(1), page.y, mm(6))
  const after = page.paper.text(words.tag, page.left + mm(6), page.y + mm(4.5), { face: 'mono-bold', size: 10 })
  page.paper.text(words.code, after + mm(4), page.y + mm(4.5), { face: 'mono', size: 9 })
  page.paper.text('Restore sheet', page.right, page.y + mm(4.5), { face: 'sans-bold', size: 10, align: 'right' })
  page.y += mm(9)
}

/** Words and values in a plate of three columns; what is longer than its cell goes on below. */
function drawFacts(page: SheetPage, { facts }: SheetWords): void {
  const { paper, left } = page
  const columns = 3
  const width = page.width / columns
  const style = { face: 'mono', size: 7.5 } as const
  for (let index = 0; index < facts.length; index += columns) {
    const cells = facts.slice(index, index + columns).map(([name, value]) => ({ name, lines: paper.lines(value, width - mm(3), style) }))
    const height = mm(4.2) + Math.max(...cells.map(({ lines }) => lines.length)) * mm(3.4)
    cells.forEach(({ name, lines }, column) => {
      const x = left + column * width
      paper.frame(x, page.y, width, height, { weight: 0.5 })
      paper.text(name, x + mm(1.5), page.y + mm(3), { size: 6.5 })
      lines.forEach((line, row) => paper.text(line, x + mm(1.5), page.y + mm(6.4) + row * mm(3.4), style))
    })
    page.y += height
  }
  page.y += mm(3)
}

function drawFramed(page: SheetPage, title: string, sentences: readonly string[]): void {
  const begin = page.y
  page.y += mm(2)
  page.paragraph(title, { size: 9, indent: mm(3), bold: true })
  for (const sentence of sentences) page.paragraph(sentence, { size: 8, indent: mm(3), width: page.width - mm(6) })
  page.y += mm(2)
  page.paper.frame(page.left, begin, page.width, page.y - begin, { weight: 2 })
  page.y += mm(2.5)
}

/** In two columns, numbered. */
function drawCautions(page: SheetPage, { cautions, cautionSources }: SheetWords): void {
  const { paper, left } = page
  const begin = page.y
  const style = { size: 7.5 } as const
  const width = (page.width - mm(12)) / 2
  const lineHeight = mm(3.5)
  const blocks = cautions.map((text, index) => ({ number: String(index + 1), lines: paper.lines(text, width - mm(4), style) }))
  const half = Math.ceil(blocks.reduce((sum, { lines }) => sum + lines.length, 0) / 2)
  paper.text('Before a value is written', left + mm(3), begin + mm(4.5), { face: 'sans-bold', size: 9 })
  let column = 0
  let row = 0
  let deepest = 0
  for (const { number, lines } of blocks) {
    if (column === 0 && row >= half) [column, row] = [1, 0]
    const x = left + mm(3) + column * (width + mm(6))
    paper.text(number, x, begin + mm(9) + row * lineHeight, { face: 'mono-bold', size: 7.5 })
    for (const line of lines) {
      paper.text(line, x + mm(4), begin + mm(9) + row * lineHeight, style)
      row += 1
    }
    deepest = Math.max(deepest, row)
  }
  const end = begin + mm(9) + deepest * lineHeight
  paper.text(cautionSources, left + mm(3), end + mm(0.5), { size: 6.5 })
  page.y = end + mm(2.5)
  paper.frame(left, begin, page.width, page.y - begin, { weight: 1.5 })
  page.y += mm(1)
}
