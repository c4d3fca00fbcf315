import { writeCsv } from '#shared/settings/write-csv'
import { writeJson } from '#shared/settings/write-json'
import type { Vault } from '#server/database/client'
import { judgingQueries } from '#server/database/judging/queries'
import { readUploadBytes, uploadQueries } from '#server/database/upload/queries'
import { fileOf, versionRow } from './read-version'

/** A file to hand out; `etag` stands for its very bytes. */
export interface HandedOut { readonly bytes: Buffer, readonly mediaType: string, readonly name: string, readonly etag: string }

export const mediaTypes = { json: 'application/json', csv: 'text/csv; charset=utf-8' } as const

/** The file of a version: written from content and identity, or byte for byte as it came. */
export function versionFile({ db }: Vault, id: number, form: 'json' | 'csv' | 'original'): HandedOut {
  const row = versionRow(db, id)
  const tag = judgingQueries(db).axis.get({ id: row.axisId })?.axis.tag ?? `axis-${row.axisId}`
  if (form === 'original') {
    const facts = uploadQueries(db).facts.get({ id: row.uploadId })
    const came = facts?.form ?? 'json'
    // The encoding of a CSV that came in is told by its bytes: no charset is claimed for it.
    return { bytes: readUploadBytes(db, row.uploadId), mediaType: came === 'csv' ? 'text/csv' : mediaTypes.json, name: facts?.name ?? `${tag}-v${row.number}.${came}`, etag: facts?.sha256 ?? '' }
  }
  const file = fileOf(db, row)
  const text = form === 'json' ? writeJson(file) : writeCsv(file)
  return { bytes: Buffer.from(text, 'utf8'), mediaType: mediaTypes[form], name: `${tag}-v${row.number}.${form}`, etag: `${id}-${form}` }
}
