import { setupFieldNames, setupFields, type SetupFieldName } from './fields'
import { moveFields, zoneFields, type MoveFieldName, type ZoneFieldName } from './move-fields'
import type { ValuePlace } from './value-place'

/*
 * Families of fields that are asked for together. A member is named as site rules name it: `thrustLimit`, `move.target`,
 * `zone.from`. No family bears the name of a field.
 */

type MemberName = SetupFieldName | `move.${MoveFieldName}` | `zone.${ZoneFieldName}`
interface Family {
  /** Behind "Who changed": 'any force limit'. */
  readonly words: string
  readonly members: readonly MemberName[]
}

const groupOf = (group: string) => setupFieldNames.filter(name => setupFields[name].group === group)

const forceLimits = ['thrustLimit', 'thrustLimitPositive', 'thrustLimitNegative', 'overloadLevel', 'homingForceLimit', 'move.forceLimit'] as const

export const families = {
  'force-limits': { words: 'any force limit', members: forceLimits },
  'limits': { words: 'any limit', members: [...forceLimits, 'overloadTime', 'softLimitsActive', 'softLimitMin', 'softLimitMax', 'speedLimit', 'accelerationLimit', 'decelerationLimit', 'followingErrorWindow', 'followingErrorTime'] },
  'targets': { words: 'any target', members: ['move.target', 'move.turn', 'move.approach'] },
  'speeds': { words: 'any speed', members: ['speedLimit', 'jogSpeed', 'pressSpeed', 'homingSpeed', 'homingCreepSpeed', 'move.speed', 'move.pressSpeed'] },
  'accelerations': { words: 'any acceleration', members: ['accelerationLimit', 'decelerationLimit', 'quickStopDeceleration', 'homingAcceleration', 'jerk', 'move.acceleration', 'move.deceleration'] },
  'homing-values': { words: 'anything of homing', members: [...groupOf('homing'), 'homeOffset'] },
  'windows': { words: 'any window', members: ['inPositionWindow', 'inPositionTime', 'followingErrorWindow', 'followingErrorTime', 'move.window'] },
  'loads': { words: 'anything of the load', members: groupOf('load') },
  'tuning-values': { words: 'anything of tuning', members: groupOf('tuning') },
  'signals': { words: 'anything of inputs, outputs and bus', members: [...groupOf('io'), ...groupOf('bus')] },
  'sequences': { words: 'what follows a move', members: ['move.next', 'move.dwell'] },
  'zones': { words: 'any zone', members: ['zone.from', 'zone.to'] },
} as const satisfies Readonly<Record<string, Family>>

export type FamilyName = keyof typeof families
export const familyNames = Object.keys(families) as FamilyName[]

/** A field of the format wherever it stands: without the number of its row. */
export type FieldName = Pick<ValuePlace, 'section' | 'field'>

/** The place that a name of a rule speaks of; the inverse of `ruleNameOf` for names of fields. */
function memberAt(name: string): FieldName {
  const [section, field] = name.split('.')
  return field === undefined ? { section: 'setup', field: name } : { section: section as ValuePlace['section'], field }
}

/**
 * The fields that a word stands for: a family, a field as site rules name it, or a bare name, which means every section that has
 * it (`pressSpeed` of the setup and of moves). Empty where the format knows no such field; any key after `extra:` is known.
 */
export function fieldsNamed(word: string): readonly FieldName[] {
  if (Object.hasOwn(families, word)) return families[word as FamilyName].members.map(memberAt)
  if (/^extra:.{1,64}$/su.test(word)) return [{ section: 'extra', field: word.slice(6) }]
  const { section, field } = memberAt(word)
  if (section === 'move') return Object.hasOwn(moveFields, field) ? [{ section, field }] : []
  if (section === 'zone') return Object.hasOwn(zoneFields, field) ? [{ section, field }] : []
  return [
    ...(Object.hasOwn(setupFields, word) ? [{ section: 'setup', field: word } as const] : []),
    ...(Object.hasOwn(moveFields, word) ? [{ section: 'move', field: word } as const] : []),
    ...(Object.hasOwn(zoneFields, word) ? [{ section: 'zone', field: word } as const] : []),
  ]
}
