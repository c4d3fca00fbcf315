import type { ReadBack } from '#shared/api/swaps'
import type { Verdict } from '#shared/diff/types'
import type { MissingKey } from '#shared/swap/types'
import type { VaultDb } from '#server/database/prepared'
import { swapQueries, type NamedReadBack } from '#server/database/swap/queries'
import { versionRow } from '../versions/read-version'
import { changesOnWire, type WireChange } from '../wire'

/** Keys that a model's firmware is known to lack; none where the firmware is not known. */
export function acceptedKeys(db: VaultDb, { model, firmware }: { model: string, firmware: string | null }): string[] {
  return firmware === null ? [] : swapQueries(db).gaps.all({ model, firmware }).map(({ key }) => key)
}

/** What an attempt says today: a key that was accepted since no longer makes it differ. */
export function verdictNow(db: VaultDb, { readBack }: NamedReadBack): Verdict | null {
  const { compared, verdict } = readBack
  if (!compared || !verdict) return null
  return compared.differences.length === 0 && missingNow(db, readBack).every(({ accepted }) => accepted) ? (verdict === 'identical' ? 'identical' : 'same') : 'differs'
}

function missingNow(db: VaultDb, { versionId, compared }: NamedReadBack['readBack']): MissingKey[] {
  if (!compared || versionId === null || compared.missingKeys.length === 0) return []
  const known = acceptedKeys(db, versionRow(db, versionId))
  return compared.missingKeys.map(missing => ({ ...missing, accepted: missing.accepted || known.includes(missing.key) }))
}

export const tolerated = (changes: readonly (Parameters<typeof changesOnWire>[0][number] & { readonly tolerance?: number })[]): (WireChange & { tolerance?: number })[] => changesOnWire(changes)

export function readBackOnWire(db: VaultDb, attempt: NamedReadBack): ReadBack {
  const { readBack, by, file, number } = attempt
  const { compared, versionId, kitCode } = readBack
  const compare = verdictNow(db, attempt)
  return {
    attempt: readBack.attempt, at: readBack.at, by, byId: readBack.byPerson, file, sha256: readBack.sha256, afterFirstMotion: readBack.afterFirstMotion,
    problem: readBack.problem, detail: readBack.detail, version: versionId === null || number === null ? null : { id: versionId, number },
    compare, differences: tolerated(compared?.differences ?? []), within: compared?.within.length ?? 0, aside: changesOnWire(compared?.aside ?? []),
    missingKeys: missingNow(db, readBack), rowsMissing: [...compared?.rowsMissing ?? []],
    scribeCode: compare !== null && compare !== 'differs' ? kitCode : compared?.scribeCode ?? null,
  }
}
