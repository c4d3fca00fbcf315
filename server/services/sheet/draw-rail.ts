import { layoutRail } from '#shared/pictures/rail'
import type { RailHalf } from '#shared/pictures/rail-half'
import { railUnit, type RailInput } from '#shared/pictures/rail-input'
import { railBounds, railNotes } from '#shared/pictures/rail-notes'
import { textWidth, type PlacedLabel } from '#shared/pictures/scale'
import type { Paper, Picture } from '../paper/paper'
import type { SheetPage } from './sheet-page'

/** Pixels that the layout has for the width of the page; its text of 12 px is then some 8 points high. */
export const railPixels = 800
const textPixels = 12
/** What is drawn, and only that. */
function keyOf({ stops, wraps, upper: { softMin, softMax, zones, moves } }: RailInput): string {
  const parts: [boolean, string][] = [
    [stops !== undefined, 'thick with hatching outside: hard stop'], [wraps, 'dashed ends: it wraps there'],
    [softMin !== undefined || softMax !== undefined, 'dashed: soft limit'], [zones.length > 0, 'hatched within the rule: zone'],
    [moves.length > 0, 'number in a ring: where that move ends, with the way that it comes at its foot'], [moves.some(({ kind }) => kind === 'press'), 'open ring and arrow: a press from its approach'],
  ]
  return parts.filter(([drawn]) => drawn).map(([, words]) => words).join('; ')
}

/** The rail as the page of the axis has it, in black: where the moves end, on a rule to scale, with its bounds in words below. */
export function drawRail(page: SheetPage, rail: RailInput): void {
  const layout = layoutRail(rail, railPixels)
  const scale = page.width / railPixels
  const unit = railUnit(rail)
  const [half] = layout.halves
  const words = [...railBounds(rail, unit), ...railNotes({ steps: [] }, half, unit).map(note => `${note}.`), `Drawn: ${keyOf(rail)}.`].join(' ')
  const below = page.paper.lines(words, page.width, { size: 7.5 }).length * 7.5 * 1.35
  page.need(layout.height * scale + below)
  const { paper } = page
  const at: Picture = { x: page.left, y: page.y, scale }
  for (const { x, y, width, height } of layout.hatches) paper.hatch(at.x + x * scale, at.y + y * scale, width * scale, height * scale, 4 * scale)
  paper.path(layout.zoneEdges, { ...at, weight: 0.6 })
  paper.path(layout.stops, { ...at, weight: 1.8 })
  paper.path(layout.wraps, { ...at, weight: 1, dash: 3 })
  paper.path(layout.rule, { ...at, weight: 0.8 })
  paper.path(layout.ticks, { ...at, weight: 0.4 })
  for (const label of layout.labels) drawText(paper, at, { ...label, y: layout.labelY })
  if (half) drawHalf(paper, at, half, layout.radius)
  page.y += layout.height * scale
  page.paragraph(words)
  page.y += 4
}

function drawHalf(paper: Paper, at: Picture, half: RailHalf, radius: number): void {
  const { scale } = at
  const [px, py] = [(x: number) => at.x + x * scale, (y: number) => at.y + y * scale]
  for (const { d } of half.softLines) paper.path(d, { ...at, weight: 1, dash: 2.5 })
  for (const { d } of half.leaders) paper.path(d, { ...at, weight: 0.5 })
  for (const { d } of half.feet) paper.path(d, at)
  for (const { bar, head, ringX, y } of half.presses) {
    paper.path(bar, { ...at, weight: 1.4 })
    if (head) paper.path(head, at)
    paper.ring(px(ringX), py(y), 3 * scale, 0.8)
  }
  for (const { x, y, move } of half.balloons) {
    paper.ring(px(x), py(y), radius * scale, 0.8)
    const size = (move > 999 ? 8 : move > 99 ? 10 : textPixels) * scale
    paper.text(String(move), px(x), py(y + 4.2), { face: 'mono', size, align: 'center' })
  }
  for (const { x, y, width, height, text } of half.crowds) {
    paper.fill(px(x), py(y), width * scale, height * scale, '#fff')
    paper.frame(px(x), py(y), width * scale, height * scale, { weight: 0.6 })
    paper.text(text, px(x + width / 2), py(y + height / 2 + 4.2), { face: 'mono', size: textPixels * scale, align: 'center' })
  }
  for (const text of half.texts) drawText(paper, at, text)
}

const aligned = { start: 'left', middle: 'center', end: 'right' } as const

/** On white, so that no line runs through it. */
function drawText(paper: Paper, at: Picture, { x, y, text, anchor }: PlacedLabel & { readonly y: number }): void {
  const { scale } = at
  const width = textWidth(text)
  const left = anchor === 'start' ? x : anchor === 'end' ? x - width : x - width / 2
  paper.fill(at.x + left * scale, at.y + (y - 9.5) * scale, width * scale, 11 * scale, '#fff')
  paper.text(text, at.x + x * scale, at.y + y * scale, { face: 'mono', size: textPixels * scale, align: aligned[anchor] })
}
