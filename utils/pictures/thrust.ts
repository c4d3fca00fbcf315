import { figure } from './scale'
import { acrossTexts, chartHeight, endTexts, round, timeChart, type ChartLine, type ChartText } from './time-chart'

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

export interface ThrustLayout {
  readonly width: number
  readonly height: number
  readonly frame: string
  readonly grid: string
  readonly zero: string
  /** One line, two where an off-centre load makes a band. */
  readonly curves: readonly string[]
  readonly limits: readonly string[]
  readonly drop: string
  readonly texts: readonly ChartText[]
}

/** Limits further off than this many times the thrust would press the curve flat: they stand in the numbers. */
const far = 5

type Value = (piece: ThrustPiece) => number

/** Lays one picture out for a width in pixels; `digits` after the point of a limit's name. */
export function layoutThrust(pieces: readonly ThrustPiece[], width: number, digits: number): ThrustLayout {
  const most = Math.max(0, ...pieces.map(piece => piece.most))
  const least = Math.min(0, ...pieces.map(piece => piece.least))
  const reach = Math.max(most, -least) || 1
  const drawn = (sign: 1 | -1, limit: Value) => pieces.some(piece => (sign === 1 ? piece.most > 0 : piece.least < 0)) && pieces.every(piece => limit(piece) <= far * reach)
  const plus = drawn(1, piece => piece.plus)
  const minus = drawn(-1, piece => piece.minus)
  const high = Math.max(most, ...(plus ? pieces.map(piece => piece.plus) : []))
  const low = Math.min(least, ...(minus ? pieces.map(piece => -piece.minus) : []))
  const air = (high - low) * 0.08 || 1
  const seconds = pieces.at(-1)?.t1 ?? 0
  const chart = timeChart(low - (low === 0 ? 0 : air), high + (high === 0 ? 0 : air), seconds, width)
  const { x, y, left, right, foot } = chart
  const steps = (value: Value) => pieces.map((piece, index) => `${index === 0 ? 'M' : 'L'}${round(x(piece.t0))} ${round(y(value(piece)))}H${round(x(piece.t1))}`).join('')
  const band = pieces.some(piece => piece.most !== piece.least)
  /** Named at the highest: a limit that changes within the picture is read off the scale. */
  const lines: ChartLine[] = [
    ...(plus ? [{ at: Math.max(...pieces.map(piece => piece.plus)), word: 'limit' }] : []),
    ...(minus ? [{ at: -Math.max(...pieces.map(piece => piece.minus)), word: 'limit' }] : []),
  ]
  return {
    width, height: chartHeight, frame: chart.frame, grid: chart.grid,
    zero: `M${left} ${round(y(0))}H${right}`,
    curves: [steps(piece => piece.most), ...(band ? [steps(piece => piece.least)] : [])],
    limits: [...(plus ? [steps(piece => piece.plus)] : []), ...(minus ? [steps(piece => -piece.minus)] : [])],
    drop: `M${round(x(seconds))} ${round(y(0))}V${foot + 20}`,
    texts: [...chart.texts, ...acrossTexts(lines.map(line => ({ ...line, at: Number(line.at.toFixed(digits)) })), chart), ...endTexts([{ seconds, tone: 'after' }], chart)],
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
