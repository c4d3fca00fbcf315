import type { ExtraValue, Move, SettingsFile, Zone } from './types'
import { moveFieldNames, zoneFieldNames } from './move-fields'
import { setupFieldNames } from './fields'
import { unitKeys } from './read-file'

/**
 * The JSON form for people and programs: keys in the order of the field tables, one row of zones and moves a line, ends
 * with a line feed. `readJson` of it is the same file. Not the canonical text, which is for hashing.
 */
export function writeJson(file: SettingsFile): string {
  const parts = [
    member('schema', file.schema),
    `"unit": ${oneLine(unitKeys.map(key => [key, file.unit[key]]))}`,
    member('exportedAt', file.exportedAt),
    ...(file.exportedBy === undefined ? [] : [member('exportedBy', file.exportedBy)]),
    ...(file.note === undefined ? [] : [member('note', file.note)]),
    member('axisKind', file.axisKind),
    `"setup": ${block('{', '}', setupFieldNames.flatMap(name => file.setup[name] === undefined ? [] : [member(name, file.setup[name])]))}`,
    `"zones": ${block('[', ']', file.zones.map(zoneLine))}`,
    `"moves": ${block('[', ']', file.moves.map(moveLine))}`,
    `"extra": ${ownValues(file.extra)}`,
    `"readings": ${ownValues(file.readings)}`,
  ]
  return `{\n  ${parts.join(',\n  ')}\n}\n`
}

type Pair = readonly [key: string, value: unknown]

function member(key: string, value: unknown): string {
  return `${JSON.stringify(key)}: ${JSON.stringify(value)}`
}

function oneLine(pairs: readonly Pair[]): string {
  return `{ ${pairs.filter(([, value]) => value !== undefined).map(([key, value]) => member(key, value)).join(', ')} }`
}

function block(open: string, close: string, lines: readonly string[]): string {
  return lines.length === 0 ? open + close : `${open}\n    ${lines.join(',\n    ')}\n  ${close}`
}

function zoneLine(zone: Zone): string {
  return oneLine([['zone', zone.zone], ...zoneFieldNames.map((name): Pair => [name, zone[name]])])
}

function moveLine(move: Move): string {
  return oneLine([['move', move.move], ...moveFieldNames.map((name): Pair => [name, move[name]])])
}

function ownValues(values: Readonly<Record<string, ExtraValue>>): string {
  return block('{', '}', Object.entries(values).map(([key, value]) =>
    typeof value === 'object' ? `${JSON.stringify(key)}: ${oneLine([['value', value.value], ['unit', value.unit]])}` : member(key, value)))
}
