import { crowdBox, type CrowdBox } from './balloons'
import type { RailInput, RailMove, RailSide } from './rail-input'
import { figure, scaleLabels, scaleSteps, scaleTicks, textWidth, type Anchor, type PlacedLabel } from './scale'
import { laneIntervals, stackBalloons } from './stack'

/*
 * The rail, laid out for the width that was measured, so that its text stays 12 px at every width. Three bands lie between
 * the rule and the balloons: feet (arrows), lanes for presses, leaders; nothing in one band meets anything in another.
 */

const footBand = 12
const laneHeight = 11
const mostLanes = 4
const mostRows = 4

export interface Box { readonly x: number, readonly y: number, readonly width: number, readonly height: number }
export interface RailText extends PlacedLabel { readonly y: number, readonly tone: Tone }
export type Tone = 'before' | 'after' | 'ink' | 'line'
interface Toned { readonly tone: Tone, readonly d: string }
export interface RailBalloon { readonly x: number, readonly y: number, readonly move: number, readonly tone: Tone, readonly filled: boolean }
export interface RailPress { readonly bar: string, readonly head: string | null, readonly ringX: number, readonly y: number, readonly tone: Tone }

export interface RailHalf {
  readonly leaders: readonly Toned[]
  readonly feet: readonly Toned[]
  readonly presses: readonly RailPress[]
  readonly balloons: readonly RailBalloon[]
  readonly crowds: readonly CrowdBox[]
  readonly softLines: readonly Toned[]
  readonly texts: readonly RailText[]
  /** Presses folded to one bar, to be named beside the picture. */
  readonly folds: readonly { readonly from: number, readonly to: number, readonly moves: readonly number[] }[]
}

export interface RailLayout {
  readonly width: number
  readonly height: number
  readonly radius: number
  readonly hatches: readonly Box[]
  readonly zoneEdges: string
  readonly stops: string
  readonly rule: string
  readonly ticks: string
  readonly labels: readonly PlacedLabel[]
  readonly labelY: number
  readonly wraps: string
  readonly halves: readonly RailHalf[]
}

const round = (value: number) => Number(value.toFixed(1))

interface Frame { readonly x: (at: number) => number, readonly radius: number, readonly step: number, readonly left: number, readonly right: number, readonly small: boolean }
type Placed = RailMove & { readonly px: number }
interface Arranged {
  readonly side: RailSide
  readonly stack: ReturnType<typeof stackBalloons<Placed>>
  readonly lanes: ReturnType<typeof laneIntervals<Placed & { from: number, to: number }>>
  /** Height from the rule to the lowest balloon, and to the top of all of them. */
  readonly reach: number
  readonly height: number
}

function arrange(side: RailSide, frame: Frame): Arranged {
  const items: Placed[] = side.moves.map(move => ({ ...move, px: round(frame.x(move.target)) }))
  const presses = items.flatMap(item => item.approach === undefined ? [] : [{ ...item, from: round(frame.x(item.approach)), to: item.px }])
  const stack = stackBalloons(items, frame.step, mostRows, 40)
  const lanes = laneIntervals(presses, mostLanes, 24)
  const reach = footBand + lanes.count * laneHeight + 8
  const rows = stack.rows + (stack.crowds.length ? 1 : 0)
  return { side, stack, lanes, reach, height: reach + rows * frame.step }
}

function pressOf(from: number, to: number, y: number, tone: Tone): RailPress {
  const way = Math.sign(to - from) || 1
  const arrow = Math.abs(to - from) >= 20
  const bar = arrow ? `M${from} ${y}H${to - way * 7}` : `M${from} ${y}H${to}M${to} ${y - 5}v10`
  return { bar, head: arrow ? `M${to} ${y}l${-way * 9} -4.5v9z` : null, ringX: from, y, tone }
}

function drawHalf(arranged: Arranged, frame: Frame, edge: number, outward: -1 | 1, tone: Tone, outer: number, limitTone: Tone): RailHalf {
  const { side, stack, lanes, reach } = arranged
  const toneOf = (changed: boolean): Tone => changed ? tone : 'line'
  const cy = (row: number) => round(edge + outward * (reach + row * frame.step + frame.radius))
  const laneY = (lane: number) => round(edge + outward * (footBand + (lane + 0.5) * laneHeight))
  const rows = stack.rows
  const folds = lanes.folded.map(knot => ({ from: Math.min(...knot.map(one => one.from)), to: Math.max(...knot.map(one => one.to)), moves: knot.map(one => one.move).sort((a, b) => a - b) }))
  const numbers: RailText[] = lanes.placed.map(({ item, lane }) => besideRing(item.from, item.to, laneY(lane), String(item.move), tone))
  const counts: RailText[] = folds.map(fold => besideRing(fold.from, fold.to, laneY(0), `${fold.moves.length}×`, tone))
  const soft = softOf(side, frame, edge, outer, limitTone)
  return {
    leaders: stack.placed.map(({ item, row }) => ({ tone: toneOf(item.changed), d: `M${item.px} ${edge}V${cy(row)}` })),
    feet: stack.placed.filter(({ item }) => item.kind === 'absolute' && item.direction !== 0).map(({ item }) => ({ tone: toneOf(item.changed), d: `M${item.px} ${edge + outward * 6}l${-item.direction * 8} -4v8z` })),
    presses: [
      ...lanes.placed.map(({ item, lane }) => pressOf(item.from, item.to, laneY(lane), tone)),
      ...folds.map(fold => pressOf(fold.from, fold.to, laneY(0), tone)),
    ],
    balloons: stack.placed.map(({ item, row }) => ({ x: item.px, y: cy(row), move: item.move, tone: toneOf(item.changed), filled: item.changed && tone === 'after' })),
    crowds: stack.crowds.map(crowd => crowdBox(crowd, cy(rows), frame.left, frame.right, frame.radius)),
    softLines: soft.lines,
    texts: [...numbers, ...counts, ...soft.texts],
    folds: lanes.folded.map(knot => ({
      from: Math.min(...knot.map(one => one.approach ?? one.target)), to: Math.max(...knot.map(one => one.target)), moves: knot.map(one => one.move).sort((a, b) => a - b),
    })),
  }
}

function besideRing(from: number, to: number, y: number, text: string, tone: Tone): RailText {
  const anchor: Anchor = to >= from ? 'end' : 'start'
  return { x: from + (to >= from ? -6 : 6), y: y + 4.2, text, anchor, tone }
}

/** Soft limits named at the outer edge, inwards of their lines; outwards where the two names would meet. */
function softOf(side: RailSide, frame: Frame, edge: number, outer: number, tone: Tone): { lines: Toned[], texts: RailText[] } {
  const word = frame.small ? '' : side.limitsHeld ? 'soft ' : 'soft, off '
  const limits = [{ at: side.softMin, way: 1 }, { at: side.softMax, way: -1 }]
    .flatMap(limit => limit.at === undefined ? [] : [{ way: limit.way, px: round(frame.x(limit.at)), text: word + figure(limit.at) }])
  const [low, high] = limits
  const meet = low && high && high.px - low.px < textWidth(low.text) + textWidth(high.text) + 16
  const named = limits.map(limit => ({ ...limit, way: meet ? -limit.way : limit.way }))
  return {
    lines: named.map(limit => ({ tone, d: `M${limit.px} ${outer}V${edge}` })),
    texts: named.map(limit => ({ x: limit.px + limit.way * 5, anchor: limit.way > 0 ? 'start' : 'end', y: outer + 4, text: limit.text, tone: 'line' })),
  }
}

const sameLimits = (one: RailSide, other: RailSide) =>
  one.softMin === other.softMin && one.softMax === other.softMax && one.limitsHeld === other.limitsHeld

/** Lays the rail out for a width in pixels; the height follows from what stacks. */
export function layoutRail(input: RailInput, width: number): RailLayout {
  const small = width < 620
  const names = [input.upper.name, ...(input.lower ? [input.lower.name] : [])]
  const left = small ? 14 : Math.min(170, Math.max(84, ...names.map(name => textWidth(name) + 12)))
  const right = width - (small ? 14 : 40)
  const perUnit = (right - left) / (input.high - input.low)
  const x = (at: number) => left + (at - input.low) * perUnit
  const radius = small ? 11 : 11.5
  const frame: Frame = { x, radius, step: 2 * radius + 3, left, right, small }
  const two = input.lower !== undefined
  const upper = arrange(input.upper, frame)
  const lower = input.lower && arrange(input.lower, frame)
  const top = Math.round(34 + upper.height)
  const bottom = top + (small ? 24 : 28)
  const height = Math.round(lower ? bottom + lower.height + 26 : bottom + 14)
  const steps = scaleSteps(perUnit, input.axisKind, Math.max(textWidth(figure(round(input.low))), textWidth(figure(round(input.high)))) + 12)
  const ticks = scaleTicks(input.low, input.high, steps)
  const limitsMoved = input.lower !== undefined && !sameLimits(input.upper, input.lower)
  const zones = zonesOf(input, frame, top, bottom)
  const ends = endsOf(input, frame, top, bottom)
  return {
    width, height, radius,
    hatches: [...ends.hatches, ...zones.hatches], zoneEdges: zones.edges, stops: ends.stops, wraps: ends.wraps,
    rule: `M${round(left)} ${top}H${round(right)}M${round(left)} ${bottom}H${round(right)}`,
    ticks: ticks.map(tick => `M${round(x(tick.at))} ${bottom}v-${tick.height}`).join(''),
    labels: scaleLabels(ticks, steps.label, at => round(x(at)), left, right), labelY: top + 12,
    halves: [
      withName(drawHalf(upper, frame, top, -1, two ? 'before' : 'after', 20, limitsMoved ? 'before' : 'ink'), input.upper.name, small ? { x: width / 2, y: 12, anchor: 'middle' } : { x: 0, y: top - 8, anchor: 'start' }, two ? 'before' : 'line'),
      ...(lower ? [withName(drawHalf(lower, frame, bottom, 1, 'after', height - 20, limitsMoved ? 'after' : 'ink'), lower.side.name, small ? { x: width / 2, y: height - 4, anchor: 'middle' } : { x: 0, y: bottom + 17, anchor: 'start' }, 'after')] : []),
    ],
  }
}

function withName(half: RailHalf, text: string, place: { x: number, y: number, anchor: Anchor }, tone: Tone): RailHalf {
  return { ...half, texts: [...half.texts, { ...place, text, tone }] }
}

/** Zones inside the rule; the upper half shows what was, the lower what is, so that unchanged ones close to one field. */
function zonesOf(input: RailInput, frame: Frame, top: number, bottom: number): { hatches: Box[], edges: string } {
  const half = (top + bottom) / 2
  const bands = input.lower
    ? [{ zones: input.upper.zones, from: top, to: half }, { zones: input.lower.zones, from: half, to: bottom }]
    : [{ zones: input.upper.zones, from: top, to: bottom }]
  const drawn = bands.flatMap(band => band.zones.map(zone => ({ from: round(frame.x(zone.from)), to: round(frame.x(zone.to)), band })))
  return {
    hatches: drawn.map(({ from, to, band }) => ({ x: Math.min(from, to), y: band.from, width: round(Math.abs(to - from)), height: band.to - band.from })),
    edges: drawn.map(({ from, to, band }) => `M${from} ${band.from}V${band.to}M${to} ${band.from}V${band.to}`).join(''),
  }
}

function endsOf(input: RailInput, frame: Frame, top: number, bottom: number): { hatches: Box[], stops: string, wraps: string } {
  const bars = (from: number, to: number) => `M${from} ${top - 8}V${bottom + 8}M${to} ${top - 8}V${bottom + 8}`
  if (input.wraps) return { hatches: [], stops: '', wraps: bars(round(frame.left), round(frame.right)) }
  if (!input.stops) return { hatches: [], stops: '', wraps: '' }
  const [low, high] = [round(frame.x(input.stops.low)), round(frame.x(input.stops.high))]
  const hatch = (x: number): Box => ({ x, y: top - 8, width: 11, height: bottom - top + 16 })
  return { hatches: [hatch(low - 11), hatch(high)], stops: bars(low, high), wraps: '' }
}
