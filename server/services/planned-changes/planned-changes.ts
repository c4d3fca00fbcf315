import type { z } from 'zod'
import type { PlannedChange, plannedChangeBody, plannedChangeEndBody } from '#shared/api/findings'
import type { listQuery } from '#shared/api/common'
import { Refusal } from '#shared/errors/refusal'
import type { Actor, PersonActor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import { findingQueries } from '#server/database/finding/queries'
import { judgingQueries } from '#server/database/judging/queries'
import { plannedChangeQueries, type NamedPlan } from '#server/database/planned-change/queries'
import type { VaultDb } from '#server/database/prepared'
import { afterOf, limitOf, pageOf } from '../page'
import { assertPlace } from '../places/bounds'
import { kindOf } from '../rules/rule-fits'
import { rangesOf } from './ranges'
import { namedPerson, personIn, personName } from '../versions/summary'

/** Announces a change before it is made: what it covers will be explained when it is seen. */
export function announceChange(vault: Vault, actor: PersonActor, body: z.output<typeof plannedChangeBody>): { id: number } {
  return vault.write(actor, (write) => {
    for (const [place, axisId] of body.axisIds.entries()) assertPlace(vault, actor, 'axis', axisId, `/axisIds/${place}`)
    assertFields(body)
    assertAllower(vault.db, body.allowedBy)
    const fromAt = new Date(body.from).toISOString()
    const untilAt = new Date(body.until).toISOString()
    if (untilAt <= fromAt) throw unfit('/until', 'time-order', 'The window ends before it begins.')
    if (untilAt <= write.now) throw unfit('/until', 'time-order', 'The window lies in the past: what was not announced before is explained at its finding.')
    const row = {
      axisIds: [...new Set(body.axisIds)], fields: [...new Set(body.fields)], min: body.min ?? null, max: body.max ?? null,
      ranges: body.ranges === undefined || body.ranges.length === 0 ? null : body.ranges.map(({ field, min = null, max = null }) => ({ field, min, max })), fromAt, untilAt,
      reason: body.reason, allowedBy: body.allowedBy, madeAt: write.now, madeBy: actor.id,
    }
    const id = plannedChangeQueries(vault.db).insert(row)
    write.log({ act: 'planned-change-announced', id, state: { id, ...row, endedAt: null }, note: row.reason })
    return { id }
  })
}

function assertFields({ fields, min, max, ranges = [] }: z.output<typeof plannedChangeBody>): void {
  for (const [place, { field }] of ranges.entries()) {
    if (!fields.includes(field)) throw unfit(`/ranges/${place}/field`, 'field', `${field} is not among the fields of this change.`)
    if (ranges.findIndex(other => other.field === field) !== place) throw unfit(`/ranges/${place}/field`, 'field', `${field} has a range already.`)
  }
  for (const [place, field] of fields.entries()) {
    const own = ranges.findIndex(range => range.field === field)
    assertRange(field, ranges[own] ?? { min, max }, own === -1 ? ['/fields', `/fields/${place}`] : [`/ranges/${own}`, `/ranges/${own}/field`])
  }
}

/** `at`: where the range stands, and where its field does. */
function assertRange(field: string, { min, max }: { min?: number | undefined, max?: number | undefined }, [range, named]: readonly [string, string]): void {
  const kind = kindOf(field)
  if (kind === undefined) throw unfit(named, 'field', `${field} is no field of the settings format.`)
  if (kind === 'other' && (min !== undefined || max !== undefined)) throw unfit(named, 'field', `${field} holds no number: announce it without a range.`)
  if (min !== undefined && max !== undefined && min > max) throw unfit(range === '/fields' ? '/min' : `${range}/min`, 'range', `The lower end ${min} lies above the upper end ${max}.`)
}

function assertAllower(db: VaultDb, allowedBy: string): void {
  const id = personIn(allowedBy)
  if (id !== null && personName(db, id) === undefined) throw unfit('/allowedBy', 'not-found', `There is no person ${id}.`)
}

const unfit = (at: string, code: string, message: string) => new Refusal(code === 'time-order' ? 'time-order' : 'input', message, { errors: [{ at, code, message }] })

/** Calls an announced change off; what came of it until then stays. */
export function endPlannedChange(vault: Vault, actor: PersonActor, id: number, { reason }: z.output<typeof plannedChangeEndBody>): PlannedChange {
  return vault.write(actor, (write) => {
    const { plan, end } = planRow(vault, actor, id)
    if (end?.at) throw new Refusal('already-ended', 'This announcement was called off already.')
    plannedChangeQueries(vault.db).insertEnd({ plannedChangeId: id, at: write.now, byPerson: actor.id, reason })
    write.log({ act: 'planned-change-ended', id, state: { ...plan, endedAt: write.now, endedByPerson: actor.id, endReason: reason }, note: reason })
    return planOnWire(vault.db, planRow(vault, actor, id))
  })
}

/** What was announced for axes of the actor's sites, newest first, each with what came of it. */
export function listPlannedChanges({ db }: Vault, actor: Actor, query: z.output<typeof listQuery>): { items: PlannedChange[], next: string | null } {
  const rows = plannedChangeQueries(db).page.all({ below: afterOf(query, Number.MAX_SAFE_INTEGER), limit: limitOf(query) + 1, sites: boundsText(actor.sites) })
  return pageOf(rows, query, ({ plan }) => plan.id, row => planOnWire(db, row))
}

export const readPlannedChange = (vault: Vault, actor: Actor, id: number): PlannedChange => planOnWire(vault.db, planRow(vault, actor, id))

/** 404 alike for what does not exist and for what names an axis outside the actor's sites. */
function planRow(vault: Vault, actor: Actor, id: number): NamedPlan {
  const found = plannedChangeQueries(vault.db).one.get({ id })
  if (!found) throw new Refusal('not-found', `There is no planned change ${id}.`)
  for (const axisId of found.plan.axisIds) assertPlace(vault, actor, 'axis', axisId, '/id')
  return found
}

function planOnWire(db: VaultDb, { plan, announcer, end }: NamedPlan): PlannedChange {
  const queries = plannedChangeQueries(db)
  return {
    id: plan.id, axes: queries.axes.all({ ids: JSON.stringify(plan.axisIds) }), fields: plan.fields, min: plan.min, max: plan.max, ranges: rangesOf(plan), from: plan.fromAt, until: plan.untilAt,
    reason: plan.reason, allowedBy: namedPerson(db, plan.allowedBy) ?? plan.allowedBy, announcedAt: plan.madeAt, announcedBy: announcer,
    timeZone: judgingQueries(db).axis.get({ id: plan.axisIds[0] ?? 0 })?.site.timeZone ?? 'UTC',
    endedAt: end?.at ?? null, endedBy: end?.by ?? null, endReason: end?.reason ?? null,
    came: queries.came.all({ id: plan.id }).map(({ findingId, at, title, state }) => {
      const [shown] = findingQueries(db).versions.all({ findingId, limit: 1 })
      return { findingId, at, title, state, tag: shown?.tag ?? '', versionId: shown?.row.versionId ?? null, number: shown?.number ?? null }
    }),
  }
}
