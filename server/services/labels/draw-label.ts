import type { Label } from '#shared/api/labels'
import type { LabelSize } from '#server/database/label/table'
import { millimetres as mm, Paper, type TextStyle } from '../paper/paper'
import { drawQr } from '../paper/qr'

/*
 * A label for an axis, true size, one a page. No values: they change, the tag does not. Capitals of the tag are 8 mm high, which
 * are read from 3 m; JetBrains Mono has capitals of 730 of 1000.
 */

const capital = 0.73
const tagSize = mm(8 / capital)
/** Below this the tag is parted: the machine above, the axis below. */
const least = mm(5 / capital)
const letterGap = -0.04

export const labelMillimetres: Readonly<Record<LabelSize, readonly [width: number, height: number]>> = { '100x50': [100, 50], '50x25': [50, 25] }

/** The labels as a PDF. */
export async function drawLabels(labels: readonly Label[], size: LabelSize, at: string): Promise<Buffer> {
  const [width, height] = labelMillimetres[size]
  const paper = new Paper({ width: mm(width), height: mm(height) }, { title: `Labels ${labels.map(({ tag }) => tag).join(', ').slice(0, 200)}`, at })
  for (const label of labels) {
    paper.addPage()
    if (size === '100x50') drawLarge(paper, label)
    else drawSmall(paper, label)
  }
  return paper.bytes()
}

function drawLarge(paper: Paper, label: Label): void {
  drawMark(paper, mm(3), mm(4), mm(9), mm(42))
  drawTag(paper, label.tag, mm(14.5), mm(4), mm(81.5))
  const words = { face: 'sans-bold', size: mm(4.4) } as const
  const x = mm(14.5)
  const room = mm(47)
  const lines = wordsOf(paper, label, room, words, label.falls ? 3 : 4)
  lines.forEach((line, index) => paper.text(line, x, mm(18.5) + index * mm(5.5), words))
  if (label.falls) {
    const y = mm(20.5) + lines.length * mm(5.5)
    paper.triangle(x, y - mm(3.4), mm(4), mm(3.6))
    paper.text('load can fall: block it', x + mm(5.4), y, { face: 'sans-bold', size: mm(3.2) })
  }
  paper.text('Scan before you take it apart.', x, mm(45), { size: mm(3.2) })
  drawQr(paper, label.address, mm(65), mm(15), mm(31), 2)
}

function drawSmall(paper: Paper, label: Label): void {
  drawTag(paper, label.tag, mm(1.2), mm(1.7), mm(47.6))
  drawQr(paper, label.address, mm(1.2), mm(11.2), mm(13), 1)
  drawMark(paper, mm(15.2), mm(11.4), mm(4), mm(12.6))
  const words = { face: 'sans-bold', size: mm(3.4) } as const
  const lines = wordsOf(paper, label, label.falls ? mm(24.3) : mm(28.5), words, 3)
  lines.forEach((line, index) => paper.text(line, mm(20.6), mm(15) + index * mm(4.1), words))
  if (label.falls) paper.triangle(mm(45.4), mm(20), mm(3.4), mm(3))
}

/** What it does and where it stands, in so many lines; what it does leaves at least one to the place. */
function wordsOf(paper: Paper, { role, machine, line }: Label, width: number, style: TextStyle, most: number): string[] {
  const does = role === '' ? [] : paper.linesOf(role, width, most - 1, style)
  return [...does, ...paper.linesOf(`${machine}, ${line}`, width, most - does.length, style)]
}

/** In 8 mm capitals as long as it fits the width, set smaller in proportion down to 5 mm, parted at a dot or hyphen below that. */
function drawTag(paper: Paper, tag: string, x: number, top: number, width: number): void {
  const size = fitting(paper, tag, width)
  if (size >= least) {
    spaced(paper, tag, x, top + size * capital, size)
    return
  }
  const parts = partedTag(tag)
  const both = Math.min(...parts.map(part => fitting(paper, part, width)), mm(4.2 / capital))
  parts.forEach((part, index) => spaced(paper, part, x, top + (index + 1) * both * capital + index * mm(0.7), both))
}

/** Where both parts can be written largest; without a dot or hyphen in the middle. */
function partedTag(tag: string): [string, string] {
  const cuts = [...tag.matchAll(/[-._]/g)].map(({ index }) => index + 1).filter(cut => cut < tag.length)
  const cut = cuts.sort((a, b) => Math.max(a, tag.length - a) - Math.max(b, tag.length - b))[0] ?? 16
  return [tag.slice(0, cut), tag.slice(cut)]
}

const fitting = (paper: Paper, text: string, width: number) => Math.min(tagSize, width / (paper.widthOf(text, { face: 'mono-bold', size: 1 }) + letterGap * (text.length - 1)))

/** Set a little closer, as on the screens. */
function spaced(paper: Paper, text: string, x: number, baseline: number, size: number): void {
  let at = x
  for (const sign of text) at = paper.text(sign, at, baseline, { face: 'mono-bold', size }) + letterGap * size
}

/** The strip where a scribe mark would stand, with the joint at its sides. */
function drawMark(paper: Paper, x: number, y: number, width: number, height: number): void {
  const stroke = width * 2.5 / 8
  const gap = height / 13
  const middle = y + height / 2
  paper.fill(x + (width - stroke) / 2, y, stroke, (height - gap) / 2)
  paper.fill(x + (width - stroke) / 2, middle + gap / 2, stroke, (height - gap) / 2)
  paper.line(x, middle, x + width / 4, middle, { weight: width * 0.6 / 8 })
  paper.line(x + width * 3 / 4, middle, x + width, middle, { weight: width * 0.6 / 8 })
}
