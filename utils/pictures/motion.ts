import type { Profile } from '#shared/motion/profile'
import { figure, scaleSteps, scaleTicks, textWidth, type Anchor } from './scale'

/*
 * Speed or position over time, old and new on one time base. Pieces are exact: a stretch of constant acceleration is a
 * straight line in speed and one quadratic curve in position, no matter how wide the picture is.
 */

export interface MotionLine { readonly at: number, readonly word: string }
export interface MotionInput {
  readonly what: 'speed' | 'position'
  readonly before: Profile
  readonly after: Profile
  /** Drawn across: a limit or the place of something that it comes near. */
  readonly line?: MotionLine
}

export interface MotionText { readonly x: number, readonly y: number, readonly text: string, readonly anchor: Anchor, readonly tone: 'before' | 'after' | 'line' }
export interface MotionLayout {
  readonly width: number
  readonly height: number
  readonly frame: string
  readonly grid: string
  readonly before: string
  readonly after: string
  readonly drops: readonly { readonly d: string, readonly tone: 'before' | 'after' }[]
  readonly ends: readonly { readonly x: number, readonly y: number, readonly tone: 'before' | 'after' }[]
  readonly line: string
  readonly texts: readonly MotionText[]
}

const height = 250
const top = 26
const foot = 196
const round = (value: number) => Number(value.toFixed(2))
const seconds = (value: number) => figure(Number(value.toFixed(3)))

interface Scale { readonly x: (t: number) => number, readonly y: (value: number) => number }

/** Speeds are drawn upwards whichever way the axis goes: how fast, not whither. */
function speedPath({ segments }: Profile, { x, y }: Scale): string {
  return segments.map((segment, index) => {
    const sign = Math.sign(segment.v0 || segment.a)
    const end = segment.v0 + segment.a * (segment.t1 - segment.t0)
    return `${index === 0 ? 'M' : 'L'}${round(x(segment.t0))} ${round(y(segment.v0 * sign))}L${round(x(segment.t1))} ${round(y(end * sign))}`
  }).join('')
}

function positionPath({ segments }: Profile, { x, y }: Scale): string {
  return segments.map((segment, index) => {
    const time = segment.t1 - segment.t0
    const end = segment.x0 + segment.v0 * time + segment.a * time ** 2 / 2
    const begin = index === 0 ? `M${round(x(segment.t0))} ${round(y(segment.x0))}` : ''
    return `${begin}Q${round(x(segment.t0 + time / 2))} ${round(y(segment.x0 + segment.v0 * time / 2))} ${round(x(segment.t1))} ${round(y(end))}`
  }).join('')
}

function rangeOf({ what, before, after, line }: MotionInput): readonly [number, number] {
  if (what === 'speed') return [0, Math.max(before.peakSpeed, after.peakSpeed, line?.at ?? 0) * 1.06 || 1]
  const places = [before.from, before.end, after.from, after.end, ...(line ? [line.at] : [])]
  const [low, high] = [Math.min(...places), Math.max(...places)]
  const air = (high - low) * 0.08 || 1
  return [low - (low === 0 ? 0 : air), high + air]
}

/** Two end times below the axis, one row apart where they would touch. */
function timeTexts(before: number, after: number, x: (t: number) => number, right: number): MotionText[] {
  const place = (at: number, tone: 'before' | 'after', row: number): MotionText => {
    const text = seconds(at)
    const half = textWidth(text) / 2
    return { x: round(Math.min(Math.max(x(at), half), right - half)), y: foot + 34 + row * 15, text, anchor: 'middle', tone }
  }
  const [a, b] = [place(after, 'after', 0), place(before, 'before', 0)]
  const touch = Math.abs(a.x - b.x) < (textWidth(a.text) + textWidth(b.text)) / 2 + 6
  return [a, touch ? { ...b, y: b.y + 15 } : b]
}

/** Lays one picture out for a width in pixels; its height is always the same. */
export function layoutMotion(input: MotionInput, width: number): MotionLayout {
  const { before, after, what, line } = input
  const [low, high] = rangeOf(input)
  const end = Math.max(before.duration, after.duration) * 1.04 || 1
  const left = 48
  const right = width - 8
  const x = (t: number) => left + t / end * (right - left)
  const y = (value: number) => foot - (value - low) / (high - low) * (foot - top)
  const scale = { x, y }
  const values = scaleTicks(low, high, { tick: scaleSteps((foot - top) / (high - low), 'linear', 34).label, label: 1e9 })
  const timeStep = scaleSteps((right - left) / end, 'linear', 60).label
  const times = scaleTicks(0, end, { tick: timeStep, label: 1e9 })
  const path = what === 'speed' ? speedPath : positionPath
  const endOf = (one: Profile) => what === 'speed' ? 0 : one.end
  const sides = [{ one: before, tone: 'before' as const }, { one: after, tone: 'after' as const }]
  return {
    width, height,
    frame: `M${left} ${top - 6}V${foot}H${right}`,
    grid: values.filter(tick => tick.at > low).map(tick => `M${left} ${round(y(tick.at))}H${right}`).join(''),
    before: path(before, scale), after: path(after, scale),
    drops: sides.map(({ one, tone }) => ({ tone, d: `M${round(x(one.duration))} ${round(y(endOf(one)))}V${foot + 20}` })),
    ends: what === 'speed' ? [] : sides.map(({ one, tone }) => ({ tone, x: round(x(one.duration)), y: round(y(one.end)) })),
    line: line ? `M${left} ${round(y(line.at))}H${right}` : '',
    texts: [
      ...values.map((tick): MotionText => ({ x: left - 6, y: round(y(tick.at)) + 4, text: figure(tick.at), anchor: 'end', tone: 'line' })),
      ...times.map((tick): MotionText => ({ x: round(x(tick.at)), y: foot + 15, text: figure(tick.at), anchor: 'middle', tone: 'line' })),
      ...(line ? [{ x: right - 2, y: round(y(line.at)) - 5, text: `${line.word} ${figure(line.at)}`, anchor: 'end' as const, tone: 'line' as const }] : []),
      ...timeTexts(before.duration, after.duration, x, right),
    ],
  }
}
