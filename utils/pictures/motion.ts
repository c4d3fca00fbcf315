import type { Profile } from '#shared/motion/profile'
import { acrossTexts, chartHeight, endTexts, round, timeChart, type ChartLine, type CurveLayout, type TimeChart } from './time-chart'

/*
 * Speed or position over time, old and new on one time base, or one alone. Pieces are exact: a stretch of constant
 * acceleration is a straight line in speed and one quadratic curve in position, no matter how wide the picture is.
 */

/** What is drawn of a movement: a move's profile, or a whole chain. */
export type Course = Pick<Profile, 'segments' | 'duration' | 'from' | 'end' | 'peakSpeed'>
export interface MotionInput {
  readonly what: 'speed' | 'position'
  readonly before?: Course
  readonly after: Course
  /** Drawn across: limits, or the place of something that it comes near. */
  readonly lines: readonly ChartLine[]
}

type Scale = Pick<TimeChart, 'x' | 'y'>

/** Speeds are drawn upwards whichever way the axis goes: how fast, not whither. */
function speedPath({ segments }: Course, { x, y }: Scale): string {
  return segments.map((segment, index) => {
    const sign = Math.sign(segment.v0 || segment.a)
    const end = segment.v0 + segment.a * (segment.t1 - segment.t0)
    return `${index === 0 ? 'M' : 'L'}${round(x(segment.t0))} ${round(y(segment.v0 * sign))}L${round(x(segment.t1))} ${round(y(end * sign))}`
  }).join('')
}

function positionPath({ segments }: Course, { x, y }: Scale): string {
  return segments.map((segment, index) => {
    const time = segment.t1 - segment.t0
    const end = segment.x0 + segment.v0 * time + segment.a * time ** 2 / 2
    const begin = index === 0 ? `M${round(x(segment.t0))} ${round(y(segment.x0))}` : ''
    return `${begin}Q${round(x(segment.t0 + time / 2))} ${round(y(segment.x0 + segment.v0 * time / 2))} ${round(x(segment.t1))} ${round(y(end))}`
  }).join('')
}

function rangeOf(what: MotionInput['what'], courses: readonly Course[], lines: readonly ChartLine[]): readonly [number, number] {
  const across = lines.map(line => line.at)
  if (what === 'speed') return [0, Math.max(...courses.map(course => course.peakSpeed), ...across) * 1.06 || 1]
  // A segment never turns round: where each begins, and where the last ends, are the furthest places there are.
  const places = [...courses.flatMap(({ from, end, segments }) => [from, end, ...segments.map(segment => segment.x0)]), ...across]
  const [low, high] = [Math.min(...places), Math.max(...places)]
  const air = (high - low) * 0.08 || 1
  return [low - (low === 0 ? 0 : air), high + air]
}

/** Lays one picture out for a width in pixels; its height is always the same. */
export function layoutMotion({ what, before, after, lines }: MotionInput, width: number): CurveLayout {
  const sides = [...(before ? [{ one: before, tone: 'before' as const }] : []), { one: after, tone: 'after' as const }]
  const courses = sides.map(side => side.one)
  const [low, high] = rangeOf(what, courses, lines)
  const chart = timeChart(low, high, Math.max(...courses.map(course => course.duration)), width)
  const { x, y, left, right, foot } = chart
  const path = what === 'speed' ? speedPath : positionPath
  const endOf = (one: Course) => what === 'speed' ? 0 : one.end
  return {
    width, height: chartHeight, frame: chart.frame, grid: chart.grid, zero: '',
    curves: sides.map(({ one, tone }) => ({ tone, d: path(one, chart) })),
    drops: sides.map(({ one, tone }) => ({ tone, d: `M${round(x(one.duration))} ${round(y(endOf(one)))}V${foot + 20}` })),
    ends: what === 'speed' ? [] : sides.map(({ one, tone }) => ({ tone, x: round(x(one.duration)), y: round(y(one.end)) })),
    lines: lines.map(({ at, tone = 'line' }) => ({ tone, d: `M${left} ${round(y(at))}H${right}` })),
    texts: [
      ...chart.texts, ...acrossTexts(lines, chart),
      ...endTexts(sides.map(({ one, tone }) => ({ seconds: one.duration, tone })).reverse(), chart),
    ],
  }
}
