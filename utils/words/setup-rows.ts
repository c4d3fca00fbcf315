import type { FieldChange } from '#shared/diff/types'
import { setupFieldNames, setupFields, setupGroups, type SetupGroup } from '#shared/settings/fields'
import type { Content, ExtraValue } from '#shared/settings/types'
import { fractionOf } from '../format'
import { extraWords, setupWords, valueWord, type WordContext } from './fields'

export interface SetupRow {
  readonly key: string
  readonly label: string
  readonly help: string
  readonly value: ExtraValue | undefined
  readonly unit: string
  /** Against the known-good; before = what stands there. */
  readonly change?: FieldChange
}

export interface SetupBlock { readonly title: string, readonly rows: readonly SetupRow[], readonly fraction: number }

const block = (title: string, rows: readonly SetupRow[]): SetupBlock =>
  ({ title, rows, fraction: fractionOf(rows.flatMap(row => [row.value, row.change?.before])) })

const numbered = (unit: string, plusMinus: boolean) => plusMinus && unit ? `± ${unit}` : unit

/** Setup values by group, in the order of the field table; a value that only the known-good has stands there too. */
export function setupBlocks(content: Content, context: WordContext, changes: readonly FieldChange[]): Record<SetupGroup, SetupBlock> {
  const changed = new Map(changes.filter(change => change.section === 'setup').map(change => [change.field, change]))
  const rowsOf = (group: SetupGroup) => setupFieldNames
    .filter(name => setupFields[name].group === group && (content.setup[name] !== undefined || changed.has(name)))
    .map((name): SetupRow => {
      const words = setupWords(name, context)
      const change = changed.get(name)
      return { key: name, label: words.label, help: setupFields[name].help, value: valueWord(name, content.setup[name]), unit: numbered(words.unit, words.plusMinus), ...(change && { change }) }
    })
  return Object.fromEntries(setupGroups.map(group => [group, block(group, rowsOf(group))])) as Record<SetupGroup, SetupBlock>
}

/** Zones as two rows each, so that a changed end stands before over after like every other value. */
export function zoneBlock(content: Content, context: WordContext, changes: readonly FieldChange[]): SetupBlock {
  const unit = context.axisKind === 'rotary' ? 'deg' : 'mm'
  const changed = new Map(changes.filter(change => change.section === 'zone').map(change => [`${change.row ?? ''} ${change.field}`, change]))
  const numbers = [...new Set([...content.zones.map(zone => zone.zone), ...[...changed.values()].flatMap(change => change.row ?? [])])].sort((a, b) => a - b)
  const rows = numbers.flatMap(number => (['from', 'to'] as const).map((end): SetupRow => {
    const change = changed.get(`${number} ${end}`)
    return { key: `${number} ${end}`, label: `zone ${number}, ${end}`, help: 'The output is on in between.', value: content.zones.find(zone => zone.zone === number)?.[end], unit, ...(change && { change }) }
  }))
  return block('zones', rows)
}

/** The drive's own values that have no field of their own, by key. */
export function extraBlock(content: Content, context: WordContext, changes: readonly FieldChange[]): SetupBlock {
  const changed = new Map(changes.filter(change => change.section === 'extra').map(change => [change.field, change]))
  const keys = [...new Set([...Object.keys(content.extra), ...changed.keys()])].sort()
  return block('extra values', keys.map((key): SetupRow => {
    const words = extraWords(key, context.nameplate?.dictionary)
    const value = content.extra[key]
    const change = changed.get(key)
    const own = typeof value === 'object' ? value.unit : words.unit
    return { key, label: words.label, help: '', value: typeof value === 'object' ? value.value : value, unit: own, ...(change && { change }) }
  }))
}
