import type { JudgingContext } from '#shared/api/uploads'
import type { Occasion } from '#shared/api/versions'
import type { CheckResult, Judgement } from '#shared/checks/types'
import type { DiffContext } from '#shared/diff/types'
import type { Content, ReadSettings } from '#shared/settings/types'
import { judge } from '#shared/checks/judge'
import { applyWaivers, type Waiver } from '#shared/checks/waivers'
import { diffContents } from '#shared/diff/diff'
import { diffRenumbered } from '#shared/diff/renumber'
import { canonicalText } from '#shared/settings/canonical'
import { contentOf } from '#shared/settings/content'
import { withoutReadings } from '#shared/settings/readings'
import { storedContent } from '../stored-content'
import { isSighting } from './becomes'
import type { Placed, Reading } from './model'

/** A file that was read, with what the vault says to its serial; judged once, compared again when the list changes. */
export interface Examined {
  readonly id: number
  readonly name: string
  readonly read: ReadSettings
  readonly context: JudgingContext
  readonly checks: readonly CheckResult[]
  readonly accepted: Placed['accepted']
  readonly clockAhead: boolean
}

type KnownAxis = NonNullable<JudgingContext['axis']>
const clockSlack = 10 * 60_000

const contextOf = (axis: KnownAxis, context: JudgingContext): DiffContext =>
  ({ flags: axis.flags, watched: axis.watched, dictionary: context.nameplate?.dictionary })

function judged(read: ReadSettings, context: JudgingContext, axis: KnownAxis): Judgement {
  const { knownGood, current, broughtFrom } = context
  const { axisKind, flags, duty, controllerScanMs } = axis
  return judge({
    content: read.content, axis: { axisKind, flags, ...(duty ? { duty } : {}), ...(controllerScanMs ? { controllerScan: controllerScanMs } : {}) }, unit: read.file.unit, rules: context.rules,
    ...(context.registered ? { registered: context.registered } : {}),
    ...(context.nameplate ? { nameplate: context.nameplate } : {}),
    ...(current ? { before: { content: storedContent(current.content) } } : {}),
    ...(knownGood ? { knownGood: { content: storedContent(knownGood.content), ...(knownGood.firmware ? { firmware: knownGood.firmware } : {}) } } : {}),
    ...(broughtFrom ? { broughtFrom: { content: storedContent(broughtFrom.content), rescaled: broughtFrom.rescaled, ...(broughtFrom.forceBase === null ? {} : { forceBase: broughtFrom.forceBase }) } } : {}),
  })
}

/** What stands, and what the waivers of the axis cover now. */
function checksOf(read: ReadSettings, context: JudgingContext, axis: KnownAxis, now: Date): Pick<Examined, 'checks' | 'accepted'> {
  const waivers = context.waivers.map(({ id, axisId, rule, value, until }): Waiver => ({ id, axisId, rule, covers: value, until: Date.parse(until) }))
  const { judgement, accepted } = applyWaivers(judged(read, context, axis), read.content, axis.id, waivers, now.getTime())
  return {
    checks: judgement.results,
    accepted: accepted.flatMap(({ result, waiver }) => context.waivers.filter(({ id }) => id === waiver.id).map(record => ({ result, waiver: record }))),
  }
}

/** A file without an axis goes to the tray; else it is judged by the rules in force. */
export function examine(id: number, name: string, read: ReadSettings, context: JudgingContext, now: Date): Reading | Examined {
  const { axis } = context
  if (!axis) return { state: 'unplaced', read, problem: context.problem ?? 'not-fitted', tag: null }
  if (axis.axisKind !== read.content.axisKind) return { state: 'unplaced', read, problem: 'axis-kind', tag: axis.tag }
  const settled = withoutReadings(read.file, context.nameplate?.dictionary)
  const kept = settled === read.file ? read : { ...read, file: settled, content: contentOf(settled) }
  const clockAhead = Date.parse(read.file.exportedAt) - now.getTime() > clockSlack
  return { id, name, read: kept, context, ...checksOf(kept, context, axis, now), clockAhead }
}

interface Base { readonly content: Content, readonly number: number, readonly versionId: number | null, readonly name: string | null, readonly capturedAt: number }

const withoutOffset = (content: Content): Content => {
  const { homeOffset: _offset, ...setup } = content.setup
  return { ...content, setup }
}

function placed(file: Examined, axis: KnownAxis, base: Base | null, number: number): Placed {
  const { read, context } = file
  const diffContext = contextOf(axis, context)
  const knownGood = context.knownGood ? storedContent(context.knownGood.content) : null
  return {
    state: 'placed', read, axis, number, checks: file.checks, accepted: file.accepted, clockAhead: file.clockAhead, knownGood: context.knownGood,
    base: base && { number: base.number, versionId: base.versionId, name: base.name },
    sightings: context.current?.sightings ?? 0,
    late: base !== null && !file.clockAhead && Date.parse(read.file.exportedAt) < base.capturedAt,
    identical: base !== null && canonicalText(base.content) === canonicalText(read.content),
    sameAsKnownGood: knownGood !== null && canonicalText(withoutOffset(knownGood)) === canonicalText(withoutOffset(read.content)),
    changes: base ? diffContents(base.content, read.content, diffContext) : [],
    renumbered: base ? diffRenumbered(base.content, read.content, diffContext)?.renumbered ?? [] : [],
  }
}

/**
 * The files of one axis, oldest first, each against what will be current when it arrives: the vault's current version,
 * then the newest of those before it in the list.
 */
export function placeAxis(files: readonly Examined[], occasion: Occasion): Map<number, Placed> {
  const out = new Map<number, Placed>()
  let base: Base | null = null
  let begun = false
  let number = 0
  for (const file of [...files].sort((a, b) => Date.parse(a.read.file.exportedAt) - Date.parse(b.read.file.exportedAt) || a.id - b.id)) {
    const { axis, current, nextNumber } = file.context
    if (!axis) continue
    if (!begun) {
      begun = true
      number = nextNumber
      base = current && { content: storedContent(current.content), number: current.number, versionId: current.versionId, name: null, capturedAt: Date.parse(current.capturedAt) }
    }
    const reading = placed(file, axis, base, number)
    out.set(file.id, reading)
    if (isSighting(reading, occasion)) continue
    if (!reading.late) base = { content: file.read.content, number, versionId: null, name: file.name, capturedAt: Date.parse(file.read.file.exportedAt) }
    number += 1
  }
  return out
}
