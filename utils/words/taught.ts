import { carryOf } from '#shared/settings/carry'
import { setupFieldNames, setupFields, type SetupFieldName } from '#shared/settings/fields'
import type { Dictionary } from '#shared/settings/nameplate'
import type { Content } from '#shared/settings/types'
import { extraWords } from './fields'

export interface Taught {
  /** On any replacement unit. */
  readonly always: readonly string[]
  /** Only where the replacement is of another model or runs another firmware. */
  readonly onOther: readonly string[]
}

/** What a whole replacement unit has to be taught instead of being given it, by the words of the screens. */
export function taughtOf({ setup, extra }: Content, dictionary: Dictionary | undefined): Taught {
  const set = setupFieldNames.filter(name => setup[name] !== undefined)
  const taught = (name: SetupFieldName, sameModelAndFirmware: boolean) => carryOf(name, { homingMethod: setup.homingMethod, replaced: 'unit', sameModelAndFirmware }) === 'teach'
  const always = set.filter(name => taught(name, true))
  const extras = Object.keys(extra).filter(key => dictionary && Object.hasOwn(dictionary, key) && dictionary[key]?.carry === 'teach')
  return {
    always: [...always.map(name => setupFields[name].label), ...extras.map(key => extraWords(key, dictionary).label)],
    onOther: set.filter(name => !always.includes(name) && taught(name, false)).map(name => setupFields[name].label),
  }
}
