import type { LifeEvent } from '#shared/api/versions'
import { textWidth, type Anchor } from '#shared/pictures/scale'
import { timeTicks, type TimeTick } from './time-scale'

/*
 * The life of an axis on one line: above it what was known-good and how long, below it a stroke for each version (longer
 * where it was marked), across it a cut where the unit was changed. Strokes that would fall on one another become one.
 */

export interface LifeInput {
  /** Any order. */
  readonly events: readonly LifeEvent[]
  /** Now, ms. */
  readonly until: number
  readonly zone: string
  /** The version that the drive holds now, if it is off its known-good. */
  readonly off: { readonly number: number } | null
}

export interface LifeStroke { readonly x: number, readonly length: number, readonly tone: 'version' | 'off', readonly numbers: readonly number[] }
export interface LifeRun { readonly from: number, readonly to: number, readonly label: string | null }
export interface LifeText { readonly x: number, readonly y: number, readonly text: string, readonly anchor: Anchor, readonly tone: 'line' | 'off' }
export interface LifeLayout {
  readonly width: number
  readonly height: number
  readonly left: number
  readonly right: number
  readonly ticks: readonly TimeTick[]
  readonly strokes: readonly LifeStroke[]
  readonly runs: readonly LifeRun[]
  readonly cuts: readonly number[]
  readonly texts: readonly LifeText[]
}

export const lifeLines = { rule: 74, axis: 118, height: 136, known: 50 }

const round = (value: number) => Number(value.toFixed(1))
const when = (event: LifeEvent) => Date.parse(event.at)

function strokesOf(versions: readonly LifeEvent[], marked: ReadonlySet<number>, off: number | undefined, x: (at: number) => number): LifeStroke[] {
  const strokes: LifeStroke[] = []
  for (const event of versions) {
    if (event.number === null) continue
    const isOff = event.number === off
    const stroke: LifeStroke = { x: round(x(when(event))), length: isOff ? 30 : marked.has(event.number) ? 21 : 12, tone: isOff ? 'off' : 'version', numbers: [event.number] }
    const last = strokes[strokes.length - 1]
    if (last && stroke.x - last.x < 4) {
      strokes[strokes.length - 1] = { x: isOff ? stroke.x : last.x, length: Math.max(last.length, stroke.length), tone: isOff ? 'off' : last.tone, numbers: [...last.numbers, event.number] }
    }
    else strokes.push(stroke)
  }
  return strokes
}

function runsOf(marks: readonly LifeEvent[], end: number, x: (at: number) => number): LifeRun[] {
  return marks.flatMap((mark, index) => {
    if (mark.kind !== 'mark' || mark.number === null) return []
    const from = round(x(when(mark)))
    const next = marks[index + 1]
    const to = Math.max(from, round((next ? x(when(next)) : end) - 5))
    const label = `v${mark.number}`
    return [{ from, to, label: to - from >= textWidth(label) + 12 ? label : null }]
  })
}

/** Serials at the cuts, the one taken out left of its line, the one put in right of it, and only where both have room. */
function unitTexts(fitted: readonly LifeEvent[], x: (at: number) => number, left: number, right: number): LifeText[] {
  const spans = fitted.map((event, index) => {
    const next = fitted[index + 1]
    return { serial: event.serial ?? '', from: Math.max(left, x(when(event))), to: next ? x(when(next)) : right, last: next === undefined, first: index === 0 }
  })
  return spans.flatMap((span): LifeText[] => {
    if (span.to - span.from < textWidth(span.serial) + 16) return []
    return span.first && !span.last
      ? [{ x: round(span.to - 8), y: 20, text: span.serial, anchor: 'end', tone: 'line' }]
      : [{ x: round(span.from + (span.first ? 0 : 8)), y: 20, text: span.serial, anchor: 'start', tone: 'line' }]
  })
}

/** Lays the life line out for a width in pixels; its height is always the same. */
export function layoutLife(input: LifeInput, width: number): LifeLayout {
  const events = [...input.events].sort((a, b) => when(a) - when(b))
  const left = 92
  const right = width - 16
  const first = events[0]
  const from = first ? when(first) : input.until
  const span = Math.max(1, input.until - from)
  const start = from - span * 0.02
  const x = (at: number) => left + (at - start) / (input.until - start || 1) * (right - left)
  const fitted = events.filter(event => event.kind === 'fitted')
  const marks = events.filter(event => event.kind === 'mark' || event.kind === 'mark-none')
  const marked = new Set(marks.flatMap(mark => mark.kind === 'mark' && mark.number !== null ? [mark.number] : []))
  const cuts = fitted.slice(1).map(event => round(x(when(event))))
  const strokes = strokesOf(events.filter(event => event.kind === 'version'), marked, input.off?.number, x)
  const offStroke = strokes.find(stroke => stroke.tone === 'off')
  return {
    width, height: lifeLines.height, left, right,
    ticks: first ? timeTicks(start, input.until, left, right, input.zone) : [],
    strokes, runs: runsOf(marks, right, x), cuts,
    texts: [
      ...unitTexts(fitted, x, left, right),
      ...(offStroke && input.off ? [{ x: offStroke.x - 5, y: lifeLines.rule + 34, text: `v${input.off.number} off`, anchor: 'end' as const, tone: 'off' as const }] : []),
    ],
  }
}

const plural = (count: number, one: string) => `${count} ${one}${count === 1 ? '' : 's'}`

/** What the life line shows, as its text equivalent. `day` writes an instant as a date of the plant. */
export function lifeSentence(tag: string, input: LifeInput, day: (at: string) => string): string {
  const events = [...input.events].sort((a, b) => when(a) - when(b))
  const first = events[0]
  if (!first) return `Nothing is known of ${tag} yet.`
  const of = (kind: LifeEvent['kind']) => events.filter(event => event.kind === kind)
  const marks = of('mark').map(mark => `v${mark.number}`)
  const swaps = of('fitted').slice(1).map((event, index) => `on ${day(event.at)} from ${of('fitted')[index]?.serial ?? 'another unit'} to ${event.serial ?? 'another'}`)
  const marksTold = marks.length === 0 ? 'none marked known-good' : `${plural(marks.length, 'known-good mark')} (${marks.join(', ')})`
  const unitsTold = swaps.length === 0 ? '' : `, the unit changed ${swaps.join(' and ')}`
  const offTold = input.off ? ` Today’s v${input.off.number} is off its known-good.` : ''
  return `Life of ${tag} since ${day(first.at)}: ${plural(of('version').length, 'version')}, ${marksTold}${unitsTold}.${offTold}`
}
