import { clearOf, type PlacedText, type Spot } from './labels'
import { balloonRadius, crowdBox, type CrowdBox } from '#shared/pictures/balloons'
import { figure, scaleSteps, scaleTicks, textWidth } from '#shared/pictures/scale'
import { stackBalloons } from '#shared/pictures/stack'
import { round } from './time-chart'
import { timeTicks, type TimeTick } from './time-scale'

/*
 * A value over time. It is a step, never a slope: what was read holds until something else was read. Each change is a balloon
 * above the picture with a leader down to it; numbers stand on a scale, words and switches on a level each. What was
 * known-good is a channel about its value, so that a line which is off leaves it.
 */

/** Null: not set, the line breaks. */
export type StepValue = number | string | boolean | null
export interface StepPoint {
  /** Milliseconds. */
  readonly at: number
  readonly value: StepValue
  /** The number in its balloon; without one it is where the record begins. */
  readonly balloon?: number
  /** Wants someone: filled, in harm. */
  readonly hot?: boolean
}
interface Lasting { readonly from: number, readonly to: number, readonly label: string }
export interface StepBand extends Lasting { readonly value: StepValue }
/** A limit from outside the settings, dashed in harm. */
export interface StepLimit extends Lasting { readonly at: number }
/** The same value of an axis like it, as thin steps on the same scale and the same time. */
export interface StepSister { readonly tag: string, readonly points: readonly Pick<StepPoint, 'at' | 'value'>[] }
export interface StepsInput {
  /** Oldest first. */
  readonly points: readonly StepPoint[]
  readonly until: number
  readonly zone: string
  readonly bands: readonly StepBand[]
  readonly limits: readonly StepLimit[]
  /** Where another unit came in. */
  readonly cuts: readonly { readonly at: number, readonly label: string }[]
  readonly sisters?: readonly StepSister[]
}

type Tone = 'line' | 'after' | 'harm'
export interface StepText extends PlacedText { readonly tone: Tone }
export interface StepsLayout {
  readonly width: number
  readonly height: number
  readonly foot: number
  readonly frame: string
  readonly grid: string
  readonly ticks: readonly TimeTick[]
  readonly line: string
  readonly sisters: string
  readonly bands: string
  readonly limits: string
  readonly cuts: string
  readonly leaders: string
  readonly balloons: readonly { readonly x: number, readonly y: number, readonly number: number, readonly hot: boolean }[]
  readonly crowds: readonly CrowdBox[]
  readonly texts: readonly StepText[]
}

const plot = 150
const channel = 5
const rowHeight = 2 * balloonRadius + 3
const mostRows = 3

export const stepWord = (value: StepValue): string => value === null ? 'not set' : typeof value === 'boolean' ? value ? 'on' : 'off' : typeof value === 'number' ? figure(value) : value

interface Scale { readonly y: (value: StepValue) => number | undefined, readonly ticks: readonly { readonly at: StepValue, readonly y: number }[] }

/** Limits further off than twice the values would press the line flat: they are told beside the picture. */
export function nearLimits({ points, bands, limits }: Pick<StepsInput, 'points' | 'bands' | 'limits'>): StepLimit[] {
  const reach = Math.max(0, ...[...points, ...bands].map(({ value }) => typeof value === 'number' ? Math.abs(value) : 0))
  return limits.filter(({ at }) => Math.abs(at) <= 2 * reach)
}

function numberScale(values: readonly number[], top: number): Scale {
  const [lowest, highest] = [Math.min(...values), Math.max(...values)]
  const air = (highest - lowest) * 0.15 || Math.abs(highest) * 0.1 || 1
  const [low, high] = [lowest - air, highest + air]
  const y = (value: number) => round(top + (high - value) / (high - low) * plot)
  const ticks = scaleTicks(low, high, { tick: scaleSteps(plot / (high - low), 'linear', 34).label, label: 1e9 })
  return { y: value => typeof value === 'number' ? y(value) : undefined, ticks: ticks.map(({ at }) => ({ at, y: y(at) })) }
}

/** Words on a level each, in the order in which they came, the first at the foot. */
function wordScale(values: readonly StepValue[], top: number): Scale {
  const levels = [...new Set(values)]
  const y = (value: StepValue) => levels.includes(value) ? round(top + plot - (levels.indexOf(value) + 0.5) * plot / levels.length) : undefined
  return { y, ticks: levels.map(at => ({ at, y: y(at) ?? 0 })) }
}

/** Lays the picture out for a width in pixels; the height follows from how many balloons stand over one another. */
export function layoutSteps(input: StepsInput, width: number): StepsLayout {
  const { points, until, zone, bands, cuts, sisters = [] } = input
  const limits = nearLimits(input)
  const held = [...points, ...bands, ...sisters.flatMap(sister => sister.points)].flatMap(({ value }) => value === null ? [] : [value])
  const numbers = held.filter(value => typeof value === 'number')
  const numeric = numbers.length === held.length
  const sample = numeric ? numberScale([...numbers, ...limits.map(({ at }) => at)], 0).ticks : wordScale(held, 0).ticks
  const left = Math.ceil(Math.max(36, ...sample.map(({ at }) => textWidth(stepWord(at)) + 12)))
  const right = width - 14
  const first = points[0]?.at ?? until
  const from = first - Math.max(1, until - first) * 0.02
  const x = (at: number) => round(left + Math.min(1, Math.max(0, (at - from) / (until - from || 1))) * (right - left))
  const balloons = stackBalloons(points.flatMap(({ at, balloon, hot = false }) => balloon === undefined ? [] : [{ move: balloon, px: x(at), changed: hot }]), rowHeight, mostRows, 40)
  const bandRows = balloons.rows + (balloons.crowds.length ? 1 : 0)
  const head = (cuts.length ? 20 : 4) + bandRows * rowHeight
  const top = head + 12
  const foot = top + plot
  const { y, ticks } = numeric ? numberScale([...numbers, ...limits.map(({ at }) => at)], top) : wordScale(held, top)
  const cy = (row: number) => round(head - balloonRadius - row * rowHeight)
  const valueOf = new Map(points.map(point => [point.balloon, point.value]))
  const stepY = (number: number) => y(valueOf.get(number) ?? null) ?? foot
  return {
    width, height: foot + 22, foot,
    frame: `M${left} ${top - 4}V${foot}H${right}`,
    grid: ticks.filter(tick => tick.y < foot - 1).map(tick => `M${left} ${tick.y}H${right}`).join(''),
    ticks: timeTicks(from, until, left, right, zone),
    line: linePath(points, x, y, right),
    sisters: sisters.map(sister => linePath(since(sister.points, first), x, y, right)).join(''),
    bands: bands.map(band => channelPath(x(band.from), x(band.to), y(band.value))).join(''),
    limits: limits.map(limit => `M${x(limit.from)} ${y(limit.at)}H${x(limit.to)}`).join(''),
    cuts: cuts.map(({ at }) => `M${x(at)} 4V${foot}`).join(''),
    leaders: balloons.placed.map(({ item, row }) => `M${item.px} ${cy(row)}V${stepY(item.move)}`).join(''),
    balloons: balloons.placed.map(({ item, row }) => ({ x: item.px, y: cy(row), number: item.move, hot: item.changed })),
    crowds: balloons.crowds.map(crowd => crowdBox(crowd, cy(balloons.rows), left, right)),
    texts: [
      ...ticks.map(({ at, y: height }): StepText => ({ x: left - 6, y: height + 4, text: stepWord(at), anchor: 'end', tone: 'line' })),
      ...cutTexts(cuts, x, right),
      ...placeTexts(input, limits, numeric, { x, y, right, top, foot }),
    ],
  }
}

type Across = (at: number) => number

/** What happened before the picture begins stands as the one value that it led to. */
function since(points: StepSister['points'], first: number): StepSister['points'] {
  const begun = points.findLastIndex(({ at }) => at <= first)
  return begun === -1 ? points : points.slice(begun)
}

function linePath(points: StepSister['points'], x: Across, y: Scale['y'], right: number): string {
  let joined = false
  return points.map(({ at, value }, index) => {
    const height = y(value)
    const next = points[index + 1]
    const end = next ? x(next.at) : right
    const begin = height === undefined ? '' : joined ? `V${height}` : `M${x(at)} ${height}`
    joined = height !== undefined
    return height === undefined ? '' : `${begin}H${end}`
  }).join('')
}

function channelPath(from: number, to: number, y: number | undefined): string {
  return y === undefined ? '' : `M${to} ${y - channel}H${from}V${y + channel}H${to}`
}

/** Beside the cut where there is room; of two that would meet the later is left to the table. */
function cutTexts(cuts: StepsInput['cuts'], x: Across, right: number): StepText[] {
  const placed: Spot[] = []
  return cuts.flatMap(({ at, label }): StepText[] => {
    const found = clearOf([{ x: x(at) + 5, y: 12, text: label, anchor: 'start' }, { x: x(at) - 5, y: 12, text: label, anchor: 'end' }], placed, right)
    return found ? [{ ...found, tone: 'line' }] : []
  })
}

interface Ground { readonly x: Across, readonly y: Scale['y'], readonly right: number, readonly top: number, readonly foot: number }

/** Names of limits, values at their line, names of what was known-good: each where nothing else stands, or not at all. */
function placeTexts({ points, bands }: StepsInput, limits: readonly StepLimit[], numeric: boolean, { x, y, right, top, foot }: Ground): StepText[] {
  const placed: Spot[] = []
  const put = (text: string, tone: Tone, spots: readonly Omit<PlacedText, 'text'>[]): StepText[] => {
    const found = clearOf(spots.filter(spot => spot.y > top && spot.y < foot - 2).map(spot => ({ ...spot, text })), placed, right)
    return found ? [{ ...found, tone }] : []
  }
  const along = (from: number, to: number, height: number, above: number, below: number): Omit<PlacedText, 'text'>[] => [
    { x: from + 5, y: height - above, anchor: 'start' }, { x: to - 4, y: height - above, anchor: 'end' },
    { x: from + 5, y: height + below, anchor: 'start' }, { x: to - 4, y: height + below, anchor: 'end' },
  ]
  const last = points.at(-1)
  const pieces = points.flatMap((point, index) => {
    const [from, to, height] = [x(point.at), points[index + 1] ? x(points[index + 1]?.at ?? 0) : right, y(point.value)]
    const text = stepWord(point.value)
    return numeric && height !== undefined && (point === last || to - from >= textWidth(text) + 10) ? [{ point, text, from, to, height }] : []
  })
  return [
    ...limits.flatMap(limit => put(limit.label, 'harm', along(x(limit.from), x(limit.to), y(limit.at) ?? 0, 5, 15))),
    ...pieces.toReversed().flatMap(({ point, text, from, to, height }) => put(text, point.hot ? 'harm' : 'after', point === last ? along(from, to, height, 9, 19).toReversed() : along(from, to, height, 9, 19))),
    ...bands.flatMap(band => x(band.to) - x(band.from) < textWidth(band.label) ? [] : put(band.label, 'line', along(x(band.from), x(band.to), y(band.value) ?? 0, 9, 19))),
  ]
}
