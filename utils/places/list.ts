import Papa from 'papaparse'
import { axisBody, unitBody } from '#shared/api/places'
import { axisFlags, axisKinds } from '#shared/settings/types'
import { numberOrText } from '../forms/fields'
import { issuesOf } from '../forms/issues'

/*
 * A list of what stands where, one axis a line, as people keep it in a spreadsheet. The header names the columns, in any
 * order; `;` and tab are read as well as `,`.
 */

export const listColumns = ['site', 'line', 'machine', 'tag', 'kind', 'role', 'flags', 'bus', 'due', 'serial', 'channel', 'model', 'firmware'] as const
export type ListColumn = (typeof listColumns)[number]
const needed: readonly ListColumn[] = ['line', 'machine', 'tag', 'kind']

export const listExample = [
  listColumns.join(','),
  'North hall,Line 1,LID-01,LID-01.Z,linear,seat lid,gravity press,bus 1,24,HL40-24-00887,,HL40-200V,3.12',
  'North hall,Line 1,LID-01,LID-01.R,rotary,turn lid,,bus 1,24,HR16-24-00921,,HR16,3.08',
].join('\n')

/** One axis of the list, and the unit that sits there. */
export interface ListRow {
  /** Line of the file, counted from 1 with the header. */
  readonly at: number
  readonly site: string
  readonly line: string
  readonly machine: string
  readonly axis: { readonly tag: string, readonly axisKind: string, readonly role: string, readonly flags: readonly string[], readonly bus: string, readonly uploadEveryHours: number | string | null }
  readonly unit: { readonly serial: string, readonly channel?: number | string, readonly model: string, readonly firmware: string } | null
}
export interface ListError { readonly at: number, readonly message: string }
export interface ReadList { readonly rows: readonly ListRow[], readonly errors: readonly ListError[] }

type Cells = Readonly<Record<string, string | undefined>>
const cell = (cells: Cells, column: ListColumn) => (cells[column] ?? '').trim()

function rowOf(cells: Cells, at: number, onlySite: string): ListRow {
  const of = (column: ListColumn) => cell(cells, column)
  const due = of('due')
  return {
    at, site: of('site') || onlySite, line: of('line'), machine: of('machine'),
    axis: { tag: of('tag'), axisKind: of('kind').toLowerCase(), role: of('role'), flags: of('flags').toLowerCase().split(/[\s/+]+/).filter(flag => flag !== ''), bus: of('bus'), uploadEveryHours: due === '' ? null : numberOrText(due) },
    unit: of('serial') === '' ? null : { serial: of('serial'), ...(of('channel') ? { channel: numberOrText(of('channel')) } : {}), model: of('model'), firmware: of('firmware') },
  }
}

function problemsOf(row: ListRow): string[] {
  const places = (['site', 'line', 'machine'] as const).filter(name => row[name] === '').map(name => `${name}: needed`)
  const axis = axisBody.safeParse({ ...row.axis, machineId: 1 }, { reportInput: true })
  const unit = row.unit ? unitBody.safeParse(row.unit, { reportInput: true }) : undefined
  const words: Readonly<Record<string, string>> = { axisKind: `kind: one of ${axisKinds.join(', ')}`, flags: `flags: any of ${axisFlags.join(', ')}`, uploadEveryHours: 'due: whole hours, 1 to 8760, or empty' }
  const found = [axis, unit].flatMap(parsed => parsed && !parsed.success ? Object.entries(issuesOf(parsed.error)) : [])
  return [...places, ...found.map(([name, issue]) => words[name] ?? `${name}: ${issue}`)]
}

function twice(rows: readonly ListRow[]): ListError[] {
  const seen = new Map<string, number>()
  return rows.flatMap((row) => {
    const keys = [`tag ${row.axis.tag}`, ...(row.unit ? [`serial ${row.unit.serial}${row.unit.channel ? ` channel ${row.unit.channel}` : ''}`] : [])]
    return keys.flatMap((key) => {
      const before = seen.get(key.toLowerCase())
      if (before === undefined) seen.set(key.toLowerCase(), row.at)
      return before === undefined ? [] : [{ at: row.at, message: `${key} stands on line ${before} already` }]
    })
  })
}

/** Reads the list; every error with its line. `onlySite` is what an empty site means, where there is one site only. */
export function readList(text: string, onlySite = ''): ReadList {
  const { data, meta, errors } = Papa.parse<Cells>(text.replace(/^\uFEFF/, '').trim(), { header: true, skipEmptyLines: 'greedy', transformHeader: head => head.trim().toLowerCase() })
  const heads = meta.fields ?? []
  const lacks = needed.filter(column => !heads.includes(column))
  if (lacks.length > 0) return { rows: [], errors: [{ at: 1, message: `The header lacks ${lacks.join(', ')}. Columns are ${listColumns.join(', ')}` }] }
  const unknown = heads.filter(head => !listColumns.some(column => column === head))
  const header = unknown.length > 0 ? [{ at: 1, message: `Not known: ${unknown.join(', ')}. Columns are ${listColumns.join(', ')}` }] : []
  const rows = data.map((cells, index) => rowOf(cells, index + 2, onlySite))
  const cells = errors.filter(error => error.type === 'Quotes' || error.code === 'TooManyFields').map(error => ({ at: (error.row ?? 0) + 2, message: error.message }))
  const wrong = rows.flatMap(row => problemsOf(row).map(message => ({ at: row.at, message })))
  return { rows, errors: [...header, ...cells, ...wrong, ...twice(rows)].sort((a, b) => a.at - b.at) }
}
