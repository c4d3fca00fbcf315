import type { Dictionary } from '../../settings/nameplate'
import type { AxisFlag, Content, ExtraValue, SetupFieldName } from '../../settings/types'
import { answers } from '../answers'
import { inWords } from '../format'
import type { CheckResult } from '../types'
import { harmValues, type SisterValue } from './sister-fields'
import { rowNames, type PairsOf } from './sister-rows'
import type { LiveResult } from './types'

const { warn } = answers('sister-outlier')

const leastAgreeing = 4
/** At most one axis in this many may stand apart. */
const oneIn = 5

/** An axis among those of its role and model in a site. */
export interface Sister { readonly tag: string, readonly content: Content, readonly flags: readonly AxisFlag[] }

/** One field over all sisters, in their order. */
export interface SisterRow {
  readonly key: string
  readonly words: string
  /** Undefined where an axis has none. */
  readonly values: readonly (ExtraValue | undefined)[]
  /** As a person reads them; '' where an axis has none. */
  readonly texts: readonly string[]
  /** Indices of the axes that stand apart from those that agree; empty where too few agree to tell. */
  readonly odd: readonly number[]
}

export const sisterOutlier = {
  id: 'sister-outlier',
  title: 'Odd one among sisters',
  reason: 'Axes that do the same work with the same unit are set alike; the one that is not was changed by somebody, or forgotten.',
  formula: 'at least 4 sister axes (same role and model in a site) agree and at most 1 in 5 does not; harm weight only, place and taught values left out',
  levels: ['warn'],
  judge: (sisters: readonly Sister[], dictionary?: Dictionary, pairsOf?: PairsOf) => sistersHeld(sisters, dictionary, pairsOf).results,
} as const

/** Matrix and results from one look at the sisters: of thousands, reading their values is what takes time. Rows of moves go by number where `pairsOf` pairs none. */
export function sistersHeld(sisters: readonly Sister[], dictionary?: Dictionary, pairsOf: PairsOf = () => undefined): { readonly rows: SisterRow[], readonly results: LiveResult[] } {
  const table = tableOf(sisters, dictionary, pairsOf)
  const rows = table.map(({ key, words, cells, odd }) => ({ key, words, values: cells.map(cell => cell?.value), texts: cells.map(cell => cell?.text ?? ''), odd }))
  return { rows, results: resultsOf(sisters, table) }
}

/** The matrix of the harm fields: a row for each field that any sister has, the odd ones marked. */
export const sisterMatrix = (sisters: readonly Sister[], dictionary?: Dictionary): SisterRow[] => sistersHeld(sisters, dictionary).rows

/** A warning for each value that stands apart; values of one row of an axis share one, as a shifted row differs in all of them. */
function resultsOf(sisters: readonly Sister[], table: readonly TableRow[]): LiveResult[] {
  const found = new Map<string, { tag: string, index: number, rows: TableRow[] }>()
  for (const row of table) {
    for (const index of row.odd) {
      const key = `${index} ${row.rowKey ?? row.key}`
      const one = found.get(key) ?? { tag: sisters[index]?.tag ?? '', index, rows: [] }
      one.rows.push(row)
      found.set(key, one)
    }
  }
  return [...found.values()].map(({ tag, index, rows }) => ({ ...resultOf(tag, index, rows), axes: [tag] }))
}

function resultOf(tag: string, index: number, rows: readonly TableRow[]): CheckResult {
  const own = rows.map(({ cells }) => cells[index])
  const at = own.flatMap(cell => cell ? [cell.at] : [])
  const fields = rows.map(({ key }) => key)
  const agreeing = Math.min(...rows.map(row => row.agreeing))
  const [row] = rows
  if (rows.length > 1 || !row) {
    return warn(at, `${tag}: ${inWords(rows.map(({ words, cells }) => cells[index]?.here ?? words))} are not as on ${agreeing} sister axes.`, { fields, agreeing, axes: [tag] })
  }
  return warn(at, `${tag}: ${own[0]?.here ?? row.words} is ${own[0]?.text ?? 'not set'}, while ${agreeing} sister axes have ${row.common?.text ?? 'none'}.`,
    { fields, ...told('value', own[0]), ...told('common', row.common), agreeing, axes: [tag] })
}

interface TableRow {
  readonly key: string
  readonly words: string
  readonly rowKey?: string
  readonly cells: readonly (SisterValue | undefined)[]
  readonly odd: readonly number[]
  /** What most have, undefined where most have none, and how many of them. */
  readonly common?: SisterValue
  readonly agreeing: number
}

function tableOf(sisters: readonly Sister[], dictionary: Dictionary | undefined, pairsOf: PairsOf): TableRow[] {
  // What can hurt on one of them is looked at on all.
  const flags = sisters.flatMap(sister => sister.flags)
  const names = rowNames(sisters.map(({ content }) => content), pairsOf)
  const columns = sisters.map(({ content }, index) => new Map(harmValues(content, flags, dictionary, names[index]).map(value => [value.key, value])))
  const fields = new Map(columns.flatMap(column => [...column]))
  return [...fields.values()].map(({ key, words, rowKey }) => {
    const cells = columns.map(column => column.get(key))
    // An axis without the row is odd by its missing kind or start, and takes no part in the row's other fields.
    const hasRow = (column: ReadonlyMap<string, SisterValue>) => rowKey === undefined || rowKey === key || column.has(rowKey)
    const isTaught = (index: number) => cells[index] === undefined && sisters[index]?.content.setup[key as SetupFieldName] !== undefined
    const takingPart = columns.flatMap((column, index) => hasRow(column) && !isTaught(index) ? [index] : [])
    return { key, words, ...rowKey === undefined ? {} : { rowKey }, cells, ...apart(cells, takingPart) }
  })
}

/** Who stands apart from those that agree; nobody where fewer than four agree or more than one in five does not. */
function apart(cells: readonly (SisterValue | undefined)[], takingPart: readonly number[]): Pick<TableRow, 'odd' | 'common' | 'agreeing'> {
  const groups = new Map<string, number[]>()
  for (const index of takingPart) {
    const text = cells[index]?.text ?? ''
    groups.set(text, [...groups.get(text) ?? [], index])
  }
  const most = [...groups.values()].reduce((largest, group) => group.length > largest.length ? group : largest, [])
  const others = takingPart.length - most.length
  const tells = most.length >= leastAgreeing && others * oneIn <= takingPart.length
  const common = cells[most[0] ?? -1]
  return { odd: tells ? takingPart.filter(index => !most.includes(index)) : [], agreeing: most.length, ...common ? { common } : {} }
}

function told(name: string, cell: SisterValue | undefined): Record<string, number | string> {
  if (!cell) return {}
  return { [name]: typeof cell.value === 'number' ? cell.value : cell.text }
}
