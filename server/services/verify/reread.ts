import { readEntryFile } from '#shared/settings/entry-table/read-entry'
import { readSettings } from '#shared/settings/read'
import type { Entry } from '#shared/trail/entry'
import { readContentText } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import { readUploadBytes } from '#server/database/upload/queries'
import { versionQueries } from '#server/database/version/queries'
import { engineVersion, ingest } from '../uploads/ingest'
import { foldRegister } from './as-of'

/** `other`: files that a drive's own layout or another reader made sense of, which today's cannot be held to. */
export interface Reread { files: number, other: number, notes: string[] }

/**
 * Reads the bytes of every version with today's reader and notes where another content comes of them. A note is no damage:
 * readers learn; what was stored stays. Give it every entry in order.
 */
export function rereadFiles(db: VaultDb): { readonly read: (entry: Entry) => void, readonly reread: Reread } {
  const register = foldRegister()
  const reread: Reread = { files: 0, other: 0, notes: [] }
  return {
    reread,
    read: (entry) => {
      register.read(entry)
      if (entry.act !== 'version-stored') return
      const version = versionQueries(db).byId.get({ id: Number(entry.subject.id) })
      const against = version && register.against(db, version.axisId, version.unitId)
      if (!version || !against) return
      const nameplate = against.nameplate?.nameplate
      const ownLayout = version.engine.includes(', entry table of ')
      if (!version.engine.startsWith(engineVersion) || (ownLayout && !nameplate?.entryTable)) {
        reread.other += 1
        return
      }
      const bytes = readUploadBytes(db, version.uploadId)
      const outcome = ownLayout && nameplate
        ? readEntryFile(bytes, nameplate, { serial: version.file.unit.serial, exportedAt: version.file.exportedAt, ...(version.firmware === null ? {} : { firmware: version.firmware }) })
        : readSettings(bytes, version.file.normalised.decimal === 'comma' ? { decimal: 'comma' } : {})
      reread.files += 1
      if (!outcome.ok) reread.notes.push(`version ${version.id} is refused today: ${outcome.errors[0]?.message ?? 'no reason'}`)
      else if (ingest(outcome.value, nameplate?.dictionary).text !== readContentText(db, version.contentId).text) reread.notes.push(`version ${version.id} reads differently today`)
    },
  }
}
