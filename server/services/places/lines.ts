import type { z } from 'zod'
import type { Line, lineBody, linePatch, placeQuery } from '#shared/api/places'
import { Refusal } from '#shared/errors/refusal'
import { boundsText } from '#server/database/bounds'
import type { Actor, PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { orRefuse } from '#server/database/constraints'
import { insertLine, lineRows, updateLine } from '#server/database/line/queries'
import type { LineRow } from '#server/database/line/table'
import { afterOf, limitOf, pageOf } from '../page'
import { assertRev, named } from '../rev'
import { assertPlace } from './bounds'

const lineOut = ({ madeAt: _made, ...rest }: LineRow): Line => rest
const nameTaken = 'The site has a line of this name.'

function lineRow(vault: Vault, id: number): LineRow {
  const found = lineRows(vault.db).byId.get({ id })
  if (found === undefined) throw new Refusal('not-found', `There is no line ${id}.`)
  return found
}

export const readLine = (vault: Vault, id: number): Line => lineOut(lineRow(vault, id))

export function listLines(vault: Vault, actor: Actor, query: z.output<typeof placeQuery>) {
  const { siteId = null, lineId = null } = query
  const rows = lineRows(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1, sites: boundsText(actor.sites), siteId, lineId })
  return pageOf(rows, query, ({ id }) => id, lineOut)
}

export function registerLine(vault: Vault, actor: PersonActor, body: z.output<typeof lineBody>): { id: number } {
  return vault.write(actor, (write) => {
    assertPlace(vault, actor, 'site', body.siteId, '/siteId')
    const row = orRefuse(nameTaken, '/name', () => insertLine(vault.db, { ...body, madeAt: write.now }))
    write.log({ act: 'line-registered', id: row.id, state: row })
    return { id: row.id }
  })
}

export function changeLine(vault: Vault, actor: PersonActor, id: number, patch: z.output<typeof linePatch>): Line {
  return vault.write(actor, (write) => {
    const before = lineRow(vault, id)
    assertRev(patch.rev, before.rev, () => lineOut(before))
    if (patch.siteId !== undefined) assertPlace(vault, actor, 'site', patch.siteId, '/siteId')
    const after = { ...before, ...named(patch), rev: before.rev + 1 }
    orRefuse(nameTaken, '/name', () => updateLine(vault.db, after))
    write.log({ act: 'line-changed', id, state: after })
    return lineOut(after)
  })
}
