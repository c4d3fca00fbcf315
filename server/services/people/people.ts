import type { z } from 'zod'
import type { Me, Person, personBody, personPatch } from '#shared/api/people'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor, SiteBounds, TokenActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { insertPerson, personQueries, personState, updatePerson } from '#server/database/person/queries'
import type { PersonRow } from '#server/database/person/table'
import { endTokensOf } from '#server/database/token/queries'
import { listSites } from '#server/database/site/queries'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { assertRev, named } from '../rev'
import { plantOf } from './plant'
import { assertStrong, hashPassword } from './password'
import { endSessionsOf } from './sessions'

type PersonBody = z.output<typeof personBody>
type PersonPatch = z.output<typeof personPatch>

const personOut = ({ passwordHash, passwordSetAt: _set, madeAt: _made, ...rest }: PersonRow): Person => ({ ...rest, hasPassword: passwordHash !== null })

export function listPeople(vault: Vault, query: PageQuery) {
  const rows = personQueries(vault.db).page.all({ after: afterOf(query), limit: limitOf(query) + 1 })
  return pageOf(rows, query, ({ id }) => id, personOut)
}

/** Names of those who are still here, to choose from. */
export const listNames = (vault: Vault): { id: number, name: string }[] => personQueries(vault.db).names.all()

/** A hash for a new password that was strong enough; null where none is given. Slow on purpose, so it comes before the write. */
export async function hashFor(vault: Vault, password: string | undefined, own: readonly string[]): Promise<string | null> {
  if (password === undefined) return null
  assertStrong(password, own)
  return hashPassword(password, vault.scryptCost)
}

export function registerPerson(vault: Vault, actor: PersonActor, { password: _password, ...body }: PersonBody, passwordHash: string | null): { id: number } {
  return vault.write(actor, (write) => {
    assertEmailFree(vault, body.email, null)
    const row = insertPerson(vault.db, { ...body, shared: body.shared ?? false, passwordHash, passwordSetAt: passwordHash === null ? null : write.now, madeAt: write.now })
    write.log({ act: 'person-registered', id: row.id, state: personState(row) })
    return { id: row.id }
  })
}

/** Changes what the patch names; a new password and an end close every session of the person, an end closes their tokens too. */
export function changePerson(vault: Vault, actor: PersonActor, id: number, patch: PersonPatch, passwordHash: string | null): Person {
  return vault.write(actor, (write) => {
    const before = findPerson(vault, id)
    assertRev(patch.rev, before.rev, () => personOut(before))
    const { password: _password, ended, ...fields } = named(patch)
    if (fields.email !== undefined) assertEmailFree(vault, fields.email, id)
    const endedAt = ended === undefined ? before.endedAt : ended ? before.endedAt ?? write.now : null
    const after = { ...before, ...fields, endedAt, rev: before.rev + 1, ...(passwordHash === null ? {} : { passwordHash, passwordSetAt: write.now }) }
    assertAdminStays(vault, before, after)
    updatePerson(vault.db, after)
    if (passwordHash !== null || (after.endedAt !== null && before.endedAt === null)) endSessionsOf(vault, id)
    if (after.endedAt !== null && before.endedAt === null) endTokensOf(vault.db, write, id)
    write.log({ act: 'person-changed', id, state: personState(after) })
    return personOut(after)
  })
}

export function findPerson(vault: Vault, id: number): PersonRow {
  const found = personQueries(vault.db).byId.get({ id })
  if (found === undefined) throw new Refusal('not-found', `There is no person ${id}.`)
  return found
}

function assertEmailFree(vault: Vault, email: string, but: number | null): void {
  const holder = personQueries(vault.db).byEmail.get({ email })
  if (holder !== undefined && holder.id !== but) throw new Refusal('taken', `${holder.name} has this e-mail address.`, { errors: [{ at: '/email', code: 'taken', message: 'already in use' }] })
}

const administers = ({ roles, endedAt }: PersonRow) => endedAt === null && roles.includes('admin')

function assertAdminStays(vault: Vault, before: PersonRow, after: PersonRow): void {
  if (!administers(before) || administers(after)) return
  if (personQueries(vault.db).otherAdmins.get({ but: before.id }) === undefined) throw new Refusal('last-admin', 'Nobody else can administer the vault. Make another administrator first.')
}

/** Who is asking. A token is told by its own name and sites, with its owner's e-mail and no role. */
export function me(vault: Vault, actor: PersonActor | TokenActor): Me {
  const person = findPerson(vault, actor.kind === 'person' ? actor.id : actor.ownerId)
  const told = meAs(vault, person, actor.sites)
  return actor.kind === 'person' ? told : { ...told, name: actor.name, roles: [] }
}

/** As `me`, for who has just signed in. */
export function meOf(vault: Vault, id: number): Me {
  const person = findPerson(vault, id)
  return meAs(vault, person, person.siteIds.length === 0 ? null : person.siteIds)
}

function meAs(vault: Vault, { id, name, email, roles, shared }: PersonRow, bounds: SiteBounds): Me {
  const sites = listSites(vault.db, bounds).map(site => ({ id: site.id, name: site.name, timeZone: site.timeZone }))
  return { id, name, email, roles, sites, plant: plantOf(vault), empty: listSites(vault.db, null).length === 0, shared }
}
