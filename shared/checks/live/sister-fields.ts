import { carryOf } from '../../settings/carry'
import { setupField, setupFieldNames } from '../../settings/fields'
import { isUnused, moveFieldNames, moveFields, zoneFieldNames, zoneFields } from '../../settings/move-fields'
import type { Dictionary } from '../../settings/nameplate'
import type { AxisFlag, Content, ExtraValue } from '../../settings/types'
import { anyValue } from '../format'
import { atExtra, atMove, atSetup, atZone } from '../pointers'
import { byNumber, type NameOf } from './sister-rows'

/** One harm value of an axis that its sisters may be held against. */
export interface SisterValue {
  /** The same on every sister: `thrustLimit`, `move 5 forceLimit`, `zone 1 from`, `extra K-017`. */
  readonly key: string
  readonly words: string
  /** Its words on this axis, where they are others: a move that has another number here. */
  readonly here?: string
  /** In the axis' own content. */
  readonly at: string
  readonly value: ExtraValue
  /** Value and unit as a person reads them; equal texts are equal values. */
  readonly text: string
  /** A field of a row: the key that every such row has, so that axes without the row are told once and not for each field. */
  readonly rowKey?: string
}

/** The values of an axis that weigh harm, without those that belong to its place or are taught to its unit; moves go by `nameOf`. */
export function harmValues(content: Content, flags: readonly AxisFlag[], dictionary: Dictionary = {}, nameOf: NameOf = byNumber): SisterValue[] {
  return [...ofSetup(content), ...ofZones(content), ...ofMoves(content, flags, nameOf), ...ofExtra(content, dictionary)]
}

function ofSetup({ axisKind, setup }: Content): SisterValue[] {
  const context = { homingMethod: setup.homingMethod, replaced: 'unit', sameModelAndFirmware: true } as const
  return setupFieldNames.flatMap((name) => {
    const field = setupField(name)
    const value = setup[name]
    const carry = carryOf(name, context)
    if (field?.weight !== 'harm' || value === undefined || carry === 'place' || carry === 'teach') return []
    const unit = field.type === 'number' ? field.unit[axisKind] ?? '' : ''
    return [{ key: name, words: field.label, at: atSetup(name), value, text: textOf(value, unit) }]
  })
}

function ofZones({ axisKind, zones }: Content): SisterValue[] {
  return zones.flatMap((zone, index) => zoneFieldNames.map(name => ({
    key: `zone ${zone.zone} ${name}`, words: `zone ${zone.zone} ${zoneFields[name].label}`, at: atZone(index, name),
    value: zone[name], text: textOf(zone[name], zoneFields[name].unit[axisKind] ?? ''), rowKey: `zone ${zone.zone} from`,
  })))
}

/** On an axis with a flag the motion fields of its moves can hurt as well. */
function ofMoves({ axisKind, moves }: Content, flags: readonly AxisFlag[], nameOf: NameOf): SisterValue[] {
  const names = moveFieldNames.filter(name => moveFields[name].weight === 'harm' || (moveFields[name].weight === 'motion' && flags.length > 0))
  return moves.flatMap((move, index) => {
    if (isUnused(move)) return []
    const { key, number, here } = nameOf(move.move)
    return names.flatMap((name): SisterValue[] => {
      const value = move[name]
      const field = moveFields[name]
      if (value === undefined) return []
      const unit = 'unit' in field ? field.unit[axisKind] ?? '' : ''
      const text = name === 'next' ? nameOf(Number(value)).number : textOf(value, unit)
      return [{
        key: `${key} ${name}`, words: `move ${number} ${field.label}`, ...here === undefined ? {} : { here: `${here} ${field.label}` },
        at: atMove({ move, index }, name), value, text, rowKey: `${key} kind`,
      }]
    })
  })
}

/** Words of the format stand as they are; anyValue would put them in quotes. */
function textOf(value: number | string | boolean, unit: string): string {
  return typeof value === 'string' ? value : anyValue(value, unit)
}

/** A drive's own key weighs harm only where the dictionary of the model says so. */
function ofExtra({ extra }: Content, dictionary: Dictionary): SisterValue[] {
  return Object.entries(extra).flatMap(([key, value]) => {
    const entry = Object.hasOwn(dictionary, key) ? dictionary[key] : undefined
    if (entry?.weight !== 'harm' || entry.reading || entry.carry === 'place' || entry.carry === 'teach') return []
    const bare = typeof value === 'object' ? value.value : value
    const unit = typeof value === 'object' ? value.unit : entry.unit ?? ''
    return [{ key: `extra ${key}`, words: entry.name === undefined ? key : `${key} (${entry.name})`, at: atExtra(key), value, text: anyValue(bare, unit) }]
  })
}
