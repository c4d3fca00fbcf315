import { ruleOf } from '#shared/checks/table'
import { findingQueries } from '#server/database/finding/queries'
import { judgingQueries } from '#server/database/judging/queries'
import { plannedChangeQueries } from '#server/database/planned-change/queries'
import { toldQueries } from '#server/database/report/queries'
import { waiverQueries } from '#server/database/waiver/queries'
import { rangeWords } from '../planned-changes/ranges'
import { namedPerson } from '../versions/summary'
import type { FindingPart, PlanPart, SwapPart, ToldAct, WaiverPart } from './parts'
import type { Span, ToldAxis } from './span'

const pageLength = 100
/** All that one finding lists. */
const whole = Number.MAX_SAFE_INTEGER

/** Rows by their ids, a page at a time. */
function* paged<Row>(read: (after: number) => Row[], idOf: (row: Row) => number): Generator<Row> {
  let after = 0
  for (;;) {
    const rows = read(after)
    yield* rows
    const end = rows.at(-1)
    if (end === undefined || rows.length < pageLength) return
    after = idOf(end)
  }
}

const asked = ({ from, until, told, axesText }: Span) => ({ from, until, told, axes: axesText, limit: pageLength })
const entryOf = ({ db }: Span, kind: string, id: number) => toldQueries(db).entriesOf.get({ kind, id })?.seq ?? null
const axisOf = ({ axes }: Span, id: number): Pick<ToldAxis, 'tag' | 'timeZone' | 'axisKind'> => axes.find(axis => axis.id === id) ?? { tag: `axis ${id}`, timeZone: 'UTC', axisKind: 'linear' }

/** Findings that were open at some time of the period, with all that was said of them until the report was asked for. */
export function* toldFindings(span: Span): Generator<FindingPart> {
  const { db, report, told } = span
  const rows = paged(after => toldQueries(db).findings.all({ ...asked(span), after, vault: report.sites === null ? 1 : 0 }), ({ finding }) => finding.id)
  for (const { finding: { id, title, cause, weight, openedAt } } of rows) {
    const queries = findingQueries(db)
    const acts = queries.acts.all({ findingId: id }).filter(({ act }) => act.at < told)
    const shown = queries.versions.all({ findingId: id, limit: whole }).filter(({ row }) => row.at < told)
    const last = acts.at(-1)?.act.kind
    yield {
      kind: 'finding', findingId: id, title, cause, weight, openedAt, state: last === undefined || last === 'reopened' ? 'open' : last,
      timeZone: judgingQueries(db).axis.get({ id: shown[0]?.row.axisId ?? 0 })?.site.timeZone ?? 'UTC',
      shown: shown.map(({ row, tag, number }) => ({ tag, number, at: row.at, says: row.says })),
      acts: acts.map(({ act, by, tag, number }): ToldAct => ({
        kind: act.kind, at: act.at, by, text: act.text, madeBy: namedPerson(db, act.madeBy), madeAt: act.madeAt, workOrder: act.workOrder, plannedChangeId: act.plannedChangeId,
        as: act.closeAs, allowedBy: namedPerson(db, act.allowedBy), version: tag !== null && number !== null ? `${tag} v${number}` : null, entry: entryOf(span, 'finding-act', act.id),
      })),
    }
  }
}

/** Changes that were announced for axes of the report and could hold in the period. */
export function* toldPlans(span: Span): Generator<PlanPart> {
  const { db, told } = span
  for (const { id } of paged(after => toldQueries(db).plans.all({ ...asked(span), after }), row => row.id)) {
    const found = plannedChangeQueries(db).one.get({ id })
    if (!found) continue
    const { plan, announcer, end } = found
    const axes = plan.axisIds.filter(axisId => span.axes.some(axis => axis.id === axisId)).map(axisId => axisOf(span, axisId))
    yield {
      kind: 'planned-change', plannedChangeId: id, tags: axes.map(({ tag }) => tag), fields: rangeWords(plan, axes[0]?.axisKind ?? 'linear'), timeZone: axes[0]?.timeZone ?? 'UTC', from: plan.fromAt, until: plan.untilAt,
      reason: plan.reason, allowedBy: namedPerson(db, plan.allowedBy) ?? plan.allowedBy, announcedAt: plan.madeAt, announcedBy: announcer,
      ended: end?.at && end.at < told ? { at: end.at, by: end.by ?? '', reason: end.reason ?? '' } : null,
      explained: plannedChangeQueries(db).came.all({ id }).filter(({ at }) => at < told).map(({ findingId }) => findingId), entry: entryOf(span, 'planned-change', id),
    }
  }
}

/** Waivers that could hold in the period. */
export function* toldWaivers(span: Span): Generator<WaiverPart & { readonly endEntry: number | null }> {
  const { db, told } = span
  for (const { id } of paged(after => toldQueries(db).waivers.all({ ...asked(span), after }), row => row.id)) {
    const row = waiverQueries(db).named.get({ id })
    if (!row) continue
    const { tag, timeZone } = axisOf(span, row.axisId)
    const ended = row.endedAt !== null && row.endedAt < told ? { at: row.endedAt, by: row.endedBy ?? '', reason: row.endReason ?? '' } : null
    yield {
      kind: 'waiver', waiverId: id, tag, timeZone, rule: ruleOf(row.rule)?.title ?? row.rule, at: row.places, reason: row.reason, givenAt: row.givenAt, by: row.giver, until: row.untilAt, ended,
      entry: entryOf(span, 'waiver', id), endEntry: ended === null ? null : toldQueries(db).entriesOf.all({ kind: 'waiver', id }).at(-1)?.seq ?? null,
    }
  }
}

/** Swaps that went on in the period, each with all its steps: half a job is not readable. */
export function* toldSwaps(span: Span): Generator<SwapPart & { readonly meanings: readonly (string | null)[] }> {
  const { db } = span
  for (const { swap, tag, by } of paged(after => toldQueries(db).swaps.all({ ...asked(span), after }), row => row.swap.id)) {
    const steps = toldQueries(db).steps.all({ swapId: swap.id, told: span.told })
    yield {
      kind: 'swap', swapId: swap.id, tag, timeZone: axisOf(span, swap.axisId).timeZone, replaced: swap.replaced, failure: swap.failure, workOrder: swap.workOrder, openedAt: swap.openedAt, by,
      steps: steps.map(({ step, by: taker }) => ({ at: step.at, by: taker, act: step.act, text: step.text, entry: entryOf(span, 'swap-step', step.id) })),
      meanings: steps.map(({ step }) => (step.act === 'released' ? String(step.said.meaning) : null)),
    }
  }
}
