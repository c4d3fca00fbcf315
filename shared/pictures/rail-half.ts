import { crowdBox, type CrowdBox } from './balloons'
import type { RailMove, RailSide } from './rail-input'
import { figure, tenth, textWidth, type Anchor, type PlacedLabel } from './scale'
import { laneIntervals, stackBalloons } from './stack'

/*
 * One side of the rail. Three bands lie between the rule and the balloons: feet (arrows), lanes for presses, leaders; nothing
 * in one band meets anything in another.
 */

const footBand = 12
const laneHeight = 11
const mostLanes = 4
const mostRows = 4

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

/** Where places fall, and how large a balloon is. */
export interface Frame { readonly x: (at: number) => number, readonly radius: number, readonly step: number, readonly left: number, readonly right: number, readonly small: boolean }
type Placed = RailMove & { readonly px: number }
/** A side with its balloons stacked and its presses in lanes. */
export interface Arranged {
  readonly side: RailSide
  readonly stack: ReturnType<typeof stackBalloons<Placed>>
  readonly lanes: ReturnType<typeof laneIntervals<Placed & { from: number, to: number }>>
  /** Height from the rule to the lowest balloon, and to the top of all of them. */
  readonly reach: number
  readonly height: number
}

/** Stacks the balloons of a side and lays its presses in lanes; `height` is what it takes from the rule on. */
export function arrange(side: RailSide, frame: Frame): Arranged {
  const items: Placed[] = side.moves.map(move => ({ ...move, px: tenth(frame.x(move.target)) }))
  const presses = items.flatMap(item => item.approach === undefined ? [] : [{ ...item, from: tenth(frame.x(item.approach)), to: item.px }])
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

/** What stands on one side of the rule: `edge` is the rule, `outer` the far end, `outward` the way from one to the other (−1 up). */
export function drawHalf(arranged: Arranged, frame: Frame, edge: number, outward: -1 | 1, tone: Tone, outer: number, limitTone: Tone): RailHalf {
  const { side, stack, lanes, reach } = arranged
  const toneOf = (changed: boolean): Tone => changed ? tone : 'line'
  const cy = (row: number) => tenth(edge + outward * (reach + row * frame.step + frame.radius))
  const laneY = (lane: number) => tenth(edge + outward * (footBand + (lane + 0.5) * laneHeight))
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
    .flatMap(limit => limit.at === undefined ? [] : [{ way: limit.way, px: tenth(frame.x(limit.at)), text: word + figure(limit.at) }])
  const [low, high] = limits
  const meet = low && high && high.px - low.px < textWidth(low.text) + textWidth(high.text) + 16
  const named = limits.map(limit => ({ ...limit, way: meet ? -limit.way : limit.way }))
  return {
    lines: named.map(limit => ({ tone, d: `M${limit.px} ${outer}V${edge}` })),
    texts: named.map(limit => ({ x: limit.px + limit.way * 5, anchor: limit.way > 0 ? 'start' : 'end', y: outer + 4, text: limit.text, tone: 'line' })),
  }
}
