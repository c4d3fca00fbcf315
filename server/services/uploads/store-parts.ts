import { createHash } from 'node:crypto'
import type { UploadFields } from '#shared/api/uploads'
import { Refusal } from '#shared/errors/refusal'
import { formOf } from '#shared/settings/read'
import { personOf, tokenOf } from '#server/database/actor'
import type { Write } from '#server/database/client'
import { contentIdOf, insertContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import { insertUpload } from '#server/database/upload/queries'
import type { Ingested } from './ingest'

/** The file as it came. */
export interface SentFile { readonly bytes: Uint8Array, readonly name: string | null }

/** Where a version or sighting comes from: a file that is coming in, or one that waited in the tray. */
export interface Source {
  readonly sha256: string
  readonly name: string | null
  readonly sender: Sender
  /** The id of the stored bytes; stores them where they are not there yet. */
  readonly uploadId: () => number
}
/** A drive’s own list is delimited text, whatever its first sign is. */
type Laid = Pick<UploadFields, 'layout'>
export interface Sender { readonly personId: number, readonly tokenId: number | null, readonly peer: string }

/** A file that is coming in with this write. */
export function sourceOf(db: VaultDb, write: Write, sent: SentFile, fields: Laid): Source {
  return { sha256: fileHash(sent), name: sent.name, sender: senderOf(write), uploadId: () => storeUploadBytes(db, write, sent, fields) }
}

const fileHash = ({ bytes }: SentFile) => createHash('sha256').update(bytes).digest('hex')

/** Who answers for what the write stores, and with which token it came. */
function senderOf({ actor }: Write): Sender {
  const personId = personOf(actor)
  if (personId === null) throw new Refusal('role', 'A file is sent by a person, or by a token that a person answers for.')
  return { personId, tokenId: tokenOf(actor), peer: actor.peer }
}

/** Keeps the bytes for good and logs them by their hash. Answers the upload's id. */
export function storeUploadBytes(db: VaultDb, write: Write, sent: SentFile, { layout }: Laid): number {
  const row = { sha256: fileHash(sent), size: sent.bytes.length, form: layout === undefined ? formOf(sent.bytes) : 'csv', name: sent.name, receivedAt: write.now, ...senderOf(write) }
  const id = insertUpload(db, row, sent.bytes)
  write.log({ act: 'upload-received', id, state: { id, ...row } })
  return id
}

/** The id of the content, stored and logged where it was never seen. */
export function storeContent(db: VaultDb, write: Write, { hashes, text }: Pick<Ingested, 'hashes' | 'text'>): number {
  const known = contentIdOf(db, hashes.contentHash)
  if (known !== undefined) return known
  const id = insertContent(db, hashes.contentHash, text)
  write.log({ act: 'content-stored', id, state: { id, hash: hashes.contentHash, size: Buffer.byteLength(text) } })
  return id
}
