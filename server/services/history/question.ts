import type { HistoryQuery } from '#shared/api/history'
import { setupField } from '#shared/settings/fields'
import { families } from '#shared/settings/families'
import { formatExact } from '#shared/units/exact-time'
import type { Actor } from '#server/database/actor'
import { axisRows } from '#server/database/axis/queries'
import type { Vault } from '#server/database/client'
import { lineRows } from '#server/database/line/queries'
import { machineRows } from '#server/database/machine/queries'
import { siteRows } from '#server/database/site/queries'
import { siteQueries } from '#server/database/site/scope'
import { unitRows } from '#server/database/unit/queries'
import { namedPerson } from '../versions/summary'

export interface Question { readonly words: string, readonly zone: string }

/** What a file answers, in words, and the zone that its head is written in; lines carry the zone of their own site. */
export function questionOf(vault: Vault, actor: Actor, query: HistoryQuery): Question {
  const zone = zoneOf(vault, actor, query)
  const { row, section, weight, by, from, to } = query
  const parts = [
    `Who changed ${fieldWords(query)}`,
    row === undefined ? '' : ` in row ${row}`,
    section === undefined ? '' : ` of ${section}`,
    weight === undefined ? '' : `, weight ${weight},`,
    ` ${placeOf(vault, query)}`,
    by === undefined ? '' : by === 'nobody' ? ', where nobody is named,' : `, changed or stored by ${namedPerson(vault.db, by)},`,
    from === undefined ? ' since the first version' : ` from ${formatExact(from, zone)}`,
    to === undefined ? ' until now' : ` until ${formatExact(to, zone)}`,
  ]
  return { words: `${parts.join('')}?`, zone }
}

function fieldWords({ field }: HistoryQuery): string {
  if (field === undefined) return 'anything'
  if (Object.hasOwn(families, field)) return families[field as keyof typeof families].words
  const label = setupField(field)?.label
  return label === undefined ? field : `the ${label}`
}

function placeOf({ db }: Vault, { axis, machine, line, site, unit }: HistoryQuery): string {
  const serial = unit === undefined ? undefined : unitRows(db).byId.get({ id: unit })?.serial
  const axisId = axis === undefined ? undefined : siteQueries(db).find('axis', axis)?.id
  const names = [
    axis === undefined ? undefined : axisRows(db).byId.get({ id: axisId ?? 0 })?.tag ?? axis,
    machine === undefined ? undefined : machineRows(db).byId.get({ id: machine })?.name ?? `machine ${machine}`,
    line === undefined ? undefined : lineRows(db).byId.get({ id: line })?.name ?? `line ${line}`,
    site === undefined ? undefined : siteRows(db).byId.get({ id: site })?.name ?? `site ${site}`,
  ].filter(name => name !== undefined)
  const place = names.length === 0 ? 'on every axis' : `on ${names.join(', ')}`
  return unit === undefined ? place : `${place}, unit ${serial ?? unit}`
}

function zoneOf({ db }: Vault, actor: Actor, { axis, machine, line, site, unit }: HistoryQuery): string {
  const asked = ([['axis', axis], ['machine', machine], ['line', line], ['site', site], ['unit', unit]] as const)
    .map(([scope, ref]) => (ref === undefined ? undefined : siteQueries(db).find(scope, ref)?.siteId)).find(id => typeof id === 'number')
  const id = asked ?? actor.sites?.[0] ?? siteRows(db).page.all({ after: 0, limit: 1, sites: null })[0]?.id
  return (typeof id === 'number' ? siteRows(db).byId.get({ id })?.timeZone : undefined) ?? 'UTC'
}
