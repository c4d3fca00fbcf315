import { toldQueries } from '#server/database/report/queries'
import type { EndPart, FindingPart, MarkPart, ReportPart, SignaturePart } from './parts'
import type { Span } from './span'
import { toldAxis } from './told-axes'
import { toldFindings, toldPlans, toldSwaps, toldWaivers } from './told-acts'

/** Everything that a report tells, in the order of its paper; read as it goes, so that no more than one axis or finding is in memory. */
export function* tellReport(span: Span): Generator<ReportPart> {
  const counts = { 'axis': span.axes.length, 'version': 0, 'change': 0, 'mark': 0, 'finding': 0, 'planned-change': 0, 'waiver': 0, 'swap': 0, 'signature': 0 }
  for (const part of partsOf(span)) {
    if (part.kind === 'version') counts.change += part.changes.length
    if (part.kind !== 'axis' && part.kind !== 'not-read') counts[part.kind] += 1
    yield part
  }
  yield { kind: 'end', counts }
}

function* partsOf(span: Span): Generator<Exclude<ReportPart, EndPart>> {
  const signatures: SignaturePart[] = []
  const read = new Set<string>()
  for (const axis of span.axes) {
    for (const part of toldAxis(span, axis)) {
      if (part.kind === 'mark') signatures.push(signatureOfMark(part))
      if (part.kind === 'version' || (part.kind === 'axis' && part.seen.count > 0)) read.add(part.tag)
      yield part
    }
  }
  for (const part of toldFindings(span)) {
    signatures.push(...signaturesOfFinding(part))
    yield part
  }
  yield* toldPlans(span)
  for (const { endEntry, ...part } of toldWaivers(span)) {
    const { by: name, tag, timeZone, ended, entry, rule } = part
    signatures.push({ kind: 'signature', name, at: part.givenAt, timeZone, meaning: 'accepts the risk until the end of the waiver', of: `waiver ${part.waiverId}, ${tag}, ${rule}`, words: part.reason, entry })
    if (ended) signatures.push({ kind: 'signature', name: ended.by, at: ended.at, timeZone, meaning: 'takes the waiver back', of: `waiver ${part.waiverId}, ${tag}, ${rule}`, words: ended.reason, entry: endEntry })
    yield part
  }
  for (const { meanings, ...part } of toldSwaps(span)) {
    for (const [index, { at, by: name, text, entry }] of part.steps.entries()) {
      const meaning = meanings[index]
      if (meaning) signatures.push({ kind: 'signature', name, at, timeZone: part.timeZone, meaning, of: `release of swap ${part.swapId}, ${part.tag}`, words: text, entry })
    }
    yield part
  }
  signatures.push(...signaturesOfVoids(span))
  yield* signatures.sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : (a.entry ?? 0) - (b.entry ?? 0)))
  yield { kind: 'not-read', tags: span.axes.filter(({ tag }) => !read.has(tag)).map(({ tag }) => tag) }
}

const signatureOfMark = ({ by: name, at, timeZone, meaning, tag, number, note, entry }: MarkPart): SignaturePart =>
  ({ kind: 'signature', name, at, timeZone, meaning, of: number === null ? `${tag}: no version is known-good` : `${tag} v${number} known-good`, words: note, entry })

function signaturesOfFinding({ findingId, timeZone, acts }: FindingPart): SignaturePart[] {
  return acts.filter(({ kind }) => kind === 'closed').map(({ by: name, at, as, allowedBy, version, entry }) => ({
    kind: 'signature', name, at, timeZone, meaning: as === 'put-right' ? `closes it as put right by ${version ?? 'a version'}` : `closes it as accepted, allowed by ${allowedBy ?? 'nobody named'}`,
    of: `finding ${findingId}`, words: null, entry,
  }))
}

function signaturesOfVoids({ db, from, until, told, axesText, axes }: Span): SignaturePart[] {
  const queries = toldQueries(db)
  return queries.voids.all({ from, until, told, axes: axesText }).map(({ versionId, axisId, number, at, by: name, reason }) => {
    const axis = axes.find(({ id }) => id === axisId)
    return { kind: 'signature', name, at, timeZone: axis?.timeZone ?? 'UTC', meaning: 'sets it aside as a wrong upload', of: `${axis?.tag ?? `axis ${axisId}`} v${number}`, words: reason, entry: queries.entriesOf.get({ kind: 'version-void', id: versionId })?.seq ?? null }
  })
}
