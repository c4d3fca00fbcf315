import { carryOf } from '../settings/carry'
import { setupField, setupFieldNames, type SetupFieldName } from '../settings/fields'
import type { Carry, Content } from '../settings/types'
import type { CarriedValue, ReplacedPart, SwapSide } from './types'

/** What is known of a swap that decides what becomes of a value. */
export interface CarryCase {
  readonly replaced: ReplacedPart
  /** The unit that the values were read from. */
  readonly out: SwapSide
  readonly into: SwapSide
  /** The values go back into the very unit that they were read from, drive and actuator alike. */
  readonly ownValues: boolean
}

/**
 * What becomes of each value that the content holds, setup and extra in the order of the format, and why on this swap. Zones
 * and moves go as a whole: they are copied.
 */
export function carriedValues(content: Content, swap: CarryCase): CarriedValue[] {
  const setup = setupFieldNames.filter(name => content.setup[name] !== undefined)
  return [
    ...setup.map((field): CarriedValue => ({ section: 'setup', field, ...setupCarry(field, content, swap) })),
    ...Object.keys(content.extra).map((field): CarriedValue => ({ section: 'extra', field, ...extraCarry(field, swap) })),
    ...content.zones.length === 0 ? [] : [{ section: 'zone', carry: 'copy', why: 'Zones are copied as they are.' } as const],
    ...content.moves.length === 0 ? [] : [{ section: 'move', carry: 'copy', why: 'The move table is copied row by row, empty rows too.' } as const],
  ]
}

type Told = Pick<CarriedValue, 'carry' | 'why'>

function setupCarry(field: SetupFieldName, content: Content, swap: CarryCase): Told {
  if (swap.ownValues) return { carry: 'copy', why: 'It is this unit’s own value.' }
  if (field === 'homeOffset') return homeOffset(content, swap)
  const group = setupField(field)?.group
  if (group === 'tuning') return tuning(field, swap)
  const carry = carryOf(field, contextOf(content, swap))
  if (swap.replaced === 'drive' && carry === 'prove') return { carry: 'copy', why: 'The actuator and what it moves stay: its friction is the same.' }
  if (swap.replaced === 'actuator' && carry !== 'prove') return { carry, why: field.startsWith('brake') ? 'It stays in the drive; judged against the brake of the new actuator.' : 'It stays in the drive.' }
  return { carry, why: reasons[carry] }
}

const reasons: Readonly<Record<Carry, string>> = {
  copy: 'It belongs to the job.',
  prove: 'It is copied, and proved at the machine: another unit may need another.',
  teach: 'It belongs to the unit, and is taught there.',
  place: 'It belongs to the place of this axis, which stays.',
}

function contextOf({ setup: { homingMethod } }: Content, { replaced, out, into }: CarryCase) {
  const sameActuator = (out.actuatorModel ?? out.model) === (into.actuatorModel ?? into.model)
  const sameDrive = out.model === into.model && out.firmware !== undefined && out.firmware === into.firmware
  return { homingMethod, replaced, sameModelAndFirmware: replaced === 'actuator' ? sameActuator : sameDrive } as const
}

function homeOffset(content: Content, swap: CarryCase): Told {
  const method = content.setup.homingMethod
  const carry = carryOf('homeOffset', contextOf(content, swap))
  if (carry === 'prove') {
    const by = method === 'index-pulse' || method === 'absolute-encoder' ? 'The encoder is the actuator’s, which stays' : `Home is found again by ${method}`
    return { carry, why: `${by}: copied, and proved at the scribed mark.` }
  }
  const from = method === undefined ? 'no homing method is given' : method === 'current-position' ? 'home is where it was set' : 'its encoder counts from another place'
  return { carry, why: `Taught at the machine: ${from}.` }
}

function tuning(field: SetupFieldName, swap: CarryCase): Told {
  const carry = carryOf(field, { replaced: swap.replaced, sameModelAndFirmware: contextOf({ setup: {} } as Content, swap).sameModelAndFirmware })
  const same = swap.replaced === 'actuator' ? 'actuator of the same model' : 'same model and firmware'
  const other = swap.replaced === 'actuator' ? 'another model of actuator' : 'another model or firmware'
  return carry === 'teach' ? { carry, why: `Tuned anew: ${other}.` } : { carry, why: `Copied, and proved at the machine: ${same}.` }
}

/** As the dictionary of the model has it that the value was read from; what is not in there is copied. */
function extraCarry(key: string, { out, ownValues, replaced }: CarryCase): Told {
  const dictionary = out.nameplate?.dictionary ?? {}
  const carry = (Object.hasOwn(dictionary, key) ? dictionary[key]?.carry : undefined) ?? 'copy'
  if (ownValues) return { carry: 'copy', why: 'It is this unit’s own value.' }
  if (replaced === 'actuator' && carry === 'copy') return { carry, why: 'It stays in the drive.' }
  return { carry, why: reasons[carry] }
}
