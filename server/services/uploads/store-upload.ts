import type { UploadFields, UploadSeen, UploadStored } from '#shared/api/uploads'
import { Refusal } from '#shared/errors/refusal'
import type { FormatError } from '#shared/settings/types'
import type { Actor } from '#server/database/actor'
import type { Vault, Write } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import type { TrayProblem } from '#server/database/schema'
import { keepInTray } from '../tray/keep'
import { personIn, personName } from '../versions/summary'
import { planUpload, readSent } from './plan-upload'
import { sourceOf, type SentFile } from './store-parts'
import { storeSighting, storeVersion } from './store-version'

export type UploadOutcome
  = | { readonly outcome: 'version', readonly answer: UploadStored }
    | { readonly outcome: 'sighting', readonly answer: UploadSeen }
    | { readonly outcome: 'tray', readonly answer: { tray: number, problem: TrayProblem, detail: string } }
    | { readonly outcome: 'unreadable', readonly refusal: Refusal }

/** Stores what came in, whatever it is: a version, a sighting, or a file in the tray; one write for all of it. */
export function storeUpload(vault: Vault, actor: Actor, sent: SentFile, fields: UploadFields): UploadOutcome {
  assertPeople(vault.db, fields)
  const read = readSent(vault.db, sent.bytes, fields)
  return vault.write(actor, (write): UploadOutcome => {
    const { db } = vault
    const plan = planUpload(db, actor, read, fields, Date.parse(write.now))
    if (plan.outcome === 'version') return { outcome: 'version', answer: storeVersion(db, write, sourceOf(db, write, sent, fields), fields, plan) }
    if (plan.outcome === 'sighting') return { outcome: 'sighting', answer: storeSighting(db, write, sourceOf(db, write, sent, fields), fields, plan) }
    if (plan.outcome === 'unplaced') {
      const { problem, detail, siteId } = plan.unplaced
      const tray = keepInTray(db, write, sent, fields, { problem, detail, siteId, errors: [], more: 0, ingested: plan.ingested })
      return { outcome: 'tray', answer: { tray, problem, detail } }
    }
    return { outcome: 'unreadable', refusal: keepUnreadable(db, write, sent, fields, plan) }
  })
}

function assertPeople(db: VaultDb, { changedBy, allowedBy }: UploadFields): void {
  for (const [name, text] of Object.entries({ changedBy, allowedBy })) {
    const id = personIn(text ?? null)
    if (id === null || personName(db, id) !== undefined) continue
    throw new Refusal('input', `?${name}: there is no person ${id}.`, { errors: [{ at: `?${name}`, code: 'not-found', message: `there is no person ${id}` }] })
  }
}

function keepUnreadable(db: VaultDb, write: Write, sent: SentFile, fields: UploadFields, { errors: found, more }: { errors: readonly FormatError[], more: number }): Refusal {
  const errors = found.map(wellFormed)
  const first = errors[0]
  const detail = first ? `${first.message}${errors.length + more > 1 ? ` And ${errors.length + more - 1} more.` : ''}` : 'The file cannot be read.'
  const tray = keepInTray(db, write, sent, fields, { problem: 'unreadable', detail, siteId: null, errors, more, ingested: null })
  return new Refusal('settings-unreadable', detail, { errors, more, tray })
}

/** An error quotes the file, which may hold half a surrogate pair: that has no UTF-8, and would keep the error out of the log. */
function wellFormed(error: FormatError): FormatError {
  const { at, message, value, meant } = error
  return { ...error, at: at.toWellFormed(), message: message.toWellFormed(), ...(value === undefined ? {} : { value: value.toWellFormed() }), ...(meant === undefined ? {} : { meant: meant.toWellFormed() }) }
}
