import { type SetupField, type SetupFieldName, setupFields } from './fields'
import type { AxisKind, Setup } from './types'
import type { RawNode, RawObject } from './raw'
import { type Reading, keyTable, shownIn, sortIntoSlots, step } from './reading'
import { sortedSetupNames } from './sorted-keys'
import { readNumber, readOwnNumber, readWhole } from './read-number'
import { readChoice, readFlag } from './read-value'

const table = keyTable(sortedSetupNames)
const fields = sortedSetupNames.map((name): SetupField => setupFields[name])
const pointers = sortedSetupNames.map(name => `/setup${step(name)}`)

/** The setup section; fields with a fault are reported and left out. Of an unknown axis kind neither fields nor units are judged. */
export function readSetup(reading: Reading, node: RawObject, axisKind: AxisKind | undefined): Setup {
  const slots = sortIntoSlots(reading, node, table, '/setup')
  const setup: Partial<Record<SetupFieldName, number | boolean | string>> = {}
  for (let index = 0; index < slots.length; index += 1) {
    const value = slots[index]
    if (value === undefined) continue
    const read = readField(reading, value, pointers[index] as string, fields[index] as SetupField, axisKind)
    if (read !== undefined) setup[sortedSetupNames[index] as SetupFieldName] = read
  }
  // Each value was read by its own field's entry in the table that Setup is derived from. Copied, since an object that was
  // filled key by key with more than a dozen is a hash table inside and ten times slower to go through than its copy.
  return { ...setup } as Setup
}

function readField(reading: Reading, node: RawNode, at: string, field: SetupField, axisKind: AxisKind | undefined) {
  if (field.type === 'flag') return readFlag(reading, node, at)
  if (field.type === 'choice') {
    return readChoice(reading, node, at, axisKind ? field.choices[axisKind] : [...new Set([...field.choices.linear, ...field.choices.rotary])])
  }
  const unit = axisKind && field.unit[axisKind]
  if (unit === null) {
    reading.problems.addValue('not-allowed-here', at, node, `${at.slice('/setup/'.length)} is not for a ${axisKind} axis; take it out.`)
    return undefined
  }
  if (field.whole) return readWhole(reading, node, at, field.min ?? 0, field.max ?? 0, 'number-range')
  const value = field.driveOwn ? readOwnNumber(reading, node, at) : readNumber(reading, node, at, unit)
  return value === undefined || inRange(reading, node, at, value, field, unit ?? '') ? value : undefined
}

function inRange(reading: Reading, node: RawNode, at: string, value: number, field: SetupField & { type: 'number' }, unit: string): boolean {
  const { above, min = -Infinity, max = Infinity } = field
  if (value >= min && value <= max && (above === undefined || value > above)) return true
  const right = above !== undefined ? `more than ${above}` : max === Infinity ? `${min} or more` : `${min} to ${max}`
  const shown = shownIn(reading, node)
  reading.problems.addValue('number-range', at, node, `${shown} will not do for ${field.label}: it must be ${right}${unit && ` ${unit}`}.`)
  return false
}
