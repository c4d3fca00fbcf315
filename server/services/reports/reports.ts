import type { z } from 'zod'
import type { Report, reportBody, reportQuery } from '#shared/api/reports'
import { Refusal } from '#shared/errors/refusal'
import { seesSite, type Actor, type PersonActor } from '#server/database/actor'
import { axisRows } from '#server/database/axis/queries'
import type { Vault } from '#server/database/client'
import { lineRows } from '#server/database/line/queries'
import { machineRows } from '#server/database/machine/queries'
import type { VaultDb } from '#server/database/prepared'
import { reportQueries } from '#server/database/report/queries'
import type { ReportRow } from '#server/database/report/table'
import { listSites, siteRows } from '#server/database/site/queries'
import { siteQueries } from '#server/database/site/scope'
import type { SiteRow } from '#server/database/schema'
import { afterOf, limitOf, pageOf } from '../page'
import { assertPlace } from '../places/bounds'
import { checkpointNow } from '../trail/trail'
import { makingOf } from './making'

/** A report that was asked for, and by whom. */
export type NamedReport = NonNullable<ReturnType<ReturnType<typeof reportQueries>['one']['get']>>

/** Keeps what is asked for, with the checkpoint of the log as it is now; its file is made when it is taken. */
export function askReport(vault: Vault, actor: PersonActor, { scope, scopeId, from, to, paper }: z.output<typeof reportBody>): { id: number } {
  return vault.write(actor, (write) => {
    if (scope !== undefined && scopeId !== undefined) assertPlace(vault, actor, scope, scopeId, '/scopeId')
    const fromAt = from === undefined ? null : new Date(from).toISOString()
    const toAt = to === undefined ? null : new Date(to).toISOString()
    if (fromAt !== null && fromAt >= (toAt ?? write.now)) throw new Refusal('time-order', 'The period ends before it begins.', { errors: [{ at: '/from', code: 'time-order', message: 'lies behind the end of the period' }] })
    const { note, size } = checkpointNow(vault)
    const row: Omit<ReportRow, 'id'> = { scope: scope ?? null, scopeId: scopeId ?? null, sites: actor.sites, fromAt, toAt, paper: paper ?? 'A4', askedAt: write.now, askedBy: actor.id, size, note }
    if (paper === undefined) row.paper = siteOf(vault.db, row)?.paper ?? 'A4'
    const id = reportQueries(vault.db).insert(row)
    write.log({ act: 'report-asked', id, state: { id, ...row } })
    return { id }
  })
}

/** Reports that tell of nothing outside the actor's sites, newest first; a page may be short and still have a next one. */
export function listReports(vault: Vault, actor: Actor, query: z.output<typeof reportQuery>): { items: Report[], next: string | null } {
  const { scope = null, scopeId = null } = query
  const rows = reportQueries(vault.db).page.all({ below: afterOf(query, Number.MAX_SAFE_INTEGER), limit: limitOf(query) + 1, scope, scopeId })
  const page = pageOf(rows, query, ({ report }) => report.id, row => row)
  return { items: page.items.filter(({ report }) => sees(vault.db, actor, report)).map(row => reportOnWire(vault, row)), next: page.next }
}

export const readReport = (vault: Vault, actor: Actor, id: number): Report => reportOnWire(vault, reportRow(vault, actor, id))

/** 404 alike for what does not exist and for what tells of sites that the actor does not see. */
export function reportRow({ db }: Vault, actor: Actor, id: number): NamedReport {
  const found = reportQueries(db).one.get({ id })
  if (!found || !sees(db, actor, found.report)) throw new Refusal('not-found', `There is no report ${id}.`)
  return found
}

function sees(db: VaultDb, actor: Actor, { scope, scopeId, sites }: ReportRow): boolean {
  if (actor.sites === null) return true
  const site = scope === null ? undefined : siteQueries(db).find(scope, scopeId ?? 0)?.siteId
  return typeof site === 'number' ? seesSite(actor, site) : sites !== null && sites.every(id => seesSite(actor, id))
}

function reportOnWire(vault: Vault, { report, asker }: NamedReport): Report {
  const { id, scope, scopeId, fromAt, toAt, paper, askedAt, size } = report
  return { id, scope, scopeId, subject: subjectOf(vault.db, report), timeZone: siteOf(vault.db, report)?.timeZone ?? 'UTC', from: fromAt, to: toAt, paper, askedAt, askedBy: asker, size, making: makingOf(vault, id) }
}

/** The place of a report by its name of today. */
export function subjectOf(db: VaultDb, { scope, scopeId, sites }: Pick<ReportRow, 'scope' | 'scopeId' | 'sites'>): string {
  const id = scopeId ?? 0
  if (scope === 'axis') return axisRows(db).byId.get({ id })?.tag ?? `axis ${id}`
  if (scope === 'machine') return machineRows(db).byId.get({ id })?.name ?? `machine ${id}`
  if (scope === 'line') return lineRows(db).byId.get({ id })?.name ?? `line ${id}`
  if (scope === 'site') return siteRows(db).byId.get({ id })?.name ?? `site ${id}`
  return sites === null ? 'every axis' : `every axis of ${sites.map(site => siteRows(db).byId.get({ id: site })?.name ?? `site ${site}`).join(', ')}`
}

/** The site whose zone and paper hold: its own, or the first that it tells of. */
export function siteOf(db: VaultDb, { scope, scopeId, sites }: Pick<ReportRow, 'scope' | 'scopeId' | 'sites'>): SiteRow | undefined {
  const id = scope === null ? sites?.[0] : siteQueries(db).find(scope, scopeId ?? 0)?.siteId
  return typeof id === 'number' ? siteRows(db).byId.get({ id }) : listSites(db, null)[0]
}
