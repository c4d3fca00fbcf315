import type { z } from 'zod'
import type { ruleBody } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { setupField } from '#shared/settings/fields'
import { moveFields, zoneFields } from '#shared/settings/move-fields'

type RuleBody = z.output<typeof ruleBody>
type Kind = 'number' | 'other' | 'any'

/** What a field's values are: `thrustLimit`, `move.speed`, `zone.from`, `extra:K-017`; undefined for a name that is no field. */
export function kindOf(field: string): Kind | undefined {
  if (/^extra:.{1,64}$/su.test(field)) return 'any'
  const [family, name = ''] = field.split('.', 2)
  const table: Readonly<Record<string, { readonly type: string }>> = family === 'move' ? moveFields : family === 'zone' ? zoneFields : {}
  const type = field.includes('.') ? (Object.hasOwn(table, name) ? table[name]?.type : undefined) : setupField(field)?.type
  return type === undefined ? undefined : type === 'number' || type === 'row' ? 'number' : 'other'
}

/** Refuses a rule that could never be kept or never be broken: an unknown field, no bound, bounds crossed, a bound on words. */
export function assertRuleFits({ field, min, max, fixed }: RuleBody): void {
  const kind = kindOf(field)
  if (kind === undefined) throw unfit('/field', `${field} is no field of the settings format.`)
  if (min === undefined && max === undefined && fixed === undefined) throw unfit('/min', 'Give a minimum, a maximum or a fixed value.')
  if (fixed !== undefined && (min !== undefined || max !== undefined)) throw unfit('/fixed', 'A fixed value leaves no room for a minimum or maximum.')
  if (min !== undefined && max !== undefined && min > max) throw unfit('/min', `The minimum ${min} lies above the maximum ${max}.`)
  if (kind === 'other' && fixed === undefined) throw unfit('/fixed', `${field} holds no number: only a fixed value can be asked for.`)
  if (kind === 'number' && fixed !== undefined && typeof fixed !== 'number') throw unfit('/fixed', `${field} holds a number.`)
}

const unfit = (at: string, message: string) => new Refusal('input', message, { errors: [{ at, code: 'rule', message }] })
