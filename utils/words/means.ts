import type { CheckResult } from '#shared/checks/types'
import { forceBaseOf } from '#shared/motion/force-base'
import type { FieldChange } from '#shared/diff/types'
import { setupField } from '#shared/settings/fields'
import { isUnused } from '#shared/settings/move-fields'
import type { Nameplate } from '#shared/settings/nameplate'
import type { Content, Move } from '#shared/settings/types'
import { formatNumber } from '#shared/units/number'
import { motionOf } from '../motion'
import { isForce, type WordContext } from './fields'

/** Both contents, and what their words hang on. */
export interface MeansContext extends WordContext {
  readonly before: Content
  readonly after: Content
  /** Of the first content's model, where that is another one: its 100 % is another force. */
  readonly nameplateBefore?: Nameplate
}

const number = (value: number, digits = 6) => formatNumber(Number(value.toFixed(digits))).replace('-', '−')
const lengthUnit = ({ axisKind }: WordContext) => axisKind === 'rotary' ? 'deg' : 'mm'
const numbers = (change: FieldChange): readonly [number, number] | undefined =>
  typeof change.before === 'number' && typeof change.after === 'number' ? [change.before, change.after] : undefined

/** Newtons of a percentage; undefined where the nameplate does not say what 100 % is. */
export function forceWords(percent: number, context: WordContext): string | undefined {
  const base = forceBaseOf(context.nameplate)
  return base === undefined ? undefined : `${number(percent * base / 100, 1)} ${context.axisKind === 'rotary' ? 'N·m' : 'N'}`
}

function forceMeans(change: FieldChange, context: MeansContext): string {
  const first = { ...context, nameplate: context.nameplateBefore ?? context.nameplate }
  const was = typeof change.before === 'number' ? forceWords(change.before, first) : undefined
  const is = typeof change.after === 'number' ? forceWords(change.after, context) : undefined
  if (was && is) return `${was} became ${is}.`
  if (is) return `${is}, where none was set.`
  return was ? `${was} before; no longer limited by this value.` : ''
}

/** The press that follows a move in the table: its approach is what the move comes close to. */
export const pressAfter = (content: Content, move: number): Move | undefined => {
  const next = content.moves.find(other => other.move > move && !isUnused(other))
  return next?.kind === 'press' && next.approach !== undefined ? next : undefined
}

function targetMeans(change: FieldChange, context: MeansContext): string {
  const pair = numbers(change)
  const move = context.after.moves.find(other => other.move === change.row)
  if (!pair || !move || move.kind === 'relative') return ''
  const unit = lengthUnit(context)
  const press = pressAfter(context.after, move.move)
  const room = (target: number, place: number) => Math.abs(place - target)
  if (press?.approach !== undefined && (press.approach - pair[0]) * (press.approach - pair[1]) > 0) {
    return `Ends ${number(room(pair[1], press.approach))} ${unit} before the approach of press ${press.move}, was ${number(room(pair[0], press.approach))} ${unit}.`
  }
  const { softLimitMin, softLimitMax } = context.after.setup
  const limits = [softLimitMin, softLimitMax].filter(limit => limit !== undefined)
  const near = [...limits].sort((a, b) => room(pair[1], a) - room(pair[1], b))[0]
  if (near === undefined || (near - pair[0]) * (near - pair[1]) < 0) return ''
  return `Ends ${number(room(pair[1], near))} ${unit} from the soft limit of ${number(near)} ${unit}, was ${number(room(pair[0], near))} ${unit}.`
}

function windowMeans(change: FieldChange, context: MeansContext): string {
  const pair = numbers(change)
  if (!pair) return ''
  return `The next step may start ${number(Math.abs(pair[1] - pair[0]))} ${lengthUnit(context)} ${pair[1] > pair[0] ? 'earlier' : 'later'}.`
}

function travelMeans(context: MeansContext): string {
  const travel = ({ setup }: Content) => setup.softLimitMin === undefined || setup.softLimitMax === undefined ? undefined : setup.softLimitMax - setup.softLimitMin
  const [was, is] = [travel(context.before), travel(context.after)]
  return was === undefined || is === undefined ? '' : `Travel between the soft limits is ${number(is)} ${lengthUnit(context)}, was ${number(was)} ${lengthUnit(context)}.`
}

function followMeans(change: FieldChange): string {
  if (change.after === undefined) return `Move ${String(change.before)} no longer follows by itself.`
  if (change.before === undefined) return `Move ${String(change.after)} now follows by itself.`
  return `Goes on with move ${String(change.after)}, went on with move ${String(change.before)}.`
}

/** How long the move takes, where its start is known; without what a jerk limit adds. */
function timeMeans(change: FieldChange, context: MeansContext): string {
  const row = change.row
  const is = row === undefined ? undefined : motionOf(context.after, row, context.nameplate)
  const was = is && motionOf(context.before, is.move.move, context.nameplateBefore ?? context.nameplate)
  if (!is || !was || was.start.target !== is.start.target || is.move.kind !== was.move.kind) return ''
  const reached = change.field === 'speed' && is.profile.peakSpeed < is.move.speed * (1 - 1e-9) ? ` The speed asked for is not reached: ${number(is.profile.peakSpeed, 1)} ${lengthUnit(context)}/s at most.` : ''
  const was3 = number(was.seconds, 3)
  const told = number(is.seconds, 3) === was3 ? 'as before' : `was ${was3} s`
  return `Move ${is.move.move} takes ${is.atLeast ? 'at least ' : ''}${number(is.seconds, 3)} s, ${told}.${reached}`
}

/** A default that is written out, or no longer is, and comes to the same motion. */
const sameMotion: Readonly<Record<string, string>> = {
  deceleration: 'the same braking as before', pressSpeed: 'the same press speed as before', turn: 'the same way round as before', softLimitsActive: 'the soft limits are held as before',
}

const ownSentences: Readonly<Record<string, (change: FieldChange, context: MeansContext) => string>> = {
  target: targetMeans,
  window: windowMeans,
  inPositionWindow: windowMeans,
  softLimitMin: (_, context) => travelMeans(context),
  softLimitMax: (_, context) => travelMeans(context),
  next: followMeans,
  speed: timeMeans,
  acceleration: timeMeans,
  deceleration: timeMeans,
  softLimitsActive: change => change.after === false ? 'The drive no longer holds the soft limits.' : 'The drive holds the soft limits.',
  positiveDirection: () => 'Every position and every move now counts the other way.',
  homeOffset: (change, context) => change.delta === undefined ? '' : `Every position moves by ${number(change.delta)} ${lengthUnit(context)} against the machine.`,
}

const carrySentences = { prove: 'Prove at the machine.', place: 'Goes by the place, not by the unit.', teach: 'Taught at the machine.', copy: '' } as const

function affected(change: FieldChange): string {
  if (!change.affects || change.affects.length === 0) return ''
  const [one] = change.affects
  return change.affects.length === 1 ? `Changes move ${one}, which names none of its own.` : `Changes moves ${change.affects.join(', ')}, which name none of their own.`
}

/** One or two sentences: what the change does at the machine; '' where the value says it all. */
export function meansOf(change: FieldChange, context: MeansContext): string {
  const same = sameMotion[change.field]
  if (change.weight === 'text' && same && (change.before === undefined || change.after === undefined)) {
    return `${change.before === undefined ? 'Written out' : 'No longer written out'}, and ${same}.`
  }
  const setup = change.section === 'setup' ? setupField(change.field) : undefined
  const own = isForce(change.field) ? forceMeans(change, context) : ownSentences[change.field]?.(change, context) ?? ''
  return [own || (setup?.help ?? ''), affected(change), setup ? carrySentences[setup.carry] : ''].filter(Boolean).join(' ')
}

/** What a whole row does, in short: '98 to 104 mm, 36 % of rated'. */
export function rowSummary(row: Readonly<Record<string, unknown>>, context: WordContext): string {
  const unit = lengthUnit(context)
  const value = (key: string) => typeof row[key] === 'number' ? number(row[key]) : undefined
  if (row.from !== undefined) return `${value('from') ?? ''} to ${value('to') ?? ''} ${unit}`
  const force = value('forceLimit')
  const way = row.kind === 'relative' ? `by ${value('target') ?? ''} ${unit}` : row.kind === 'press' ? `${value('approach') ?? '…'} to ${value('target') ?? ''} ${unit}` : `to ${value('target') ?? ''} ${unit}`
  return [way, force === undefined ? `${value('speed') ?? ''} ${unit}/s` : `${force} ${context.nameplate?.forceBase === 'peak-thrust' ? '% of peak' : '% of rated'}`].join(', ')
}

/**
 * The stops and warnings that hit each changed place of the second content, each told once, at the first line it hits.
 * One that stood there before with the same words is not the doing of this change.
 */
export function checksByLine(lines: readonly { readonly key: string, readonly ats: readonly string[] }[], checks: readonly CheckResult[], before: readonly CheckResult[]): Map<string, CheckResult[]> {
  const known = new Set(before.map(check => `${check.rule} ${check.message}`))
  const fresh = checks.filter(check => (check.level === 'stop' || check.level === 'warn') && !known.has(`${check.rule} ${check.message}`))
  const hits = (place: string, at: string) => place === at || at.startsWith(`${place}/`) || place.startsWith(`${at}/`)
  const byLine = new Map<string, CheckResult[]>()
  for (const check of fresh) {
    const line = lines.find(candidate => candidate.ats.some(at => check.at.some(place => hits(place, at))))
    if (line) byLine.set(line.key, [...(byLine.get(line.key) ?? []), check])
  }
  return byLine
}
