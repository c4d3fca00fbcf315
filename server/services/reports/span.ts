import { boundsText } from '#server/database/bounds'
import { instantOf } from '#server/database/clock'
import type { VaultDb } from '#server/database/prepared'
import { toldQueries } from '#server/database/report/queries'
import type { ReportRow } from '#server/database/report/table'

export type ToldAxis = ReturnType<ReturnType<typeof toldQueries>['axes']['all']>[number]

/** What a report tells of: its axes and its period, and until when what was said of it counts. */
export interface Span {
  readonly db: VaultDb
  readonly report: ReportRow
  readonly axes: readonly ToldAxis[]
  /** Their ids as the statements take them. */
  readonly axesText: string
  readonly from: string
  /** Not included. */
  readonly until: string
  /** Not included: what was done later than the report was asked for is in none. */
  readonly told: string
}

export function spanOf(db: VaultDb, report: ReportRow): Span {
  const { scope, scopeId, sites, fromAt, toAt, askedAt } = report
  const axes = toldQueries(db).axes.all({ sites: boundsText(sites), axis: null, machine: null, line: null, site: null, ...(scope === null ? {} : { [scope]: scopeId }) })
  const told = instantOf(Date.parse(askedAt) + 1)
  return { db, report, axes, axesText: JSON.stringify(axes.map(({ id }) => id)), from: fromAt ?? '', until: toAt === null || toAt > told ? told : toAt, told }
}
