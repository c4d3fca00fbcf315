import type { z } from 'zod'
import { letterKindNames, termsOf, type letterChoiceBody, type OwnLetters, type watchBody } from '#shared/api/letters'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { putChoice } from '#server/database/letter/queries'
import { putWatch, watchQueries } from '#server/database/watch/queries'
import { assertPlace } from '../places/bounds'
import { wants } from './access'

/** The kinds of letters that the person's roles and sites allow, each with what holds, and the places they watch. */
export function ownLetters({ db }: Vault, actor: PersonActor): OwnLetters {
  return {
    choices: letterKindNames.filter(kind => mayChoose(actor, kind)).map((kind) => {
      const { says, reach } = termsOf(kind)
      return { kind, says, reach, wanted: wants(db, { id: actor.id, roles: [...actor.roles] }, kind) }
    }),
    watches: watchQueries(db).ofPerson.all({ personId: actor.id }),
  }
}

const mayChoose = ({ roles, sites }: PersonActor, kind: (typeof letterKindNames)[number]) =>
  roles.some(role => termsOf(kind).may.includes(role)) && (termsOf(kind).reach !== 'vault' || sites === null)

export function chooseLetter(vault: Vault, actor: PersonActor, { kind, wanted }: z.output<typeof letterChoiceBody>): OwnLetters {
  return vault.write(actor, (write) => {
    if (!mayChoose(actor, kind)) throw new Refusal('role', 'Letters of this kind go to other roles, or to people of all sites.')
    const row = putChoice(vault.db, { personId: actor.id, kind, wanted, chosenAt: write.now })
    write.log({ act: 'letter-chosen', id: row.id, state: row })
    return ownLetters(vault, actor)
  })
}

/** Watches a place of one's sites, or no more. */
export function watchPlace(vault: Vault, actor: PersonActor, { scope, scopeId, watched }: z.output<typeof watchBody>): OwnLetters {
  return vault.write(actor, (write) => {
    if (watched) assertPlace(vault, actor, scope, scopeId, '/scopeId')
    const row = putWatch(vault.db, { personId: actor.id, scope, scopeId, watched, chosenAt: write.now })
    write.log({ act: 'watch-set', id: row.id, state: row })
    return ownLetters(vault, actor)
  })
}
