import { figure } from '#shared/pictures/scale'
import { acrossTexts, chartHeight, endTexts, round, timeChart, type ChartTone, type CurveLayout } from './time-chart'

/*
 * Thrust over time against what the limits leave, towards plus above the zero line and towards minus below it. Thrust stays
 * the same while the acceleration does, so every piece is level.
 */

/** One stretch of time: the least and the most thrust that it may ask for, and the limit of each sign, N or N·m. */
export interface ThrustPiece {
  readonly t0: number
  readonly t1: number
  readonly least: number
  readonly most: number
  /** Infinity where nothing limits it. */
  readonly plus: number
  /** As a positive number. */
  readonly minus: number
}

/** Thrust of one movement, or of what was and what is on one time base. */
export interface ThrustInput {
  readonly before?: readonly ThrustPiece[]
  readonly after: readonly ThrustPiece[]
  /** After the point of a limit's name. */
  readonly digits: number
}

/** Limits further off than this many times the thrust would press the curve flat: they stand in the numbers. */
const far = 5

type Value = (piece: ThrustPiece) => number

type Tone = 'before' | 'after'
interface Side { readonly tone: Tone, readonly pieces: readonly ThrustPiece[] }
/** A limit of one sign, level by level; named at its highest, a limit that changes within the picture is read off the scale. */
interface Limit { readonly tone: ChartTone, readonly sign: 1 | -1, readonly pieces: readonly ThrustPiece[], readonly highest: number }

const limitOf = (sign: 1 | -1): Value => sign === 1 ? piece => piece.plus : piece => piece.minus

/** Limits of the signs that are asked for, not further off than the curve bears; the old one only where it is another one. */
function limitsOf(sides: readonly Side[], reach: number, digits: number): Limit[] {
  return ([1, -1] as const).flatMap((sign) => {
    const value = limitOf(sign)
    const asked = sides.some(({ pieces }) => pieces.some(piece => (sign === 1 ? piece.most > 0 : piece.least < 0)))
    const drawn = sides.filter(({ pieces }) => asked && pieces.every(piece => value(piece) <= far * reach))
      .map(({ tone, pieces }): Limit => ({ tone: tone === 'after' ? 'line' : tone, sign, pieces, highest: sign * Number(Math.max(...pieces.map(value)).toFixed(digits)) }))
    const after = drawn.find(({ tone }) => tone === 'line')
    return drawn.filter(limit => limit === after || limit.highest !== after?.highest)
  })
}

/** Lays one picture out for a width in pixels; its height is always the same. */
export function layoutThrust({ before, after, digits }: ThrustInput, width: number): CurveLayout {
  const sides: Side[] = [...(before ? [{ tone: 'before' as const, pieces: before }] : []), { tone: 'after', pieces: after }]
  const all = sides.flatMap(({ pieces }) => pieces)
  const most = Math.max(0, ...all.map(piece => piece.most))
  const least = Math.min(0, ...all.map(piece => piece.least))
  const limits = limitsOf(sides, Math.max(most, -least) || 1, digits)
  const edges = limits.flatMap(({ sign, pieces }) => pieces.map(piece => sign * limitOf(sign)(piece)))
  const high = Math.max(most, ...edges)
  const low = Math.min(least, ...edges)
  const air = (high - low) * 0.08 || 1
  const ends = sides.map(({ tone, pieces }) => ({ tone, seconds: pieces.at(-1)?.t1 ?? 0 }))
  const chart = timeChart(low - (low === 0 ? 0 : air), high + (high === 0 ? 0 : air), Math.max(...ends.map(({ seconds }) => seconds)), width)
  const { x, y, left, right, foot } = chart
  const steps = (pieces: readonly ThrustPiece[], value: Value) => pieces.map((piece, index) => `${index === 0 ? 'M' : 'L'}${round(x(piece.t0))} ${round(y(value(piece)))}H${round(x(piece.t1))}`).join('')
  /** One line, two where an off-centre load makes a band. */
  const curvesOf = ({ tone, pieces }: Side) => [
    { tone, d: steps(pieces, piece => piece.most) },
    ...(pieces.some(piece => piece.most !== piece.least) ? [{ tone, d: steps(pieces, piece => piece.least) }] : []),
  ]
  return {
    width, height: chartHeight, frame: chart.frame, grid: chart.grid, ends: [],
    zero: `M${left} ${round(y(0))}H${right}`,
    curves: sides.flatMap(curvesOf),
    lines: limits.map(({ tone, sign, pieces }) => ({ tone, d: `${steps(pieces, piece => sign * limitOf(sign)(piece))}H${right}` })),
    drops: ends.map(({ tone, seconds }) => ({ tone, d: `M${round(x(seconds))} ${round(y(0))}V${foot + 20}` })),
    texts: [...chart.texts, ...acrossTexts(limits.map(({ highest, tone }) => ({ at: highest, word: tone === 'before' ? 'limit before' : 'limit', tone })), chart), ...endTexts(ends.toReversed(), chart)],
  }
}

/** What the picture says to those who do not see it; `word` is thrust or torque, `digits` how many stand after the point. */
export function thrustSentence(pieces: readonly ThrustPiece[], word: string, unit: string, digits: number): string {
  const short = (value: number) => figure(Number(value.toFixed(digits)))
  const limit = (value: number) => Number.isFinite(value) ? `${short(value)} ${unit}` : 'none'
  const least = Math.min(...pieces.map(piece => piece.least))
  const most = Math.max(...pieces.map(piece => piece.most))
  const lowest = (value: Value) => limit(Math.min(...pieces.map(value)))
  return `${word} over time: from ${short(least)} to ${short(most)} ${unit}. Lowest limit towards plus ${lowest(piece => piece.plus)}, towards minus ${lowest(piece => piece.minus)}.`
}
