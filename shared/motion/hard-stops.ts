import type { Nameplate } from '../settings/nameplate'
import type { Setup } from '../settings/types'
import { minus, plus } from './exact'

/** The ends of an axis in its own positions, mm or deg, from low to high. */
export interface Ends {
  readonly hardLow: number
  /** Where the stroke begins, one hard margin inside the stop. */
  readonly low: number
  readonly high: number
  readonly hardHigh: number
}

type Homing = Pick<Setup, 'homeOffset' | 'homingDirection'>

/** What the axis reads where it found home: −homeOffset, or +homeOffset on a drive that counts the other way; undefined without an offset. */
export function homeReading(setup: Homing, sense: Nameplate['homeOffsetSense'] = 'zero-is-home-plus-offset'): number | undefined {
  if (setup.homeOffset === undefined) return undefined
  return sense === 'home-reads-offset' ? setup.homeOffset : minus(0, setup.homeOffset)
}

/**
 * The ends of an axis that takes a hard stop as home: negative homing finds the lower one, positive the upper. Undefined
 * without offset, direction or stroke; a hard margin that is not given counts as 0.
 */
export function endsByHardStop(setup: Homing, plate: Pick<Nameplate, 'stroke' | 'hardMargin' | 'homeOffsetSense'> | undefined): Ends | undefined {
  const home = homeReading(setup, plate?.homeOffsetSense)
  if (home === undefined || setup.homingDirection === undefined || plate === undefined) return undefined
  const { stroke, hardMargin = 0 } = plate
  const between = plus(stroke, plus(hardMargin, hardMargin))
  const hardLow = setup.homingDirection === 'negative' ? home : minus(home, between)
  const hardHigh = plus(hardLow, between)
  return { hardLow, low: plus(hardLow, hardMargin), high: minus(hardHigh, hardMargin), hardHigh }
}
