import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { personState, updatePerson } from '#server/database/person/queries'
import { assertStrong, hashPassword } from './password'
import { findPerson } from './people'
import { endSessionsOf } from './sessions'
import { verifyOwnPassword } from './sign-in'

/** The hash of a new password of one's own, once the present one was given; failures count like failed sign-ins. */
export async function newOwnPassword(vault: Vault, actor: PersonActor, { current, password }: { current: string, password: string }): Promise<string> {
  if (await verifyOwnPassword(vault, actor, current) !== 'right') throw new Refusal('password-wrong', 'The present password is wrong; nothing was changed.')
  const { name, email } = findPerson(vault, actor.id)
  assertStrong(password, [name, email])
  return hashPassword(password, vault.scryptCost)
}

/** Sets it and ends the person's other sessions. */
export function setOwnPassword(vault: Vault, actor: PersonActor, passwordHash: string): void {
  vault.write(actor, (write) => {
    const before = findPerson(vault, actor.id)
    const after = { ...before, passwordHash, passwordSetAt: write.now, rev: before.rev + 1 }
    updatePerson(vault.db, after)
    endSessionsOf(vault, actor.id, actor.session)
    write.log({ act: 'password-set', id: actor.id, state: personState(after) })
  })
}
