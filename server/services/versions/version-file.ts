import type { SettingsFile } from '#shared/settings/types'
import { writeCsv } from '#shared/settings/write-csv'
import { writeJson } from '#shared/settings/write-json'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { readUploadBytes, uploadQueries } from '#server/database/upload/queries'
import { entryText } from './entry-file'
import { fileOf, versionRow } from './read-version'

/** A file to hand out; `etag` stands for its very bytes. */
export interface HandedOut { readonly bytes: Buffer, readonly mediaType: string, readonly name: string, readonly etag: string }

const csv = 'text/csv; charset=utf-8'
export const mediaTypes = { json: 'application/json', csv, entry: csv } as const
/** What the name of such a file ends with. */
export const fileEnds = { json: '.json', csv: '.csv', entry: '-list.csv' } as const

/** The file of a version: written from content and identity, or byte for byte as it came. */
export function versionFile({ db }: Vault, id: number, form: 'json' | 'csv' | 'entry' | 'original'): HandedOut {
  const row = versionRow(db, id)
  const tag = judgingQueries(db).axis.get({ id: row.axisId })?.axis.tag ?? `axis-${row.axisId}`
  if (form === 'original') {
    const facts = uploadQueries(db).facts.get({ id: row.uploadId })
    const came = facts?.form ?? 'json'
    // The encoding of a CSV that came in is told by its bytes: no charset is claimed for it.
    return { bytes: readUploadBytes(db, row.uploadId), mediaType: came === 'csv' ? 'text/csv' : mediaTypes.json, name: facts?.name ?? `${tag}-v${row.number}.${came}`, etag: facts?.sha256 ?? '' }
  }
  const file = fileOf(db, row)
  const text = textOf(db, file, form)
  return { bytes: Buffer.from(text, 'utf8'), mediaType: mediaTypes[form], name: `${tag}-v${row.number}${fileEnds[form]}`, etag: etagOf(db, row, form) }
}

/** The drive's own list changes with the nameplate. */
function etagOf(db: VaultDb, { id, model }: VersionRow, form: 'json' | 'csv' | 'entry'): string {
  return form === 'entry' ? `${id}-entry-${judgingQueries(db).nameplate.get({ model })?.revision ?? 0}` : `${id}-${form}`
}

/** The file in one of the forms; in the drive's own list by the entry table of its model. */
export function textOf(db: VaultDb, file: SettingsFile, form: 'json' | 'csv' | 'entry'): string {
  if (form === 'entry') return entryText(db, file)
  return form === 'json' ? writeJson(file) : writeCsv(file)
}
