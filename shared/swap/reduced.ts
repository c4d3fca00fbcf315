import type { Content, Move } from '../settings/types'
import { Exact } from '../units/exact'
import { decimals } from '../units/number'

/**
 * The moves with every speed at so many percent, press speeds too, accelerations as they are: what an override does
 * (common practice, no source). Speeds are rounded half-even to six decimals and never below one millionth.
 */
export function atReducedSpeed({ moves, setup }: Pick<Content, 'moves' | 'setup'>, percent: number): { readonly moves: readonly Move[], readonly setup: Content['setup'] } {
  const slowed = (speed: number) => speed === 0 ? 0 : Math.max(new Exact(speed).times(percent).div(100).toDecimalPlaces(decimals, Exact.ROUND_HALF_EVEN).toNumber(), 1e-6)
  return {
    moves: moves.map(move => ({ ...move, speed: slowed(move.speed), ...(move.pressSpeed === undefined ? {} : { pressSpeed: slowed(move.pressSpeed) }) })),
    setup: { ...setup, ...(setup.pressSpeed === undefined ? {} : { pressSpeed: slowed(setup.pressSpeed) }) },
  }
}
