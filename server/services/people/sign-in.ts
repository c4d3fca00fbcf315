import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { personQueries } from '#server/database/person/queries'
import type { PersonRow } from '#server/database/person/table'
import { hashPassword, verifyPassword } from './password'
import { throttled } from './throttle'

const nobody = new WeakMap<Vault, Promise<string>>()

/** A hash that no password meets: an unknown e-mail takes as long as a known one. */
function emptyHash(vault: Vault): Promise<string> {
  const known = nobody.get(vault) ?? hashPassword('', vault.scryptCost)
  nobody.set(vault, known)
  return known
}

/** Whose e-mail and password these are; refuses alike whatever was wrong, and `throttled` after too many failures. */
export async function signIn(vault: Vault, email: string, password: string, peer: string): Promise<PersonRow> {
  const found = await throttled(vault, email, peer, async () => {
    const person = personQueries(vault.db).byEmail.get({ email })
    const usable = person !== undefined && person.endedAt === null && person.passwordHash !== null
    const right = await verifyPassword(usable && person.passwordHash !== null ? person.passwordHash : await emptyHash(vault), password)
    return usable && right ? person : null
  })
  if (found === null) throw new Refusal('sign-in-failed', 'E-mail or password is wrong.')
  personQueries(vault.db).signedIn.run({ id: found.id, now: vault.now() })
  return found
}

/** Whether the password is the person's own; 'none' where they have none. Failures count like failed sign-ins. */
export async function verifyOwnPassword(vault: Vault, actor: PersonActor, password: string): Promise<'right' | 'wrong' | 'none'> {
  const person = personQueries(vault.db).byId.get({ id: actor.id })
  const hash = person?.passwordHash
  if (person === undefined || hash === null || hash === undefined) return 'none'
  const right = await throttled(vault, person.email, actor.peer, async () => await verifyPassword(hash, password) ? true : null)
  return right === null ? 'wrong' : 'right'
}
