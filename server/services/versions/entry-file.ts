import { entryLoss } from '#shared/diff/entry-loss'
import type { FieldChange } from '#shared/diff/types'
import { Refusal } from '#shared/errors/refusal'
import { writeEntryCsv } from '#shared/settings/entry-table/write-entry'
import type { SettingsFile } from '#shared/settings/types'
import { judgingQueries } from '#server/database/judging/queries'
import type { VaultDb } from '#server/database/prepared'

const namedAtMost = 6

/**
 * The file in the own list of its model's drive. Refused where the model has no entry table, and where a value that matters would
 * be left out: what is missing in a list that is typed in at night, nobody sees.
 */
export function entryText(db: VaultDb, file: SettingsFile): string {
  const { model } = file.unit
  const nameplate = judgingQueries(db).nameplate.get({ model })?.nameplate
  if (!nameplate?.entryTable) throw new Refusal('no-entry-table', `${model} has no entry table, so nobody knows the drive’s own numbers. A planner makes it on the nameplate; until then take the JSON or CSV form.`)
  const { lost, fault } = entryLoss(file, nameplate)
  if (fault) throw new Refusal('entry-table-unfit', `By the entry table of ${model} the list would not read back: ${fault.message} Take the JSON or CSV form.`)
  if (lost.length > 0) throw new Refusal('entry-table-unfit', `The entry table of ${model} has no place for ${placesOf(lost)}. A planner adds it on the nameplate; until then take the JSON or CSV form.`, { errors: lost.slice(0, 100).map(({ at }) => ({ at, code: 'no-place', message: 'the entry table has no place for it' })) })
  return writeEntryCsv(file, nameplate)
}

function placesOf(lost: readonly FieldChange[]): string {
  const names = lost.map(({ section, row, field }) => row === undefined ? field : `${section} ${row} ${field}`)
  const more = names.length - namedAtMost
  return `${names.slice(0, namedAtMost).join(', ')}${more > 0 ? ` and ${more} more` : ''}`
}
