import { eq, isNull, and, sql, type SQL } from 'drizzle-orm'
import type { Scope } from '#shared/api/routes'
import { attachment } from '../attachment/table'
import { axis } from '../axis/table'
import { finding } from '../finding/table'
import { fitting } from '../fitting/table'
import { line } from '../line/table'
import { machine } from '../machine/table'
import { prepared } from '../prepared'
import { rule } from '../rule/table'
import { swap } from '../swap/table'
import { tray } from '../tray/table'
import { unit } from '../unit/table'
import { version } from '../version/table'
import { waiver } from '../waiver/table'
import { site } from './table'

/** The site that a record belongs to; siteId null = to none in particular. */
interface Found { id: number, siteId: number | null }

const ref = sql.placeholder('ref')

export const siteQueries = prepared((db) => {
  const axisSite = (where: SQL) => db.select({ id: axis.id, siteId: line.siteId }).from(axis)
    .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).where(where)
  const queries = {
    site: db.select({ id: site.id, siteId: site.id }).from(site).where(eq(site.id, ref)).prepare(),
    line: db.select({ id: line.id, siteId: line.siteId }).from(line).where(eq(line.id, ref)).prepare(),
    machine: db.select({ id: machine.id, siteId: line.siteId }).from(machine).innerJoin(line, eq(line.id, machine.lineId)).where(eq(machine.id, ref)).prepare(),
    axis: axisSite(eq(axis.id, ref)).prepare(),
    version: db.select({ id: version.id, siteId: line.siteId }).from(version).innerJoin(axis, eq(axis.id, version.axisId))
      .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).where(eq(version.id, ref)).prepare(),
    // A unit belongs where it sits; one that sits nowhere, where it lies.
    unit: db.select({ id: unit.id, siteId: sql<number | null>`coalesce(${line.siteId}, ${unit.siteId})` }).from(unit)
      .leftJoin(fitting, and(eq(fitting.unitId, unit.id), isNull(fitting.toAt))).leftJoin(axis, eq(axis.id, fitting.axisId))
      .leftJoin(machine, eq(machine.id, axis.machineId)).leftJoin(line, eq(line.id, machine.lineId)).where(eq(unit.id, ref)).prepare(),
    fitting: db.select({ id: fitting.id, siteId: line.siteId }).from(fitting).innerJoin(axis, eq(axis.id, fitting.axisId))
      .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).where(eq(fitting.id, ref)).prepare(),
    waiver: db.select({ id: waiver.id, siteId: line.siteId }).from(waiver).innerJoin(axis, eq(axis.id, waiver.axisId))
      .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).where(eq(waiver.id, ref)).prepare(),
    attachment: db.select({ id: attachment.id, siteId: line.siteId }).from(attachment).innerJoin(version, eq(version.id, attachment.versionId)).innerJoin(axis, eq(axis.id, version.axisId))
      .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).where(eq(attachment.id, ref)).prepare(),
    finding: db.select({ id: finding.id, siteId: finding.siteId }).from(finding).where(eq(finding.id, ref)).prepare(),
    swap: db.select({ id: swap.id, siteId: line.siteId }).from(swap).innerJoin(axis, eq(axis.id, swap.axisId))
      .innerJoin(machine, eq(machine.id, axis.machineId)).innerJoin(line, eq(line.id, machine.lineId)).where(eq(swap.id, ref)).prepare(),
    tray: db.select({ id: tray.id, siteId: tray.siteId }).from(tray).where(eq(tray.id, ref)).prepare(),
  }
  const tagged = axisSite(eq(axis.tag, ref)).prepare()
  const ruleScope = db.select({ id: rule.id, scope: rule.scope, scopeId: rule.scopeId }).from(rule).where(eq(rule.id, ref)).prepare()

  /** An axis also as `tag:LID-02.Z`, without case. */
  function find(scope: Scope, of: number | string): Found | undefined {
    if (scope === 'axis' && typeof of === 'string' && of.startsWith('tag:')) return tagged.get({ ref: of.slice(4) })
    if (scope !== 'rule') return queries[scope].get({ ref: Number(of) })
    const found = ruleScope.get({ ref: Number(of) })
    const place = found && queries[found.scope].get({ ref: found.scopeId })
    return found && place && { id: found.id, siteId: place.siteId }
  }
  return { find }
})
