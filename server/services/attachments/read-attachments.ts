import type { Attachment } from '#shared/api/attachments'
import { Refusal } from '#shared/errors/refusal'
import { attachmentBytes, attachmentQueries, type NamedAttachment } from '#server/database/attachment/queries'
import type { Vault } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'

function onWire({ id, versionId, kind, name, mediaType, note, size, sha256, receivedAt, by, token, serial, model }: NamedAttachment): Attachment {
  return { id, versionId, kind, name, mediaType, note, size, sha256, receivedAt, by: token === null ? by : `${token} (${by})`, unit: { serial, model } }
}

/** 404 where there is none. */
export function readAttachment(db: VaultDb, id: number): Attachment {
  const found = attachmentQueries(db).named.get({ id })
  if (!found) throw new Refusal('not-found', 'There is no such attachment.')
  return onWire(found)
}

/** Of one version, the drive tool's own backups first. */
export function listAttachments(db: VaultDb, versionId: number): { items: Attachment[] } {
  return { items: attachmentQueries(db).ofVersion.all({ versionId }).map(onWire) }
}

/** An attachment on its way out. */
export interface AttachmentFile { readonly chunks: Iterable<Buffer>, readonly size: number, readonly mediaType: string, readonly name: string, readonly etag: string }

/** For download under its own name; the browser is never told to open it as anything but a picture. */
export function attachmentFile({ db }: Vault, id: number): AttachmentFile {
  const { name, mediaType, size, sha256 } = readAttachment(db, id)
  const shown = ['image/jpeg', 'image/png', 'image/webp'].includes(mediaType)
  return { chunks: attachmentBytes(db, { id, sha256, size }), size, mediaType: shown ? mediaType : 'application/octet-stream', name, etag: sha256 }
}
