import { closeSync, openSync, readSync } from 'node:fs'
import type { Attachment } from '#shared/api/attachments'
import { Refusal } from '#shared/errors/refusal'
import { personOf, tokenOf, type Actor } from '#server/database/actor'
import { attachmentQueries } from '#server/database/attachment/queries'
import type { AttachmentKind } from '#server/database/attachment/table'
import type { Vault } from '#server/database/client'
import { refreshAxisState } from '../axes/axis-state'
import { versionRow } from '../versions/read-version'
import { readAttachment } from './read-attachments'

/** A file that came in whole and waits on the disk. */
export interface ComeFile { readonly path: string, readonly size: number, readonly sha256: string, readonly name: string | null, readonly mediaType: string }

const chunkSize = 256 * 1024

/** Keeps the file with the version, unread. Each file once a version; logged by its hash. */
export function attach(vault: Vault, actor: Actor, versionId: number, { path, size, sha256, name, mediaType }: ComeFile, { kind = 'drive-backup', note }: { kind?: AttachmentKind | undefined, note?: string | undefined }): Attachment {
  return vault.write(actor, (write) => {
    const { db } = vault
    const queries = attachmentQueries(db)
    const version = versionRow(db, versionId)
    const personId = personOf(actor)
    if (personId === null) throw new Refusal('role', 'A file is attached by a person, or by a token that a person answers for.')
    if (queries.same.get({ versionId, sha256 })) throw new Refusal('taken', `This very file is attached to version ${version.number} already.`)
    const row = { versionId, kind, name: name ?? `${kind}-${sha256.slice(0, 8)}`, mediaType, note: note ?? null, size, sha256, receivedAt: write.now, personId, tokenId: tokenOf(actor), peer: actor.peer }
    const id = queries.insert(row)
    let seq = 0
    for (const bytes of chunksOf(path)) queries.insertChunk({ attachmentId: id, seq: seq++, bytes })
    write.log({ act: 'attachment-stored', id, state: { id, ...row } })
    refreshAxisState(db, version.axisId)
    return readAttachment(db, id)
  })
}

/** One chunk in memory at a time; each is a copy, since the statement may keep it. */
function* chunksOf(path: string): Generator<Buffer> {
  const file = openSync(path, 'r')
  try {
    for (;;) {
      const chunk = Buffer.alloc(chunkSize)
      const read = readSync(file, chunk)
      if (read === 0) return
      yield chunk.subarray(0, read)
    }
  }
  finally {
    closeSync(file)
  }
}
