import type { z } from 'zod'
import type { Site, siteBody, sitePatch } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { boundsText } from '#server/database/bounds'
import type { Actor, PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { orRefuse } from '#server/database/constraints'
import { insertSite, siteRows, updateSite } from '#server/database/site/queries'
import type { SiteRow } from '#server/database/site/table'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { assertRev, named } from '../rev'

const siteOut = ({ madeAt: _made, ...rest }: SiteRow): Site => rest
const nameTaken = 'Another site has this name.'

function siteRow(vault: Vault, id: number): SiteRow {
  const found = siteRows(vault.db).byId.get({ id })
  if (found === undefined) throw new Refusal('not-found', `There is no site ${id}.`)
  return found
}

export const readSite = (vault: Vault, id: number): Site => siteOut(siteRow(vault, id))

export function listSitesPage(vault: Vault, actor: Actor, query: PageQuery) {
  const rows = siteRows(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1, sites: boundsText(actor.sites) })
  return pageOf(rows, query, ({ id }) => id, siteOut)
}

/** Only by people without site bounds: whoever has bounds would not see the new one. */
export function registerSite(vault: Vault, actor: PersonActor, body: z.output<typeof siteBody>): { id: number } {
  if (actor.sites !== null) throw new Refusal('site-bounds', 'A site is registered by someone who sees all sites.')
  assertTimeZone(body.timeZone)
  return vault.write(actor, (write) => {
    const row = orRefuse(nameTaken, '/name', () => insertSite(vault.db, { ...body, madeAt: write.now }))
    write.log({ act: 'site-registered', id: row.id, state: row })
    return { id: row.id }
  })
}

export function changeSite(vault: Vault, actor: PersonActor, id: number, patch: z.output<typeof sitePatch>): Site {
  if (patch.timeZone !== undefined) assertTimeZone(patch.timeZone)
  return vault.write(actor, (write) => {
    const before = siteRow(vault, id)
    assertRev(patch.rev, before.rev, () => siteOut(before))
    const after = { ...before, ...named(patch), rev: before.rev + 1 }
    orRefuse(nameTaken, '/name', () => updateSite(vault.db, after))
    write.log({ act: 'site-changed', id, state: after })
    return siteOut(after)
  })
}

function assertTimeZone(timeZone: string): void {
  try {
    new Intl.DateTimeFormat('en', { timeZone })
  }
  catch {
    const message = `${timeZone} is no time zone known here; take an IANA name such as Europe/Copenhagen.`
    throw new Refusal('time-zone', message, { errors: [{ at: '/timeZone', code: 'time-zone', message }] })
  }
}
