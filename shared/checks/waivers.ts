import { setEntries } from '../settings/move-row'
import type { Content, ExtraValue } from '../settings/types'
import { ruleOf } from './table'
import type { CheckResult, CheckValue, Judgement } from './types'

/** A value that a waiver covers. Rows are named by their number: a place that moved up or down a table stays the same. */
export interface Covered {
  /** `/setup/thrustLimit`, `/moves/move 5/forceLimit`, `/zones/zone 2/from`, `/extra/K-017`; a name of `values` where the result has no place. */
  readonly place: string
  /** Null where nothing is set. */
  readonly value: ExtraValue | CheckValue | null
}

/** Somebody took a stop, or what could not be judged, upon himself. */
export interface Waiver {
  readonly id: number
  readonly axisId: number
  readonly rule: string
  /** stop: good for these values at these places. unknown: good for the axis, whatever the values. */
  readonly covers: { readonly level: 'stop', readonly values: readonly Covered[] } | { readonly level: 'unknown', readonly missing: readonly string[] }
  /** Epoch milliseconds from which it no longer holds; absent = for as long as the values stay. */
  readonly until?: number
}

export interface Accepted { readonly result: CheckResult, readonly waiver: Waiver }

export interface WaivedJudgement {
  /** What still stands, in its order. */
  readonly judgement: Judgement
  /** Stops and unknowns that a waiver covers, in their order. */
  readonly accepted: readonly Accepted[]
}

/** Parts a judgement into what stands and what is accepted at an instant (epoch milliseconds); nothing is lost or added. */
export function applyWaivers(judgement: Judgement, content: Content, axisId: number, waivers: readonly Waiver[], now: number): WaivedJudgement {
  const inForce = waivers.filter(waiver => waiver.axisId === axisId && (waiver.until === undefined || now < waiver.until))
  const accepted: Accepted[] = []
  const standing = judgement.results.filter((result) => {
    const waiver = inForce.find(one => covers(one, result, content))
    if (waiver) accepted.push({ result, waiver })
    return !waiver
  })
  return { judgement: { ...judgement, results: standing }, accepted }
}

/** What a waiver of this result would have to cover; undefined for results that need none: warnings, notes, and unknowns of rules that never stop. */
export function coverOf(result: CheckResult, content: Content): Waiver['covers'] | undefined {
  if (result.level === 'stop') return { level: 'stop', values: coveredValues(result, content) }
  const canStop = ruleOf(result.rule)?.levels.includes('stop') ?? true
  return result.level === 'unknown' && canStop ? { level: 'unknown', missing: result.missing ?? [] } : undefined
}

function covers({ rule, covers: covered }: Waiver, result: CheckResult, content: Content): boolean {
  if (rule !== result.rule) return false
  const wanted = coverOf(result, content)
  if (wanted?.level === 'unknown' && covered.level === 'unknown') return wanted.missing.every(name => covered.missing.includes(name))
  return wanted?.level === 'stop' && covered.level === 'stop' && inOneOrder(wanted.values) === inOneOrder(covered.values)
}

/** What a result hangs on besides the values at its places: the rule of the site that it breaks, where a row starts, and the forces that percentages meant and mean. */
const hangsOn = ['ruleId', 'start', 'from', 'to']

/** The values at the places of a result; of one without places those that it told. */
function coveredValues({ at, values }: CheckResult, content: Content): Covered[] {
  const told = Object.entries(values).filter(([name]) => at.length === 0 || hangsOn.includes(name))
  return [...at.map(pointer => valueAt(content, pointer)), ...told.map(([place, value]) => ({ place, value }))]
}

function valueAt(content: Content, pointer: string): Covered {
  const [section = '', key = '', field] = pointer.split('/').slice(1).map(part => part.replaceAll('~1', '/').replaceAll('~0', '~'))
  if (section === 'moves') return ofRow(section, `move ${content.moves[Number(key)]?.move ?? key}`, field, content.moves[Number(key)])
  if (section === 'zones') return ofRow(section, `zone ${content.zones[Number(key)]?.zone ?? key}`, field, content.zones[Number(key)])
  if (section === 'setup' || section === 'extra') return { place: `/${section}/${key}`, value: member(content[section], key) }
  return { place: pointer, value: section === 'axisKind' ? content.axisKind : null }
}

/** A field of a row, or the whole row as one text: its fields by name. */
function ofRow(section: string, name: string, field: string | undefined, row: object | undefined): Covered {
  if (field !== undefined) return { place: `/${section}/${name}/${field}`, value: member(row, field) }
  const whole = row === undefined ? null : JSON.stringify(setEntries(row).sort(([a], [b]) => a < b ? -1 : 1))
  return { place: `/${section}/${name}`, value: whole }
}

function member(of: object | undefined, name: string): ExtraValue | null {
  return of !== undefined && Object.hasOwn(of, name) ? (of as Readonly<Record<string, ExtraValue | undefined>>)[name] ?? null : null
}

function inOneOrder(values: readonly Covered[]): string {
  return JSON.stringify(values.map(({ place, value }) => JSON.stringify([place, plainValue(value)])).sort())
}

/** Key order of { value, unit } as it came over the wire must not matter. */
function plainValue(value: Covered['value']): unknown {
  return typeof value === 'object' && value !== null && 'unit' in value ? [value.value, value.unit] : value
}
