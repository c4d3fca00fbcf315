import { usedRows } from '../motion/chains'
import { setupField } from '../settings/fields'
import type { MoveFieldName, ZoneFieldName } from '../settings/move-fields'
import type { AxisKind, Content, ExtraValue, Move, Setup, SetupFieldName } from '../settings/types'
import { fieldWords } from './format'
import { atExtra, atMove, atSetup, atZone } from './pointers'

/** One value that a site rule is held against. */
export interface Place {
  readonly at: string
  /** "thrust limit", "move 5 speed". */
  readonly words: string
  readonly value: Exclude<ExtraValue, object>
  /** The drive's own unit of an extra value. */
  readonly unit?: string
  readonly row?: Readonly<Record<string, number>>
}

/**
 * The values of a field that a site rule names: `thrustLimit`, `move.speed`, `zone.from`, `extra:K-017`. Undefined where a
 * setup field or extra key is not set, or where there is no such field; rows that leave an optional field out count by what
 * the drive takes instead, or not at all.
 */
export function placesOf(content: Content, field: string): Place[] | undefined {
  if (field.startsWith('extra:')) return extraPlace(content, field.slice('extra:'.length))
  const words = fieldWords(field, content.axisKind)
  if (!words) return undefined
  const [section, name] = field.split('.') as [string, string | undefined]
  if (name === undefined) {
    if (isRefused(field, content.axisKind)) return []
    const value = content.setup[field as SetupFieldName]
    return value === undefined ? undefined : [{ at: atSetup(field as SetupFieldName), words: words.label, value }]
  }
  if (section === 'move') return movePlaces(content, name as MoveFieldName, words.label)
  return content.zones.map((zone, index) => ({
    at: atZone(index, name as ZoneFieldName), words: `zone ${zone.zone} ${words.label}`, value: zone[name as ZoneFieldName], row: { zone: zone.zone },
  }))
}

/** A field of the other axis kind: the rule, made for a whole site perhaps, is not about this axis. */
function isRefused(name: string, kind: AxisKind): boolean {
  const field = setupField(name)
  return field?.type === 'number' && field.unit[kind] === null
}

function movePlaces({ moves, setup }: Content, name: MoveFieldName, label: string): Place[] {
  const places: Place[] = []
  for (const row of usedRows(moves)) {
    const { move } = row.move
    const value = row.move[name]
    const words = `move ${move} ${label}`
    const instead = value === undefined ? takenInstead(row.move, name, setup) : undefined
    if (value !== undefined) places.push({ at: atMove(row, name), words, value, row: { move } })
    else if (instead) places.push({ at: instead.own ? atMove(row, instead.own) : atSetup('pressSpeed'), words, value: instead.value, row: { move } })
  }
  return places
}

/** What the drive goes by where a row leaves the field out. */
function takenInstead(move: Move, name: MoveFieldName, setup: Setup): { value: number, own?: MoveFieldName } | undefined {
  if (name === 'deceleration') return { value: move.acceleration, own: 'acceleration' }
  if (name === 'pressSpeed' && move.kind === 'press' && setup.pressSpeed !== undefined) return { value: setup.pressSpeed }
  return undefined
}

function extraPlace({ extra }: Content, key: string): Place[] | undefined {
  const held = Object.hasOwn(extra, key) ? extra[key] : undefined
  if (held === undefined) return undefined
  return [typeof held === 'object'
    ? { at: atExtra(key), words: key, value: held.value, unit: held.unit }
    : { at: atExtra(key), words: key, value: held }]
}
