import { type SetupFieldName, setupField } from './fields'
import type { Carry, Setup } from './types'

/** What is known of the unit that the values go to. */
export interface CarryContext {
  readonly homingMethod?: Setup['homingMethod']
  /** What was changed: the whole unit, or only its drive or actuator. */
  readonly replaced: 'unit' | 'drive' | 'actuator'
  /** Old and new unit are of one model and run one firmware. */
  readonly sameModelAndFirmware: boolean
}

/**
 * What becomes of a setup value on another unit. The table says it for most; the home offset hangs on the homing method,
 * and tuning is taught anew on another model or firmware. Without a homing method the home offset is taught: copying a zero
 * that means another place could run the axis into its end.
 */
export function carryOf(field: SetupFieldName, context: CarryContext): Carry {
  if (field === 'homeOffset') return homeOffsetCarry(context)
  const entry = setupField(field)
  if (entry === undefined) return 'teach'
  return entry.group === 'tuning' && !context.sameModelAndFirmware ? 'teach' : entry.carry
}

function homeOffsetCarry({ homingMethod, replaced }: CarryContext): Carry {
  switch (homingMethod) {
    case 'hard-stop':
    case 'limit-switch':
    case 'home-switch': return 'prove'
    case 'index-pulse':
    case 'absolute-encoder': return replaced === 'drive' ? 'prove' : 'teach'
    default: return 'teach'
  }
}
