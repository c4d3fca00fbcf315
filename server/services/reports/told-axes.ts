import { knownGoodWords } from './words'
import { stretchOf } from '../history/filter'
import { newtonsOf } from '../forces/newtons'
import { namedPerson } from '../versions/summary'
import { toldQueries } from '#server/database/report/queries'
import type { AxisPart, MarkPart, ToldChange, VersionPart } from './parts'
import type { Span, ToldAxis } from './span'

const pageLength = 100
/** Before the first instant that a vault can hold. */
const never = '0000'

/** One axis: what stood there, its marks, its versions with their changes, oldest first. Nothing where nothing happened, unless it is all that was asked for. */
export function* toldAxis(span: Span, axis: ToldAxis): Generator<AxisPart | MarkPart | VersionPart> {
  const head = axisPart(span, axis)
  const marks = marksOf(span, axis)
  let begun = span.report.scope === 'axis' || head.seen.count > 0 || marks.length > 0
  if (begun) yield head
  yield* marks
  for (const version of versionsOf(span, axis)) {
    if (!begun) yield head
    begun = true
    yield version
  }
}

function axisPart({ db, from, until, report }: Span, axis: ToldAxis): AxisPart {
  const queries = toldQueries(db)
  const mark = (at: string) => knownGoodWords(queries.markBefore.get({ axisId: axis.id, at }))
  return {
    kind: 'axis', axisId: axis.id, tag: axis.tag, place: [axis.role, axis.machine, axis.line, axis.site].filter(Boolean).join(', '), timeZone: axis.timeZone,
    units: queries.fittings.all({ axisId: axis.id, from: from || never, until }).map(({ fitting, serial, model }) => ({ serial, model, from: fitting.fromAt, to: fitting.toAt })),
    knownGood: { before: report.fromAt === null ? null : mark(from), after: mark(until) },
    seen: queries.seen.get({ axisId: axis.id, from, until }) ?? { count: 0, lastAt: null },
  }
}

function marksOf({ db, from, until }: Span, { id, tag, timeZone }: ToldAxis): MarkPart[] {
  const queries = toldQueries(db)
  return queries.marks.all({ axisId: id, from, until }).map(({ mark, by, number }) => ({
    kind: 'mark', tag, timeZone, number, at: mark.at, by, meaning: mark.meaning, note: mark.note, entry: queries.entriesOfMark.get({ id: mark.id })?.seq ?? null,
  }))
}

function* versionsOf(span: Span, axis: ToldAxis): Generator<VersionPart> {
  const { db, report, until, told } = span
  const { first, last } = stretchOf(db, { from: report.fromAt ?? undefined, to: until })
  let after = first - 1
  for (;;) {
    const rows = toldQueries(db).versions.all({ axisId: axis.id, after, last, told, limit: pageLength })
    for (const row of rows) yield versionPart(span, axis, row)
    const end = rows.at(-1)
    if (end === undefined || rows.length < pageLength) return
    after = end.version.id
  }
}

type VersionRow = ReturnType<ReturnType<typeof toldQueries>['versions']['all']>[number]

function versionPart({ db }: Span, axis: ToldAxis, { version, serial, storer, token, base, void: wrong }: VersionRow): VersionPart {
  const queries = toldQueries(db)
  const { number, occasion, capturedAt, receivedAt, clockDoubtful, late, model, scribeCode, reason, workOrder } = version
  const read = () => ({ axisKind: axis.axisKind, before: base ? { model: base.model, at: receivedAt } : null, after: { model, at: receivedAt } })
  const changes: ToldChange[] = queries.changes.all({ versionId: version.id }).map(({ section, row, field, before, after, unit, weight, watched }) => {
    const change = { section, field, before: before ?? null, after: after ?? null }
    return { ...change, row, unit, newtons: newtonsOf(db, change, read), weight, watched }
  })
  return {
    kind: 'version', versionId: version.id, tag: axis.tag, timeZone: axis.timeZone, number, occasion, capturedAt, receivedAt, clockDoubtful, late, serial, model, scribeCode,
    storedBy: token === null ? storer : `${token} (${storer})`, changedBy: namedPerson(db, version.changedBy), allowedBy: namedPerson(db, version.allowedBy), reason, workOrder,
    void: wrong?.at && wrong.reason !== null ? { at: wrong.at, by: wrong.by ?? '', reason: wrong.reason } : null,
    base: base ? { number: base.number, at: base.orderAt } : null, findingId: queries.findingOf.get({ versionId: version.id })?.id ?? null,
    entry: queries.entriesOf.get({ kind: 'version', id: version.id })?.seq ?? null, changes,
  }
}
