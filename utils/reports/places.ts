import type { BoardAxis } from '#shared/api/board'
import { reportScopes, type Report, type ReportScope } from '#shared/api/reports'
import type { Option } from '../forms/fields'

/** A place to choose, as the form holds it: `machine:3`. */
export interface ReportPlace extends Option { readonly scope: ReportScope, readonly scopeId: number }

interface Named { readonly id: number, readonly name: string }

/** Every place that a report can be of, axes first; `lines` and `sites` as the register has them. */
export function reportPlaces(axes: readonly Pick<BoardAxis, 'id' | 'tag' | 'machine' | 'machineId'>[], lines: readonly Named[], sites: readonly Named[]): ReportPlace[] {
  const machines = new Map(axes.map(({ machineId, machine }) => [machineId, machine]))
  const place = (scope: ReportScope, scopeId: number, name: string): ReportPlace => ({ scope, scopeId, value: `${scope}:${scopeId}`, label: `${name}, ${scope}` })
  return [
    ...axes.map(({ id, tag }) => place('axis', id, tag)), ...[...machines].map(([id, name]) => place('machine', id, name)),
    ...lines.map(({ id, name }) => place('line', id, name)), ...sites.map(({ id, name }) => place('site', id, name)),
  ]
}

/** Those whose name has the text, twelve at most. */
export function placesLike(places: readonly ReportPlace[], text: string): ReportPlace[] {
  const wanted = text.trim().toLowerCase()
  return places.filter(({ label }) => label.toLowerCase().includes(wanted)).slice(0, 12)
}

/** `machine:3` as the route takes it; nothing for what is no place, which means every axis. */
export function scopeOf(value: unknown): { scope?: ReportScope, scopeId?: number } {
  const [scope, id = ''] = String(value ?? '').split(':')
  const known = reportScopes.find(each => each === scope)
  return known === undefined || !/^[1-9]\d*$/.test(id) ? {} : { scope: known, scopeId: Number(id) }
}

/** From when to when, at the latest when it was asked for; `exact` writes an instant. */
export function periodWords({ from, to, askedAt }: Pick<Report, 'from' | 'to' | 'askedAt'>, exact: (iso: string) => string): string {
  return `${from === null ? 'from the first version' : exact(from)} to ${exact(to === null || to > askedAt ? askedAt : to)}`
}

/** How far the making has come, as a sentence. */
export function makingWords(making: Report['making']): string {
  if (making === null) return 'Reading what the vault holds.'
  return making.of === null ? `Counting pages: ${making.pages} so far.` : `Page ${making.pages} of ${making.of}.`
}
