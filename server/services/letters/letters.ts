import type { z } from 'zod'
import type { Letter, LetterOne, LetterPage, letterQuery } from '#shared/api/letters'
import { Refusal } from '#shared/errors/refusal'
import type { PersonActor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import { letterQueries, moveLetter, type AddressedLetter } from '#server/database/letter/queries'
import { composed } from '#server/mail/message'
import type { Post } from '#server/mail/post'
import { afterOf, limitOf, pageOf } from '../page'
import type { HandedOut } from '../versions/version-file'
import { letterText, messageOf } from './text'

/** The way letters leave by, and the address that they name. */
export interface Letterbox { readonly post: Post, readonly publicOrigin: string | null }

/** All letters, newest first, and what waits. */
export function listLetters(vault: Vault, { post, publicOrigin }: Letterbox, query: z.output<typeof letterQuery>): LetterPage {
  const rows = letterQueries(vault.db).page.all({ below: afterOf(query, Number.MAX_SAFE_INTEGER), state: query.state ?? null, limit: limitOf(query) + 1 })
  const { waiting, waitingSince } = readQueue(vault)
  return { ...pageOf(rows, query, ({ letter }) => letter.id, letterOnWire), queue: { waiting, waitingSince, way: post.way, publicUrl: publicOrigin !== null } }
}

/** How many letters wait, and since when the oldest does. */
export function readQueue({ db }: Vault): { waiting: number, waitingSince: string | null } {
  const row = letterQueries(db).waiting.get()
  return { waiting: row?.count ?? 0, waitingSince: row?.since ?? null }
}

export function readLetter(vault: Vault, { publicOrigin }: Letterbox, id: number): LetterOne {
  const addressed = addressedLetter(vault, id)
  return { ...letterOnWire(addressed), messageId: addressed.letter.messageId, text: letterText(addressed, publicOrigin) }
}

/** The letter as it leaves, whole, as an .eml file. */
export async function letterFile(vault: Vault, { post, publicOrigin }: Letterbox, id: number): Promise<HandedOut> {
  const addressed = addressedLetter(vault, id)
  const bytes = await composed(messageOf(addressed, publicOrigin), post.from)
  return { bytes, mediaType: 'message/rfc822', name: `letter-${id}.eml`, etag: addressed.letter.messageId }
}

/** Puts a letter at the head of the queue again, under its old Message-ID: a reader that has it knows it. Who may have it is judged again. */
export function sendAgain(vault: Vault, actor: PersonActor, id: number): Letter {
  return vault.write(actor, (write) => {
    const { letter } = addressedLetter(vault, id)
    if (letter.leasedUntil !== null && letter.leasedUntil > write.now) throw new Refusal('letter-under-way', 'The letter is being sent just now. Look again in a minute.')
    moveLetter(vault.db, id, { state: 'queued', attempts: 0, nextTryAt: write.now, leasedUntil: null, settledAt: null, problem: null })
    write.log({ act: 'letter-sent-again', id, state: { id, kind: letter.kind, personId: letter.personId, title: letter.title } })
    return letterOnWire(addressedLetter(vault, id))
  })
}

function addressedLetter({ db }: Vault, id: number): AddressedLetter {
  const found = letterQueries(db).one.get({ id })
  if (!found) throw new Refusal('not-found', `There is no letter ${id}.`)
  return found
}

function letterOnWire({ letter, name, email }: AddressedLetter): Letter {
  const { id, kind, title, path, state, madeAt, attempts, nextTryAt, settledAt, problem } = letter
  return { id, kind, to: { id: letter.personId, name, email }, title, path, state, madeAt, attempts, nextTryAt, settledAt, problem }
}
