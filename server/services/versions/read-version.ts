import type { VersionOne, VersionSummary } from '#shared/api/versions'
import { Refusal } from '#shared/errors/refusal'
import type { Content, SettingsFile } from '#shared/settings/types'
import { schemaName } from '#shared/settings/types'
import { readJudgement } from '#server/database/check/queries'
import type { Vault } from '#server/database/client'
import { readContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { uploadQueries } from '#server/database/upload/queries'
import { versionQueries } from '#server/database/version/queries'
import { afterOf, limitOf, pageOf, type PageQuery } from '../page'
import { waivedOnWire } from '../waivers/accepted'
import { contentOnWire, judgedOnWire } from '../wire'
import { summaryOnWire, versionSummary } from './summary'

/** The row of a version; 404 where there is none. */
export function versionRow(db: VaultDb, id: number): VersionRow {
  const row = versionQueries(db).byId.get({ id })
  if (!row) throw new Refusal('not-found', 'There is no such version.')
  return row
}

/** One version, whole: its line in a list, content, judgement, and what the file said besides. */
export function readVersion({ db, now }: Vault, id: number): VersionOne {
  const row = versionRow(db, id)
  const { changes, checks, ...summary } = versionSummary(db, id)
  const judgement = readJudgement(db, id)
  const { unit, exportedAt, exportedBy, note, readings, normalised } = row.file
  const { rounded, converted, encoding, delimiter, decimal } = normalised
  const content = readContent(db, row.contentId)
  const upload = uploadQueries(db).facts.get({ id: row.uploadId })
  return {
    ...summary, changeCounts: changes, checkCounts: checks,
    content: contentOnWire(content), checks: waivedOnWire(db, row.axisId, judgement, () => content, now()), judged: judgedOnWire(judgement),
    unit: { ...unit }, exportedAt, exportedBy: exportedBy ?? null, note: note ?? null, readings: { ...readings },
    upload: { name: upload?.name ?? null, bytes: upload?.size ?? 0, sha256: upload?.sha256 ?? '', form: upload?.form ?? 'json' },
    normalised: { rounded, converted, encoding, ...(delimiter ? { delimiter } : {}), ...(decimal ? { decimal } : {}) },
  }
}

export function readVersionByNumber(vault: Vault, axisId: number, number: number): VersionOne {
  const found = versionQueries(vault.db).byNumber.get({ axisId, number })
  if (!found) throw new Refusal('not-found', `This axis has no version ${number}.`)
  return readVersion(vault, found.id)
}

/** The versions of an axis, newest number first. */
export function listVersions({ db }: Vault, axisId: number, query: PageQuery): { items: VersionSummary[], next: string | null } {
  const rows = versionQueries(db).page.all({ axisId, below: afterOf(query, Number.MAX_SAFE_INTEGER), limit: limitOf(query) + 1 })
  return pageOf(rows, query, row => row.version.number, row => summaryOnWire(db, row))
}

/** The version as a settings file: its content, which the caller may have read already, with what the file said besides. */
export function fileOf(db: VaultDb, row: VersionRow, content: Content = readContent(db, row.contentId)): SettingsFile {
  const { normalised: _receipt, ...facts } = row.file
  return { schema: schemaName, ...facts, ...content }
}
