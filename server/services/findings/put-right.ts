import type { FieldChange } from '#shared/diff/types'
import { Refusal } from '#shared/errors/refusal'
import type { Content, ExtraValue } from '#shared/settings/types'
import { readContent } from '#server/database/content/queries'
import { findingQueries } from '#server/database/finding/queries'
import type { FindingRow } from '#server/database/finding/table'
import { readJudgement } from '#server/database/check/queries'
import type { VaultDb } from '#server/database/prepared'
import { versionQueries } from '#server/database/version/queries'
import { spokenPlace, valueWords } from '../change-words'
import { standingStops } from './stops'

/** Beyond that a finding's list is not looked through: a version that puts right is that of one axis. */
const most = 1000

/** Refuses a version that does not show it: of another axis, older, void, or one that still holds what the finding is about. */
export function assertPutRight(db: VaultDb, finding: FindingRow, versionId: number): void {
  const version = versionQueries(db).byId.get({ id: versionId })
  const showings = findingQueries(db).versions.all({ findingId: finding.id, limit: most }).filter(({ row }) => row.axisId === version?.axisId)
  const last = showings.at(-1)
  if (!version || !last) throw unfit('It is no version of an axis that this finding names.')
  if (versionQueries(db).voidOf.get({ versionId })) throw unfit(`v${version.number} is void.`)
  if (last.number !== null && version.number <= last.number) throw unfit(`v${version.number} is not newer than v${last.number}, which shows what was found. Upload what the drive holds now, then name that version.`)
  const content = readContent(db, version.contentId)
  const still = showings.flatMap(({ row }) => row.changes).find(change => change.after !== undefined && same(valueAt(content, change), change.after))
  if (still) throw new Refusal('still-stands', `v${version.number} still holds it: ${spokenPlace(still)} ${valueWords(still)}.`)
  const stops = finding.cause === 'stop-check' ? standingStops(db, version.axisId, readJudgement(db, versionId), () => content, version.receivedAt).flatMap(({ results }) => results.map(({ message }) => message)) : []
  const kept = stops.find(message => showings.some(({ row }) => row.says.startsWith(message)))
  if (kept !== undefined) throw new Refusal('still-stands', `v${version.number} still stands under it: ${kept}`)
}

const unfit = (message: string) => new Refusal('input', message, { errors: [{ at: '/versionId', code: 'version', message }] })

function valueAt(content: Content, { section, row, field }: FieldChange): ExtraValue | undefined {
  if (section === 'file') return content.axisKind
  const lines: readonly object[] = section === 'move' ? content.moves.filter(({ move }) => move === row) : section === 'zone' ? content.zones.filter(({ zone }) => zone === row) : []
  const holder = (section === 'setup' ? content.setup : section === 'extra' ? content.extra : lines[0] ?? {}) as Readonly<Record<string, ExtraValue>>
  return Object.hasOwn(holder, field) ? holder[field] : undefined
}

function same(one: ExtraValue | undefined, other: ExtraValue): boolean {
  if (typeof one === 'object' && typeof other === 'object') return one.value === other.value && one.unit === other.unit
  return Object.is(one, other)
}
