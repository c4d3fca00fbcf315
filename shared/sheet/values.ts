import { forceBaseOf } from '../motion/force-base'
import { addressOf, type Address } from '../settings/entry-table/address'
import type { EntryParameter } from '../settings/entry-table/schema'
import { setupField, setupFieldNames } from '../settings/fields'
import type { Nameplate } from '../settings/nameplate'
import type { Content, ExtraValue } from '../settings/types'
import { besideValue, writtenCell, type BesideContext } from './beside'
import { extraLabel, labelOf, unitOf } from './labels'
import type { SheetTaught, SheetValue } from './types'

export interface SheetSource {
  /** What goes to the unit, taught values left out already. */
  readonly content: Content
  /** Of the unit that is written to. */
  readonly nameplate?: Nameplate
  /** Names of what is to be taught, extra as `extra:KEY`. */
  readonly left: readonly string[]
  /** Names of what is copied and then proved at the machine. */
  readonly prove: readonly string[]
}

const extraGroup = 'extra values'

interface Placed { readonly name: string, readonly value: ExtraValue }

/**
 * Every value of setup, zones and extra exactly once: first in the order and the numbers of the entry table, where there is
 * one, then what it does not name, by group in the order of the field tables.
 */
export function sheetValues(source: SheetSource): SheetValue[] {
  const { content, nameplate } = source
  const table = nameplate?.entryTable
  const all = placedValues(content)
  const listed = kept((table?.parameters ?? []).flatMap(entry => inList(source, entry, all)))
  const named = new Set((table?.parameters ?? []).map(({ field }) => field))
  const rest = all.filter(({ name }) => !named.has(name)).map(placed => plainValue(source, placed))
  return [...listed, ...rest]
}

/** A value of the drive's own in the middle of its list stays with the group that it stands in. */
function kept(values: readonly SheetValue[]): SheetValue[] {
  let group = ''
  return values.map((value) => {
    if (value.group !== extraGroup || group === '') group = value.group
    return { ...value, group }
  })
}

/** What the unit must be taught, with the drive's own number where the entry table has it. */
export function sheetTaught({ content, nameplate, left }: SheetSource): SheetTaught[] {
  const numbers = new Map((nameplate?.entryTable?.parameters ?? []).map(({ field, number }) => [field, number]))
  return left.map(name => ({
    number: numbers.get(name) ?? '',
    label: name.startsWith('extra:') ? extraLabel(name.slice('extra:'.length), nameplate?.dictionary) : labelOf(name),
    unit: unitOf(name, content.axisKind, nameplate),
  }))
}

/** Setup by the field table, zones by number, extra by key: the names are those of an entry table. */
function placedValues({ setup, zones, extra }: Content): Placed[] {
  return [
    ...setupFieldNames.flatMap((name): Placed[] => setup[name] === undefined ? [] : [{ name, value: setup[name] }]),
    ...zones.flatMap(({ zone, from, to }): Placed[] => [{ name: `zone:${zone}:from`, value: from }, { name: `zone:${zone}:to`, value: to }]),
    ...Object.entries(extra).map(([key, value]): Placed => ({ name: `extra:${key}`, value })),
  ]
}

function inList(source: SheetSource, entry: EntryParameter, all: readonly Placed[]): SheetValue[] {
  const { content, nameplate, left } = source
  const address = addressOf(entry.field, content.axisKind)
  if (!address || !['setup', 'zone', 'extra'].includes(address.section) || left.includes(entry.field)) return []
  const value = all.find(({ name }) => name === entry.field)?.value
  if (value === undefined && entry.none === undefined) return []
  const cell = writtenCell(value, entry, address.kind, nameplate?.entryTable?.decimal ?? 'point')
  const scaled = entry.factor !== undefined && entry.factor !== 1
  return [{
    number: entry.number, label: labelFor(source, entry.field), value: cell, group: groupOf(address),
    unit: scaled ? '' : entry.unit ?? unitFor(source, entry.field, value),
    beside: value === undefined ? 'not set' : besideValue(contextOf(source), entry.field, value, { cell, told: scaled || entry.unit !== undefined || entry.step !== undefined || entry.digits !== undefined }),
  }]
}

function plainValue(source: SheetSource, { name, value }: Placed): SheetValue {
  const address = addressOf(name, source.content.axisKind)
  const cell = writtenCell(value, { field: name }, address?.kind ?? { type: 'extra' }, 'point')
  return { number: '', label: labelFor(source, name), value: cell, unit: unitFor(source, name, value), beside: besideValue(contextOf(source), name, value, { cell, told: false }), group: address ? groupOf(address) : extraGroup }
}

const contextOf = ({ content, nameplate, prove }: SheetSource): BesideContext => ({ axisKind: content.axisKind, base: forceBaseOf(nameplate), prove })

function labelFor({ nameplate }: SheetSource, name: string): string {
  return name.startsWith('extra:') ? extraLabel(name.slice('extra:'.length), nameplate?.dictionary) : labelOf(name)
}

function unitFor({ content, nameplate }: SheetSource, name: string, value: ExtraValue | undefined): string {
  return typeof value === 'object' ? value.unit : unitOf(name, content.axisKind, nameplate)
}

function groupOf({ section, field }: Address): string {
  if (section === 'setup') return setupField(field)?.group ?? 'other'
  return section === 'zone' ? 'zones' : extraGroup
}
