import type { TrayItem } from '#shared/api/uploads'
import { Refusal } from '#shared/errors/refusal'
import type { Actor } from '#server/database/actor'
import type { Vault } from '#server/database/client'
import type { VaultDb } from '#server/database/prepared'
import { trayQueries, waitingGroups, type TrayItemRow } from '#server/database/tray/queries'
import { readUploadBytes } from '#server/database/upload/queries'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import type { HandedOut } from '../versions/version-file'
import { mediaTypes } from '../versions/version-file'

/** Files that wait, oldest first; equal content of one serial stands in one line. */
export function listTray({ db }: Vault, actor: Actor, query: PageQuery): { items: TrayItem[], next: string | null } {
  const rows = waitingGroups(db, actor.sites, afterOf(query), limitOf(query) + 1)
  return pageOf(rows, query, row => row.tray.id, ({ tray, upload, copies, sentBy, token, guessTag }) => ({
    id: tray.id, problem: tray.problem, detail: tray.detail, errors: tray.errors, more: tray.more, name: upload.name, bytes: upload.size, sha256: upload.sha256,
    receivedAt: upload.receivedAt, sentBy: token === null ? sentBy : `${token} (${sentBy})`, serial: tray.serial, model: tray.model, capturedAt: tray.capturedAt, siteId: tray.siteId, copies,
    guess: tray.guessAxisId !== null && guessTag !== null ? { axisId: tray.guessAxisId, tag: guessTag, why: tray.guessWhy ?? '' } : null,
  }))
}

/** A file that still waits; 409 where it was settled. */
export function waitingItem(db: VaultDb, id: number): TrayItemRow {
  const row = trayQueries(db).byId.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such file in the tray.')
  if (row.settled) throw new Refusal('tray-settled', `This file was ${row.settled} already.`)
  return row
}

/** The bytes as they came, those of settled files too. */
export function trayFile({ db }: Vault, id: number): HandedOut {
  const row = trayQueries(db).byId.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such file in the tray.')
  const { form, name, sha256 } = row.upload
  return { bytes: readUploadBytes(db, row.tray.uploadId), mediaType: form === 'csv' ? 'text/csv' : mediaTypes.json, name: name ?? `tray-${id}.${form}`, etag: sha256 }
}
