import type { VaultActor } from '#server/database/actor'
import { instantOf } from '#server/database/clock'
import type { Vault } from '#server/database/client'
import { letterQueries, moveLetter, type AddressedLetter } from '#server/database/letter/queries'
import { personQueries } from '#server/database/person/queries'
import { PostError, type Post } from '#server/mail/post'
import { barredFrom } from './access'
import { messageOf } from './text'

/*
 * What is promised. A letter that was written is handed over, or its line on the letters page says why not. It is handed over
 * twice only where the process dies between the mail server's "250" and our note of it (or that answer is lost): SMTP has no
 * way to ask. Both then bear one Message-ID, by which mail servers and readers know them for the same. Files are exactly one.
 *
 * A letter is taken under a lease, so that none is sent by two at once; a lease that ran out was held by a process that died.
 */

const minute = 60_000
const hour = 60 * minute

/** Longer than a mail server may take to answer, so that a letter under way is not taken again. */
const lease = 15 * minute
/** After each try in vain the pause grows; the last one repeats. */
const pauses = [minute, 5 * minute, 15 * minute, 30 * minute, hour, 2 * hour, 4 * hour, 8 * hour, 12 * hour]
/** "The give-up time generally needs to be at least 4-5 days" (RFC 5321, 4.5.4.1). */
const giveUpAfter = 5 * 24 * hour

export const postActor: VaultActor = { kind: 'vault', name: 'letters', sites: null, peer: '' }

type Taken = { readonly id: number, readonly going: AddressedLetter | null }

/** Sends every letter that is due, one after the other, until none is or `stopped` says so. Answers how many it took in hand. */
export async function sendDue(vault: Vault, post: Post, publicOrigin: string | null, stopped: () => boolean = () => false): Promise<number> {
  let count = 0
  for (let taken = takeNext(vault); taken !== null; taken = stopped() ? null : takeNext(vault)) {
    count += 1
    if (taken.going !== null) await hand(vault, post, taken.going, publicOrigin)
    if (!vault.sqlite.open) break
  }
  return count
}

/** Takes the next letter under a lease; one that its receiver must not have any more is dropped instead. */
function takeNext(vault: Vault): Taken | null {
  const queries = letterQueries(vault.db)
  if (queries.due.get({ now: vault.now() }) === undefined) return null
  return vault.write(postActor, ({ now }) => {
    const id = queries.due.get({ now })?.id
    const addressed = id === undefined ? undefined : queries.one.get({ id })
    if (id === undefined || addressed === undefined) return null
    const { letter } = addressed
    const barred = barredNow(vault, letter.personId, letter)
    if (barred !== null) {
      moveLetter(vault.db, id, { state: 'dropped', problem: barred, nextTryAt: null, leasedUntil: null, settledAt: now })
      return { id, going: null }
    }
    const attempts = letter.attempts + 1
    moveLetter(vault.db, id, { state: 'queued', attempts, leasedUntil: instantOf(Date.parse(now) + lease) })
    return { id, going: { ...addressed, letter: { ...letter, attempts } } }
  })
}

function barredNow(vault: Vault, personId: number, letter: AddressedLetter['letter']): string | null {
  const person = personQueries(vault.db).byId.get({ id: personId })
  return person === undefined ? 'The receiver is not registered.' : barredFrom(vault.db, person, letter)
}

async function hand(vault: Vault, post: Post, addressed: AddressedLetter, publicOrigin: string | null): Promise<void> {
  try {
    await post.send(messageOf(addressed, publicOrigin))
  }
  catch (error) {
    if (!(error instanceof PostError)) throw error
    if (vault.sqlite.open) putBack(vault, addressed.letter, error)
    return
  }
  if (!vault.sqlite.open) return
  vault.write(postActor, ({ now }) => {
    moveLetter(vault.db, addressed.letter.id, { state: 'sent', nextTryAt: null, leasedUntil: null, settledAt: now, problem: null })
  })
}

/** Tries again after a pause, unless the other side refused for good or it was tried long enough. */
function putBack(vault: Vault, { id, attempts, madeAt }: AddressedLetter['letter'], { code, message }: PostError): void {
  vault.write(postActor, ({ now }) => {
    const next = Date.parse(now) + (pauses[Math.min(attempts, pauses.length) - 1] ?? minute)
    const over = code === 'refused' || next > Date.parse(madeAt) + giveUpAfter
    moveLetter(vault.db, id, over
      ? { state: 'failed', problem: message, nextTryAt: null, leasedUntil: null, settledAt: now }
      : { state: 'queued', problem: message, nextTryAt: instantOf(next), leasedUntil: null })
  })
}
