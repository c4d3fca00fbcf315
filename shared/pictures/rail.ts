import type { RailInput, RailSide } from './rail-input'
import { arrange, drawHalf, type Frame, type RailHalf, type Tone } from './rail-half'
import { figure, scaleLabels, scaleSteps, scaleTicks, tenth, textWidth, type Anchor, type PlacedLabel } from './scale'

/*
 * The rail, laid out for a width in pixels, so that its text stays 12 px at every width: a screen has its measured one, paper
 * its own.
 */

export interface Box { readonly x: number, readonly y: number, readonly width: number, readonly height: number }

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
  const top = Math.floor(0.5 + 34 + upper.height)
  const bottom = top + (small ? 24 : 28)
  const height = Math.floor(0.5 + (lower ? bottom + lower.height + 26 : bottom + 14))
  const steps = scaleSteps(perUnit, input.axisKind, Math.max(textWidth(figure(tenth(input.low))), textWidth(figure(tenth(input.high)))) + 12)
  const ticks = scaleTicks(input.low, input.high, steps)
  const limitsMoved = input.lower !== undefined && !sameLimits(input.upper, input.lower)
  const zones = zonesOf(input, frame, top, bottom)
  const ends = endsOf(input, frame, top, bottom)
  return {
    width, height, radius,
    hatches: [...ends.hatches, ...zones.hatches], zoneEdges: zones.edges, stops: ends.stops, wraps: ends.wraps,
    rule: `M${tenth(left)} ${top}H${tenth(right)}M${tenth(left)} ${bottom}H${tenth(right)}`,
    ticks: ticks.map(tick => `M${tenth(x(tick.at))} ${bottom}v-${tick.height}`).join(''),
    labels: scaleLabels(ticks, steps.label, at => tenth(x(at)), left, right), labelY: top + 12,
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
  const drawn = bands.flatMap(band => band.zones.map(zone => ({ from: tenth(frame.x(zone.from)), to: tenth(frame.x(zone.to)), band })))
  return {
    hatches: drawn.map(({ from, to, band }) => ({ x: Math.min(from, to), y: band.from, width: tenth(Math.abs(to - from)), height: band.to - band.from })),
    edges: drawn.map(({ from, to, band }) => `M${from} ${band.from}V${band.to}M${to} ${band.from}V${band.to}`).join(''),
  }
}

function endsOf(input: RailInput, frame: Frame, top: number, bottom: number): { hatches: Box[], stops: string, wraps: string } {
  const bars = (from: number, to: number) => `M${from} ${top - 8}V${bottom + 8}M${to} ${top - 8}V${bottom + 8}`
  if (input.wraps) return { hatches: [], stops: '', wraps: bars(tenth(frame.left), tenth(frame.right)) }
  if (!input.stops) return { hatches: [], stops: '', wraps: '' }
  const [low, high] = [tenth(frame.x(input.stops.low)), tenth(frame.x(input.stops.high))]
  const hatch = (x: number): Box => ({ x, y: top - 8, width: 11, height: bottom - top + 16 })
  return { hatches: [hatch(low - 11), hatch(high)], stops: bars(low, high), wraps: '' }
}
