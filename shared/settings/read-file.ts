import { type AxisKind, type ReadSettings, type SettingsFile, type UnitIdentity, axisKinds, schemaName } from './types'
import type { RawNode, RawObject } from './raw'
import { type Reading, type Slots, isNotSet, keyTable, shownIn, sortIntoSlots } from './reading'
import { contentOf } from './content'
import { serialToBeWritten } from './identity'
import { maxExtra, maxReadings, readExtra } from './read-extra'
import { readMoves } from './read-moves'
import { readZones } from './read-rows'
import { readSetup } from './read-setup'
import { readWhole } from './read-number'
import { readChoice, readText } from './read-value'
import { type TextRule, textRules } from './text-rules'
import { cutText } from './problems'
import { parseTimestamp } from './time'

export const fileKeys = ['schema', 'unit', 'exportedAt', 'exportedBy', 'note', 'axisKind', 'setup', 'zones', 'moves', 'extra', 'readings'] as const
export const unitKeys = ['serial', 'channel', 'model', 'firmware', 'actuatorSerial', 'actuatorModel'] as const
export const maxChannel = 255

const rootTable = keyTable(fileKeys)
const unitTable = keyTable(unitKeys)

/**
 * Judges the whole tree, section by section, so that every problem is found at once. Answers undefined where any was
 * reported; the values are then not to be used.
 */
export function readFile(reading: Reading, root: RawObject): Omit<ReadSettings, 'normalised'> | undefined {
  const slots = sortIntoSlots(reading, root, rootTable, '')
  const slot = (name: (typeof fileKeys)[number]) => slots[rootTable.index.get(name) as number]
  readSchema(reading, slot('schema'), root)
  const unit = readIdentity(reading, section(reading, slot('unit'), '/unit'), root)
  const exportedAt = readExportedAt(reading, slot('exportedAt'), root)
  const exportedBy = readOptional(reading, slot('exportedBy'), '/exportedBy', textRules.exportedBy)
  const note = readOptional(reading, slot('note'), '/note', textRules.note)
  const axisKind = readAxisKind(reading, slot('axisKind'), root)
  const setupNode = section(reading, slot('setup'), '/setup')
  const setup = setupNode ? readSetup(reading, setupNode, axisKind) : {}
  const context = { axisKind, wraps: axisKind === 'rotary' && gives(setupNode, 'modulo') }
  const zonesNode = slot('zones')
  const zones = zonesNode ? readZones(reading, zonesNode, context) : []
  const movesNode = slot('moves')
  const moves = movesNode ? readMoves(reading, movesNode, context) : []
  const extra = readOwn(reading, slot('extra'), '/extra', maxExtra)
  const readings = readOwn(reading, slot('readings'), '/readings', maxReadings)
  if (reading.problems.total > 0 || unit === undefined || exportedAt === undefined || axisKind === undefined) return undefined
  const file: SettingsFile = {
    schema: schemaName, unit, exportedAt, ...given('exportedBy', exportedBy), ...given('note', note), axisKind, setup, zones, moves, extra, readings,
  }
  return { file, content: contentOf(file) }
}

/** Whether the key is set, rightly or not: a faulty modulo is one problem, not one for each turn as well. */
function gives(node: RawObject | undefined, key: string): boolean {
  const value = node?.values[node.keys.indexOf(key)]
  return value !== undefined && !isNotSet(value)
}

function given<Key extends string, Value>(key: Key, value: Value | undefined): { readonly [K in Key]?: Value } {
  return (value === undefined ? {} : { [key]: value }) as { readonly [K in Key]?: Value }
}

function section(reading: Reading, node: RawNode | undefined, at: string): RawObject | undefined {
  if (node === undefined || node.kind === 'object') return node
  if (node.kind !== 'refused') reading.problems.addValue('json-syntax', at, node, 'An object { … } belongs here.')
  return undefined
}

function missing(reading: Reading, at: string, spot: RawObject, right: string): undefined {
  reading.problems.add('missing', at, spot, `${at.slice(at.lastIndexOf('/') + 1)} is missing: ${right}.`)
  return undefined
}

function readSchema(reading: Reading, node: RawNode | undefined, root: RawObject): void {
  if (node === undefined) return missing(reading, '/schema', root, `"${schemaName}" belongs here`)
  if (node.kind === 'refused' || ((node.kind === 'text' || node.kind === 'cell') && node.text === schemaName)) return
  reading.problems.addValue('schema-version', '/schema', node, `${shownIn(reading, node)} is not read here; this is the reader of ${schemaName}.`)
}

function readAxisKind(reading: Reading, node: RawNode | undefined, root: RawObject): AxisKind | undefined {
  if (node === undefined) return missing(reading, '/axisKind', root, `${axisKinds.join(' or ')} belongs here`)
  return readChoice(reading, node, '/axisKind', axisKinds)
}

function readExportedAt(reading: Reading, node: RawNode | undefined, root: RawObject): string | undefined {
  if (node === undefined) return missing(reading, '/exportedAt', root, 'the time of the export belongs here, like 2026-11-30T08:15:00+01:00')
  const text = readText(reading, node, '/exportedAt', textRules.exportedAt)
  if (text === undefined || parseTimestamp(text) !== undefined) return text
  reading.problems.addValue('text-character', '/exportedAt', node, `${cutText(text)} is no time with offset (RFC 3339) of a real day; write it like 2026-11-30T08:15:00+01:00.`)
  return undefined
}

function readOptional(reading: Reading, node: RawNode | undefined, at: string, rule: TextRule): string | undefined {
  return node && readText(reading, node, at, rule)
}

function readOwn(reading: Reading, node: RawNode | undefined, at: string, limit: number) {
  const object = section(reading, node, at)
  return object ? readExtra(reading, object, at, limit) : {}
}

function readIdentity(reading: Reading, node: RawObject | undefined, root: RawObject): UnitIdentity | undefined {
  const slots: Slots = node ? sortIntoSlots(reading, node, unitTable, '/unit') : []
  const identity: Record<string, string | number> = {}
  for (const key of unitKeys) {
    const value = slots[unitTable.index.get(key) as number]
    if (value === undefined) continue
    const read = key === 'channel' ? readWhole(reading, value, '/unit/channel', 0, maxChannel, 'number-range') : readText(reading, value, `/unit/${key}`, textRules[key])
    if (read === serialToBeWritten && key === 'serial') {
      reading.problems.addValue('missing', '/unit/serial', value, `serial is missing: write the serial of the unit in the place of ${serialToBeWritten}.`)
    }
    else if (read !== undefined) identity[key] = read
  }
  for (const key of ['serial', 'model'] as const) {
    if (slots[unitTable.index.get(key) as number] === undefined) missing(reading, `/unit/${key}`, node ?? root, `the ${key} of the unit belongs here`)
  }
  const { serial, model } = identity
  // Each further key was read by its own rule above.
  return typeof serial === 'string' && typeof model === 'string' ? { ...identity, serial, model } as UnitIdentity : undefined
}
