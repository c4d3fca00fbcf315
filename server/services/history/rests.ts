import type { HistoryQuery, HistoryRests, notReadQuery } from '#shared/api/history'
import type { z } from 'zod'
import { formatExact } from '#shared/units/exact-time'
import type { Actor } from '#server/database/actor'
import { boundsText } from '#server/database/bounds'
import type { Vault } from '#server/database/client'
import { logSize } from '#server/database/log/nodes'
import { toldQueries } from '#server/database/report/queries'
import { siteQueries } from '#server/database/site/scope'
import { trailQueries } from '#server/database/trail/queries'
import { stretchOf } from './filter'
import { listNotRead } from './not-read'
import { questionOf } from './question'

/** So many axes that were not read are named; further ones are counted up to the length of a page. */
const named = 5
const counted = 200

/** Of a question what says where and when. */
export const placeAndTime = ({ axis, machine, line, site, from, to }: HistoryQuery): z.output<typeof notReadQuery> => ({ axis, machine, line, site, from, to })

/** What an answer of the history rests on: how many versions of its place and time, which axes nobody read meanwhile, and how far the log was verified. `zone` is that of the question. */
export function restsOn(vault: Vault, actor: Actor, query: z.output<typeof notReadQuery>, zone: string): HistoryRests {
  const { db } = vault
  const { axis, machine = null, line = null, site = null } = query
  const stretch = stretchOf(db, query)
  const axisId = axis === undefined ? null : siteQueries(db).find('axis', axis)?.id ?? 0
  const whole = actor.sites === null && axisId === null && machine === null && line === null && site === null
  // Ids have no gaps, since nothing is ever deleted: of the whole vault they need not be counted one by one.
  const versions = whole ? Math.max(0, stretch.last - stretch.first + 1) : toldQueries(db).countVersions.get({ ...stretch, sites: boundsText(actor.sites), axis: axisId, machine, line, site })?.count ?? 0
  const notRead = listNotRead(vault, actor, { ...query, limit: counted, cursor: undefined })
  const [newest] = trailQueries(db).verifications.all({ limit: 1 })
  const rests = {
    versions, notRead: notRead.items.length, notReadMore: notRead.next !== null, tags: notRead.items.slice(0, named).map(({ tag }) => tag),
    verified: newest ? { at: newest.endedAt, entries: newest.entries, outcome: newest.outcome } : null, size: logSize(db),
  }
  return { ...rests, says: sentence(rests, zone) }
}

/** The same as one sentence, for a question. */
export const restsOf = (vault: Vault, actor: Actor, query: HistoryQuery): string => restsOn(vault, actor, placeAndTime(query), questionOf(vault, actor, query).zone).says

function sentence({ versions, notRead, notReadMore, tags, verified, size }: Omit<HistoryRests, 'says'>, zone: string): string {
  const unread = notRead === 0 ? 'every axis was read in that time' : `${notReadMore ? `more than ${notRead}` : notRead} ${notRead === 1 ? 'axis was' : 'axes were'} not read in that time: ${tags.join(', ')}${notRead > tags.length ? ' …' : ''}`
  const sound = verified === null ? 'the log was not verified yet' : verified.outcome === 'sound' ? `the log was found sound up to entry ${verified.entries - 1}, ${formatExact(verified.at, zone)}` : `the last verification, ${formatExact(verified.at, zone)}, did not find the log sound`
  return `Rests on ${versions} ${versions === 1 ? 'version' : 'versions'}; ${unread}; ${sound}; the log has ${size} entries.`
}
