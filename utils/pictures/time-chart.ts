import { figure, scaleSteps, scaleTicks, textWidth, type Anchor } from '#shared/pictures/scale'

/*
 * The ground of a picture over time: frame, values at the left, seconds below, end times dropped under the axis. Its height
 * is always the same, whatever the width.
 */

export const chartHeight = 250
const top = 26
const foot = 196

export type ChartTone = 'before' | 'after' | 'line'
/** Class of a text by what it belongs to. */
export const chartTones: Readonly<Record<ChartTone, string>> = { before: 't-b', after: 't-a', line: '' }
export interface ChartText { readonly x: number, readonly y: number, readonly text: string, readonly anchor: Anchor, readonly tone: ChartTone }
export interface ChartLine {
  readonly at: number
  readonly word: string
  /** Its name in the colour of the side that it belongs to. */
  readonly tone?: ChartTone
  /** Where its name stands; at the right unless the curve is there. */
  readonly side?: 'left' | 'right'
}

interface Toned { readonly d: string, readonly tone: ChartTone }
/** A picture over time as it is drawn: what was before what is, so that what is lies on top. */
export interface CurveLayout {
  readonly width: number
  readonly height: number
  readonly frame: string
  readonly grid: string
  /** The level of nothing, where a picture has two sides. */
  readonly zero: string
  readonly curves: readonly Toned[]
  /** Limits and places, dashed. */
  readonly lines: readonly Toned[]
  readonly drops: readonly Toned[]
  readonly ends: readonly { readonly x: number, readonly y: number, readonly tone: ChartTone }[]
  readonly texts: readonly ChartText[]
}

export interface TimeChart {
  readonly left: number
  readonly right: number
  readonly foot: number
  readonly x: (seconds: number) => number
  readonly y: (value: number) => number
  readonly frame: string
  readonly grid: string
  readonly texts: readonly ChartText[]
}

export const round = (value: number) => Number(value.toFixed(2))

/** Lays the ground out for values from low to high and seconds from 0 to a little beyond `seconds`. */
export function timeChart(low: number, high: number, seconds: number, width: number): TimeChart {
  const end = seconds * 1.04 || 1
  const left = 48
  const right = width - 8
  const x = (t: number) => left + t / end * (right - left)
  const y = (value: number) => foot - (value - low) / (high - low) * (foot - top)
  const values = scaleTicks(low, high, { tick: scaleSteps((foot - top) / (high - low), 'linear', 34).label, label: 1e9 })
  const times = scaleTicks(0, end, { tick: scaleSteps((right - left) / end, 'linear', 60).label, label: 1e9 })
  return {
    left, right, foot, x, y,
    frame: `M${left} ${top - 6}V${foot}H${right}`,
    grid: values.filter(tick => tick.at > low).map(tick => `M${left} ${round(y(tick.at))}H${right}`).join(''),
    texts: [
      ...values.map((tick): ChartText => ({ x: left - 6, y: round(y(tick.at)) + 4, text: figure(tick.at), anchor: 'end', tone: 'line' })),
      ...times.map((tick): ChartText => ({ x: round(x(tick.at)), y: foot + 15, text: figure(tick.at), anchor: 'middle', tone: 'line' })),
    ],
  }
}

/** Lines across the picture, each named on itself; a name that would touch another stands at the other end. */
export function acrossTexts(lines: readonly ChartLine[], { left, right, y }: TimeChart): ChartText[] {
  const placed: ChartText[] = []
  for (const { at, word, side = 'right', tone = 'line' } of [...lines].sort((one, other) => one.at - other.at)) {
    const wanted: Anchor = side === 'right' ? 'end' : 'start'
    const height = round(y(at)) - 5
    const touches = placed.some(other => other.anchor === wanted && Math.abs(other.y - height) < 14)
    const anchor = touches ? wanted === 'end' ? 'start' : 'end' : wanted
    placed.push({ x: anchor === 'end' ? right - 2 : left + 4, y: height, text: `${word} ${figure(at)}`, anchor, tone })
  }
  return placed
}

/** End times below the axis, one row apart where they would touch. */
export function endTexts(ends: readonly { readonly seconds: number, readonly tone: ChartTone }[], { x, right }: TimeChart): ChartText[] {
  const placed: ChartText[] = []
  for (const { seconds, tone } of ends) {
    const text = figure(Number(seconds.toFixed(3)))
    const half = textWidth(text) / 2
    const one: ChartText = { x: round(Math.min(Math.max(x(seconds), half), right - half)), y: foot + 34, text, anchor: 'middle', tone }
    const touches = placed.some(other => Math.abs(one.x - other.x) < (textWidth(one.text) + textWidth(other.text)) / 2 + 6)
    placed.push(touches ? { ...one, y: one.y + 15 } : one)
  }
  return placed
}
