import { Refusal } from '#shared/errors/refusal'
import type { SettingsFile } from '#shared/settings/types'
import { readContent } from '#server/database/content/queries'
import type { VaultDb } from '#server/database/prepared'
import type { VersionRow } from '#server/database/schema'
import { versionQueries } from '#server/database/version/queries'
import { spokenPlace, valueWords } from '../change-words'
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
  const told = byRow(own)
  const errors = told.slice(0, 100).map(entries => ({ at: entries[0].change.at, code: 'four-eyes', message: sentence(entries) }))
  throw new Refusal('four-eyes', `${errors[0]?.message ?? ''} Another planner marks it.`, { errors, more: told.length - errors.length })
}

type Entries = readonly [BroughtIn, ...BroughtIn[]]

/** Values of one row that one version brought in are one line: a row put in changes every value of the rows behind it. */
function byRow(own: readonly BroughtIn[]): Entries[] {
  const rows = new Map<string, [BroughtIn, ...BroughtIn[]]>()
  for (const entry of own) {
    const { section, row, field } = entry.change
    const key = `${entry.version.number} ${section} ${row ?? field}`
    const known = rows.get(key)
    if (known) known.push(entry)
    else rows.set(key, [entry])
  }
  return [...rows.values()]
}

const before = (db: VaultDb, { axisId, orderAt, number }: VersionRow) => versionQueries(db).before.get({ axisId, at: orderAt, number })

/** Who answers for a version: changed by where that names a person, else who stored it; with a token that is its owner. */
function runVersion(db: VaultDb, row: VersionRow, content: RunVersion['content']): RunVersion {
  const id = personIn(row.changedBy) ?? row.storedBy
  return { number: row.number, content, broughtBy: { id, name: personName(db, id) ?? `person ${id}` } }
}

function sentence([first, ...rest]: Entries): string {
  const { change, version } = first
  const by = `brought in by ${version.broughtBy.name} in version ${version.number}.`
  if (rest.length > 0) return capital(`${change.section} ${change.row}: ${rest.length + 1} values were ${by}`)
  return capital(`${spokenPlace(change)} ${valueWords(change)} was ${by}`)
}

const capital = (words: string) => words.charAt(0).toUpperCase() + words.slice(1)
