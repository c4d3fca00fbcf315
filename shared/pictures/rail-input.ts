import { endsByHardStop } from '../motion/hard-stops'
import { startOf } from '../motion/start-of'
import { isUnused } from '../settings/move-fields'
import type { Nameplate } from '../settings/nameplate'
import type { AxisKind, Content, Move, Zone } from '../settings/types'

/** What one side of the rail shows: the rows that end at a place, and what bounds them. */
export interface RailSide {
  readonly name: string
  readonly moves: readonly RailMove[]
  /** Relative rows have no place on the rule; they are told beside it. */
  readonly steps: readonly { readonly move: number, readonly by: number }[]
  readonly softMin?: number
  readonly softMax?: number
  /** False: the drive does not hold the soft limits. */
  readonly limitsHeld: boolean
  readonly zones: readonly Zone[]
}

export interface RailMove {
  readonly move: number
  readonly kind: 'absolute' | 'press'
  readonly target: number
  readonly approach?: number
  /** Way it goes when it is called after the row before it, or after the row that names it: 1 up, −1 down, 0 not known. */
  readonly direction: -1 | 0 | 1
  readonly changed: boolean
}

export interface RailInput {
  readonly axisKind: AxisKind
  readonly low: number
  readonly high: number
  /** Where the hard stops are known; the rule may reach beyond them where something wrong stands there. */
  readonly stops?: { readonly low: number, readonly high: number }
  /** One turn of a modulo axis. */
  readonly wraps: boolean
  /** Above the rule. */
  readonly upper: RailSide
  /** Below it: what is now, where two versions are compared. */
  readonly lower?: RailSide
}

function directionOf(move: Move, moves: readonly Move[]): -1 | 0 | 1 {
  if (move.kind === 'press' && move.approach !== undefined) return Math.sign(move.target - move.approach) as -1 | 0 | 1
  const start = startOf(move, moves)
  return start ? Math.sign(move.target - start.target) as -1 | 0 | 1 : 0
}

export function railSideOf(content: Content, name: string, changed: ReadonlySet<number> = new Set()): RailSide {
  const used = content.moves.filter(move => !isUnused(move))
  const placed = used.map(move => ({ move, direction: directionOf(move, used) })).filter(({ move }) => move.kind !== 'relative')
  const { softLimitMin, softLimitMax, softLimitsActive } = content.setup
  return {
    name,
    moves: placed.map(({ move, direction }) => ({
      move: move.move, kind: move.kind === 'press' ? 'press' : 'absolute', target: move.target, direction, changed: changed.has(move.move),
      ...(move.approach !== undefined && { approach: move.approach }),
    })),
    steps: used.filter(move => move.kind === 'relative').map(move => ({ move: move.move, by: move.target })),
    ...(softLimitMin !== undefined && { softMin: softLimitMin }),
    ...(softLimitMax !== undefined && { softMax: softLimitMax }),
    limitsHeld: softLimitsActive !== false,
    zones: content.zones,
  }
}

const placesOf = (side: RailSide) => [
  ...side.moves.flatMap(move => move.approach === undefined ? [move.target] : [move.target, move.approach]),
  ...[side.softMin, side.softMax].filter(limit => limit !== undefined),
  ...side.zones.flatMap(zone => [zone.from, zone.to]),
]

/** mm or deg, as places on the rule are given. */
export const railUnit = ({ axisKind }: Pick<RailInput, 'axisKind'>): 'mm' | 'deg' => axisKind === 'rotary' ? 'deg' : 'mm'

/** Where the hard stops lie; undefined unless the axis homes against one of them and the stroke of its model is known. */
function stopsOf({ setup }: Content, nameplate: Nameplate | undefined): RailInput['stops'] {
  const ends = setup.homingMethod === 'hard-stop' ? endsByHardStop(setup, nameplate) : undefined
  return ends && { low: ends.hardLow, high: ends.hardHigh }
}

/** The rule reaches over everything that stands on it, and over the travel of the unit where that is known. */
export function railInputOf(contents: { readonly upper: Content, readonly lower?: Content }, sides: { readonly upper: RailSide, readonly lower?: RailSide }, nameplate?: Nameplate): RailInput {
  const today = contents.lower ?? contents.upper
  const places = [...placesOf(sides.upper), ...(sides.lower ? placesOf(sides.lower) : [])]
  const stops = stopsOf(today, nameplate)
  const modulo = today.axisKind === 'rotary' ? today.setup.modulo : undefined
  const travel = stops ? [stops.low, stops.high] : modulo !== undefined ? [0, modulo] : places.length === 0 ? [0, nameplate?.stroke ?? 100] : []
  const low = Math.min(...travel, ...places)
  const high = Math.max(...travel, ...places)
  const air = travel.length > 0 || high === low ? 0 : (high - low) * 0.04
  return {
    axisKind: today.axisKind,
    low: high === low ? low - 1 : low - air,
    high: high === low ? high + 1 : high + air,
    ...(stops && { stops }),
    wraps: modulo !== undefined,
    ...sides,
  }
}
