import { quantity } from '../checks/format'
import { forceBaseOf } from '../motion/force-base'
import { gridOf, roundDownToStep, type Place } from '../settings/entry-table/grid'
import type { Content, Move, SetupFieldName } from '../settings/types'
import { Exact } from '../units/exact'
import { decimals, largestNumber } from '../units/number'
import type { CarryCase } from './carried'
import type { Adjustment, SwapSide } from './types'

/** Setup values that are percentages of the force base. */
export const forceFields = ['homingForceLimit', 'thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative', 'overloadLevel'] as const satisfies readonly SetupFieldName[]

/** Whether the content holds a percentage of the force base at all. */
export function holdsForces({ setup, moves }: Content): boolean {
  return forceFields.some(name => setup[name] !== undefined) || moves.some(move => move.forceLimit !== undefined)
}

/** What 100 % means on either side, in N or N·m; undefined where it is the same, or a nameplate does not tell. */
export function differingBases(out: SwapSide, into: SwapSide): { readonly from: number, readonly to: number } | undefined {
  const [from, to] = [forceBaseOf(out.nameplate), forceBaseOf(into.nameplate)]
  return from === undefined || to === undefined || from === to ? undefined : { from, to }
}

export interface Rescaled { readonly content: Content, readonly adjustments: readonly Adjustment[] }

/**
 * Every percentage of the force base as it has to be on the new unit: new = old · base old / base new, half-even to six
 * decimals and 1e9 at most, as the format has numbers, then down to the step of the new unit's entry table, so that no limit
 * grows. Unchanged where the bases agree or cannot be told.
 */
export function rescaled(content: Content, out: SwapSide, into: SwapSide): Rescaled {
  const bases = differingBases(out, into)
  if (!bases) return { content, adjustments: [] }
  const adjustments: Adjustment[] = []
  const unit = content.axisKind === 'linear' ? 'N' : 'N·m'
  const meant = `100 % meant ${quantity(bases.from, unit)} on ${out.model} and means ${quantity(bases.to, unit)} on ${into.model}`
  const adjust = (place: Pick<Adjustment, 'at' | 'section' | 'row' | 'field'>, before: number): number => {
    const { value, step } = rescaledPercent(before, bases, into, place)
    if (value !== before) {
      const why = step === undefined ? `${meant}.` : `${meant}; rounded down to steps of ${quantity(step, '%')}.`
      adjustments.push({ ...place, before, after: value, unit: '%', newtonsBefore: forceOf(before, bases.from), newtonsAfter: forceOf(value, bases.to), why })
    }
    return value
  }
  const setup: Record<string, unknown> = { ...content.setup }
  for (const field of forceFields) {
    const before = content.setup[field]
    if (before !== undefined) setup[field] = adjust({ at: `/setup/${field}`, section: 'setup', field }, before)
  }
  const moves = content.moves.map((move, index): Move => move.forceLimit === undefined
    ? move
    : { ...move, forceLimit: adjust({ at: `/moves/${index}/forceLimit`, section: 'move', row: move.move, field: 'forceLimit' }, move.forceLimit) })
  return { content: { ...content, setup: setup as Content['setup'], moves }, adjustments }
}

/** One percentage, and the step that it was rounded down to where that took anything. */
function rescaledPercent(before: number, { from, to }: { from: number, to: number }, into: SwapSide, place: Place): { value: number, step?: number } {
  const exact = Exact.min(new Exact(before).times(from).div(to).toDecimalPlaces(decimals, Exact.ROUND_HALF_EVEN), largestNumber).toNumber()
  const value = into.nameplate ? roundDownToStep(exact, into.nameplate, place) : exact
  const step = into.nameplate && gridOf(into.nameplate, place)?.step.toNumber()
  return value === exact || step === undefined ? { value } : { value, step }
}

/** A force in N or N·m of a percentage, to six decimals. */
function forceOf(percent: number, base: number): number {
  return new Exact(percent).times(base).div(100).toDecimalPlaces(decimals, Exact.ROUND_HALF_EVEN).toNumber()
}

/**
 * Whether a file that the drive's own tool saved on the old unit means the same newtons in the new one: it goes back where it
 * came from, or both units have one force base. Models decide only where neither nameplate tells the base.
 */
export function ownFileFits({ ownValues, out, into }: Pick<CarryCase, 'ownValues' | 'out' | 'into'>): boolean {
  const [from, to] = [forceBaseOf(out.nameplate), forceBaseOf(into.nameplate)]
  return ownValues || (from === undefined && to === undefined ? out.model === into.model : from === to)
}
