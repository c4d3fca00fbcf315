import { partsOfTime } from '#shared/units/exact-time'
import { readAllAxes } from '#server/database/axis-state/list'
import type { Vault } from '#server/database/client'
import { personQueries } from '#server/database/person/queries'
import type { PersonRow } from '#server/database/person/table'
import { listSites } from '#server/database/site/queries'
import { overdueSince } from '../axes/overdue'
import { wants } from './access'
import { queueLetter } from './queue'
import { postActor } from './send'
import { digestWords, type OverdueAxis } from './words'

/** Before the early shift reads its mail, by the clock of the reader's first site. */
export const digestHour = 6

/** Writes today's list of overdue axes to everyone who wants it and has not got it; nothing where nothing is overdue. Answers how many. */
export function queueOverdueDigests(vault: Vault): number {
  const now = vault.now()
  const readers = personQueries(vault.db).present.all().filter(person => wants(vault.db, person, 'overdue-digest'))
  const letters = readers.flatMap((person) => {
    const zone = listSites(vault.db, boundsOf(person))[0]?.timeZone
    const date = zone === undefined ? null : dayOf(now, zone)
    const axes = date === null ? [] : overdueFor(vault, person, now)
    return date === null || axes.length === 0 ? [] : [{ person, date, axes }]
  })
  if (letters.length === 0) return 0
  return vault.write(postActor, write => letters.filter(({ person, date, axes }) => {
    const siteIds = [...new Set(axes.map(({ siteId }) => siteId))]
    return queueLetter(vault.db, write, person, { kind: 'overdue-digest', axisId: null, siteIds }, digestWords(date, axes)) !== null
  }).length)
}

const boundsOf = ({ siteIds }: PersonRow) => (siteIds.length === 0 ? null : siteIds)

/** The day there, as `2026-12-01`, once the hour of the digest has struck; null before it. */
function dayOf(now: string, zone: string): string | null {
  const { year, hour = '' } = partsOfTime(new Date(now), zone)
  if (Number(hour) < digestHour) return null
  return `${year}-${new Intl.DateTimeFormat('en-CA', { timeZone: zone, month: '2-digit', day: '2-digit' }).format(new Date(now))}`
}

function overdueFor(vault: Vault, person: PersonRow, now: string): (OverdueAxis & { siteId: number })[] {
  return readAllAxes(vault.db, boundsOf(person)).flatMap(({ axis, state, machine, line, site }) => {
    const dueAt = overdueSince(state?.lastUploadAt ?? null, axis.uploadEveryHours, now)
    return dueAt === null ? [] : [{ tag: axis.tag, machine: machine.name, line: line.name, zone: site.timeZone, dueAt, siteId: site.id }]
  }).sort((a, b) => (a.dueAt < b.dueAt ? -1 : 1))
}
