import { sideText } from '../history/words'
import { millimetres as mm } from '../paper/paper'
import type { Block, Column } from './blocks'
import type { AxisPart, FindingPart, MarkPart, PlanPart, ReportPart, SignaturePart, SwapPart, ToldAct, VersionPart, WaiverPart } from './parts'
import { countWords, entryText, joined, numberText, placeText, timeText } from './words'

const changeColumns: readonly Column[] = [{ head: 'Value', share: 0.3 }, { head: 'Before', share: 0.23, face: 'mono' }, { head: 'After', share: 0.25, face: 'mono-bold' }, { head: 'Can change', share: 0.12 }, { head: 'Finding', share: 0.1, face: 'mono' }]
const markColumns: readonly Column[] = [{ head: 'Known-good marked', share: 0.25, face: 'mono' }, { head: 'Version', share: 0.09, face: 'mono' }, { head: 'By, meaning', share: 0.26 }, { head: 'Note', share: 0.3 }, { head: 'Log entry', share: 0.1, face: 'mono' }]
const shownColumns: readonly Column[] = [{ head: 'Seen', share: 0.25, face: 'mono' }, { head: 'Axis', share: 0.18, face: 'mono' }, { head: 'What it shows', share: 0.57 }]
const actColumns: readonly Column[] = [{ head: 'When', share: 0.25, face: 'mono' }, { head: 'Who', share: 0.18 }, { head: 'What was said', share: 0.47 }, { head: 'Log entry', share: 0.1, face: 'mono' }]
const signatureColumns: readonly Column[] = [{ head: 'Signed by', share: 0.17 }, { head: 'When', share: 0.25, face: 'mono' }, { head: 'Meaning', share: 0.21 }, { head: 'Of what, with which words', share: 0.27 }, { head: 'Log entry', share: 0.1, face: 'mono' }]

const titles: Readonly<Partial<Record<ReportPart['kind'], string>>> = {
  'axis': 'Axes, versions and changes', 'finding': 'Findings', 'planned-change': 'Planned changes', 'waiver': 'Waivers', 'swap': 'Swaps', 'signature': 'Signatures', 'not-read': 'Not read',
}
const none: readonly (readonly [ReportPart['kind'], string])[] = [
  ['axis', 'Nothing was stored there in that time.'], ['finding', 'No finding was open in that time.'], ['planned-change', 'No change was announced.'], ['waiver', 'No waiver held.'], ['swap', 'No unit was swapped.'], ['signature', 'Nobody signed anything.'],
]

/** The parts as blocks of the paper, a chapter a kind; one that is empty says so. `foot` stands before the last part. */
export function* paperBlocks(parts: Iterable<ReportPart>, foot: Iterable<Block>): Generator<Block> {
  let chapter = -1
  for (const part of parts) {
    const kind = part.kind === 'version' || part.kind === 'mark' ? 'axis' : part.kind
    const at = none.findIndex(([name]) => name === kind)
    const last = at === -1 ? none.length : at
    for (; chapter < last; chapter += 1) {
      const opened = none[chapter + 1]
      if (opened === undefined) continue
      yield { kind: 'heading', level: 1, text: titles[opened[0]] ?? '' }
      if (opened[0] !== kind) yield { kind: 'text', text: opened[1] }
    }
    if (part.kind === 'end') yield* foot
    yield* blocksOf(part)
  }
}

function blocksOf(part: ReportPart): Iterable<Block> {
  switch (part.kind) {
    case 'axis': return axisBlocks(part)
    case 'mark': return [markBlock(part)]
    case 'version': return versionBlocks(part)
    case 'finding': return findingBlocks(part)
    case 'planned-change': return planBlocks(part)
    case 'waiver': return waiverBlocks(part)
    case 'swap': return swapBlocks(part)
    case 'signature': return [signatureBlock(part)]
    case 'not-read': return [
      { kind: 'heading', level: 1, text: 'Not read' },
      { kind: 'text', text: part.tags.length === 0 ? 'Every axis was read in that time.' : `No file came from ${part.tags.length === 1 ? 'this axis' : `these ${part.tags.length} axes`} in that time, so nothing is known of what changed there: ${part.tags.join(', ')}.` },
    ]
    case 'end': return [{ kind: 'heading', level: 1, text: 'End of the report' }, { kind: 'text', text: `It holds ${countWords(part.counts)}. Pages that are missing before this one were taken out.` }]
  }
}

function* axisBlocks({ tag, place, units, knownGood, seen, timeZone }: AxisPart): Generator<Block> {
  yield { kind: 'heading', level: 2, text: tag, aside: timeZone }
  yield { kind: 'text', text: place }
  for (const unit of units) yield { kind: 'fact', label: 'Unit fitted', face: 'mono', value: `${unit.serial}, ${unit.model}, from ${timeText(unit.from, timeZone)}${unit.to === null ? '' : ` to ${timeText(unit.to, timeZone)}`}` }
  if (knownGood.before !== null) yield { kind: 'fact', label: 'Known-good before', value: knownGood.before }
  yield { kind: 'fact', label: 'Known-good at the end', value: knownGood.after ?? 'never marked' }
  if (seen.lastAt !== null) yield { kind: 'fact', label: 'Seen unchanged', value: `${seen.count} ${seen.count === 1 ? 'time' : 'times'}, last ${timeText(seen.lastAt, timeZone)}` }
}

const markBlock = ({ at, timeZone, number, by, meaning, note, entry }: MarkPart): Block =>
  ({ kind: 'row', columns: markColumns, cells: [timeText(at, timeZone), number === null ? 'none' : `v${number}`, `${by}, ${meaning}`, note ?? '', numberText(entry)] })

function* versionBlocks(version: VersionPart): Generator<Block> {
  const { tag, number, timeZone, base, changes, void: wrong, findingId } = version
  yield { kind: 'heading', level: 3, text: `${tag} v${number}, ${version.occasion}${version.late ? ', late' : ''}${wrong ? ', void' : ''}`, aside: entryText(version.entry) }
  yield { kind: 'fact', label: 'Captured, received', face: 'mono', value: `${timeText(version.capturedAt, timeZone)}${version.clockDoubtful ? ' (clock doubtful)' : ''}, ${timeText(version.receivedAt, timeZone)}` }
  yield { kind: 'fact', label: 'Stored by', value: joined(version.storedBy, `changed by ${version.changedBy ?? 'nobody named'}`, `allowed by ${version.allowedBy ?? 'nobody named'}`) }
  yield { kind: 'fact', label: 'Reason', value: joined(version.reason, version.workOrder) || 'none given' }
  yield { kind: 'fact', label: 'Unit, scribe code', face: 'mono', value: `${version.serial}, ${version.model}, ${version.scribeCode}` }
  if (wrong) yield { kind: 'fact', label: 'Void since', value: `${timeText(wrong.at, timeZone)}, ${wrong.by}: ${wrong.reason}` }
  if (changes.length === 0) yield { kind: 'text', text: base === null ? 'The first version of the axis: there is nothing before it to differ from.' : `No value differs from v${base.number}.` }
  else yield { kind: 'text', text: `${changes.length} ${changes.length === 1 ? 'change' : 'changes'}${base === null ? '' : ` against v${base.number}, captured ${timeText(base.at, timeZone)}`}` }
  for (const change of changes) {
    yield { kind: 'row', columns: changeColumns, cells: [placeText(change), sideText(change, 'before'), sideText(change, 'after'), change.weight, change.watched && findingId !== null ? String(findingId) : ''] }
  }
}

function* findingBlocks({ findingId, title, weight, state, openedAt, timeZone, shown, acts }: FindingPart): Generator<Block> {
  yield { kind: 'heading', level: 3, text: `Finding ${findingId}: ${title}`, aside: state }
  yield { kind: 'fact', label: 'Opened, weight', value: `${timeText(openedAt, timeZone)}, ${weight}` }
  for (const { at, tag, number, says } of shown) yield { kind: 'row', columns: shownColumns, cells: [timeText(at, timeZone), `${tag}${number === null ? '' : ` v${number}`}`, says === title ? 'what the title says' : says] }
  if (acts.length === 0) yield { kind: 'text', text: 'Nobody has said why.' }
  for (const act of acts) yield { kind: 'row', columns: actColumns, cells: [timeText(act.at, timeZone), act.by, actText(act, timeZone), numberText(act.entry)] }
}

function actText(act: ToldAct, zone: string): string {
  const how = act.kind === 'closed' ? (act.as === 'put-right' ? `closed as put right by ${act.version ?? ''}` : `closed as accepted, allowed by ${act.allowedBy ?? 'nobody named'}`) : act.plannedChangeId === null ? act.kind : `explained by planned change ${act.plannedChangeId}`
  const beside = joined(act.madeBy && `done by ${act.madeBy}`, act.madeAt && `done ${timeText(act.madeAt, zone)}`, act.workOrder && `work order ${act.workOrder}`)
  return `${how}${act.text === null ? '' : `: ${act.text}`}${beside === '' ? '' : ` (${beside})`}`
}

function* planBlocks({ plannedChangeId, tags, fields, timeZone, from, until, reason, allowedBy, announcedAt, announcedBy, ended, explained, entry }: PlanPart): Generator<Block> {
  yield { kind: 'heading', level: 3, text: `Planned change ${plannedChangeId}: ${tags.join(', ')}`, aside: entryText(entry) }
  for (const field of fields) yield { kind: 'fact', label: 'May change', face: 'mono', value: field }
  yield { kind: 'fact', label: 'Window', face: 'mono', value: `${timeText(from, timeZone)} to ${timeText(until, timeZone)}` }
  yield { kind: 'fact', label: 'Announced', value: `${timeText(announcedAt, timeZone)}, ${announcedBy}, allowed by ${allowedBy}` }
  yield { kind: 'fact', label: 'Why', value: reason }
  if (ended) yield { kind: 'fact', label: 'Called off', value: `${timeText(ended.at, timeZone)}, ${ended.by}: ${ended.reason}` }
  yield { kind: 'fact', label: 'Explained', value: explained.length === 0 ? 'nothing' : `finding ${explained.join(', ')}` }
}

function* waiverBlocks({ waiverId, tag, timeZone, rule, at, reason, givenAt, by, until, ended, entry }: WaiverPart): Generator<Block> {
  yield { kind: 'heading', level: 3, text: `Waiver ${waiverId}: ${tag}, ${rule}`, aside: entryText(entry) }
  yield { kind: 'fact', label: 'Given', value: `${timeText(givenAt, timeZone)}, ${by}, until ${timeText(until, timeZone)}` }
  if (at.length > 0) yield { kind: 'fact', label: 'Where', value: at.join(', ') }
  yield { kind: 'fact', label: 'Why', value: reason }
  if (ended) yield { kind: 'fact', label: 'Taken back', value: `${timeText(ended.at, timeZone)}, ${ended.by}: ${ended.reason}` }
}

function* swapBlocks({ swapId, tag, timeZone, replaced, failure, workOrder, openedAt, by, steps }: SwapPart): Generator<Block> {
  yield { kind: 'heading', level: 3, text: `Swap ${swapId}: ${tag}, ${replaced} replaced` }
  yield { kind: 'fact', label: 'Begun', value: `${timeText(openedAt, timeZone)}, ${by}` }
  yield { kind: 'fact', label: 'What had failed', value: joined(failure, workOrder) }
  for (const step of steps) yield { kind: 'row', columns: actColumns, cells: [timeText(step.at, timeZone), step.by, step.text, numberText(step.entry)] }
}

const signatureBlock = ({ name, at, timeZone, meaning, of, words, entry }: SignaturePart): Block =>
  ({ kind: 'row', columns: signatureColumns, cells: [name, timeText(at, timeZone), meaning, words === null || words === '' ? of : `${of}: ${words}`, numberText(entry)] })

/** Between the head of the report and its first chapter. */
export const headGap = mm(2)
