import { readEntryFile } from '../settings/entry-table/read-entry'
import { writeEntryCsv } from '../settings/entry-table/write-entry'
import { contentOf } from '../settings/content'
import type { Nameplate } from '../settings/nameplate'
import type { FormatError, SettingsFile } from '../settings/types'
import { diffContents } from './diff'
import type { FieldChange } from './types'

/** What becomes of a file that is written in the drive's own list; nothing of weight is ever lost unsaid. */
export interface EntryLoss {
  /** Numbers that the table's steps and digits change: before as they are, after as the drive gets them. */
  readonly rounded: readonly FieldChange[]
  /** Values that the table has no place for, labels and comments aside. */
  readonly lost: readonly FieldChange[]
  /** The list could not be read back at all, as when rounding makes a zone's ends one; null: it could. */
  readonly fault: FormatError | null
}

/** Writes the list and reads it back: the difference is what the drive would not get. Throws 'no-entry-table' as the writer does. */
export function entryLoss(file: SettingsFile, nameplate: Pick<Nameplate, 'model' | 'axisKind' | 'entryTable'>): EntryLoss {
  // A kit's serial may be still to be written, which the reader takes for missing: it is no part of what is compared.
  const named = { ...file, unit: { serial: 'compared', model: file.unit.model } }
  const back = readEntryFile(new TextEncoder().encode(writeEntryCsv(named, nameplate)), nameplate, { serial: 'compared', exportedAt: file.exportedAt })
  if (!back.ok) return { rounded: [], lost: [], fault: back.errors[0] ?? null }
  const changes = diffContents(contentOf(file), back.value.content).filter(({ weight }) => weight !== 'text')
  const isRounded = ({ before, after }: FieldChange) => typeof before === 'number' && typeof after === 'number'
  return { rounded: changes.filter(isRounded), lost: changes.filter(change => !isRounded(change)), fault: null }
}
