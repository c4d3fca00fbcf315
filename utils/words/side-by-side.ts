import { setupFieldNames, setupFields, type SetupGroup } from '#shared/settings/fields'
import type { Content, ExtraValue } from '#shared/settings/types'
import { fractionOf } from '../format'
import { setupWords, valueWord } from './fields'

export interface SideRow {
  readonly key: string
  readonly label: string
  /** Of all that hold it; '' where axes of both kinds do. */
  readonly unit: string
  /** Beside each value where linear and rotary axes hold it; else none. */
  readonly units: readonly string[]
  /** One for each axis, in their order; undefined = not set, null = never read. */
  readonly values: readonly (ExtraValue | undefined | null)[]
  readonly fraction: number
  /** Not all axes that were read hold the same. */
  readonly differs: boolean
}

/** Setup of several axes as one table, by group; a field that none of them has takes no row. */
export function sideBySide(contents: readonly (Content | null)[]): { group: SetupGroup, rows: SideRow[] }[] {
  const read = contents.filter(content => content !== null)
  const rows = setupFieldNames.filter(name => read.some(content => content.setup[name] !== undefined)).map((name) => {
    const holding = read.filter(content => content.setup[name] !== undefined)
    const words = setupWords(name, { axisKind: holding[0]?.axisKind ?? 'linear' })
    const unitOf = ({ axisKind }: Content) => {
      const { unit, plusMinus } = setupWords(name, { axisKind })
      return unit && plusMinus ? `± ${unit}` : unit
    }
    const mixed = new Set(holding.map(unitOf)).size > 1
    const values = contents.map(content => content === null ? null : valueWord(name, content.setup[name]))
    const row: SideRow = {
      key: name, label: words.label, unit: mixed || !holding[0] ? '' : unitOf(holding[0]), values,
      units: contents.map(content => mixed && content?.setup[name] !== undefined ? unitOf(content) : ''), fraction: fractionOf(values),
      differs: new Set(values.filter(value => value !== null)).size > 1,
    }
    return { group: setupFields[name].group, row }
  })
  const groups = [...new Set(rows.map(row => row.group))]
  return groups.map(group => ({ group, rows: rows.filter(row => row.group === group).map(({ row }) => row) }))
}
