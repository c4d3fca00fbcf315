import { Refusal } from '#shared/errors/refusal'
import type { SettingsFile } from '#shared/settings/types'
import { readContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { formatPlace, valueWords } from '../change-words'
import { diffContextOf, type ReadAgainst } from '../uploads/read-against'
import { personIn, personName } from '../versions/summary'
import { harmBroughtIn, type BroughtIn, type RunVersion } from './four-eyes'

/** Refuses a marker who brought in a harm value of the version that the known-good in force does not carry; names the field and the person. */
export function assertFourEyes(db: VaultDb, marker: number, version: VersionRow, file: SettingsFile, against: ReadAgainst): void {
  const older = (function* () {
    for (let row = before(db, version); row; row = before(db, row)) yield runVersion(db, row, readContent(db, row.contentId))
  })()
  const brought = harmBroughtIn(runVersion(db, version, file), older, against.knownGood?.content ?? null, diffContextOf(against))
  const own = brought.filter(entry => entry.version.broughtBy.id === marker)
  if (own.length === 0) return
  const errors = own.slice(0, 100).map(entry => ({ at: entry.change.at, code: 'four-eyes', message: sentence(entry) }))
  throw new Refusal('four-eyes', `${errors[0]?.message ?? ''} Another planner marks it.`, { errors, more: own.length - errors.length })
}

const before = (db: VaultDb, { axisId, orderAt, number }: VersionRow) => versionQueries(db).before.get({ axisId, at: orderAt, number })

/** Who answers for a version: changed by where that names a person, else who stored it; with a token that is its owner. */
function runVersion(db: VaultDb, row: VersionRow, content: RunVersion['content']): RunVersion {
  const id = personIn(row.changedBy) ?? row.storedBy
  return { number: row.number, content, broughtBy: { id, name: personName(db, id) ?? `person ${id}` } }
}

function sentence({ change, version }: BroughtIn): string {
  return `${formatPlace(change)} ${valueWords(change)} was brought in by ${version.broughtBy.name} in version ${version.number}.`
}
